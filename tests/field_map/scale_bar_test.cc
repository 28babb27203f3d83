#include "field_map/scale_bar.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>

#include "support/test_random.h"

namespace nearpit::ui {
namespace {

TEST(ScaleBar, IsTheLargestRoundLengthThatFits) {
  EXPECT_EQ(scale_bar(2, 100).metres, 50);
  EXPECT_EQ(scale_bar(2, 100).px, 100);
  EXPECT_EQ(scale_bar(2, 100).text, "50 m");
  EXPECT_EQ(scale_bar(2, 99.9F).text, "20 m");
  EXPECT_EQ(scale_bar(2, 39.9F).text, "10 m");
  EXPECT_EQ(scale_bar(10, 10).text, "1 m");
  EXPECT_EQ(scale_bar(10, 9.9F).text, "50 cm");
  EXPECT_EQ(scale_bar(1, 0.2F / 2).text, "10 cm");
  EXPECT_EQ(scale_bar(0.1, 100).text, "1 km");
  EXPECT_EQ(scale_bar(0.1, 99).text, "500 m");
  EXPECT_EQ(scale_bar(0.01, 100).text, "10 km");
}

// The next round length is at most two and a half times as long.
TEST(ScaleBar, FillsMoreThanTwoFifthsOfItsRoom) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = rounds(5000); round > 0; --round) {
    const double px_per_m = std::exp(random.real(-9, 9));
    const auto most = static_cast<float>(random.real(20, 400));
    const ScaleBar bar = scale_bar(px_per_m, most);
    EXPECT_LE(bar.px, most * 1.00001F);
    EXPECT_GT(bar.px, most * 0.39999F);
    EXPECT_NEAR(bar.px, bar.metres * px_per_m, 1e-4 * bar.px);
    const double digit = bar.metres / std::pow(10, std::floor(std::log10(bar.metres * 1.0001)));
    EXPECT_NEAR(std::min({std::abs(digit - 1), std::abs(digit - 2), std::abs(digit - 5)}), 0, 1e-9);
  }
}

}  // namespace
}  // namespace nearpit::ui
