// The table of pits (PITS.csv) -> action values. Checks everything that does not depend on the survey's state: columns, words, numbers, times. Every finding is
// one line: FILE:LINE: COLUMN: "VALUE" is …; legal: ….
//
// Spaces around labels, words, names and numbers don't count; notes keep theirs. In a row of status not_dug a count or weight of zero is taken as empty;
// any other is an error.
#ifndef NEARPIT_EXCHANGE_PITS_CSV_H_
#define NEARPIT_EXCHANGE_PITS_CSV_H_

#include <string>
#include <string_view>
#include <vector>

#include "base/status.h"
#include "record/action.h"
#include "record/plan.h"

namespace nearpit {

// One RecordPit a row, in order of the rows, whatever its status; `by` and `why` as written, empty when not given.
Result<std::vector<Action>> read_pits_csv(std::string_view text, const std::string& file, const Plan& plan);

}  // namespace nearpit

#endif  // NEARPIT_EXCHANGE_PITS_CSV_H_
