#include "estimate/sample_design.h"

#include <gtest/gtest.h>

namespace nearpit {
namespace {

SampleDesign pits(std::vector<StratumSize> strata) {
  return {.strata = std::move(strata), .drawn = {}, .nodes = 100, .one_node_units = true};
}

TEST(SampleDesign, LoneUnitIsOneOfSeveral) {
  EXPECT_TRUE(pits({{10, 3}, {5, 1}}).lone_unit());
  EXPECT_FALSE(pits({{10, 3}, {1, 1}}).lone_unit());
  EXPECT_FALSE(pits({{10, 3}, {5, 2}}).lone_unit());
}

TEST(SampleDesign, CensusDrawsEveryUnitOfEveryArea) {
  EXPECT_TRUE(pits({{10, 10}, {1, 1}}).census());
  EXPECT_FALSE(pits({{10, 10}, {5, 4}}).census());
}

TEST(SampleDesign, OnlyPitsOfOneAreaHaveRoundingTakenForZero) {
  const SampleDesign one_area = pits({{10, 3}});
  EXPECT_EQ(zero_if_rounding(one_area, 10, -9.9e-11), 0);
  EXPECT_EQ(zero_if_rounding(one_area, 10, -1.1e-10), -1.1e-10);
  EXPECT_EQ(zero_if_rounding(pits({{10, 3}, {5, 2}}), 10, -9.9e-11), -9.9e-11);
  SampleDesign transects = one_area;
  transects.one_node_units = false;
  EXPECT_EQ(zero_if_rounding(transects, 10, 9.9e-11), 9.9e-11);
}

}  // namespace
}  // namespace nearpit
