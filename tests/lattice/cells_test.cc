#include "lattice/cells.h"

#include <gtest/gtest.h>

#include <set>

#include "support/held_nodes.h"
#include "support/random_ground.h"

namespace nearpit {
namespace {

TEST(Cells, OneNodeIsItsRectangle) {
  const Lattice lattice{LatticeKind::kTriangular, 10, {0, 0}};
  const MultiPolygon outline = cells_outline(lattice, {{1, 1}});
  ASSERT_EQ(outline.size(), 1U);
  const Box box = bounding_box(outline);
  EXPECT_NEAR(box.low.x, -5, 1e-6);
  EXPECT_NEAR(box.high.x, 5, 1e-6);
  EXPECT_NEAR(box.low.y, -4.330127018922193, 1e-6);
  EXPECT_NEAR(box.high.y, 4.330127018922193, 1e-6);
}

TEST(Cells, ARingOfPitsHasAHole) {
  const Lattice lattice{LatticeKind::kSquare, 10, {0, 0}};
  const MultiPolygon outline = cells_outline(lattice, {{1, 1}, {1, 2}, {1, 3}, {2, 1}, {2, 3}, {3, 1}, {3, 2}, {3, 3}});
  ASSERT_EQ(outline.size(), 1U);
  EXPECT_EQ(outline[0].holes.size(), 1U);
  EXPECT_NEAR(area_m2(outline), 800, 1e-6);
}

TEST(Cells, NoNodesNoGround) { EXPECT_TRUE(cells_outline({LatticeKind::kSquare, 10, {0, 0}}, {}).empty()); }

// The area is the number of nodes times the cell; the middles of the cells of the set are inside and no others are.
TEST(Cells, HoldTheirNodesAndNoOthers) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(60); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e5);
    std::set<Node> nodes;
    const double share = random.real(0.1, 0.9);
    for (int row = -3; row <= 5; ++row) {
      for (int column = -3; column <= 5; ++column) {
        if (random.chance(share)) nodes.insert({row, column});
      }
    }
    const MultiPolygon outline = cells_outline(lattice, {nodes.begin(), nodes.end()});
    const double expected = static_cast<double>(nodes.size()) * lattice.cell_area_m2();
    EXPECT_NEAR(area_m2(outline), expected, 1e-6 * expected);
    for (int row = -4; row <= 6; ++row) {
      for (int column = -4; column <= 6; ++column) {
        const double distance = distance_by_boost(outline, lattice.to_ground(Node{row, column}));
        EXPECT_EQ(distance == 0, nodes.count({row, column}) == 1) << row << ' ' << column;
      }
    }
  }
}

}  // namespace
}  // namespace nearpit
