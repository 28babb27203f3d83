// Where a frame's row 1 and column 1 are: the origin that a plan leaves open, and the one that an error names.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <optional>
#include <regex>
#include <set>

#include "lattice/frame.h"
#include "support/held_nodes.h"
#include "support/random_ground.h"

namespace nearpit {
namespace {

// The two numbers after 'use'.
std::optional<Point> origin_named_in(const std::string& text) {
  const std::regex pattern(R"(\[?(-?\d+(?:\.\d+)?(?:e[-+]?\d+)?),\s*(-?\d+(?:\.\d+)?(?:e[-+]?\d+)?)\]?)");
  std::smatch found;
  const std::size_t from = text.find("use ");
  if (from == std::string::npos) return std::nullopt;
  const std::string rest = text.substr(from);
  if (!std::regex_search(rest, found, pattern)) return std::nullopt;
  return Point{std::stod(found[1]), std::stod(found[2])};
}

// Whole steps of the lattice: the same places on the ground are in the frame as before.
void expect_same_ground(const Frame& frame, const Lattice& before, const std::set<Node>& nodes_before) {
  std::set<Node> again;
  for (NodeId id = 0; id < frame.size(); ++id) {
    const Node node = before.nearest(frame.ground(id));
    EXPECT_LT(distance_m(before.to_ground(node), frame.ground(id)), 1e-4);
    again.insert(node);
  }
  EXPECT_EQ(again, nodes_before);
}

TEST(Frame, BelowRowOrColumnOneSaysHowManyAndNamesAnOriginThatWorks) {
  TestRandom random = TestRandom::of_this_run();
  int tried = 0;
  while (tried < rounds(80)) {
    Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e4);
    const MultiPolygon polygons = random_boundary(random, lattice.origin, lattice.spacing_m * random.real(4, 10));
    lattice.origin = {lattice.origin.x + random.real(-200, 200), lattice.origin.y + random.real(-200, 200)};
    const Held held = held_by(lattice, polygons);
    const auto below = std::count_if(held.nodes.begin(), held.nodes.end(),
                                     [](const Node& node) { return node.row < 1 || node.column < 1; });
    if (below == 0 || !held.doubtful.empty()) continue;
    ++tried;
    const Result<Frame> refused = Frame::clip(lattice, polygons);
    ASSERT_FALSE(refused);
    const std::string text = refused.error().one_line();
    EXPECT_TRUE(std::regex_search(" " + text, std::regex("[^0-9.]" + std::to_string(below) + "[^0-9.]")))
        << below << ": " << text;
    const std::optional<Point> origin = origin_named_in(text);
    ASSERT_TRUE(origin) << text;
    Lattice moved = lattice;
    moved.origin = *origin;
    const Result<Frame> frame = Frame::clip(moved, polygons);
    ASSERT_TRUE(frame) << text << "\n" << frame.error().one_line();
    expect_same_ground(*frame, lattice, held.nodes);
  }
}

// Along the lattice's axes, from the corner that default_origin gives without a shift.
Along moved_by(const Lattice& lattice, const Point& corner, const Point& origin) {
  Lattice at_corner = lattice;
  at_corner.origin = corner;
  return at_corner.along(origin);
}

TEST(Frame, DefaultOriginIsTheLowerLeftCornerInTurnedAxes) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(300); ++round) {
    Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e5);
    const MultiPolygon polygons = random_boundary(random, lattice.origin, 10 * lattice.spacing_m);
    lattice.origin = default_origin(lattice, polygons);
    Along low{1e300, 1e300};
    for (const Polygon& polygon : polygons) {
      for (const Point& corner : polygon.outer) {
        const Along along = lattice.along(corner);
        low = {std::min(low.u, along.u), std::min(low.v, along.v)};
      }
    }
    EXPECT_NEAR(low.u, 0, 1e-6);
    EXPECT_NEAR(low.v, 0, 1e-6);
  }
}

TEST(Frame, AShiftedOriginLeavesNoNodeBelowOne) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(100); ++round) {
    Lattice lattice = random_lattice(random, random.one_of(kAllLatticeKinds), 1e4);
    const MultiPolygon polygons = random_boundary(random, lattice.origin, lattice.spacing_m * random.real(3, 8));
    const std::vector<double> ends{0, 0.5, 0.999999, 1 - 1e-12, 0.0001 / lattice.spacing_m, random.real(0, 1)};
    const double along = random.one_of(ends);
    const double across = random.one_of(ends);
    lattice.origin = default_origin(lattice, polygons, along, across);
    const Held held = held_by(lattice, polygons);
    const Result<Frame> frame = Frame::clip(lattice, polygons);
    ASSERT_TRUE(frame) << "shift " << along << ' ' << across << ": " << frame.error().one_line();
    EXPECT_EQ(nodes_of(frame->runs(), held.doubtful), held.nodes);
  }
}

// Whole steps of the lattice apart, two origins give the same pits; so the shift is looked at within one cell. Fixed numbers, so the outcome
// is the same every time.
TEST(Frame, ShiftsSpreadEvenlyOverTheCell) {
  TestRandom random(20260504);
  for (const LatticeKind kind : kAllLatticeKinds) {
    const Lattice lattice{kind, 12, {0, 0}, 33};
    const MultiPolygon polygons{{rectangle(0, 0, 100, 70), {}}};
    const Point corner = default_origin(lattice, polygons);
    constexpr int kParts = 8;
    std::vector<std::uint64_t> counts(kParts * kParts);
    for (int draw = 0; draw < 20000; ++draw) {
      const Along step =
          moved_by(lattice, corner, default_origin(lattice, polygons, random.real(0, 1), random.real(0, 1)));
      const double rows = std::floor(step.v / lattice.row_distance_m());
      const double slid = lattice.rows_shift() ? rows * 0.5 : 0;
      const double columns = step.u / lattice.spacing_m - slid;
      const double part_u = columns - std::floor(columns);
      const double part_v = step.v / lattice.row_distance_m() - rows;
      ++counts[static_cast<std::size_t>(part_v * kParts) * kParts + static_cast<std::size_t>(part_u * kParts)];
    }
    EXPECT_GT(equal_chance_p_value(counts), 0.001) << lattice_kind_name(kind);
  }
}

// Over all shifts the mean number of nodes times the cell is the ground's area.
TEST(Frame, OverAllShiftsTheNodesStandForTheArea) {
  TestRandom random(7);
  for (const LatticeKind kind : kAllLatticeKinds) {
    Lattice lattice{kind, 12, {0, 0}, 33};
    const MultiPolygon polygons{{rectangle(0, 0, 100, 70), {rectangle(20, 20, 31, 17)}}};
    double sum = 0;
    double squares = 0;
    constexpr int kDraws = 1200;
    for (int draw = 0; draw < kDraws; ++draw) {
      lattice.origin = default_origin(lattice, polygons, random.real(0, 1), random.real(0, 1));
      const double ground = Frame::clip(lattice, polygons)->size() * lattice.cell_area_m2();
      sum += ground;
      squares += ground * ground;
    }
    const double mean = sum / kDraws;
    const double standard_error = std::sqrt((squares / kDraws - mean * mean) / kDraws);
    EXPECT_NEAR(mean, 100 * 70 - 31 * 17, 4 * standard_error);
  }
}

}  // namespace
}  // namespace nearpit
