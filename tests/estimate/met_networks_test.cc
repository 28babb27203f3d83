#include "estimate/met_networks.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "support/lattice_picture.h"

namespace nearpit {
namespace {

using testing::ElementsAre;

MetNetworks met_of(const Survey& survey) { return met_networks(survey, find_networks(survey.dig_list()), 2); }

std::vector<UnitRef> units(std::vector<std::uint32_t> numbers) {
  std::vector<UnitRef> refs;
  for (const std::uint32_t number : numbers)
    refs.push_back({0, number});
  return refs;
}

TEST(MetNetworks, PitsOfOneArea) {
  const MetNetworks met = met_of(LatticePicture("o3/1 1 . o0/2 . o4", {.at_least = 2}).survey());
  EXPECT_TRUE(met.design.one_node_units);
  EXPECT_EQ(met.design.nodes, 6u);
  EXPECT_EQ(met.design.drawn, units({0, 3, 5}));
  ASSERT_EQ(met.networks.size(), 5u);  // two of positives, and the rest of each drawn unit
  EXPECT_EQ(met.networks[0].units, units({0}));
  EXPECT_EQ(met.networks[1].units, units({5}));
  EXPECT_EQ(met.networks[3].units, units({3}));
  EXPECT_THAT(met.totals[0].sum, ElementsAre(3, 4, 0, 0, 0));  // target; the edge unit's 1 has no weight
  EXPECT_THAT(met.totals[0].squares, ElementsAre(9, 16, 0, 0, 0));
  EXPECT_THAT(met.totals[2].sum, ElementsAre(1, 0, 0, 2, 0));  // the second find
  EXPECT_THAT(met.totals[3].sum, ElementsAre(1, 1, 0, 0, 0));  // positive pits
  EXPECT_THAT(met.own_totals[0].sum, ElementsAre(3, 0, 4));
  EXPECT_THAT(met.own_totals[2].sum, ElementsAre(1, 2, 0));
  EXPECT_THAT(met.found, ElementsAre(8, 8, 3, 2));
}

TEST(MetNetworks, TransectsAcrossAreas) {
  PicturePlan plan{.draw = DrawKind::kTransects, .at_least = 2, .areas = "a a b\na a b\na a b"};
  const MetNetworks met = met_of(LatticePicture("o1 o3 4\n . 2 .\n . . o1", plan).survey());
  EXPECT_FALSE(met.design.one_node_units);
  ASSERT_EQ(met.design.strata.size(), 2u);
  EXPECT_EQ(met.design.strata[0].units, 3u);
  EXPECT_EQ(met.design.strata[1].drawn, 1u);
  ASSERT_EQ(met.networks.size(), 3u);
  EXPECT_EQ(met.networks[0].units, (std::vector<UnitRef>{{0, 0}, {0, 1}, {1, 0}}));
  EXPECT_THAT(met.totals[0].sum, ElementsAre(9, 1, 1));
  EXPECT_THAT(met.own_totals[0].sum, ElementsAre(4, 1));
}

TEST(MetNetworks, OnlyDugPitsOfTheDesignCount) {
  const LatticePicture picture("o3 x . or . 9 . o. ?", {});
  Survey survey = picture.survey();
  survey.set_off_grid("J1", head_of(picture.record(5)));
  const MetNetworks met = met_of(survey);
  EXPECT_THAT(met.totals[0].sum, ElementsAre(3, 0, 0, 0));
  EXPECT_THAT(met.own_totals[0].sum, ElementsAre(3, 0, 0));
  EXPECT_EQ(met.found[0], 12);  // the judgement pit on the grid too, the one off it not
}

}  // namespace
}  // namespace nearpit
