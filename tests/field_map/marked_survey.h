// Surveys that the field map's tests show: drawn ones, random ones with everything that a map can mark, and a large one.
#ifndef NEARPIT_TESTS_FIELD_MAP_MARKED_SURVEY_H_
#define NEARPIT_TESTS_FIELD_MAP_MARKED_SURVEY_H_

#include "field_map/map_marks.h"
#include "support/drawn_survey.h"
#include "support/test_random.h"

namespace nearpit::ui {

// As drawn_survey(), under a plan that says nothing else.
SurveyModel drawn_model(const Picture& picture, const DrawnRules& rules = {});

// Records of every kind, pits moved, pits off the grid, conflicts, closed areas, stop-works and judgement positives that opened their neighbours, on a
// lattice turned to any bearing somewhere far from zero.
SurveyModel random_model(TestRandom& random, LatticeKind kind, NodeId least, NodeId most);

// A square of nodes 10 m apart, the rows run on `bearing_deg`; `drawn` in the first sample, the first `recorded` of them dug, every tenth a positive.
SurveyModel large_model(std::int32_t side, double bearing_deg, std::uint32_t drawn, std::uint32_t recorded);

// Of the frame's nodes.
Box node_bounds(const SurveyModel& model);
// A box about a place inside `bounds`, `part` of its width and height.
Box random_box(TestRandom& random, const Box& bounds, double part);
bool box_holds(const Box& box, const Point& at);

// One pit the same as another, for sets and sorting.
bool same_pit(const PitMark& a, const PitMark& b);

}  // namespace nearpit::ui

#endif  // NEARPIT_TESTS_FIELD_MAP_MARKED_SURVEY_H_
