#include "glass.h"

#include <gtest/gtest.h>

namespace nearpit::ui {
namespace {

constexpr double kPlain = 96 / 25.4;

TEST(Glass, TheMonitorsOwnSizeIsBelieved) {
  // A 10.1 inch tablet: 1280 pixels on 217 mm.
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1280, 217, 1), 1280 / 217.0);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(3840, 600, 2), 6.4);
}

TEST(Glass, WithoutASizeTheDesktopsScaleCounts) {
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1280, 0, 1), kPlain);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1280, 0, 1.5), kPlain * 1.5);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(0, 0, 2), kPlain * 2);
}

TEST(Glass, WhatCanNotBeIsNotBelieved) {
  // A projector that says it is 16 mm wide, a wall that says 10 m, a scale of nothing.
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1920, 16, 1), kPlain);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1920, 10'000, 1), kPlain);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1920, -5, 1), kPlain);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1920, 0, 0), kPlain);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1920, 0, 100), kPlain);
  // The ends of what can be.
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(1000, 1000, 2), 1);
  EXPECT_DOUBLE_EQ(guessed_px_per_mm(4000, 100, 1), 40);
}

TEST(Glass, MillimetresAndPixelsAreInverse) {
  const Glass glass{1280, 800, 5.67};
  EXPECT_NEAR(glass.mm(glass.px(20)), 20, 1e-5);
  EXPECT_NEAR(glass.px(20), 113.4, 1e-4);
}

}  // namespace
}  // namespace nearpit::ui
