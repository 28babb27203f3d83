#include "lattice/lattice.h"

#include <gtest/gtest.h>

#include <cmath>
#include <numbers>

#include "support/random_ground.h"

namespace nearpit {
namespace {

// As the plan's page words it: laid out eastward first, then the whole turned clockwise about the origin by bearing minus 90.
Point by_hand(const Lattice& lattice, const Node& node) {
  const double s = lattice.spacing_m;
  const double h = lattice.kind == LatticeKind::kTriangular ? s * std::sqrt(3.0) / 2 : s;
  const bool shifted = lattice.kind != LatticeKind::kSquare && node.row % 2 == 0;
  const double east = (node.column - 1) * s + (shifted ? s / 2 : 0);
  const double north = (node.row - 1) * h;
  const double turn = (lattice.bearing_deg - 90) * std::numbers::pi / 180;
  return {lattice.origin.x + east * std::cos(turn) + north * std::sin(turn),
          lattice.origin.y - east * std::sin(turn) + north * std::cos(turn)};
}

TEST(Lattice, EastwardRowsByDefault) {
  const Lattice square{LatticeKind::kSquare, 10, {5, 7}};
  EXPECT_NEAR(square.to_ground(Node{1, 1}).x, 5, 1e-9);
  EXPECT_NEAR(square.to_ground(Node{1, 1}).y, 7, 1e-9);
  EXPECT_NEAR(square.to_ground(Node{3, 2}).x, 15, 1e-9);
  EXPECT_NEAR(square.to_ground(Node{3, 2}).y, 27, 1e-9);
  const Lattice triangular{LatticeKind::kTriangular, 10, {5, 7}};
  EXPECT_NEAR(triangular.to_ground(Node{2, 2}).x, 20, 1e-9);
  EXPECT_NEAR(triangular.to_ground(Node{2, 2}).y, 7 + 8.660254037844387, 1e-9);
  const Lattice staggered{LatticeKind::kStaggered, 10, {5, 7}};
  EXPECT_NEAR(staggered.to_ground(Node{2, 1}).x, 10, 1e-9);
  EXPECT_NEAR(staggered.to_ground(Node{2, 1}).y, 17, 1e-9);
}

TEST(Lattice, NorthwardRowsTurnTheRowsToTheWest) {
  const Lattice lattice{LatticeKind::kSquare, 10, {100, 100}, 0};
  const Point next_pit = lattice.to_ground(Node{1, 2});
  const Point next_row = lattice.to_ground(Node{2, 1});
  EXPECT_NEAR(next_pit.x, 100, 1e-9);
  EXPECT_NEAR(next_pit.y, 110, 1e-9);
  EXPECT_NEAR(next_row.x, 90, 1e-9);
  EXPECT_NEAR(next_row.y, 100, 1e-9);
}

TEST(Lattice, CellAreas) {
  EXPECT_DOUBLE_EQ((Lattice{LatticeKind::kSquare, 10, {0, 0}}).cell_area_m2(), 100);
  EXPECT_DOUBLE_EQ((Lattice{LatticeKind::kStaggered, 10, {0, 0}}).cell_area_m2(), 100);
  EXPECT_NEAR((Lattice{LatticeKind::kTriangular, 10, {0, 0}}).cell_area_m2(), 86.60254037844386, 1e-12);
  EXPECT_NEAR((Lattice{LatticeKind::kTriangular, 10, {0, 0}}).row_distance_m(), 8.660254037844387, 1e-12);
  EXPECT_DOUBLE_EQ((Lattice{LatticeKind::kStaggered, 10, {0, 0}}).row_distance_m(), 10);
}

TEST(Lattice, NodesLieWhereThePlanSaysAtAnyBearing) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(3000); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e7);
    const Node node{random.between(-3000, 3000), random.between(-3000, 3000)};
    EXPECT_LT(distance_m(lattice.to_ground(node), by_hand(lattice, node)), 1e-6);
  }
}

// Round trip within 1 mm, node to ground to node, and ground to along to ground.
TEST(Lattice, RoundTrips) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(3000); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e7);
    const Node node{random.between(-20000, 20000), random.between(-20000, 20000)};
    const Point place = lattice.to_ground(node);
    ASSERT_EQ(lattice.nearest(place), node) << "bearing " << lattice.bearing_deg;
    const Point again = lattice.to_ground(lattice.along(place));
    EXPECT_LT(distance_m(place, again), 0.001);
    const Along expected = lattice.along(node);
    const Along got = lattice.along(place);
    EXPECT_LT(std::hypot(got.u - expected.u, got.v - expected.v), 0.001);
  }
}

TEST(Lattice, NearestIsNearest) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(3000); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e5);
    const Point place{lattice.origin.x + random.real(-300, 300), lattice.origin.y + random.real(-300, 300)};
    const Node nearest = lattice.nearest(place);
    const double distance = distance_m(place, lattice.to_ground(nearest));
    for (int row = nearest.row - 2; row <= nearest.row + 2; ++row) {
      for (int column = nearest.column - 2; column <= nearest.column + 2; ++column) {
        EXPECT_LE(distance, distance_m(place, lattice.to_ground(Node{row, column})) + 1e-9);
      }
    }
  }
}

TEST(Lattice, OfEquallyNearTheLowerRowThenTheLowerColumn) {
  const Lattice square{LatticeKind::kSquare, 10, {0, 0}};
  EXPECT_EQ(square.nearest(Point{5, 0}), (Node{1, 1}));
  EXPECT_EQ(square.nearest(Point{0, 5}), (Node{1, 1}));
  EXPECT_EQ(square.nearest(Point{5, 5}), (Node{1, 1}));
  EXPECT_EQ(square.nearest(Point{-5, -5}), (Node{0, 0}));
  const Lattice staggered{LatticeKind::kStaggered, 10, {0, 0}};
  EXPECT_EQ(staggered.nearest(Point{10, 10}), (Node{2, 1}));
  EXPECT_EQ(staggered.nearest(Point{5, 3.75}), (Node{1, 1}));
}

TEST(Lattice, TwoRowsOrOneColumnAreTheSameStepEverywhere) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(500); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e6);
    const Point start = lattice.to_ground(Node{1, 1});
    const Node node{random.between(-500, 500), random.between(-500, 500)};
    for (const Node& step : {Node{2, 0}, Node{0, 1}}) {
      const Point moved = lattice.to_ground(Node{1 + step.row, 1 + step.column});
      const Point from = lattice.to_ground(node);
      const Point to = lattice.to_ground(Node{node.row + step.row, node.column + step.column});
      EXPECT_NEAR(to.x - from.x, moved.x - start.x, 1e-6);
      EXPECT_NEAR(to.y - from.y, moved.y - start.y, 1e-6);
    }
  }
}

TEST(Lattice, DistanceAndBearing) {
  EXPECT_DOUBLE_EQ(distance_m({1, 1}, {4, 5}), 5);
  EXPECT_DOUBLE_EQ(bearing_deg({0, 0}, {0, 5}), 0);
  EXPECT_DOUBLE_EQ(bearing_deg({0, 0}, {5, 0}), 90);
  EXPECT_DOUBLE_EQ(bearing_deg({0, 0}, {0, -5}), 180);
  EXPECT_DOUBLE_EQ(bearing_deg({0, 0}, {-5, 0}), 270);
  EXPECT_DOUBLE_EQ(bearing_deg({0, 0}, {5, 5}), 45);
  EXPECT_DOUBLE_EQ(bearing_deg({3, 3}, {3, 3}), 0);
  const double just_west_of_north = bearing_deg({0, 0}, {-1e-30, 1});
  EXPECT_GE(just_west_of_north, 0);
  EXPECT_LT(just_west_of_north, 360);
}

TEST(Lattice, RowsRunByTheBearing) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(500); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e4);
    const double got = bearing_deg(lattice.to_ground(Node{1, 1}), lattice.to_ground(Node{1, 50}));
    const double off = std::remainder(got - lattice.bearing_deg, 360);
    EXPECT_NEAR(off, 0, 1e-6);
  }
}

}  // namespace
}  // namespace nearpit
