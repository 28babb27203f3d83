// Marks are told apart without colour.
#include "widgets/mark_shapes.h"

#include <gtest/gtest.h>

#include <array>

#include "support/picture_contrast.h"

namespace nearpit::ui {
namespace {

constexpr int kSize = 48;
constexpr std::array kPits = {MarkShape::kDot,      MarkShape::kDue,      MarkShape::kDueAsked, MarkShape::kHalted,
                              MarkShape::kNegative, MarkShape::kPositive, MarkShape::kNotDug};
constexpr std::array kNames = {"dot", "due", "due on request", "halted", "negative", "positive", "not dug"};

// 0 where the ground shows, 1 and 2 for what is nearer to paper or to ink: the mark as a printer without colours has it.
using TwoColours = std::vector<int>;

std::vector<Colour> laid_over(std::vector<Colour> under, const std::vector<Colour>& over) {
  for (std::size_t i = 0; i < under.size(); ++i) {
    if (over[i].alpha > 127) under[i] = over[i];
  }
  return under;
}

TwoColours reduced(const std::vector<Colour>& pixels) {
  TwoColours out;
  for (const Colour& pixel : pixels) {
    // Halfway between black and white as an eye sees it (CIE 1976 lightness 50).
    const bool light = relative_luminance({pixel.red, pixel.green, pixel.blue}) > 0.184;
    out.push_back(pixel.alpha < 128 ? 0 : light ? 1 : 2);
  }
  return out;
}

double share_that_differs(const TwoColours& a, const TwoColours& b) {
  int differ = 0;
  for (std::size_t i = 0; i < a.size(); ++i)
    differ += a[i] == b[i] ? 0 : 1;
  return static_cast<double>(differ) / static_cast<double>(a.size());
}

class MarkShapes : public testing::TestWithParam<bool> {
 protected:
  const Theme& theme() const { return GetParam() ? dusk_theme() : sun_theme(); }
  TwoColours seen(MarkShape shape) const { return reduced(paint_mark(shape, kSize, theme())); }
};

TEST_P(MarkShapes, EachDiffersFromEveryOtherWithoutColour) {
  for (std::size_t i = 0; i < kPits.size(); ++i) {
    for (std::size_t k = i + 1; k < kPits.size(); ++k)
      EXPECT_GT(share_that_differs(seen(kPits[i]), seen(kPits[k])), 0.05) << kNames[i] << " and " << kNames[k];
  }
}

TEST_P(MarkShapes, WhatIsLaidOverAnotherChangesIt) {
  for (std::size_t i = 0; i < kPits.size(); ++i) {
    const std::vector<Colour> plain = paint_mark(kPits[i], kSize, theme());
    for (const MarkShape over : {MarkShape::kUnderStroke, MarkShape::kFlag}) {
      const TwoColours changed = reduced(laid_over(plain, paint_mark(over, kSize, theme())));
      EXPECT_GT(share_that_differs(reduced(plain), changed), 0.02) << kNames[i];
    }
    EXPECT_GT(share_that_differs(seen(MarkShape::kUnderStroke), seen(MarkShape::kFlag)), 0.02);
  }
}

TEST_P(MarkShapes, APositiveIsLargerAndAllFilledANegativeIsOpen) {
  const std::vector<Colour> positive = paint_mark(MarkShape::kPositive, kSize, theme());
  const std::vector<Colour> negative = paint_mark(MarkShape::kNegative, kSize, theme());
  const auto covered = [](const std::vector<Colour>& pixels) {
    return std::count_if(pixels.begin(), pixels.end(), [](const Colour& pixel) { return pixel.alpha > 127; });
  };
  EXPECT_GT(covered(positive), covered(negative));
  // Beside the cross, and beside the bar.
  const std::size_t beside = static_cast<std::size_t>(kSize * (kSize / 2 - kSize / 8) + kSize / 2 + kSize / 8);
  EXPECT_EQ(positive[beside], theme().positive);
  EXPECT_EQ(negative[beside], theme().open_mark);
}

TEST_P(MarkShapes, CornersAreFreeAndNothingTouchesTheEdgeButAFlag) {
  for (std::size_t i = 0; i < kPits.size(); ++i) {
    const TwoColours shape = seen(kPits[i]);
    for (int at = 0; at < kSize; ++at) {
      EXPECT_EQ(shape[static_cast<std::size_t>(at)], 0) << kNames[i];
      EXPECT_EQ(shape[static_cast<std::size_t>(at * kSize)], 0) << kNames[i];
    }
  }
}

INSTANTIATE_TEST_SUITE_P(Themes, MarkShapes, testing::Values(false, true),
                         [](const auto& theme) { return theme.param ? "Dusk" : "Sun"; });

}  // namespace
}  // namespace nearpit::ui
