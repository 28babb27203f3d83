// Is the record complete? The fields that the plan requires of a finished record (`record.require`) and that are blank.
#ifndef NEARPIT_SESSION_BLANK_FIELDS_H_
#define NEARPIT_SESSION_BLANK_FIELDS_H_

#include <string>
#include <vector>

#include "session/survey_model.h"
#include "store/file_check.h"

namespace nearpit {

// Whether a dug pit's record says nothing of a field that a plan may require; a dug_at that is the time of saving says nothing.
bool is_blank(const PitRecord& record, const std::string& field);

// One finding a dug pit with blanks, and one a pit in conflict.
std::vector<FileProblem> blank_fields(const SurveyModel& model);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_BLANK_FIELDS_H_
