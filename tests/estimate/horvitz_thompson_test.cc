#include "estimate/horvitz_thompson.h"

#include <gtest/gtest.h>

#include <cmath>

#include "estimate/hansen_hurwitz.h"
#include "estimate/met_networks.h"
#include "estimate/textbook_pair.h"
#include "support/lattice_picture.h"

namespace nearpit {
namespace {

TEST(HorvitzThompson, TextbookPair) {
  const TextbookPair pair;
  const double first = inclusion_chance(pair.design, pair.networks[0]);
  const double second = inclusion_chance(pair.design, pair.networks[1]);
  EXPECT_NEAR(first, 0.1417650710, 5e-11);
  EXPECT_NEAR(second, 0.2457906438, 5e-11);
  EXPECT_NEAR(first * second + joint_excess(400, 10, 6, 11, 0), 0.0319971261, 5e-11);
  const Moments moments = horvitz_thompson(pair.design, pair.networks, pair.y);
  EXPECT_NEAR(moments.mean, 1.7231777, 5e-8);
  ASSERT_TRUE(moments.variance);
  EXPECT_NEAR(*moments.variance, 1.1162552, 5e-8);
  EXPECT_EQ(horvitz_thompson_mean(pair.design, pair.networks, pair.y), moments.mean);
}

// The same networks told as many-node units must give the same: sizes then come from sets.
TEST(HorvitzThompson, BothWaysOfGroupingAgree) {
  TextbookPair pair;
  for (double& y : pair.y)
    y += 1;
  const Moments pits = horvitz_thompson(pair.design, pair.networks, pair.y);
  pair.design.one_node_units = false;
  const Moments units = horvitz_thompson(pair.design, pair.networks, pair.y);
  EXPECT_DOUBLE_EQ(pits.mean, units.mean);
  EXPECT_NEAR(*pits.variance, *units.variance, 1e-13 * *units.variance);
}

// Values derived in exact fractions.
TEST(JointExcess, ExactValues) {
  EXPECT_NEAR(joint_excess(400, 10, 6, 11, 0), -2.847401990758761e-3, 1e-13 * 2.8e-3);
  EXPECT_NEAR(joint_excess(10'000'000, 10, 2, 3, 0), -5.9999784000243e-13, 1e-13 * 6e-13);
  EXPECT_NEAR(joint_excess(1000, 20, 5, 7, 3), 4.89134490006435e-2, 1e-13 * 4.9e-2);
}

TEST(JointExcess, Symmetric) {
  EXPECT_DOUBLE_EQ(joint_excess(1000, 20, 5, 7, 3), joint_excess(1000, 20, 7, 5, 3));
  EXPECT_DOUBLE_EQ(joint_excess(50, 7, 1, 12, 1), joint_excess(50, 7, 12, 1, 1));
}

// alpha_jk = n(n-1)/(N(N-1)) for two single nodes; alpha (1 - alpha) for a network with itself.
TEST(JointExcess, ClosedForms) {
  const double N = 1e7;
  const double n = 1e6;
  EXPECT_NEAR(joint_excess(10'000'000, 1'000'000, 1, 1, 0) / (-n * (N - n) / (N * N * (N - 1))), 1, 1e-12);
  EXPECT_NEAR(joint_excess(10'000'000, 1'000'000, 1, 1, 1), 0.1 * 0.9, 1e-15);
}

TEST(JointExcess, SurelyMetNetworksAreIndependent) {
  EXPECT_EQ(joint_excess(10, 4, 7, 2, 0), 0);
  EXPECT_EQ(joint_excess(10, 4, 2, 7, 1), 0);
}

// 3 and 4 units can each be missed by 4 drawn of 10, the 7 together can't: alpha_jk = 1 - q_j - q_k.
TEST(JointExcess, OnlyTheUnionIsSurelyMet) {
  const double q3 = 35.0 / 210;  // C(7,4)/C(10,4)
  const double q4 = 15.0 / 210;  // C(6,4)/C(10,4)
  EXPECT_NEAR(joint_excess(10, 4, 3, 4, 0), -q3 * q4, 1e-16);
}

TEST(JointExcess, NoOverflowInALargeFrame) {
  for (const std::uint32_t x : {1u, 100u, 6'900u, 100'000u, 4'000'000u}) {
    for (const std::uint32_t both : {0u, x / 2, x}) {
      const double excess = joint_excess(10'000'000, 1'000'000, x, x, both);
      EXPECT_TRUE(std::isfinite(excess)) << x << " " << both;
      EXPECT_LE(std::abs(excess), 0.25);
    }
  }
  // ln q = -727: exp(R) alone would overflow, and q(1 - q) is still a number.
  EXPECT_GT(joint_excess(10'000'000, 1'000'000, 6'900, 6'900, 6'900), 0);
}

TEST(HorvitzThompson, ALargeFrameKeepsItsDigits) {
  // Two networks of 2 and 3 nodes among ten drawn of 10^7: v = N^-2 [sum y^2 (1-a)/a^2 + 2 y y d/(a a a_jk)], derived in exact fractions.
  SampleDesign design{.strata = {{10'000'000, 10}}, .drawn = {}, .nodes = 10'000'000, .one_node_units = true};
  const std::vector<MetNetwork> networks{{{{0, 0}, {0, 1}}}, {{{0, 2}, {0, 3}, {0, 4}}}};
  const double a2 = inclusion_chance(design, networks[0]);
  const double a3 = inclusion_chance(design, networks[1]);
  EXPECT_NEAR(a2 / (2e-6 - 9e-13), 1, 1e-12);  // 1 - q = 2n/N - n(n-1)/(N(N-1))
  const Moments moments = horvitz_thompson(design, networks, std::vector<double>{4, 9});
  EXPECT_NEAR(moments.mean / ((4 / a2 + 9 / a3) / 1e7), 1, 1e-14);
  const double delta = -5.9999784000243e-13;
  const double scaled =
      16 * (1 - a2) / (a2 * a2) + 81 * (1 - a3) / (a3 * a3) + 2 * 36 * delta / (a2 * a3 * (a2 * a3 + delta));
  EXPECT_NEAR(*moments.variance / (scaled / 1e14), 1, 1e-11);
}

TEST(HorvitzThompson, NoVarianceWithALoneUnit) {
  // N = 2, n = 1: a number would come out, and its mean would be 5/2 where the variance is 1 (y = 1, 3).
  const SampleDesign design{.strata = {{2, 1}}, .drawn = {{0, 1}}, .nodes = 2, .one_node_units = true};
  const Moments moments = horvitz_thompson(design, std::vector<MetNetwork>{{{{0, 1}}}}, std::vector<double>{3});
  EXPECT_DOUBLE_EQ(moments.mean, 3);
  EXPECT_FALSE(moments.variance);
}

// Blue-winged teal, Smith DR, Conroy MJ & Brakhage DH 1995, Biometrics 51:777-788 (layout from memory; the total, 14121, is a textbook's).
// V over all samples by formula; the expected values are derived.
constexpr char kTeal[] = R"(
  o. o. o3 o5  o.  o. o. o.  o.     o.
  o. o. o. o24 o14 o. o. o10 o103   o.
  o. o. o. o.  o2  o3 o2 o.  o13639 o1
  o. o. o. o.  o.  o. o. o.  o14    o122
  o. o. o. o.  o.  o. o2 o.  o.     o177
)";

TEST(HorvitzThompson, Teal) {
  const Survey survey = LatticePicture(kTeal, {}).survey();
  MetNetworks met = met_networks(survey, find_networks(survey.dig_list()), 2);
  const std::vector<double>& y = met.totals[0].sum;
  double total = 0;
  for (const double value : y)
    total += value;
  ASSERT_EQ(total, 14121);

  const std::vector<double> values = unit_values(met.design, met.networks, y);
  double squares = 0;
  for (const double value : values)
    squares += (value - 282.42) * (value - 282.42);
  EXPECT_NEAR(squares / 49 * (1 - 10.0 / 50) / 10, 39635.87715, 5e-6);

  met.design.strata[0].drawn = 10;
  double scaled = 0;
  for (std::size_t j = 0; j < y.size(); ++j) {
    for (std::size_t k = 0; k < y.size(); ++k) {
      if (y[j] == 0 || y[k] == 0) continue;
      const auto xj = static_cast<std::uint32_t>(met.networks[j].units.size());
      const auto xk = static_cast<std::uint32_t>(met.networks[k].units.size());
      scaled += y[j] * y[k] * joint_excess(50, 10, xj, xk, j == k ? xj : 0) /
                (inclusion_chance(met.design, met.networks[j]) * inclusion_chance(met.design, met.networks[k]));
    }
  }
  EXPECT_NEAR(scaled / 2500, 18151.98524, 5e-6);
}

}  // namespace
}  // namespace nearpit
