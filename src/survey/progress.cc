#include "survey/progress.h"

namespace nearpit {
namespace {

void count_entry(const PitEntry& entry, const PositiveRule& rule, Progress* progress) {
  const PitRecord& record = entry.record();
  progress->dug += record.status == PitStatus::kDug ? 1u : 0u;
  progress->not_dug += record.status == PitStatus::kNotDug ? 1u : 0u;
  progress->withdrawn += entry.withdrawn() ? 1u : 0u;
  progress->positive += rule.positive(record) ? 1u : 0u;
  progress->conflicts += entry.verdict.conflict != Conflict::kNone ? 1u : 0u;
}

void count_first_sample(const Survey& survey, Progress* progress) {
  const SurveyGround& ground = survey.ground();
  const DigList& list = survey.dig_list();
  progress->first_sample = static_cast<std::size_t>(ground.sample.nodes);
  std::size_t waiting = 0;
  for (NodeId id = 0; id < ground.frame.size(); ++id) {
    if (ground.sample.holds[static_cast<std::size_t>(id)] && (list.due(id) || list.halted(id))) ++waiting;
  }
  progress->first_sample_dug = progress->first_sample - waiting;
  progress->first_sample_open += waiting;
}

// Design pits that count as not dug: by record (counted already), or by standing in a closed area.
void count_closed(const Survey& survey, Progress* progress) {
  const DigList& list = survey.dig_list();
  for (NodeId id = 0; id < survey.ground().frame.size(); ++id) {
    if (list.not_dug(id, ReasonClass::kAccess)) ++progress->access_refused;
    const bool closed = list.state(id) == PitState::kNoRecord && list.in_design(id) && list.closed(id);
    progress->not_dug += closed ? 1u : 0u;
  }
}

}  // namespace

Progress progress_of(const Survey& survey) {
  Progress progress;
  const DigList& list = survey.dig_list();
  const PositiveRule& rule = survey.ground().positive;
  for (const auto& [id, entry] : survey.pits()) {
    count_entry(entry, rule, &progress);
    const bool first = survey.ground().sample.holds[static_cast<std::size_t>(id)];
    const bool outcome = entry.verdict.conflict == Conflict::kOutcome;
    if (outcome && list.in_design(id)) ++progress.outcome_conflicts;
    if (outcome && first) ++progress.first_sample_open;
    if (entry.withdrawn() || list.in_design(id)) continue;
    ++progress.judgement;
    const ChosenBy chosen = entry.record().chosen_by;
    if (chosen != ChosenBy::kJudgement && chosen != ChosenBy::kAsked) ++progress.no_longer_required;
  }
  for (const auto& [label, entry] : survey.off_grid_pits()) {
    count_entry(entry, rule, &progress);
    if (!entry.withdrawn()) ++progress.judgement;
  }
  count_first_sample(survey, &progress);
  count_closed(survey, &progress);
  progress.due = list.due().size();
  progress.halted = list.halted().size();
  progress.truncated = list.truncated();
  progress.complete = progress.first_sample_dug == progress.first_sample && progress.due == 0 && progress.halted == 0 &&
                      progress.conflicts == 0 && progress.access_refused == 0;
  return progress;
}

}  // namespace nearpit
