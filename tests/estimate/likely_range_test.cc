#include "estimate/likely_range.h"

#include <gtest/gtest.h>

#include <cmath>
#include <limits>

namespace nearpit {
namespace {

// Student's t, upper critical values: NIST/SEMATECH e-Handbook of Statistical Methods, table 1.3.6.7.2 (from memory).
TEST(TFactor, PublishedValues) {
  struct Row {
    double level;
    double nu;
    double t;
  };
  for (const Row& row : {Row{0.95, 1, 12.706}, Row{0.95, 2, 4.303}, Row{0.95, 5, 2.571}, Row{0.95, 10, 2.228},
                         Row{0.95, 30, 2.042}, Row{0.95, 100, 1.984}, Row{0.90, 10, 1.812}, Row{0.80, 10, 1.372},
                         Row{0.99, 5, 4.032}, Row{0.99, 20, 2.845}, Row{0.998, 10, 4.144}}) {
    EXPECT_NEAR(t_factor(row.level, row.nu), row.t, 5e-4) << row.level << " " << row.nu;
  }
}

// Derived: closed forms at 1 and 2 degrees of freedom, the normal's at many.
TEST(TFactor, ClosedForms) {
  EXPECT_NEAR(t_factor(0.95, 1), std::tan(std::acos(-1.0) * 0.475), 1e-10);
  EXPECT_NEAR(t_factor(0.95, 2), 0.95 * std::sqrt(2 / (1 - 0.95 * 0.95)), 1e-10);
  EXPECT_NEAR(t_factor(0.95, 1e12), 1.959963984540054, 1e-9);
}

// Two areas: W = 0, 0, 6, 2 of 10 units and 0, 3, 9 of 6, one-node units; figures derived in exact fractions.
TEST(DegreesOfFreedom, TwoAreas) {
  const double v1 = (10.0 / 16) * (10.0 / 16) * (1 - 0.4) * 8 / 4;
  const double v2 = (6.0 / 16) * (6.0 / 16) * (1 - 0.5) * 21 / 3;
  ASSERT_NEAR(v1 + v2, 123.0 / 128, 1e-15);
  const auto nu = degrees_of_freedom({{v1, 4, false}, {v2, 3, false}});
  ASSERT_TRUE(nu);
  EXPECT_NEAR(*nu, 4.750824, 5e-7);
  EXPECT_NEAR(t_factor(0.95, *nu), 2.611668, 5e-7);

  std::string why;
  const auto range = plain_t_range({.mean = 11.0 / 4, .variance = 123.0 / 128, .nu = nu}, &why);
  ASSERT_TRUE(range);
  EXPECT_EQ(why, "");
  EXPECT_NEAR(range->lower, 0.189849, 5e-7);
  EXPECT_NEAR(range->upper, 5.310151, 5e-7);
  EXPECT_EQ(range->level, 0.95);
  EXPECT_EQ(range->method, "plain t");
}

TEST(DegreesOfFreedom, OneAreaGivesUnitsLessOne) { EXPECT_DOUBLE_EQ(*degrees_of_freedom({{0.3, 7, false}}), 6); }

TEST(DegreesOfFreedom, AreasDrawnWholeAreLeftOut) {
  EXPECT_DOUBLE_EQ(*degrees_of_freedom({{0.3, 7, false}, {0, 1, true}, {0, 4, true}}), 6);
}

TEST(DegreesOfFreedom, NothingWhereNothingVaries) {
  EXPECT_FALSE(degrees_of_freedom({{0, 7, false}, {0, 1, true}}));
  EXPECT_FALSE(degrees_of_freedom({}));
}

TEST(DegreesOfFreedom, TinyVariancesDoNotUnderflow) {
  EXPECT_DOUBLE_EQ(*degrees_of_freedom({{3e-200, 7, false}, {3e-200, 7, false}}), 12);
}

TEST(PlainTRange, NeverBelowWhatWasFound) {
  std::string why;
  const auto range = plain_t_range({.mean = 1, .variance = 1, .nu = 3, .found_per_node = 0.25}, &why);
  ASSERT_TRUE(range);
  EXPECT_EQ(range->lower, 0.25);
  EXPECT_NEAR(range->upper, 1 + 3.182446, 1e-6);
  const auto above = plain_t_range({.mean = 1, .variance = 0.01, .nu = 3, .found_per_node = 9}, &why);
  ASSERT_TRUE(above);
  EXPECT_EQ(above->lower, 9);
  EXPECT_EQ(above->upper, 9);
}

TEST(PlainTRange, NeverAboveWhatIsPossible) {
  std::string why;
  const auto range = plain_t_range({.mean = 0.5, .variance = 0.04, .nu = 3, .most_per_node = 0.8}, &why);
  ASSERT_TRUE(range);
  EXPECT_NEAR(range->lower, 0, 1e-12);
  EXPECT_EQ(range->upper, 0.8);
  const auto below =
      plain_t_range({.mean = 0.5, .variance = 1e-6, .nu = 3, .found_per_node = 0.1, .most_per_node = 0.3}, &why);
  ASSERT_TRUE(below);
  EXPECT_EQ(below->lower, 0.3);
  EXPECT_EQ(below->upper, 0.3);
}

TEST(SpreadIsUnjudged, OnlyWhereUnitsAreLeftOut) {
  EXPECT_TRUE(spread_is_unjudged(2, 4e-18, false));
  EXPECT_TRUE(spread_is_unjudged(0, 0, false));
  EXPECT_FALSE(spread_is_unjudged(2, 4.1e-18, false));
  EXPECT_FALSE(spread_is_unjudged(2, 0, true));
  EXPECT_FALSE(spread_is_unjudged(2, -1e-19, false));
}

TEST(PlainTRange, SaysWhyThereIsNone) {
  std::string why;
  EXPECT_FALSE(plain_t_range({.mean = 1, .variance = {}, .nu = 3}, &why));
  EXPECT_EQ(why, "no spread can be given");
  EXPECT_FALSE(plain_t_range({.mean = 1, .variance = -0.1, .nu = 3}, &why));
  EXPECT_EQ(why, "the variance estimate came out negative; use Hansen-Hurwitz");
  EXPECT_FALSE(plain_t_range({.mean = 0, .variance = 0, .nu = {}}, &why));
  EXPECT_EQ(why, "nothing found by the sample: no range of this kind can be given");
  EXPECT_FALSE(plain_t_range({.mean = 2, .variance = 3.9e-18, .nu = 3}, &why));
  EXPECT_EQ(why, "every drawn unit carries the same value: the spread can't be judged");
  EXPECT_FALSE(plain_t_range({.mean = 2, .variance = 1, .nu = {}}, &why));
  EXPECT_EQ(why, "every drawn unit carries the same value: the spread can't be judged");
}

TEST(PlainTRange, EveryUnitDrawnIsCertain) {
  std::string why;
  const auto range = plain_t_range({.mean = 2.5, .variance = 0, .nu = {}, .census = true}, &why);
  ASSERT_TRUE(range);
  EXPECT_EQ(range->lower, 2.5);
  EXPECT_EQ(range->upper, 2.5);
  EXPECT_FALSE(plain_t_range({.mean = 0, .variance = 0, .nu = {}, .census = true}, &why));
  EXPECT_EQ(why, "nothing found by the sample: no range of this kind can be given");
}

}  // namespace
}  // namespace nearpit
