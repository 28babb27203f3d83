#include "lattice/polygon.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>

#include "support/held_nodes.h"
#include "support/random_ground.h"

namespace nearpit {
namespace {

double shoelace_m2(const Ring& ring) {
  double twice = 0;
  for (std::size_t i = 0; i < ring.size(); ++i) {
    const Point& a = ring[i];
    const Point& b = ring[(i + 1) % ring.size()];
    twice += (a.x - ring[0].x) * (b.y - ring[0].y) - (b.x - ring[0].x) * (a.y - ring[0].y);
  }
  return std::abs(twice) / 2;
}

TEST(Polygon, SoundOnesHaveNoProblem) {
  EXPECT_EQ(polygon_problem({{rectangle(0, 0, 10, 10), {}}}), std::nullopt);
  EXPECT_EQ(polygon_problem({{rectangle(0, 0, 10, 10), {rectangle(2, 2, 3, 3), rectangle(6, 6, 2, 2)}}}), std::nullopt);
  EXPECT_EQ(polygon_problem({{rectangle(0, 0, 10, 10), {}}, {rectangle(20, 0, 10, 10), {}}}), std::nullopt);
  // An island in a hole.
  EXPECT_EQ(polygon_problem({{rectangle(0, 0, 10, 10), {rectangle(2, 2, 6, 6)}}, {rectangle(4, 4, 2, 2), {}}}),
            std::nullopt);
  // The other winding.
  EXPECT_EQ(polygon_problem({{{{0, 0}, {0, 10}, {10, 10}, {10, 0}}, {}}}), std::nullopt);
}

TEST(Polygon, RandomSoundOnesHaveNoProblem) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(200); ++round) {
    const Point centre{random.real(-1e7, 1e7), random.real(-1e7, 1e7)};
    EXPECT_EQ(polygon_problem(random_boundary(random, centre, random.real(20, 2000))), std::nullopt);
  }
}

TEST(Polygon, ProblemsAreNamed) {
  const auto problem = [](const MultiPolygon& polygons) { return polygon_problem(polygons).value_or("none found"); };
  EXPECT_THAT(problem({{{{0, 0}, {10, 10}, {10, 0}, {0, 16}}, {}}}), testing::HasSubstr("itself"));
  EXPECT_NE(problem({{{{0, 0}, {10, 10}, {10, 0}, {0, 10}}, {}}}), "none found");
  EXPECT_NE(problem({{{{0, 0}, {10, 10}}, {}}}), "none found");
  EXPECT_NE(problem({{{{0, 0}, {5, 0}, {10, 0}}, {}}}), "none found");
  EXPECT_NE(problem({{{{0, 0}, {10, 0}, {10, 10}, {10, 0}}, {}}}), "none found");
  EXPECT_NE(problem({{rectangle(0, 0, 10, 10), {rectangle(20, 20, 2, 2)}}}), "none found");
  EXPECT_NE(problem({{rectangle(0, 0, 10, 10), {rectangle(8, 8, 4, 4)}}}), "none found");
  EXPECT_NE(problem({{rectangle(0, 0, 10, 10), {rectangle(2, 2, 4, 4), rectangle(4, 4, 4, 4)}}}), "none found");
  EXPECT_NE(problem({{rectangle(0, 0, 10, 10), {}}, {rectangle(5, 5, 10, 10), {}}}), "none found");
  EXPECT_NE(problem({{rectangle(0, 0, 10, 10), {}}, {rectangle(2, 2, 3, 3), {}}}), "none found");
  EXPECT_NE(problem({{rectangle(0, 0, 10, 10), {}}, {rectangle(0, 0, 10, 10), {}}}), "none found");
  const double nan = std::nan("");
  EXPECT_NE(problem({{{{0, 0}, {10, 0}, {nan, 10}}, {}}}), "none found");
}

TEST(Polygon, AreaLeavesHolesOut) {
  EXPECT_DOUBLE_EQ(area_m2({{rectangle(0, 0, 10, 10), {rectangle(2, 2, 3, 3)}}, {rectangle(20, 0, 2, 2), {}}}), 95);
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(200); ++round) {
    const MultiPolygon polygons = random_boundary(random, {random.real(-1e6, 1e6), 3e6}, random.real(20, 2000));
    double expected = 0;
    for (const Polygon& polygon : polygons) {
      expected += shoelace_m2(polygon.outer);
      for (const Ring& hole : polygon.holes)
        expected -= shoelace_m2(hole);
    }
    EXPECT_NEAR(area_m2(polygons) / expected, 1, 1e-7);
  }
}

TEST(Polygon, CommonArea) {
  const MultiPolygon square{{rectangle(0, 0, 10, 10), {}}};
  const MultiPolygon holed{{rectangle(0, 0, 10, 10), {rectangle(2, 2, 3, 3)}}};
  EXPECT_NEAR(common_area_m2(square, {{rectangle(5, 5, 10, 10), {}}}), 25, 1e-9);
  EXPECT_NEAR(common_area_m2(holed, {{rectangle(0, 0, 5, 5), {}}}), 16, 1e-9);
  EXPECT_NEAR(common_area_m2({{rectangle(0, 0, 5, 5), {}}}, holed), 16, 1e-9);
  EXPECT_NEAR(common_area_m2(square, {{rectangle(10, 0, 10, 10), {}}}), 0, 1e-9);
  EXPECT_NEAR(common_area_m2(square, {{rectangle(50, 0, 10, 10), {}}}), 0, 1e-9);
  EXPECT_NEAR(common_area_m2({{rectangle(2, 2, 3, 3), {}}}, holed), 0, 1e-9);
  EXPECT_NEAR(common_area_m2(holed, holed), 91, 1e-9);
}

TEST(Polygon, BoundingBox) {
  const Box box = bounding_box({{rectangle(3, 4, 10, 10), {}}, {rectangle(-5, 20, 2, 2), {}}});
  EXPECT_EQ(box.low, (Point{-5, 4}));
  EXPECT_EQ(box.high, (Point{13, 22}));
}

TEST(Polygon, CoversTheLineAndTheTolerance) {
  const MultiPolygon holed{{rectangle(0, 0, 10, 10), {rectangle(2, 2, 3, 3)}}};
  EXPECT_TRUE(covers(holed, {1, 1}, 0));
  EXPECT_TRUE(covers(holed, {0, 5}, 0));
  EXPECT_TRUE(covers(holed, {10, 10}, 0));
  EXPECT_TRUE(covers(holed, {2, 3}, 0));
  EXPECT_FALSE(covers(holed, {3, 3}, 0));
  EXPECT_FALSE(covers(holed, {10.01, 5}, 0.001));
  EXPECT_TRUE(covers(holed, {10.0009, 5}, 0.001));
  EXPECT_FALSE(covers(holed, {10.0011, 5}, 0.001));
  EXPECT_TRUE(covers(holed, {2.0009, 3}, 0.001));
  EXPECT_FALSE(covers(holed, {2.0011, 3}, 0.001));
  EXPECT_TRUE(covers(holed, {10.0006, 10.0006}, 0.001));
  EXPECT_FALSE(covers(holed, {10.0008, 10.0008}, 0.001));
}

TEST(Polygon, CoversAsTheDistanceSays) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(50); ++round) {
    const Point centre{random.real(-1e5, 1e5), random.real(-1e5, 1e5)};
    const MultiPolygon polygons = random_boundary(random, centre, 100);
    const double tolerance = random.chance(0.3) ? 0 : random.real(0.001, 3);
    for (int point = 0; point < 40; ++point) {
      const Point place{centre.x + random.real(-120, 120), centre.y + random.real(-120, 120)};
      const double distance = distance_by_boost(polygons, place);
      if (std::abs(distance - tolerance) < 1e-7 && distance > 0) continue;
      EXPECT_EQ(covers(polygons, place, tolerance), distance <= tolerance) << place.x << ' ' << place.y;
    }
  }
}

TEST(Polygon, UnitedLeavesNothingOutAndCountsNothingTwice) {
  const auto square = [](double x, double y) {
    return MultiPolygon{{{{x, y}, {x + 2, y}, {x + 2, y + 2}, {x, y + 2}}, {}}};
  };
  EXPECT_TRUE(united({}).empty());
  EXPECT_EQ(united({square(0, 0)}).front().outer, square(0, 0).front().outer);
  EXPECT_DOUBLE_EQ(area_m2(united({square(0, 0), square(1, 1)})), 7);
  EXPECT_EQ(united({square(0, 0), square(2, 0), square(4, 0)}).size(), 1U);
  EXPECT_EQ(united({square(0, 0), square(9, 0), square(0, 9)}).size(), 3U);
  std::vector<MultiPolygon> ring;
  for (const Point& at : {Point{0, 0}, {2, 0}, {4, 0}, {0, 2}, {4, 2}, {0, 4}, {2, 4}, {4, 4}})
    ring.push_back(square(at.x, at.y));
  const MultiPolygon around = united(ring);
  ASSERT_EQ(around.size(), 1U);
  EXPECT_EQ(around.front().holes.size(), 1U);
  EXPECT_DOUBLE_EQ(area_m2(around), 32);
}

}  // namespace
}  // namespace nearpit
