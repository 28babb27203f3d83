// Half-typed records of one survey survive a crash: "drafts-<survey id>.json" in the user's folder (store/user_folder.h), never in the survey file.
#ifndef NEARPIT_SESSION_DRAFT_FILE_H_
#define NEARPIT_SESSION_DRAFT_FILE_H_

#include <string>
#include <vector>

#include "base/status.h"
#include "session/record_draft.h"

namespace nearpit {

class DraftFile {
 public:
  // Reads and makes nothing yet.
  DraftFile(std::string folder, const std::string& survey_id);

  // As written; no drafts when there is no file. A word that is no reason (a later program's) is left out and the draft keeps everything else.
  // A file that can't be read, is longer than 4 MiB or is not ours gives no drafts and is first moved to "….unreadable" ("….unreadable-2" and so on
  // when that is taken), so that nothing typed is lost. Call catch_up() (record_draft.h) on each.
  std::vector<RecordDraft> read() const;
  // Replaces the file durably, mode 0600; makes the folder; no drafts removes the file. Errors: can't be written; more than read() takes. Then the
  // drafts in the file are as they were.
  Status write(const std::vector<RecordDraft>& drafts) const;

 private:
  std::string folder_;
  std::string name_;
};

}  // namespace nearpit

#endif  // NEARPIT_SESSION_DRAFT_FILE_H_
