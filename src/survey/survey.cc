#include "survey/survey.h"

#include <algorithm>
#include <unordered_set>
#include <utility>

namespace nearpit {
namespace {

PitState state_of(const PitRecord& record, const PositiveRule& rule) {
  switch (record.status) {
    case PitStatus::kDug:
      return rule.positive(record) ? PitState::kPositive : PitState::kNegative;
    case PitStatus::kNotDug:
      return record.reason && class_of(*record.reason) == ReasonClass::kGround ? PitState::kNotDugGround
                                                                               : PitState::kNotDugAccess;
    case PitStatus::kWithdrawn:
      break;
  }
  return PitState::kNoRecord;
}

PitEntry entry_of(std::vector<Head> heads, const PositiveRule& rule) {
  PitEntry entry;
  entry.verdict = judge_heads(heads, rule);
  entry.heads = std::move(heads);
  return entry;
}

}  // namespace

Survey::Survey(std::unique_ptr<const SurveyGround> ground) : ground_(std::move(ground)), list_(*ground_) {}

std::vector<NodeId> Survey::set_pit(NodeId id, std::vector<Head> heads) {
  std::vector<NodeId> changed{id};
  if (heads.empty()) {
    list_.set_state(id, PitState::kNoRecord, &changed);
    pits_.erase(id);
    return changed;
  }
  PitEntry entry = entry_of(std::move(heads), ground_->positive);
  list_.set_state(id, state_of(entry.record(), ground_->positive), &changed);
  pits_.insert_or_assign(id, std::move(entry));
  return changed;
}

void Survey::set_off_grid(const std::string& label, std::vector<Head> heads) {
  if (heads.empty()) {
    off_grid_.erase(label);
    return;
  }
  off_grid_.insert_or_assign(label, entry_of(std::move(heads), ground_->positive));
}

std::vector<NodeId> Survey::nodes_in(const ClosedArea& area) const {
  std::vector<NodeId> nodes;
  if (!area.polygon.empty()) {
    ground_->frame.each_inside(area.polygon, [&](NodeId id) { nodes.push_back(id); });
    return nodes;
  }
  const std::unordered_set<std::int32_t> rows(area.rows.begin(), area.rows.end());
  for (const Run& run : ground_->frame.runs()) {
    if (!rows.contains(run.row)) continue;
    for (NodeId id = run.start; id <= run.start + (run.last - run.first); ++id)
      nodes.push_back(id);
  }
  return nodes;
}

void Survey::mark_closed(const ClosedArea& area, int change, std::vector<NodeId>* changed) {
  if (area.open_again) return;
  for (const NodeId id : nodes_in(area))
    list_.add_closed(id, class_of(area.reason), change, changed);
}

std::vector<NodeId> Survey::forget_closed_area(const std::string& object) {
  std::vector<NodeId> changed;
  const auto before = closed_.find(object);
  if (before == closed_.end()) return changed;
  mark_closed(before->second, -1, &changed);
  closed_.erase(before);
  return changed;
}

std::vector<NodeId> Survey::set_closed_area(const std::string& object, ClosedArea area) {
  std::vector<NodeId> changed = forget_closed_area(object);
  mark_closed(area, +1, &changed);
  closed_.insert_or_assign(object, std::move(area));
  return changed;
}

std::vector<NodeId> Survey::set_stop_work(const std::string& object, StopWork stop) {
  std::vector<NodeId> changed;
  const auto mark = [&](const StopWork& which, int change) {
    if (which.lifted) return;
    for (NodeId id = 0; id < ground_->frame.size(); ++id) {
      if (distance_m(ground_->frame.ground(id), which.place) > which.distance_m) continue;
      list_.add_halt(id, change, &changed);
    }
  };
  if (const auto before = stops_.find(object); before != stops_.end()) mark(before->second, -1);
  mark(stop, +1);
  stops_.insert_or_assign(object, std::move(stop));
  return changed;
}

const PitEntry* Survey::pit(NodeId id) const {
  const auto found = pits_.find(id);
  return found == pits_.end() ? nullptr : &found->second;
}

const PitEntry* Survey::off_grid(const std::string& label) const {
  const auto found = off_grid_.find(label);
  return found == off_grid_.end() ? nullptr : &found->second;
}

bool Survey::opens_on_request(NodeId id) const {
  const PitEntry* entry = pit(id);
  return entry != nullptr && entry->record().opens_neighbours && !list_.in_design(id) &&
         list_.state(id) == PitState::kPositive;
}

bool Survey::may_be_asked_for(NodeId id) const {
  return !list_.in_design(id) && list_.state(id) == PitState::kNoRecord && !list_.closed(id);
}

bool Survey::asked_for(NodeId id) const {
  if (!may_be_asked_for(id)) return false;
  bool asked = false;  // pits open one another both ways
  ground_->each_opened(id, [&](NodeId other) { asked = asked || opens_on_request(other); });
  return asked;
}

std::vector<NodeId> Survey::asked() const {
  std::vector<NodeId> asked;
  for (const auto& [id, entry] : pits_) {
    if (!opens_on_request(id)) continue;
    ground_->each_opened(id, [&](NodeId other) {
      if (may_be_asked_for(other)) asked.push_back(other);
    });
  }
  std::sort(asked.begin(), asked.end());
  asked.erase(std::unique(asked.begin(), asked.end()), asked.end());
  return asked;
}

}  // namespace nearpit
