// How sure a row of the day's figures is, and why, in a crew chief's words.
//
//   provisional  something is open: pits due or halted, conflicts, pits refused (wherever they stand)
//   truncated    else, the ring limit kept a pit off (never the first sample's own row)
//   final        else
//
// Due and halted pits, and a conflict that could change what is positive, also take a row's variance away: anywhere for the adaptive rows, in
// the first sample for the first sample's own. Refused pits and other conflicts leave it.
#ifndef NEARPIT_ESTIMATE_FIGURE_REASONS_H_
#define NEARPIT_ESTIMATE_FIGURE_REASONS_H_

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

#include "estimate/figures.h"
#include "survey/progress.h"
#include "survey/survey.h"

namespace nearpit {

// Stands with every row per m2 that was not made with a random origin.
constexpr std::string_view kGroundReason =
    "per m2 and total hold for the ground if the lattice was laid without regard to what lies below";

struct OpenWork {
  std::size_t due = 0;
  std::size_t halted = 0;
  std::size_t outcome_conflicts = 0;  // could change what is positive
  std::size_t other_conflicts = 0;
  std::size_t refused = 0;  // not dug for an access reason

  bool any() const { return due + halted + outcome_conflicts + other_conflicts + refused > 0; }
  bool hides_variance() const { return due + halted + outcome_conflicts > 0; }
};

OpenWork open_work(const Progress& progress);
// The same of the first sample's pits alone. Cost: the frame's nodes.
OpenWork open_in_first_sample(const Survey& survey);

FigureStatus figure_status(const Progress& progress, Estimator estimator);

// What is open, as far as it bears on the row.
std::vector<std::string> open_reasons(const OpenWork& everywhere, const OpenWork& first_sample, Estimator estimator);
// "area west has one drawn transect only: no spread can be given"; not for designs without a lone unit.
std::string lone_unit_reason(const SurveyGround& ground);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_FIGURE_REASONS_H_
