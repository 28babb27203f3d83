#include "field_map/hatch.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "support/random_ground.h"

namespace nearpit::ui {
namespace {

using Segments = std::vector<std::pair<Point, Point>>;

constexpr double kLine = std::numbers::sqrt2;
const Box kWide{{-1e5, -1e5}, {1e5, 1e5}};

double length_m(const Segments& segments) {
  double sum = 0;
  for (const auto& [from, to] : segments)
    sum += distance_m(from, to);
  return sum;
}

Ring square(double low_x, double low_y, double side) {
  return {{low_x, low_y}, {low_x + side, low_y}, {low_x + side, low_y + side}, {low_x, low_y + side}};
}

MultiPolygon boxed(const Box& box) {
  return {{{box.low, {box.high.x, box.low.y}, box.high, {box.low.x, box.high.y}}, {}}};
}

TEST(Hatch, RunsThroughASquareByItsCorners) {
  // Lines x - y = 10 k: the two at the corners touch only.
  const Segments lines = hatch_lines({{square(0, 0, 20), {}}}, kWide, 10 / kLine);
  ASSERT_EQ(lines.size(), 3U);
  EXPECT_NEAR(distance_m(lines[0].first, {0, 10}), 0, 1e-9);
  EXPECT_NEAR(distance_m(lines[0].second, {10, 20}), 0, 1e-9);
  EXPECT_NEAR(distance_m(lines[1].first, {0, 0}), 0, 1e-9);
  EXPECT_NEAR(distance_m(lines[1].second, {20, 20}), 0, 1e-9);
  EXPECT_NEAR(distance_m(lines[2].first, {10, 0}), 0, 1e-9);
}

TEST(Hatch, LeavesHolesOut) {
  const Segments lines = hatch_lines({{square(0, 0, 40), {square(10, 10, 20)}}}, kWide, 100);
  ASSERT_EQ(lines.size(), 2U);
  EXPECT_NEAR(distance_m(lines[0].second, {10, 10}), 0, 1e-9);
  EXPECT_NEAR(distance_m(lines[1].first, {30, 30}), 0, 1e-9);
}

TEST(Hatch, NothingOutsideTheBoxOrOfNothing) {
  EXPECT_TRUE(hatch_lines({}, kWide, 1).empty());
  EXPECT_TRUE(hatch_lines({{square(0, 0, 40), {}}}, {{100, 0}, {200, 100}}, 1).empty());
}

// Points of the lines lie inside, and by the box; lines are whole multiples; their length stands for the area, which no other way of drawing gives.
TEST(Hatch, CoversRandomGround) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(150); round > 0; --round) {
    const Point centre{random.real(-1e6, 1e6), random.real(0, 9e6)};
    const MultiPolygon ground = random_boundary(random, centre, 400);
    const double half = random.real(50, 500);
    const Point middle{centre.x + random.real(-200, 200), centre.y + random.real(-200, 200)};
    const Box clip{{middle.x - half, middle.y - half}, {middle.x + half, middle.y + half}};
    const double apart = random.real(0.5, 3);
    const Segments lines = hatch_lines(ground, clip, apart);
    for (const auto& [from, to] : lines) {
      EXPECT_NEAR(from.x - from.y, to.x - to.y, 1e-6);
      const double number = (from.x - from.y) / (apart * kLine);
      EXPECT_NEAR(number, std::round(number), 1e-6);
      const Point mid{(from.x + to.x) / 2, (from.y + to.y) / 2};
      EXPECT_TRUE(covers(ground, mid, 1e-6));
      EXPECT_TRUE(covers(ground, from, 1e-6) && covers(ground, to, 1e-6));
      EXPECT_TRUE(covers(boxed(clip), from, 1e-6) && covers(boxed(clip), to, 1e-6));
    }
    const double area = common_area_m2(ground, boxed(clip));
    // Off by less than the outline's length along the lines times the distance; generous, yet a missed hole or part is more.
    EXPECT_NEAR(length_m(lines) * apart, area, 0.03 * area + 2000 * apart * 0.5);
  }
}

TEST(Hatch, PanningMovesNoLine) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(100); round > 0; --round) {
    const MultiPolygon ground = random_boundary(random, {5e5, 4e6}, 400);
    const double apart = random.real(2, 20);
    const Segments all = hatch_lines(ground, {{4e5, 3e6}, {6e5, 5e6}}, apart);
    const Box clip{{5e5 - 90, 4e6 - 70}, {5e5 + random.real(10, 200), 4e6 + random.real(10, 200)}};
    for (const auto& [from, to] : hatch_lines(ground, clip, apart)) {
      const Point mid{(from.x + to.x) / 2, (from.y + to.y) / 2};
      EXPECT_TRUE(std::any_of(all.begin(), all.end(), [&](const auto& line) {
        return std::abs((line.first.x - line.first.y) - (mid.x - mid.y)) < 1e-6 && line.first.x <= mid.x &&
               mid.x <= line.second.x;
      }));
    }
  }
}

TEST(Hatch, LeavesOutEverySecondLineWhenThereAreTooMany) {
  const MultiPolygon ground{{square(0, 0, 1000), {}}};
  const Segments lines = hatch_lines(ground, kWide, 0.25);
  EXPECT_LE(lines.size(), kMostHatchLines);
  EXPECT_GT(lines.size(), kMostHatchLines / 2 - 2);
  for (const auto& [from, to] : lines) {
    const double number = (from.x - from.y) / (0.5 * kLine);
    EXPECT_NEAR(number, std::round(number), 1e-6);
  }
  // A comb: few lines, many segments.
  MultiPolygon comb;
  for (int tooth = 0; tooth < 200; ++tooth)
    comb.push_back({square(10 * tooth, 10 * tooth, 7), {}});
  const Segments teeth = hatch_lines(comb, kWide, 0.2);
  EXPECT_LE(teeth.size(), kMostHatchLines);
  EXPECT_GT(teeth.size(), kMostHatchLines / 4);
}

}  // namespace
}  // namespace nearpit::ui
