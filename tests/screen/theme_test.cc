#include "theme.h"

#include <gtest/gtest.h>

#include "support/picture_contrast.h"
#include "support/test_random.h"

namespace nearpit::ui {
namespace {

double ratio(const Colour& a, const Colour& b) {
  return contrast_ratio({a.red, a.green, a.blue}, {b.red, b.green, b.blue});
}

class ThemeColours : public testing::TestWithParam<bool> {
 protected:
  const Theme& theme() const { return GetParam() ? dusk_theme() : sun_theme(); }
};

TEST_P(ThemeColours, TextStandsOutSevenToOneOnEverySurface) {
  for (const Surface& surface :
       {theme().ground, theme().map, theme().key, theme().primary, theme().chosen, theme().warning, theme().good})
    EXPECT_GE(ratio(surface.text, surface.fill), 7) << int{surface.fill.red} << " " << int{surface.fill.green};
  EXPECT_GE(ratio(theme().quiet, theme().ground.fill), 7);
  EXPECT_GE(ratio(theme().quiet, theme().map.fill), 7);
}

TEST_P(ThemeColours, LinesAndTheRingStandOutThreeToOne) {
  for (const Surface& surface : {theme().ground, theme().map, theme().key})
    EXPECT_GE(ratio(theme().line, surface.fill), 3);
  EXPECT_GE(ratio(theme().focus, theme().ground.fill), 3);
  EXPECT_GE(ratio(theme().focus, theme().map.fill), 3);
  for (const Colour& line : {theme().outline, theme().area_line, theme().hatch})
    EXPECT_GE(ratio(line, theme().map.fill), 3);
}

TEST_P(ThemeColours, EverythingButTheSeeThroughIsOpaque) {
  for (const Colour& colour :
       {theme().ground.fill, theme().map.fill, theme().key.fill, theme().primary.fill, theme().chosen.fill,
        theme().warning.fill, theme().good.fill, theme().quiet, theme().line, theme().focus, theme().outline})
    EXPECT_EQ(colour.alpha, 255);
  EXPECT_LT(theme().cluster.alpha, 128);
  EXPECT_LT(theme().pressed.alpha, 128);
}

INSTANTIATE_TEST_SUITE_P(Both, ThemeColours, testing::Values(false, true),
                         [](const auto& theme) { return theme.param ? "Dusk" : "Sun"; });

TEST(Theme, ItsFormulaIsThePublishedOne) {
  TestRandom random = TestRandom::of_this_run();
  const auto some = [&] { return static_cast<std::uint8_t>(random.between(0, 255)); };
  for (int i = 0; i < rounds(500); ++i) {
    const Colour a{some(), some(), some()};
    const Colour b{some(), some(), some()};
    ASSERT_NEAR(contrast(a, b), ratio(a, b), 1e-9);
    ASSERT_NEAR(contrast(a, b), contrast(b, a), 1e-12);
  }
}

TEST(Theme, DuskIsDarkAndSunIsLight) {
  EXPECT_GT(luminance(sun_theme().ground.fill), 0.7);
  EXPECT_LT(luminance(dusk_theme().ground.fill), 0.05);
}

}  // namespace
}  // namespace nearpit::ui
