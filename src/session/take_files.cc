#include "session/take_files.h"

#include "exchange/pits_csv.h"
#include "exchange/text_file.h"
#include "record/action.h"

namespace nearpit {

Result<Applied> take_pits_table(Session& session, const std::string& path) {
  NEARPIT_ASSIGN(text, read_text_file(path));
  NEARPIT_ASSIGN(actions, read_pits_csv(text, path, session.model().plan()));
  return session.apply(actions);
}

Result<Applied> take_actions_file(Session& session, const std::string& path) {
  NEARPIT_ASSIGN(text, read_text_file(path));
  NEARPIT_ASSIGN(actions, read_actions(text, path));
  return session.apply(actions);
}

}  // namespace nearpit
