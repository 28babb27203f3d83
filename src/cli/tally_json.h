// The JSON of `tally --json`: the contract that scripts rely on.
#ifndef NEARPIT_CLI_TALLY_JSON_H_
#define NEARPIT_CLI_TALLY_JSON_H_

#include "cli/command.h"
#include "estimate/figures.h"
#include "session/survey_model.h"

namespace nearpit::cli {

Json tally_json(const Figures& figures, const SurveyModel& model);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_TALLY_JSON_H_
