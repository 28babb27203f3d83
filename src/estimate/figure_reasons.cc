#include "estimate/figure_reasons.h"

#include "base/text.h"

namespace nearpit {
namespace {

struct Verb {
  const char* one;
  const char* many;
};

// "1 pit is", "12 grid pits are".
std::string pits(std::size_t count, const std::string& kind, const Verb& verb) {
  return std::to_string(count) + " " + kind + (count == 1 ? " " : "s ") + (count == 1 ? verb.one : verb.many);
}

std::string it_or_them(std::size_t count) { return count == 1 ? "it" : "them"; }

// `kind` is "pit" or "grid pit".
std::vector<std::string> reasons_of(const OpenWork& open, const std::string& kind) {
  const Verb are{"is", "are"};
  const Verb have{"has", "have"};
  std::vector<std::string> reasons;
  if (open.due > 0) {
    reasons.push_back(pits(open.due, kind, are) + " still to dig: figures count " + it_or_them(open.due) + " as empty");
  }
  if (open.halted > 0) {
    reasons.push_back(pits(open.halted, kind, are) + " halted: figures count " + it_or_them(open.halted) + " as empty");
  }
  if (open.outcome_conflicts > 0) {
    reasons.push_back(pits(open.outcome_conflicts, kind, have) + " records that disagree on being positive: settle " +
                      it_or_them(open.outcome_conflicts));
  }
  if (open.other_conflicts > 0) {
    reasons.push_back(pits(open.other_conflicts, kind, have) + " more than one record: settle " +
                      it_or_them(open.other_conflicts));
  }
  if (open.refused > 0) {
    reasons.push_back(pits(open.refused, kind, {"was", "were"}) +
                      " refused: holds for that ground only if it is like the rest");
  }
  return reasons;
}

}  // namespace

OpenWork open_work(const Progress& progress) {
  return {.due = progress.due,
          .halted = progress.halted,
          .outcome_conflicts = progress.outcome_conflicts,
          .other_conflicts = progress.conflicts - progress.outcome_conflicts,
          .refused = progress.access_refused};
}

OpenWork open_in_first_sample(const Survey& survey) {
  const SurveyGround& ground = survey.ground();
  const DigList& list = survey.dig_list();
  OpenWork open;
  for (NodeId id = 0; id < ground.frame.size(); ++id) {
    if (!ground.sample.holds[static_cast<std::size_t>(id)]) continue;
    if (list.due(id)) ++open.due;
    if (list.halted(id)) ++open.halted;
    if (list.not_dug(id, ReasonClass::kAccess)) ++open.refused;
  }
  for (const auto& [id, entry] : survey.pits()) {
    if (!ground.sample.holds[static_cast<std::size_t>(id)]) continue;
    if (entry.verdict.conflict == Conflict::kOutcome) ++open.outcome_conflicts;
    if (entry.verdict.conflict == Conflict::kSameOutcome) ++open.other_conflicts;
  }
  return open;
}

FigureStatus figure_status(const Progress& progress, Estimator estimator) {
  if (open_work(progress).any()) return FigureStatus::kProvisional;
  const bool truncated = progress.truncated && estimator != Estimator::kFirstSampleOnly;
  return truncated ? FigureStatus::kTruncated : FigureStatus::kFinal;
}

std::vector<std::string> open_reasons(const OpenWork& everywhere, const OpenWork& first_sample, Estimator estimator) {
  if (estimator != Estimator::kFirstSampleOnly) {
    std::vector<std::string> reasons = reasons_of(everywhere, "pit");
    if (everywhere.hides_variance()) reasons.push_back("no likely range until all pits are dug and settled");
    return reasons;
  }
  std::vector<std::string> reasons = reasons_of(first_sample, "grid pit");
  if (first_sample.hides_variance()) {
    reasons.push_back("no likely range until the grid pits are dug and settled");
  } else if (everywhere.any() && !first_sample.any()) {
    reasons.push_back("what is open lies outside the grid pits and does not change this row");
  }
  return reasons;
}

std::string lone_unit_reason(const SurveyGround& ground) {
  std::vector<std::string> names;
  for (std::size_t area = 0; area < ground.areas.list.size(); ++area) {
    const bool lone = ground.sample.drawn[area].size() == 1 && ground.units.count[area] > 1;
    if (lone) names.push_back(ground.areas.list[area].name);
  }
  const std::string rest =
      "one drawn " + std::string(unit_word(ground.units.kind, false)) + " only: no spread can be given";
  if (ground.areas.list.size() == 1) return rest;
  return (names.size() == 1 ? "area " : "areas ") + list_in_words(names) + (names.size() == 1 ? " has " : " have ") +
         rest;
}

}  // namespace nearpit
