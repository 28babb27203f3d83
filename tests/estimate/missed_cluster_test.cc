#include "estimate/missed_cluster.h"

#include <gtest/gtest.h>

#include <vector>

#include "support/exact_oracle.h"

namespace nearpit {
namespace {

std::uint64_t bound(const std::vector<StratumSize>& strata, double level = 0.95) {
  return missed_cluster_pits(strata, level);
}

// Derived in exact fractions.
TEST(MissedCluster, GoldenValues) {
  EXPECT_EQ(bound({{400, 10}}), 102u);
  EXPECT_EQ(bound({{400, 20}}), 54u);
  EXPECT_EQ(bound({{400, 40}}), 27u);
  EXPECT_EQ(bound({{300, 60}}), 13u);
  EXPECT_EQ(bound({{200, 40}, {100, 5}}), 44u);
  EXPECT_EQ(bound({{200, 40}}), 12u);
  EXPECT_EQ(bound({{100, 5}}), 44u);
  EXPECT_EQ(bound({{200, 40}, {100, 20}}), 13u);
  EXPECT_EQ(bound({{300, 30}, {100, 30}}), 27u);
}

TEST(MissedCluster, NothingCanBeMissedWhereAllIsDrawn) {
  EXPECT_EQ(bound({{10, 10}}), 0u);
  EXPECT_EQ(bound({{10, 10}, {5, 5}}), 0u);
  EXPECT_EQ(bound({{100, 96}}), 0u);
}

TEST(MissedCluster, AnAreaWithoutADugPitMayHoldAnything) {
  EXPECT_EQ(bound({{10, 0}}), 10u);
  EXPECT_EQ(bound({{400, 40}, {7, 0}}), 34u);
}

// 19 of 20 with one drawn is missed with chance exactly 1/20.
TEST(MissedCluster, AChanceOfExactlyTheLevelCounts) {
  EXPECT_EQ(bound({{20, 1}}), 19u);
  EXPECT_EQ(bound({{100, 1}}, 0.9), 90u);
  EXPECT_EQ(bound({{100, 1}}, 0.99), 99u);
}

// Every split of M over two areas, in exact fractions.
std::uint64_t worst_split(StratumSize a, StratumSize b, const exact::Rational& least) {
  std::uint64_t most = 0;
  for (std::uint32_t i = 0; i <= a.units; ++i) {
    for (std::uint32_t j = 0; j <= b.units; ++j) {
      const exact::Rational missed = exact::binomial(a.units - i, a.drawn) / exact::binomial(a.units, a.drawn) *
                                     exact::binomial(b.units - j, b.drawn) / exact::binomial(b.units, b.drawn);
      if (missed >= least) most = std::max<std::uint64_t>(most, i + j);
    }
  }
  return most;
}

TEST(MissedCluster, NoSplitOverAreasDoesBetter) {
  for (std::uint32_t first = 1; first <= 12; first += 2) {
    for (std::uint32_t second = 1; second <= 8; ++second) {
      const StratumSize a{12, first};
      const StratumSize b{8, second};
      EXPECT_EQ(bound({a, b}, 0.95), worst_split(a, b, exact::Rational(1, 20))) << first << " " << second;
      EXPECT_EQ(bound({a, b}, 0.8), worst_split(a, b, exact::Rational(1, 5))) << first << " " << second;
    }
  }
}

}  // namespace
}  // namespace nearpit
