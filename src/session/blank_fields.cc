#include "session/blank_fields.h"

#include <algorithm>
#include <string>

#include "base/text.h"

namespace nearpit {

bool is_blank(const PitRecord& record, const std::string& field) {
  if (field == "crew") return record.crew.empty();
  if (field == "started_at") return record.started_at.empty();
  if (field == "dug_at") return record.dug_at.empty() || record.dug_at_defaulted;
  if (field == "depth_cm") return !record.depth_cm;
  if (field == "stop") return !record.stop;
  if (field == "mesh_mm") return !record.mesh_mm;
  if (field == "backfilled") return !record.backfilled;
  if (field == "bag") return record.bag.empty();
  if (field == "note") return record.note.empty();
  return false;
}

namespace {

void judge_entry(const SurveyModel& model, const std::string& label, const PitEntry& entry,
                 std::vector<FileProblem>* found) {
  if (entry.verdict.conflict != Conflict::kNone) {
    found->push_back({"conflict", label, std::to_string(entry.heads.size()) + " records of the pit disagree",
                      "log the pit again with 'why', which settles it"});
  }
  const PitRecord& record = entry.record();
  if (record.status != PitStatus::kDug) return;
  std::vector<std::string> blanks;
  for (const std::string& field : model.plan().require) {
    if (is_blank(record, field)) blanks.push_back(field);
  }
  if (blanks.empty()) return;
  found->push_back({"blank", label, "the plan requires " + list_in_words(blanks),
                    "log the pit again with " + std::string(blanks.size() > 1 ? "them" : "it")});
}

}  // namespace

std::vector<FileProblem> blank_fields(const SurveyModel& model) {
  std::vector<NodeId> ids;
  for (const auto& [id, entry] : model.survey().pits())
    ids.push_back(id);
  std::sort(ids.begin(), ids.end());
  std::vector<FileProblem> found;
  for (const NodeId id : ids)
    judge_entry(model, model.label(id), *model.survey().pit(id), &found);
  for (const auto& [label, entry] : model.survey().off_grid_pits())
    judge_entry(model, label, entry, &found);
  return found;
}

}  // namespace nearpit
