// Files of records and actions taken into a survey: read, checked, applied in one go.
#ifndef NEARPIT_SESSION_TAKE_FILES_H_
#define NEARPIT_SESSION_TAKE_FILES_H_

#include <string>

#include "base/status.h"
#include "session/session.h"

namespace nearpit {

// PITS.csv and ACTION.json of the command contract. Errors: every finding, one a line; then nothing was recorded.
Result<Applied> take_pits_table(Session& session, const std::string& path);
Result<Applied> take_actions_file(Session& session, const std::string& path);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_TAKE_FILES_H_
