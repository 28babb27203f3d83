// Surveys drawn as text: a line is a row (the first is row 1), a character a node (the first is column 1), a space no node.
//
//                   in the first sample   elsewhere
//   no record              o                 .
//   negative               =                 -
//   positive               @                 #
//   not dug, ground        G                 g
//   not dug, access        A                 a
//   withdrawn              W                 w
//
// Pits are 10 m apart and node (1, 1) lies at (0, 0); rows run east.
#ifndef NEARPIT_TESTS_SUPPORT_DRAWN_SURVEY_H_
#define NEARPIT_TESTS_SUPPORT_DRAWN_SURVEY_H_

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "survey/survey.h"

namespace nearpit {

using Picture = std::vector<std::string>;

// Every character but a space is a node.
Frame drawn_frame(const Picture& picture, LatticeKind kind = LatticeKind::kSquare);
// One area a letter, in alphabetical order; the picture of the frame gives which nodes there are.
Areas drawn_areas(const Frame& frame, const Picture& letters);
Areas one_area(const Frame& frame);

struct DrawnRules {
  LatticeKind kind = LatticeKind::kSquare;
  NeighbourRule neighbours = NeighbourRule::kEight;
  Confinement confinement = {};
  std::optional<std::int32_t> ring_limit = {};
  Picture areas = {};
};

std::unique_ptr<const SurveyGround> drawn_ground(const Picture& picture, const DrawnRules& rules);

PitRecord dug_record(std::uint32_t count);
PitRecord not_dug_record(NotDugReason reason);
PitRecord withdrawn_record();
Head head_of(const PitRecord& record, std::int64_t clock = 1, const std::string& writer = "a");

// The plan has one find, the target, and one is enough to be positive.
Survey drawn_survey(const Picture& picture, const DrawnRules& rules = {});
NodeId node_at(const Survey& survey, std::int32_t row, std::int32_t column);

// The standing of each node: a due pit's ring, h halted, c in a closed area, n not dug, # positive, - negative; j recorded but not of the
// design; . nothing.
Picture standing_of(const DigList& list);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_DRAWN_SURVEY_H_
