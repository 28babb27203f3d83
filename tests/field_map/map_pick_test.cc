#include "field_map/map_pick.h"

#include <gtest/gtest.h>

#include <algorithm>

#include "field_map/marked_survey.h"
#include "support/random_ground.h"

namespace nearpit::ui {
namespace {

// All that is drawn, looked at one by one.
std::optional<PitMark> naive_pick(const SurveyModel& model, const MapMarks& marks, const Point& at, double within_m,
                                  double apart_m, bool plain_shown) {
  std::vector<PitMark> drawn;
  marks.visible({{-1e9, -1e9}, {1e9, 1e9}}, apart_m, &drawn);
  for (NodeId id = 0; plain_shown && id < model.survey().ground().frame.size(); ++id) {
    const PitMark pit = mark_of(model, id);
    if (pit.mark == Mark::kPlain && !pit.conflict) drawn.push_back(pit);
  }
  std::erase_if(drawn, [&](const PitMark& pit) { return distance_m(at, pit.place) > within_m; });
  if (drawn.empty()) return std::nullopt;
  const auto nearer = [&](const PitMark& a, const PitMark& b) {
    return distance_m(at, a.place) < distance_m(at, b.place);
  };
  const double nearest = distance_m(at, std::min_element(drawn.begin(), drawn.end(), nearer)->place);
  std::erase_if(drawn, [&](const PitMark& pit) { return distance_m(at, pit.place) > nearest + 0.001; });
  return *std::min_element(drawn.begin(), drawn.end(), more_telling);
}

TEST(MapPick, TakesTheNearestWithinReach) {
  const SurveyModel model = drawn_model({"o..=", "...."});
  const MapMarks marks(model);
  EXPECT_EQ(nearest_pit(model, marks, {4, 0}, 5, 0, false)->node, 0);
  EXPECT_FALSE(nearest_pit(model, marks, {4, 0}, 3.9, 0, false));
  EXPECT_EQ(nearest_pit(model, marks, {20, 0}, 15, 0, false)->node, 3);
  EXPECT_EQ(nearest_pit(model, marks, {19, 1}, 15, 0, true)->node, 2);
  EXPECT_EQ(nearest_pit(model, marks, {19, 1}, 15, 0, true)->mark, Mark::kPlain);
  EXPECT_FALSE(nearest_pit(model, marks, {-500, 0}, 400, 0, true));
  EXPECT_EQ(nearest_pit(model, marks, {-500, 0}, 600, 0, true)->node, 0);
  EXPECT_FALSE(nearest_pit(model, marks, {0, 0}, -1, 0, true));
}

TEST(MapPick, OfEquallyNearTakesTheMoreTelling) {
  const SurveyModel model = drawn_model({"=@o"});
  const MapMarks marks(model);
  EXPECT_EQ(nearest_pit(model, marks, {5, 0}, 10, 0, true)->node, 1);
  EXPECT_EQ(nearest_pit(model, marks, {5.0004, 0}, 10, 0, true)->node, 1);
  EXPECT_EQ(nearest_pit(model, marks, {4.9, 0}, 10, 0, true)->node, 0);
  EXPECT_EQ(nearest_pit(model, marks, {15, 0}, 10, 0, true)->node, 1);
  // The reach ends between the two.
  EXPECT_EQ(nearest_pit(model, marks, {4.9998, 0}, 5, 0, true)->node, 0);
}

TEST(MapPick, CannotPickWhatThinningLeavesOut) {
  const SurveyModel model = drawn_model({"=@", "=="});
  const MapMarks marks(model);
  EXPECT_EQ(nearest_pit(model, marks, {0, 10}, 30, 10, false)->node, 2);
  EXPECT_EQ(nearest_pit(model, marks, {0, 10}, 30, 20, false)->node, 1);
}

TEST(MapPick, AgreesWithANaiveScan) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(60); round > 0; --round) {
    const SurveyModel model = random_model(random, random.one_of(kAllLatticeKinds), 20, 400);
    const MapMarks marks(model);
    const Box bounds = node_bounds(model);
    const double spacing = model.survey().ground().frame.lattice().spacing_m;
    for (int touch = 0; touch < 30; ++touch) {
      const Box near = random_box(random, bounds, 0.3);
      const Point at = random.chance(0.2) ? model.survey().ground().frame.ground(0) : near.high;
      const double within = random.real(0, 12) * spacing;
      const double apart = random.real(0, 6) * spacing;
      const bool plain = random.chance(0.5);
      const auto expected = naive_pick(model, marks, at, within, apart, plain);
      const auto picked = nearest_pit(model, marks, at, within, apart, plain);
      ASSERT_EQ(picked.has_value(), expected.has_value());
      EXPECT_TRUE(!picked || same_pit(*picked, *expected));
    }
  }
}

TEST(MapPick, FindsAPitAmongAMillionNodes) {
  const SurveyModel model = large_model(1000, 37, 70000, 10000);
  const MapMarks marks(model);
  const Frame& frame = model.survey().ground().frame;
  TestRandom random = TestRandom::of_this_run();
  for (int touch = 0; touch < 200; ++touch) {
    const NodeId id = random.between(0, frame.size() - 1);
    const Point node = frame.ground(id);
    const Point at{node.x + random.real(-3, 3), node.y + random.real(-3, 3)};
    EXPECT_EQ(nearest_pit(model, marks, at, 20000, 0, true)->node, id);
  }
}

}  // namespace
}  // namespace nearpit::ui
