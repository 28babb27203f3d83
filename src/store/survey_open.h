// The way into a file that may come from anywhere: refuse what is no survey file, tell damage, set what makes a save safe.
#ifndef NEARPIT_STORE_SURVEY_OPEN_H_
#define NEARPIT_STORE_SURVEY_OPEN_H_

#include <string>

#include "base/status.h"
#include "store/survey_handle.h"

namespace nearpit::store {

Result<SurveyFile::Handle> open_survey(const std::string& path, bool read_only);

// journal_mode DELETE, synchronous EXTRA; the file's journal mode may have been changed by another program.
Status make_saves_safe(Connection& db);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_SURVEY_OPEN_H_
