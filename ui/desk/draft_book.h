// Records of one survey that are half written on this device, by pit: on the disk with every touch, so that a crash or an empty battery loses nothing.
// Another window on the same survey keeps its own; what this one never touched is left alone.
#ifndef NEARPIT_UI_DESK_DRAFT_BOOK_H_
#define NEARPIT_UI_DESK_DRAFT_BOOK_H_

#include <map>
#include <set>
#include <string>

#include "session/draft_file.h"
#include "session/record_draft.h"

namespace nearpit::ui {

class DraftBook {
 public:
  DraftBook(const std::string& folder, const std::string& survey_id) : file_(folder, survey_id) {}

  // Reads what the disk holds. Drafts whose record says all of it already (the crash came after the save) are dropped. Whether a pit's record has
  // changed since its draft was begun.
  bool read(const SurveyModel& model);

  const std::map<std::string, RecordDraft>& all() const { return drafts_; }
  // Nothing when nothing is half written of the pit.
  const RecordDraft* find(const std::string& label) const;

  // Keeps the draft, or forgets it when nothing was typed. Errors: the disk refuses; it is then kept in memory alone.
  Status keep(const RecordDraft& draft, const SurveyModel& model);
  Status forget(const std::string& label);

 private:
  Status write();

  DraftFile file_;
  std::map<std::string, RecordDraft> drafts_;
  std::set<std::string> touched_;  // labels that are ours to say anything about
};

// The draft goes on from what stands now. Whether its pit's record has changed since it was begun and it still says something of its own.
bool overtaken_draft(RecordDraft* draft, const SurveyModel& model);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_DESK_DRAFT_BOOK_H_
