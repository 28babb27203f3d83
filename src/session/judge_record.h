// What a record action makes of a pit: the new whole record, from what is already known, what is given, and the survey's rules. Judges everything
// about the record itself; whether the design reaches the pit is judged after the whole batch (judge_batch.h).
#ifndef NEARPIT_SESSION_JUDGE_RECORD_H_
#define NEARPIT_SESSION_JUDGE_RECORD_H_

#include "base/clock.h"
#include "base/status.h"
#include "record/action.h"
#include "session/survey_model.h"

namespace nearpit {

// Errors are "FIELD: 'VALUE' …; legal: …" without the place.
Result<PitRecord> new_record(const SurveyModel& model, const PitName& pit, const RecordPit& given,
                             const std::string& why, const WallTime& now);

// Whether a record's as-dug place goes with the pit: within max_move_m of its node, with `moved` saying why; off the grid a place must be there.
Status check_place(const SurveyModel& model, const PitName& pit, const PitRecord& record);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_JUDGE_RECORD_H_
