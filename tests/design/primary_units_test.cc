#include "design/primary_units.h"

#include <gtest/gtest.h>

#include <cmath>
#include <map>
#include <set>
#include <utility>

#include "support/held_nodes.h"
#include "support/random_ground.h"

namespace nearpit {
namespace {

Areas whole(const Frame& frame) {
  return {{{"all", {}}}, std::vector<AreaId>(static_cast<std::size_t>(frame.size()), 0)};
}

// Ragged areas: the law holds whatever the shape of an area.
Areas ragged(TestRandom& random, const Frame& frame) {
  Areas areas{{{"a", {}}, {"b", {}}, {"c", {}}}, {}};
  for (NodeId id = 0; id < frame.size(); ++id) {
    areas.of_node.push_back(static_cast<AreaId>(id < 3 ? id : random.between(0, 2)));
  }
  return areas;
}

// What makes two nodes of an area one unit, as design says it, without any number.
std::pair<int, int> unit_key(const Frame& frame, NodeId id, DrawKind kind, std::int32_t every) {
  const Node node = frame.node(id);
  if (kind == DrawKind::kPits) return {node.row, node.column};
  if (kind == DrawKind::kTransects) return {node.row, 0};
  const auto part = [every](int value) { return ((value % every) + every) % every; };
  const int p = node.row - 1;
  if (frame.lattice().kind == LatticeKind::kSquare) return {part(node.column - 1), part(p)};
  const int q = node.column - 1 - static_cast<int>(std::floor(p / 2.0));
  return {part(q), part(p)};
}

// Numbered 0 .. count-1 within the area, none empty, in the order of their first node, or for systematic by start.
TEST(PrimaryUnits, PartitionEachArea) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(120); ++round) {
    MultiPolygon boundary;
    const Frame frame = random_frame(random, random.one_of(kAllLatticeKinds), 30, 300, &boundary);
    const Areas areas = random.chance(0.5) ? whole(frame) : ragged(random, frame);
    const DrawKind kind =
        random.one_of(std::vector<DrawKind>{DrawKind::kPits, DrawKind::kTransects, DrawKind::kSystematic});
    const std::int32_t every = random.between(2, 6);
    const PrimaryUnits units = PrimaryUnits::of(frame, areas, kind, every);
    ASSERT_EQ(units.of_node.size(), static_cast<std::size_t>(frame.size()));
    ASSERT_EQ(units.count.size(), areas.list.size());
    for (std::size_t area = 0; area < areas.list.size(); ++area) {
      std::map<std::pair<int, int>, UnitId> of_key;
      std::map<UnitId, std::pair<int, int>> key_of;
      for (NodeId id = 0; id < frame.size(); ++id) {
        if (areas.of_node[static_cast<std::size_t>(id)] != area) continue;
        const UnitId unit = units.of_node[static_cast<std::size_t>(id)];
        const std::pair<int, int> key = unit_key(frame, id, kind, every);
        const auto [known, is_new] = of_key.emplace(key, unit);
        EXPECT_EQ(known->second, unit);
        if (is_new && kind != DrawKind::kSystematic) {
          EXPECT_EQ(unit, of_key.size() - 1);
        }
        EXPECT_EQ(key_of.emplace(unit, key).first->second, key);
      }
      EXPECT_EQ(units.count[area], of_key.size());
      EXPECT_EQ(key_of.size(), of_key.size());
      if (kind != DrawKind::kSystematic) continue;
      UnitId next = 0;
      for (const auto& [key, unit] : of_key)
        EXPECT_EQ(unit, next++) << key.first << ' ' << key.second;
    }
  }
}

// Each interleaved part is a lattice of the same kind with `every` times the spacing: away from the frame's edge each pit has its nearest
// pits of the part at the same distances and bearings as on the whole lattice, only so much farther.
TEST(PrimaryUnits, SystematicPartsAreOfTheSameKind) {
  for (const LatticeKind kind : kAllLatticeKinds) {
    for (std::int32_t every = 2; every <= 5; ++every) {
      const Lattice lattice{kind, 10, {0, 0}, 90};
      const double side = 10.0 * (every * 6 + 1);
      const Frame frame = Frame::clip(lattice, {{rectangle(0, 0, side, side), {}}}).value();
      const PrimaryUnits units = PrimaryUnits::of(frame, whole(frame), DrawKind::kSystematic, every);
      EXPECT_EQ(units.count[0], static_cast<std::uint32_t>(every * every));
      const Lattice wider{kind, 10.0 * every, {0, 0}, 90};
      const std::vector<Node> around{{0, 1}, {1, 0}, {1, kind == LatticeKind::kSquare ? 1 : -1}};
      for (NodeId id = 0; id < frame.size(); ++id) {
        const Point at = frame.ground(id);
        if (at.x < 25.0 * every || at.x > side - 25.0 * every || at.y < 15.0 * every || at.y > side - 15.0 * every)
          continue;
        double nearest = 1e9;
        std::set<NodeId> same_unit;
        for (NodeId other = 0; other < frame.size(); ++other) {
          if (other == id ||
              units.of_node[static_cast<std::size_t>(other)] != units.of_node[static_cast<std::size_t>(id)])
            continue;
          nearest = std::min(nearest, distance_m(at, frame.ground(other)));
          same_unit.insert(other);
        }
        EXPECT_NEAR(nearest, 10.0 * every, 1e-6);
        for (const Node& step : around) {
          const Point from = wider.to_ground(Node{1, 1});
          const Point to = wider.to_ground(Node{1 + step.row, 1 + step.column});
          for (const double way : {1.0, -1.0}) {
            const Point place{at.x + way * (to.x - from.x), at.y + way * (to.y - from.y)};
            const NodeId there = frame.find(lattice.nearest(place));
            ASSERT_NE(there, kNoNode);
            EXPECT_LT(distance_m(frame.ground(there), place), 1e-6);
            EXPECT_EQ(same_unit.count(there), 1U) << lattice_kind_name(kind) << " every " << every;
          }
        }
      }
    }
  }
}

TEST(PrimaryUnits, EmptyPartsDoNotCount) {
  // Two rows of three nodes: with every 4 there are six starts, not sixteen.
  const Frame frame = Frame::clip({LatticeKind::kSquare, 10, {0, 0}}, {{rectangle(0, 0, 20, 10), {}}}).value();
  EXPECT_EQ(PrimaryUnits::of(frame, whole(frame), DrawKind::kSystematic, 4).count[0], 6U);
}

TEST(PrimaryUnits, Names) {
  EXPECT_EQ(draw_kind_name(DrawKind::kPits), "pits");
  EXPECT_EQ(draw_kind_name(DrawKind::kTransects), "transects");
  EXPECT_EQ(draw_kind_name(DrawKind::kSystematic), "systematic");
}

}  // namespace
}  // namespace nearpit
