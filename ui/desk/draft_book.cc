#include "desk/draft_book.h"

#include <utility>
#include <vector>

namespace nearpit::ui {

bool overtaken_draft(RecordDraft* draft, const SurveyModel& model) {
  return catch_up(draft, model) && typed_beside_why(*draft, model);
}

bool DraftBook::read(const SurveyModel& model) {
  bool overtaken = false;
  for (RecordDraft& draft : file_.read()) {
    touched_.insert(draft.pit);
    const bool changed = overtaken_draft(&draft, model);
    if (!typed_beside_why(draft, model)) continue;
    overtaken = overtaken || changed;
    drafts_[draft.pit] = std::move(draft);
  }
  return overtaken;
}

const RecordDraft* DraftBook::find(const std::string& label) const {
  const auto found = drafts_.find(label);
  return found == drafts_.end() ? nullptr : &found->second;
}

Status DraftBook::keep(const RecordDraft& draft, const SurveyModel& model) {
  if (!typed_anything(draft, model)) return forget(draft.pit);
  touched_.insert(draft.pit);
  drafts_[draft.pit] = draft;
  return write();
}

Status DraftBook::forget(const std::string& label) {
  touched_.insert(label);
  drafts_.erase(label);
  return write();
}

Status DraftBook::write() {
  std::vector<RecordDraft> all;
  for (RecordDraft& draft : file_.read()) {
    if (!touched_.contains(draft.pit)) all.push_back(std::move(draft));
  }
  for (const auto& [label, draft] : drafts_)
    all.push_back(draft);
  return file_.write(all);
}

}  // namespace nearpit::ui
