#include "lattice/neighbour_rule.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <set>

namespace nearpit {
namespace {

struct Pairing {
  LatticeKind kind;
  NeighbourRule rule;
  std::size_t degree;
  std::vector<double> distances;  // in spacings, ascending
};

const double kDiagonal = std::sqrt(2.0);
const double kStaggeredSide = std::sqrt(1.25);

const std::vector<Pairing> kPairings{
    {LatticeKind::kSquare, NeighbourRule::kEight, 8, {1, 1, 1, 1, kDiagonal, kDiagonal, kDiagonal, kDiagonal}},
    {LatticeKind::kSquare, NeighbourRule::kFour, 4, {1, 1, 1, 1}},
    {LatticeKind::kSquare, NeighbourRule::kFourByTwo, 8, {1, 1, 1, 1, 2, 2, 2, 2}},
    {LatticeKind::kStaggered,
     NeighbourRule::kSix,
     6,
     {1, 1, kStaggeredSide, kStaggeredSide, kStaggeredSide, kStaggeredSide}},
    {LatticeKind::kTriangular, NeighbourRule::kSix, 6, {1, 1, 1, 1, 1, 1}},
};

std::vector<Node> neighbours_of(NeighbourRule rule, const Node& node) {
  std::vector<Node> found;
  for (const Node& step : neighbour_offsets(rule, node.row)) {
    found.push_back({node.row + step.row, node.column + step.column});
  }
  return found;
}

TEST(NeighbourRule, SymmetricAndNeverItself) {
  for (const Pairing& pairing : kPairings) {
    for (int row = -4; row <= 5; ++row) {
      const Node node{row, 3};
      for (const Node& other : neighbours_of(pairing.rule, node)) {
        EXPECT_NE(other, node);
        const std::vector<Node> back = neighbours_of(pairing.rule, other);
        EXPECT_EQ(std::count(back.begin(), back.end(), node), 1) << neighbour_rule_name(pairing.rule) << " row " << row;
      }
    }
  }
}

TEST(NeighbourRule, TheSameNumberEverywhereAllDifferentInRowThenColumnOrder) {
  for (const Pairing& pairing : kPairings) {
    EXPECT_EQ(neighbour_count(pairing.rule), pairing.degree);
    EXPECT_LE(pairing.degree, kMostNeighbours);
    for (int row = -4; row <= 5; ++row) {
      const std::vector<Node> found = neighbours_of(pairing.rule, {row, 0});
      EXPECT_EQ(found.size(), pairing.degree);
      EXPECT_EQ(std::set<Node>(found.begin(), found.end()).size(), pairing.degree);
      EXPECT_TRUE(std::is_sorted(found.begin(), found.end()));
    }
  }
}

TEST(NeighbourRule, RightDistances) {
  for (const Pairing& pairing : kPairings) {
    const Lattice lattice{pairing.kind, 10, {3, 4}, 33};
    for (int row = -4; row <= 5; ++row) {
      std::vector<double> distances;
      for (const Node& other : neighbours_of(pairing.rule, {row, 2})) {
        distances.push_back(distance_m(lattice.to_ground(Node{row, 2}), lattice.to_ground(other)) / 10);
      }
      std::sort(distances.begin(), distances.end());
      ASSERT_EQ(distances.size(), pairing.distances.size());
      for (std::size_t i = 0; i < distances.size(); ++i)
        EXPECT_NEAR(distances[i], pairing.distances[i], 1e-9);
    }
  }
}

// Six: on these kinds they are the six nearest of all, so none is left out.
TEST(NeighbourRule, NoOtherPitIsAsNearAsTheSix) {
  for (const LatticeKind kind : {LatticeKind::kStaggered, LatticeKind::kTriangular}) {
    const Lattice lattice{kind, 1, {0, 0}};
    for (const int row : {4, 5}) {
      const std::vector<Node> six = neighbours_of(NeighbourRule::kSix, {row, 5});
      for (int other_row = 1; other_row <= 9; ++other_row) {
        for (int column = 1; column <= 9; ++column) {
          const Node other{other_row, column};
          if (other == Node{row, 5} || std::count(six.begin(), six.end(), other) != 0) continue;
          EXPECT_GT(distance_m(lattice.to_ground(Node{row, 5}), lattice.to_ground(other)), 1.5);
        }
      }
    }
  }
}

TEST(NeighbourRule, FourByTwoLiesOnTheArms) {
  for (const Node& step : neighbour_offsets(NeighbourRule::kFourByTwo, 7)) {
    EXPECT_TRUE(step.row == 0 || step.column == 0);
  }
}

TEST(NeighbourRule, TheSameShapeAfterTwoRowsAndOneRowOnSquares) {
  for (const Pairing& pairing : kPairings) {
    const int period = pairing.kind == LatticeKind::kSquare ? 1 : 2;
    for (int row = -6; row <= 6; ++row) {
      const auto here = neighbour_offsets(pairing.rule, row);
      const auto there = neighbour_offsets(pairing.rule, row + period);
      EXPECT_TRUE(std::equal(here.begin(), here.end(), there.begin(), there.end()));
    }
  }
}

TEST(NeighbourRule, FitsAndDefaults) {
  for (const LatticeKind kind : {LatticeKind::kSquare, LatticeKind::kStaggered, LatticeKind::kTriangular}) {
    EXPECT_TRUE(rule_fits(default_rule(kind), kind));
    EXPECT_EQ(rule_fits(NeighbourRule::kSix, kind), kind != LatticeKind::kSquare);
    for (const NeighbourRule rule : {NeighbourRule::kEight, NeighbourRule::kFour, NeighbourRule::kFourByTwo}) {
      EXPECT_EQ(rule_fits(rule, kind), kind == LatticeKind::kSquare);
    }
  }
  EXPECT_EQ(default_rule(LatticeKind::kSquare), NeighbourRule::kEight);
}

TEST(NeighbourRule, Names) {
  EXPECT_EQ(neighbour_rule_name(NeighbourRule::kEight), "8");
  EXPECT_EQ(neighbour_rule_name(NeighbourRule::kFour), "4");
  EXPECT_EQ(neighbour_rule_name(NeighbourRule::kFourByTwo), "4x2");
  EXPECT_EQ(neighbour_rule_name(NeighbourRule::kSix), "6");
  EXPECT_EQ(lattice_kind_name(LatticeKind::kSquare), "square");
  EXPECT_EQ(lattice_kind_name(LatticeKind::kStaggered), "staggered");
  EXPECT_EQ(lattice_kind_name(LatticeKind::kTriangular), "triangular");
}

}  // namespace
}  // namespace nearpit
