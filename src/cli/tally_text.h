// The day's figures as a crew chief reads them: progress, clusters, then each figure with its likely range and what holds it back.
#ifndef NEARPIT_CLI_TALLY_TEXT_H_
#define NEARPIT_CLI_TALLY_TEXT_H_

#include <string>

#include "estimate/figures.h"
#include "session/survey_model.h"

namespace nearpit::cli {

// `day` is empty for all records.
std::string tally_text(const Figures& figures, const SurveyModel& model, const std::string& day);

}  // namespace nearpit::cli

#endif  // NEARPIT_CLI_TALLY_TEXT_H_
