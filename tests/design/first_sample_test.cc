#include "design/first_sample.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>
#include <map>
#include <string>

#include "lattice/label.h"
#include "support/held_nodes.h"
#include "support/random_ground.h"

namespace nearpit {
namespace {

using testing::HasSubstr;
using testing::IsEmpty;

constexpr std::uint64_t kSeeds = 20000;

// columns x rows nodes, the first `in_first` columns area "west", the rest "east"; one area "all" when there are none.
struct Setting {
  Frame frame;
  Areas areas;
  PrimaryUnits units;

  Setting(LatticeKind kind, int columns, int rows, DrawKind draw, std::int32_t every, int in_first = 0) {
    const Lattice lattice{kind, 10, {0, 0}};
    // Half a spacing more on the right for the shifted rows.
    frame = Frame::clip(lattice, {{rectangle(0, 0, 10.0 * columns - 5, lattice.row_distance_m() * (rows - 1) + 1), {}}})
                .value();
    areas.list = in_first > 0 ? std::vector<Area>{{"west", {}}, {"east", {}}} : std::vector<Area>{{"all", {}}};
    for (NodeId id = 0; id < frame.size(); ++id) {
      areas.of_node.push_back(in_first > 0 && frame.node(id).column > in_first ? 1 : 0);
    }
    units = PrimaryUnits::of(frame, areas, draw, every);
  }
};

std::vector<std::string> labels_of(const Frame& frame, const FirstSample& sample) {
  std::vector<std::string> labels;
  for (NodeId id = 0; id < frame.size(); ++id) {
    if (sample.holds[static_cast<std::size_t>(id)]) labels.push_back(transect_label(frame.node(id)));
  }
  return labels;
}

// Draws with seeds 1 .. kSeeds; every one of the `possible` samples turns up and none more often than chance lets it. The same every time.
void expect_all_samples_equally_likely(const Setting& setting, const std::vector<std::uint32_t>& count,
                                       std::size_t possible) {
  std::map<std::vector<std::vector<UnitId>>, std::uint64_t> seen;
  for (std::uint64_t seed = 1; seed <= kSeeds; ++seed) {
    ++seen[draw_first_sample(setting.areas, setting.units, count, seed).value().drawn];
  }
  ASSERT_EQ(seen.size(), possible);
  std::vector<std::uint64_t> counts;
  for (const auto& [sample, times] : seen)
    counts.push_back(times);
  EXPECT_GT(equal_chance_p_value(counts), 0.001);
}

TEST(FirstSample, EverySampleOfPitsIsEquallyLikely) {
  const Setting setting(LatticeKind::kSquare, 4, 2, DrawKind::kPits, 1);
  expect_all_samples_equally_likely(setting, {1}, 8);
  expect_all_samples_equally_likely(setting, {3}, 56);
  expect_all_samples_equally_likely(setting, {6}, 28);
}

TEST(FirstSample, EverySampleOfTransectsIsEquallyLikely) {
  const Setting setting(LatticeKind::kStaggered, 3, 6, DrawKind::kTransects, 1);
  expect_all_samples_equally_likely(setting, {2}, 15);
  expect_all_samples_equally_likely(setting, {4}, 15);
}

TEST(FirstSample, EverySystematicSampleIsEquallyLikely) {
  for (const LatticeKind kind : kAllLatticeKinds) {
    const Setting setting(kind, 5, 4, DrawKind::kSystematic, 2);
    expect_all_samples_equally_likely(setting, {1}, 4);
    expect_all_samples_equally_likely(setting, {2}, 6);
  }
  const Setting threes(LatticeKind::kTriangular, 5, 5, DrawKind::kSystematic, 3);
  expect_all_samples_equally_likely(threes, {2}, 36);
}

// West 4 of one kind of unit, east 6 or so: independent of one another, so all pairs of samples are alike.
TEST(FirstSample, EverySampleOfTwoAreasIsEquallyLikely) {
  const Setting pits(LatticeKind::kSquare, 5, 2, DrawKind::kPits, 1, 2);
  expect_all_samples_equally_likely(pits, {2, 2}, 6 * 15);
  expect_all_samples_equally_likely(pits, {1, 5}, 4 * 6);
  const Setting transects(LatticeKind::kTriangular, 5, 4, DrawKind::kTransects, 1, 2);
  expect_all_samples_equally_likely(transects, {2, 1}, 6 * 4);
  const Setting systematic(LatticeKind::kSquare, 6, 4, DrawKind::kSystematic, 2, 3);
  expect_all_samples_equally_likely(systematic, {2, 1}, 6 * 4);
}

TEST(FirstSample, AllOfTheUnitsIsTheWholeFrame) {
  const Setting setting(LatticeKind::kSquare, 4, 3, DrawKind::kPits, 1);
  const FirstSample sample = draw_first_sample(setting.areas, setting.units, {12}, 9).value();
  EXPECT_EQ(sample.nodes, 12);
  EXPECT_EQ(sample.holds, std::vector<bool>(12, true));
}

// What one draws in a later area leaves an earlier area as it is.
TEST(FirstSample, LaterAreasDoNotChangeEarlierOnes) {
  const Setting setting(LatticeKind::kSquare, 10, 10, DrawKind::kPits, 1, 5);
  for (std::uint64_t seed = 1; seed <= 20; ++seed) {
    const auto few = draw_first_sample(setting.areas, setting.units, {7, 1}, seed).value();
    const auto many = draw_first_sample(setting.areas, setting.units, {7, 30}, seed).value();
    EXPECT_EQ(few.drawn[0], many.drawn[0]);
  }
}

TEST(FirstSample, HoldsTheNodesOfDrawnUnits) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(100); ++round) {
    const DrawKind kind =
        random.one_of(std::vector<DrawKind>{DrawKind::kPits, DrawKind::kTransects, DrawKind::kSystematic});
    const Setting setting(random.one_of(kAllLatticeKinds), 12, 9, kind, random.between(2, 4), random.between(0, 1) * 5);
    std::vector<std::uint32_t> count;
    for (const std::uint32_t all : setting.units.count)
      count.push_back(static_cast<std::uint32_t>(random.between(1, static_cast<int>(all))));
    const FirstSample sample =
        draw_first_sample(setting.areas, setting.units, count, static_cast<std::uint64_t>(round)).value();
    for (std::size_t area = 0; area < count.size(); ++area) {
      EXPECT_EQ(sample.drawn[area].size(), count[area]);
      EXPECT_TRUE(std::is_sorted(sample.drawn[area].begin(), sample.drawn[area].end()));
      EXPECT_EQ(std::adjacent_find(sample.drawn[area].begin(), sample.drawn[area].end()), sample.drawn[area].end());
      EXPECT_LT(sample.drawn[area].back(), setting.units.count[area]);
    }
    NodeId nodes = 0;
    for (std::size_t id = 0; id < setting.units.of_node.size(); ++id) {
      const std::vector<UnitId>& drawn = sample.drawn[setting.areas.of_node[id]];
      const bool expected = std::count(drawn.begin(), drawn.end(), setting.units.of_node[id]) == 1;
      EXPECT_EQ(sample.holds[id], expected);
      nodes += expected ? 1 : 0;
    }
    EXPECT_EQ(sample.nodes, nodes);
    const FirstSample again = FirstSample::from_units(setting.areas, setting.units, sample.drawn);
    EXPECT_EQ(again.holds, sample.holds);
    EXPECT_EQ(again.nodes, sample.nodes);
  }
}

// Frozen: survey files name a seed, and the same seed gives the same pits on every machine and with every later version.
TEST(FirstSample, PinnedDraws) {
  const Setting pits(LatticeKind::kSquare, 20, 15, DrawKind::kPits, 1);
  EXPECT_EQ(labels_of(pits.frame, draw_first_sample(pits.areas, pits.units, {8}, 7).value()),
            (std::vector<std::string>{"T1-6", "T2-1", "T3-8", "T3-9", "T4-18", "T7-13", "T11-15", "T12-16"}));
  const Setting two(LatticeKind::kTriangular, 12, 10, DrawKind::kPits, 1, 6);
  EXPECT_EQ(labels_of(two.frame, draw_first_sample(two.areas, two.units, {3, 4}, 20260504).value()),
            (std::vector<std::string>{"T1-6", "T1-11", "T2-7", "T2-9", "T3-12", "T9-2", "T10-1"}));
  const Setting transects(LatticeKind::kStaggered, 2, 40, DrawKind::kTransects, 1);
  EXPECT_EQ(draw_first_sample(transects.areas, transects.units, {6}, 7).value().drawn[0],
            (std::vector<UnitId>{12, 23, 24, 32, 33, 37}));
  const Setting systematic(LatticeKind::kTriangular, 12, 12, DrawKind::kSystematic, 4);
  EXPECT_EQ(draw_first_sample(systematic.areas, systematic.units, {3}, 7).value().drawn[0],
            (std::vector<UnitId>{0, 11, 13}));
}

TEST(FirstSample, CountsOutsideTheUnitsAreRefusedByAreaName) {
  const Setting setting(LatticeKind::kSquare, 5, 2, DrawKind::kPits, 1, 2);
  const Result<FirstSample> none = draw_first_sample(setting.areas, setting.units, {2, 0}, 1);
  ASSERT_FALSE(none);
  EXPECT_EQ(none.error().kind, ErrorKind::kBadInput);
  EXPECT_THAT(none.error().one_line(), HasSubstr("east"));
  const Result<FirstSample> too_many = draw_first_sample(setting.areas, setting.units, {5, 1}, 1);
  ASSERT_FALSE(too_many);
  EXPECT_THAT(too_many.error().one_line(), HasSubstr("west"));
  EXPECT_THAT(too_many.error().one_line(), HasSubstr("5"));
  EXPECT_THAT(too_many.error().one_line(), HasSubstr("4"));
}

TEST(FirstSample, ListedPitsStandForTheirUnits) {
  const Setting pits(LatticeKind::kSquare, 5, 4, DrawKind::kPits, 1);
  const FirstSample some = listed_first_sample(pits.areas, pits.units, {11, 3, 11}).value();
  EXPECT_EQ(some.drawn, (std::vector<std::vector<UnitId>>{{3, 11}}));
  EXPECT_EQ(some.nodes, 2);
  // Two of row 2 and one of row 4: two transects.
  const Setting rows(LatticeKind::kSquare, 5, 4, DrawKind::kTransects, 1);
  const FirstSample transects = listed_first_sample(rows.areas, rows.units, {7, 16, 5}).value();
  EXPECT_EQ(transects.drawn, (std::vector<std::vector<UnitId>>{{1, 3}}));
  EXPECT_EQ(transects.nodes, 10);
  const Setting parts(LatticeKind::kSquare, 5, 4, DrawKind::kSystematic, 2);
  const FirstSample one = listed_first_sample(parts.areas, parts.units, {0, 2, 14}).value();
  EXPECT_EQ(one.drawn[0].size(), 1U);
  EXPECT_EQ(one.nodes, 6);
}

TEST(FirstSample, AnAreaWithoutAListedPitIsRefused) {
  const Setting setting(LatticeKind::kSquare, 5, 2, DrawKind::kPits, 1, 2);
  const Result<FirstSample> listed = listed_first_sample(setting.areas, setting.units, {0, 1});
  ASSERT_FALSE(listed);
  EXPECT_THAT(listed.error().one_line(), HasSubstr("east"));
}

std::vector<std::string> warnings(const Setting& setting, const std::vector<std::uint32_t>& count) {
  return first_sample_warnings(setting.areas, setting.units,
                               draw_first_sample(setting.areas, setting.units, count, 3).value());
}

TEST(FirstSample, Warnings) {
  const Setting pits(LatticeKind::kSquare, 10, 10, DrawKind::kPits, 1, 5);
  EXPECT_THAT(warnings(pits, {10, 10}), IsEmpty());
  const std::vector<std::string> lone = warnings(pits, {10, 1});
  ASSERT_FALSE(lone.empty());
  EXPECT_THAT(lone[0], HasSubstr("east"));
  const Setting systematic(LatticeKind::kSquare, 10, 10, DrawKind::kSystematic, 3);
  EXPECT_THAT(warnings(systematic, {1}), testing::Not(IsEmpty()));
  EXPECT_THAT(warnings(systematic, {4}), IsEmpty());
  const Setting transects(LatticeKind::kSquare, 10, 10, DrawKind::kTransects, 1);
  EXPECT_THAT(warnings(transects, {4}), testing::Not(IsEmpty()));
  EXPECT_THAT(warnings(transects, {5}), IsEmpty());
}

}  // namespace
}  // namespace nearpit
