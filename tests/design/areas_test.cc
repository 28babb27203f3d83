#include "design/areas.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>

#include "support/held_nodes.h"
#include "support/random_ground.h"

namespace nearpit {
namespace {

using testing::HasSubstr;

// 10 x 10 nodes at 0, 10 .. 90 both ways.
Frame ten_by_ten() { return Frame::clip({LatticeKind::kSquare, 10, {0, 0}}, {{rectangle(0, 0, 90, 90), {}}}).value(); }

Area area(const std::string& name, double x, double y, double width, double height) {
  return {name, {{rectangle(x, y, width, height), {}}}};
}

TEST(Areas, WithoutBoundaryOneHoldsAll) {
  const Result<Areas> areas = Areas::assign(ten_by_ten(), {{"all", {}}});
  ASSERT_TRUE(areas) << areas.error().one_line();
  ASSERT_EQ(areas->list.size(), 1U);
  EXPECT_EQ(areas->list[0].name, "all");
  EXPECT_EQ(areas->of_node, std::vector<AreaId>(100, 0));
}

TEST(Areas, ANodeOnTheLineOfTwoBelongsToTheFirst) {
  const Frame frame = ten_by_ten();
  const Area west = area("west", 0, 0, 40, 90);
  const Area east = area("east", 40, 0, 50, 90);
  const auto of_node = [&](const Areas& areas, Node node) {
    return areas.of_node[static_cast<std::size_t>(frame.find(node))];
  };
  const Areas west_first = Areas::assign(frame, {west, east}).value();
  const Areas east_first = Areas::assign(frame, {east, west}).value();
  for (std::int32_t row = 1; row <= 10; ++row) {
    EXPECT_EQ(of_node(west_first, {row, 5}), 0);
    EXPECT_EQ(of_node(west_first, {row, 6}), 1);
    EXPECT_EQ(of_node(east_first, {row, 5}), 0);
    EXPECT_EQ(of_node(east_first, {row, 4}), 1);
  }
}

// Strips across the rows, side by side, their lines often through nodes or 0.9 mm beside them; the outer two reach far out.
std::vector<Area> random_strips(TestRandom& random, const Frame& frame) {
  const Lattice& lattice = frame.lattice();
  constexpr double kFar = 1e4;
  std::vector<double> lines{-kFar};
  for (double at = 0; at < 25 && random.chance(0.7);) {
    at += random.between(2, 8);
    const double beside = random.one_of(std::vector<double>{0, 0.0009, -0.0009, 0.4, 0.0011});
    lines.push_back(at * lattice.spacing_m + beside);
  }
  lines.push_back(kFar);
  std::vector<Area> strips;
  for (std::size_t i = 0; i + 1 < lines.size(); ++i) {
    const auto corner = [&](double u, double v) { return lattice.to_ground(Along{u, v}); };
    strips.push_back(
        {"strip " + std::to_string(i),
         {{{corner(lines[i], -kFar), corner(lines[i + 1], -kFar), corner(lines[i + 1], kFar), corner(lines[i], kFar)},
           {}}}});
  }
  if (random.chance(0.5)) std::reverse(strips.begin(), strips.end());
  return strips;
}

TEST(Areas, EveryNodeIsInTheFirstThatHoldsIt) {
  TestRandom random = TestRandom::of_this_run();
  int whole = 0;
  for (int round = 0; round < rounds(60); ++round) {
    MultiPolygon boundary;
    const Frame frame = random_frame(random, random.one_of(kAllLatticeKinds), 40, 300, &boundary);
    const std::vector<Area> strips = random_strips(random, frame);
    std::vector<AreaId> expected;
    std::vector<int> nodes(strips.size());
    for (NodeId id = 0; id < frame.size(); ++id) {
      std::size_t holder = 0;
      while (distance_by_boost(strips[holder].boundary, frame.ground(id)) > 0.001)
        ++holder;
      expected.push_back(static_cast<AreaId>(holder));
      ++nodes[holder];
    }
    const Result<Areas> areas = Areas::assign(frame, strips);
    if (std::count(nodes.begin(), nodes.end(), 0) > 0) {
      EXPECT_FALSE(areas);
      continue;
    }
    ++whole;
    ASSERT_TRUE(areas) << areas.error().one_line();
    EXPECT_EQ(areas->of_node, expected);
  }
  EXPECT_GT(whole, 0);
}

TEST(Areas, ANodeInNoneIsNamedWithItsPlace) {
  const Result<Areas> areas = Areas::assign(ten_by_ten(), {area("west", -1, -1, 32, 92), area("east", 35, -1, 60, 70)});
  ASSERT_FALSE(areas);
  EXPECT_EQ(areas.error().kind, ErrorKind::kBadInput);
  const std::string text = areas.error().one_line();
  // The first in row, column order that neither holds.
  EXPECT_THAT(text, HasSubstr("T8-5"));
  EXPECT_THAT(text, HasSubstr("40"));
  EXPECT_THAT(text, HasSubstr("70"));
}

TEST(Areas, TwoThatOverlapAreNamed) {
  const Result<Areas> areas = Areas::assign(ten_by_ten(), {area("west", -1, -1, 50, 92), area("east", 45, -1, 50, 92)});
  ASSERT_FALSE(areas);
  EXPECT_THAT(areas.error().one_line(), HasSubstr("west"));
  EXPECT_THAT(areas.error().one_line(), HasSubstr("east"));
}

TEST(Areas, OneWithoutNodesIsNamed) {
  const Result<Areas> between = Areas::assign(ten_by_ten(), {area("sliver", 2, 2, 5, 5), area("rest", 7, -1, 90, 92)});
  EXPECT_FALSE(between);
  const Result<Areas> outside =
      Areas::assign(ten_by_ten(), {area("all", -1, -1, 92, 92), area("elsewhere", 500, 500, 50, 50)});
  ASSERT_FALSE(outside);
  EXPECT_THAT(outside.error().one_line(), HasSubstr("elsewhere"));
}

TEST(Areas, OneWhoseNodesAllBelongToAnEarlierOneIsNamed) {
  const Result<Areas> areas =
      Areas::assign(ten_by_ten(), {area("all but a line", -1, -1, 91, 92), area("line", 90, -1, 5, 92)});
  ASSERT_FALSE(areas);
  EXPECT_THAT(areas.error().one_line(), HasSubstr("line"));
}

}  // namespace
}  // namespace nearpit
