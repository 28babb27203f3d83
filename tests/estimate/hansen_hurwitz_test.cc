#include "estimate/hansen_hurwitz.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "estimate/textbook_pair.h"

namespace nearpit {
namespace {

using testing::DoubleEq;
using testing::ElementsAre;

TEST(HansenHurwitz, TextbookPair) {
  const TextbookPair pair;
  const Moments moments = hansen_hurwitz(pair.design, pair.networks, pair.y);
  EXPECT_NEAR(moments.mean, 1.572727, 5e-7);
  EXPECT_NEAR(moments.mean, (6 + 107.0 / 11) / 10, 1e-15);
  ASSERT_TRUE(moments.variance);
  EXPECT_NEAR(*moments.variance, 1.147089, 5e-7);
}

// Transects 1 and 3 of four: a network in transects 0 and 1, one in 1 and 3, one in 3 alone.
TEST(HansenHurwitz, EachDrawnUnitCarriesItsShareOfTheNetworksItMeets) {
  const SampleDesign design{.strata = {{4, 2}}, .drawn = {{0, 1}, {0, 3}}, .nodes = 20, .one_node_units = false};
  const std::vector<MetNetwork> networks{{{{0, 0}, {0, 1}}}, {{{0, 1}, {0, 3}}}, {{{0, 3}}}};
  const std::vector<double> y{8, 6, 5};
  EXPECT_THAT(unit_values(design, networks, y), ElementsAre(DoubleEq(7), DoubleEq(8)));
  const Moments moments = hansen_hurwitz(design, networks, y);
  EXPECT_DOUBLE_EQ(moments.mean, 4.0 / 2 * 15 / 20);
  EXPECT_DOUBLE_EQ(*moments.variance, (4.0 / 20) * (4.0 / 20) * 0.5 * 0.5 / 2);
}

TEST(HansenHurwitz, NoVarianceWithALoneUnit) {
  const SampleDesign design{
      .strata = {{4, 2}, {3, 1}}, .drawn = {{0, 1}, {0, 3}, {1, 0}}, .nodes = 7, .one_node_units = true};
  const std::vector<MetNetwork> networks{{{{0, 1}}}, {{{0, 3}}}, {{{1, 0}}}};
  const Moments moments = hansen_hurwitz(design, networks, std::vector<double>{1, 2, 3});
  EXPECT_DOUBLE_EQ(moments.mean, (4 * 1.5 + 3 * 3) / 7);
  EXPECT_FALSE(moments.variance);
  EXPECT_TRUE(moments.parts.empty());
}

TEST(HansenHurwitz, AnAreaDrawnWholeAddsNothing) {
  const SampleDesign design{
      .strata = {{4, 2}, {2, 2}}, .drawn = {{0, 1}, {0, 3}, {1, 0}, {1, 1}}, .nodes = 6, .one_node_units = true};
  const std::vector<MetNetwork> networks{{{{0, 1}}}, {{{0, 3}}}, {{{1, 0}}}, {{{1, 1}}}};
  const Moments moments = hansen_hurwitz(design, networks, std::vector<double>{1, 2, 100, 0});
  ASSERT_EQ(moments.parts.size(), 2u);
  EXPECT_FALSE(moments.parts[0].census);
  EXPECT_TRUE(moments.parts[1].census);
  EXPECT_EQ(moments.parts[1].variance, 0);
  EXPECT_DOUBLE_EQ(*moments.variance, moments.parts[0].variance);
}

// Large equal counts: the spread is 0 and not what rounding left.
TEST(HansenHurwitz, EqualValuesHaveNoSpread) {
  SampleDesign design{.strata = {{1000, 3}, {1000, 3}}, .drawn = {}, .nodes = 2000, .one_node_units = true};
  std::vector<MetNetwork> networks;
  for (const std::uint16_t area : {std::uint16_t{0}, std::uint16_t{1}}) {
    for (std::uint32_t unit = 0; unit < 3; ++unit) {
      design.drawn.push_back({area, unit});
      networks.push_back({{{area, unit}}});
    }
  }
  const Moments moments = hansen_hurwitz(design, networks, std::vector<double>(6, 1e9 / 3));
  EXPECT_LE(*moments.variance, 1e-16 * moments.mean * moments.mean);
}

}  // namespace
}  // namespace nearpit
