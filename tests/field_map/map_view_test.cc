#include "field_map/map_view.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "support/test_random.h"

namespace nearpit::ui {
namespace {

constexpr PixelBox kBox{100, 50, 900, 650};

void expect_near(const Point& found, const Point& expected, double within) {
  EXPECT_NEAR(found.x, expected.x, within);
  EXPECT_NEAR(found.y, expected.y, within);
}

MapView random_view(TestRandom& random) {
  return {{random.real(-1e6, 1e6), random.real(0, 9e6)}, std::exp(random.real(-5, 6))};
}

Pixel random_pixel(TestRandom& random, const PixelBox& box) {
  return {static_cast<float>(random.real(box.left, box.right)), static_cast<float>(random.real(box.top, box.bottom))};
}

Box random_ground_box(TestRandom& random) {
  const Point low{random.real(-1e6, 1e6), random.real(0, 9e6)};
  return {low, {low.x + std::exp(random.real(0, 9)), low.y + std::exp(random.real(0, 9))}};
}

TEST(MapView, NorthIsUpAndEastIsRight) {
  const MapView view{{1000, 2000}, 2};
  const Pixel middle = to_screen(view, kBox, {1000, 2000});
  EXPECT_EQ(middle.x, 500);
  EXPECT_EQ(middle.y, 350);
  const Pixel moved = to_screen(view, kBox, {1010, 2020});
  EXPECT_EQ(moved.x, 520);
  EXPECT_EQ(moved.y, 310);
  const Box shown = visible_ground(view, kBox);
  EXPECT_EQ(shown.low, (Point{800, 1850}));
  EXPECT_EQ(shown.high, (Point{1200, 2150}));
}

TEST(MapView, ScreenAndGroundAreInverse) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(2000); round > 0; --round) {
    const MapView view = random_view(random);
    const Pixel at = random_pixel(random, kBox);
    const Pixel back = to_screen(view, kBox, to_ground(view, kBox, at));
    EXPECT_NEAR(back.x, at.x, 0.001);
    EXPECT_NEAR(back.y, at.y, 0.001);
  }
}

TEST(MapView, FitsTheWholeGround) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(2000); round > 0; --round) {
    const Box ground = random_ground_box(random);
    const float margin = static_cast<float>(random.real(0, 200));
    const MapView view = fitted(ground, kBox, margin);
    const Pixel low = to_screen(view, kBox, ground.low);
    const Pixel high = to_screen(view, kBox, ground.high);
    const float least = std::min({low.x - kBox.left, kBox.right - high.x, kBox.bottom - low.y, high.y - kBox.top});
    EXPECT_NEAR(least, margin, 0.01);
  }
}

TEST(MapView, FitsGroundWithoutWidthOrRoomForTheMargin) {
  EXPECT_EQ(fitted({{0, 0}, {0, 300}}, kBox, 0).px_per_m, 2);
  EXPECT_EQ(fitted({{0, 0}, {400, 0}}, kBox, 0).px_per_m, 2);
  EXPECT_EQ(fitted({{7, 9}, {7, 9}}, kBox, 0).px_per_m, 1);
  EXPECT_EQ(fitted({{7, 9}, {7, 9}}, kBox, 0).centre, (Point{7, 9}));
  EXPECT_EQ(fitted({{0, 0}, {400, 10}}, kBox, 400).px_per_m, 2);
}

TEST(MapView, PanningFollowsTheFinger) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(2000); round > 0; --round) {
    const MapView view = random_view(random);
    const Pixel from = random_pixel(random, kBox);
    const Pixel to = random_pixel(random, kBox);
    const MapView moved = panned(view, to.x - from.x, to.y - from.y);
    const double within = 0.001 / view.px_per_m + 1e-8;
    expect_near(to_ground(moved, kBox, to), to_ground(view, kBox, from), within);
    expect_near(panned(moved, from.x - to.x, from.y - to.y).centre, view.centre, 1e-8);
    EXPECT_EQ(moved.px_per_m, view.px_per_m);
  }
}

TEST(MapView, ZoomingKeepsTheGroundUnderThePoint) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(2000); round > 0; --round) {
    const MapView view = random_view(random);
    const ZoomLimits limits{std::exp(random.real(-6, 0)), std::exp(random.real(1, 7))};
    const Pixel about = random_pixel(random, kBox);
    const double factor = std::exp(random.real(-3, 3));
    const MapView zoom = zoomed(view, kBox, about, factor, limits);
    expect_near(to_ground(zoom, kBox, about), to_ground(view, kBox, about), 1e-8);
    EXPECT_EQ(zoom.px_per_m, std::clamp(view.px_per_m * factor, limits.least_px_per_m, limits.most_px_per_m));
  }
}

TEST(MapView, ZoomLimitsAreAQuarterOfTheBoxAndSixtyMillimetres) {
  const ZoomLimits limits = zoom_limits({{0, 0}, {800, 100}}, 10, kBox, 6);
  EXPECT_EQ(limits.least_px_per_m, 0.25);
  EXPECT_EQ(limits.most_px_per_m, 36);
  // Six metres of ground fit at 100 px a metre, which is more.
  EXPECT_EQ(zoom_limits({{0, 0}, {6, 6}}, 10, kBox, 6).most_px_per_m, 100);
}

TEST(MapView, ThePannedSurveyCannotBeLost) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(2000); round > 0; --round) {
    const Box ground = random_ground_box(random);
    const ZoomLimits limits = zoom_limits(ground, random.real(1, 50), kBox, 6);
    MapView view{{ground.low.x + random.real(-1e5, 1e5), ground.low.y + random.real(-1e5, 1e5)},
                 random.real(limits.least_px_per_m, limits.most_px_per_m)};
    const MapView kept = kept_near(view, kBox, ground);
    const Box shown = visible_ground(kept, kBox);
    const auto overlap = [](double low_a, double high_a, double low_b, double high_b) {
      return std::min(high_a, high_b) - std::max(low_a, low_b);
    };
    const double across = overlap(ground.low.x, ground.high.x, shown.low.x, shown.high.x);
    const double up = overlap(ground.low.y, ground.high.y, shown.low.y, shown.high.y);
    EXPECT_GE(across, std::min(ground.high.x - ground.low.x, (shown.high.x - shown.low.x) / 8) - 1e-6);
    EXPECT_GE(up, std::min(ground.high.y - ground.low.y, (shown.high.y - shown.low.y) / 8) - 1e-6);
    const MapView again = kept_near(kept, kBox, ground);
    EXPECT_EQ(again.centre, kept.centre);
    view.centre = {random.real(ground.low.x, ground.high.x), random.real(ground.low.y, ground.high.y)};
    EXPECT_EQ(kept_near(view, kBox, ground).centre, view.centre);
  }
}

}  // namespace
}  // namespace nearpit::ui
