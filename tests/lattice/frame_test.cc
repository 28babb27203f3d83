#include "lattice/frame.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <set>

#include "support/held_nodes.h"
#include "support/random_ground.h"

namespace nearpit {
namespace {

// In row, column order, disjoint, and as long as can be.
void expect_good_runs(const std::vector<nearpit::Run>& runs) {
  for (std::size_t i = 0; i < runs.size(); ++i) {
    EXPECT_LE(runs[i].first, runs[i].last);
    if (i == 0) continue;
    EXPECT_TRUE(runs[i - 1].row < runs[i].row ||
                (runs[i - 1].row == runs[i].row && runs[i - 1].last < runs[i].first - 1));
  }
}

TEST(Frame, ClippingAgreesWithBoost) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(50); ++round) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), random.chance(0.2) ? 1e7 : 1e3);
    const double size = lattice.spacing_m * random.real(3, 14);
    const MultiPolygon polygons = random_boundary(random, lattice.origin, size);
    const Held held = held_by(lattice, polygons);
    const std::vector<nearpit::Run> runs = clip_to_runs(lattice, polygons);
    EXPECT_EQ(nodes_of(runs, held.doubtful), held.nodes) << "round " << round;
    expect_good_runs(runs);
  }
}

// Corners on nodes, or a part of a millimetre off them, so that sides run through or just past many nodes.
TEST(Frame, ClippingAgreesWithBoostWhereSidesRunAlongNodes) {
  TestRandom random = TestRandom::of_this_run();
  int tried = 0;
  while (tried < rounds(150)) {
    const Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), random.chance(0.2) ? 1e6 : 1e3);
    MultiPolygon polygons = random_boundary(random, lattice.origin, lattice.spacing_m * random.real(4, 10));
    const double off = random.one_of(std::vector<double>{0, 0.0005, 0.00098, 0.00102, 0.0015});
    const auto snap = [&](Ring* ring) {
      for (Point& corner : *ring) {
        const double angle = random.real(0, 6.28);
        corner = lattice.to_ground(lattice.nearest(corner));
        corner = {corner.x + off * std::cos(angle), corner.y + off * std::sin(angle)};
      }
    };
    for (Polygon& polygon : polygons) {
      snap(&polygon.outer);
      std::for_each(polygon.holes.begin(), polygon.holes.end(), [&](Ring& hole) { snap(&hole); });
    }
    if (!sound_by_boost(polygons) || polygon_problem(polygons)) continue;
    ++tried;
    const Held held = held_by(lattice, polygons);
    EXPECT_EQ(nodes_of(clip_to_runs(lattice, polygons), held.doubtful), held.nodes)
        << "bearing " << lattice.bearing_deg << " off " << off;
  }
}

// Sides along the rows and across them, off the nodes by just less and just more than the tolerance.
TEST(Frame, OneMillimetreInAndOut) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(100); ++round) {
    Lattice lattice = random_lattice(random, LatticeKind::kSquare, 1e6);
    const auto corner = [&](double u, double v) { return lattice.to_ground(Along{u, v}); };
    const double s = lattice.spacing_m;
    for (const double inset : {0.0, 0.0009, 0.0011, -0.0011}) {
      const double low = inset;
      const double high = 3 * s - inset;
      const MultiPolygon box{{{corner(low, low), corner(high, low), corner(high, high), corner(low, high)}, {}}};
      // Nodes 1 .. 4 of rows 1 .. 4; an inset of 0.9 mm both ways keeps the sides but leaves out the corners.
      const std::size_t expected = inset <= 0 ? 16 : inset < 0.001 ? 12 : 4;
      const Result<Frame> frame = Frame::clip(lattice, box);
      ASSERT_TRUE(frame);
      EXPECT_EQ(static_cast<std::size_t>(frame->size()), expected) << inset;
    }
  }
}

TEST(Frame, NodesNearAHolesLineAreIn) {
  const Lattice lattice{LatticeKind::kSquare, 1, {0, 0}};
  const MultiPolygon polygons{{rectangle(0, 0, 4, 4), {rectangle(0.9995, 0.9995, 2.001, 2.001)}}};
  EXPECT_EQ(Frame::clip(lattice, polygons)->size(), 24);
  const MultiPolygon wider{{rectangle(0, 0, 4, 4), {rectangle(0.998, 0.998, 2.004, 2.004)}}};
  EXPECT_EQ(Frame::clip(lattice, wider)->size(), 16);
}

TEST(Frame, NumbersRunInRowThenColumnOrder) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(100); ++round) {
    MultiPolygon boundary;
    const Frame frame = random_frame(random, random.one_of(kAllLatticeKinds), 30, 400, &boundary);
    std::set<Node> known;
    for (NodeId id = 0; id < frame.size(); ++id) {
      const Node node = frame.node(id);
      if (id > 0) {
        EXPECT_LT(frame.node(id - 1), node);
      }
      EXPECT_EQ(frame.find(node), id);
      EXPECT_EQ(frame.ground(id), frame.lattice().to_ground(node));
      EXPECT_GE(node.row, 1);
      EXPECT_GE(node.column, 1);
      known.insert(node);
    }
    EXPECT_EQ(known, nodes_of(frame.runs(), {}));
    for (int probe = 0; probe < 200; ++probe) {
      const Node node{random.between(-5, 60), random.between(-5, 60)};
      if (known.count(node) == 0) {
        EXPECT_EQ(frame.find(node), kNoNode);
      }
    }
  }
}

TEST(Frame, NeighboursAtTheEdgeAreSimplyNotThere) {
  TestRandom random = TestRandom::of_this_run();
  MultiPolygon boundary;
  const Frame frame = random_frame(random, LatticeKind::kTriangular, 100, 400, &boundary);
  for (NodeId id = 0; id < frame.size(); ++id) {
    std::vector<NodeId> got;
    frame.each_neighbour(NeighbourRule::kSix, id, [&](NodeId other) { got.push_back(other); });
    std::vector<NodeId> expected;
    for (NodeId other = 0; other < frame.size(); ++other) {
      const double apart = distance_m(frame.ground(id), frame.ground(other));
      if (other != id && apart < 1.01 * frame.lattice().spacing_m) expected.push_back(other);
    }
    EXPECT_EQ(got, expected);
  }
}

TEST(Frame, EachInsideVisitsTheFramesOwnNodesAscending) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(30); ++round) {
    MultiPolygon boundary;
    const Frame frame = random_frame(random, random.one_of(kAllLatticeKinds), 60, 300, &boundary);
    const MultiPolygon part =
        random_boundary(random, frame.ground(random.between(0, frame.size() - 1)), 6 * frame.lattice().spacing_m);
    const Held held = held_by(frame.lattice(), part);
    std::vector<NodeId> got;
    frame.each_inside(part, [&](NodeId id) { got.push_back(id); });
    EXPECT_TRUE(std::is_sorted(got.begin(), got.end()));
    std::vector<NodeId> expected;
    for (NodeId id = 0; id < frame.size(); ++id) {
      if (held.nodes.count(frame.node(id)) != 0) expected.push_back(id);
    }
    std::erase_if(got, [&](NodeId id) { return held.doubtful.count(frame.node(id)) != 0; });
    EXPECT_EQ(got, expected);
  }
}

TEST(Frame, NoNodeInsideIsAnError) {
  const Lattice lattice{LatticeKind::kSquare, 100, {0, 0}};
  const Result<Frame> frame = Frame::clip(lattice, {{rectangle(10, 10, 20, 20), {}}});
  ASSERT_FALSE(frame);
  EXPECT_EQ(frame.error().kind, ErrorKind::kBadInput);
}

TEST(Frame, MoreNodesThanTheMostIsAnErrorAtOnce) {
  const Lattice lattice{LatticeKind::kSquare, 0.01, {0, 0}};
  EXPECT_FALSE(Frame::clip(lattice, {{rectangle(0, 0, 100000, 100000), {}}}));
}

}  // namespace
}  // namespace nearpit
