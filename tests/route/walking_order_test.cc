#include "route/walking_order.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <chrono>
#include <cmath>
#include <limits>
#include <numeric>
#include <set>
#include <string>

#include "support/test_random.h"

namespace nearpit {
namespace {

// ---- up one line and down the next ----

// Pictures show rows from the top down, highest first; letters are stops in the order of the walk, '.' is no stop.
using Picture = std::vector<std::string>;

std::vector<Node> stops_of(const Picture& picture) {
  std::vector<Node> stops;
  for (std::size_t line = 0; line < picture.size(); ++line) {
    for (std::size_t column = 0; column < picture[line].size(); ++column) {
      if (picture[line][column] == '.') continue;
      stops.push_back({static_cast<std::int32_t>(picture.size() - line), static_cast<std::int32_t>(column + 1)});
    }
  }
  return stops;
}

Picture walked(const Lattice& lattice, const std::vector<std::int32_t>& lines, Picture picture) {
  const std::vector<Node> stops = stops_of(picture);
  char letter = 'a';
  for (const std::size_t stop : transect_order(lattice, lines, stops)) {
    const auto line = picture.size() - static_cast<std::size_t>(stops[stop].row);
    picture[line][static_cast<std::size_t>(stops[stop].column) - 1] = letter++;
  }
  return picture;
}

#define EXPECT_WALK(lattice, lines, ...)                 \
  do {                                                   \
    const Picture picture = __VA_ARGS__;                 \
    EXPECT_EQ(walked(lattice, lines, picture), picture); \
  } while (false)

Lattice lattice_of(LatticeKind kind) { return {kind, 10, {500, 700}, 90}; }
const Lattice kSquare = lattice_of(LatticeKind::kSquare);

TEST(WalkingOrder, UpOneLineAndDownTheNext) {
  EXPECT_WALK(kSquare, (std::vector<std::int32_t>{1, 2, 3}),
              {"g.h.i",  //
               ".fed.",  //
               "a.b.c"});
}

TEST(WalkingOrder, LinesAlternateWhateverLiesBetween) {
  EXPECT_WALK(kSquare, (std::vector<std::int32_t>{1, 5, 8}),
              {"ghi",  //
               "...",  //
               "...",  //
               "fed",  //
               "...",  //
               "...",  //
               "...",  //
               "abc"});
}

TEST(WalkingOrder, StopsWithinOneSpacingAreWalkedWhenPassing) {
  EXPECT_WALK(kSquare, (std::vector<std::int32_t>{2, 6}),
              {".h...",  //
               "i.gf.",  //
               "...e.",  //
               ".....",  //
               ".b...",  //
               "a...d",  //
               "..c.."});
}

TEST(WalkingOrder, BetweenTwoLinesTheLowerOneTakesTheStop) {
  EXPECT_WALK(kSquare, (std::vector<std::int32_t>{1, 3}),
              {"f.e.",  //
               ".b.d",  //
               "a..c"});
}

// Rows 1, 5 and 6 are further than one spacing from both lines and turn about in their turn.
TEST(WalkingOrder, OtherRowsAreLinesOfTheirOwn) {
  EXPECT_WALK(kSquare, (std::vector<std::int32_t>{3, 8}),
              {"ji",  //
               "..",  //
               "gh",  //
               "fe",  //
               "..",  //
               "cd",  //
               "..",  //
               "ba"});
}

TEST(WalkingOrder, WithoutLinesEveryRowIsOne) {
  EXPECT_WALK(kSquare, (std::vector<std::int32_t>{}),
              {"ef",  //
               "dc",  //
               "ab"});
}

// Shifted rows pass by metres along the line, not by column: row 2 stands half a spacing further than row 1.
TEST(WalkingOrder, ShiftedRowsPassByMetres) {
  for (const LatticeKind kind : {LatticeKind::kStaggered, LatticeKind::kTriangular}) {
    EXPECT_WALK(lattice_of(kind), (std::vector<std::int32_t>{1}),
                {"bd",  //
                 "ac"});
    EXPECT_WALK(lattice_of(kind), (std::vector<std::int32_t>{2}),
                {"bd",  //
                 "ac"});
    EXPECT_WALK(lattice_of(kind), (std::vector<std::int32_t>{2, 4}),
                {"hg",  //
                 "be",  //
                 "cf",  //
                 "ad"});
  }
}

// What a stop's place in the walk depends on: leaving out other stops, or adding some, never changes which of two is first.
TEST(WalkingOrder, NewStopsLeaveTheRestInOrder) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(300); ++round) {
    const Lattice lattice = lattice_of(
        random.one_of<LatticeKind>({LatticeKind::kSquare, LatticeKind::kStaggered, LatticeKind::kTriangular}));
    std::vector<std::int32_t> lines;
    std::vector<Node> all;
    std::vector<std::size_t> kept;
    for (std::int32_t row = 1; row <= 12; ++row) {
      if (random.chance(0.3)) lines.push_back(row);
      for (std::int32_t column = 1; column <= 6; ++column) {
        if (random.chance(0.5)) all.push_back({row, column});
      }
    }
    for (std::size_t i = 0; i < all.size(); ++i) {
      if (random.chance(0.5)) kept.push_back(i);
    }
    std::vector<Node> some;
    for (const std::size_t i : kept)
      some.push_back(all[i]);

    std::vector<Node> among_all;
    for (const std::size_t i : transect_order(lattice, lines, all)) {
      if (std::binary_search(kept.begin(), kept.end(), i)) among_all.push_back(all[i]);
    }
    std::vector<Node> alone;
    for (const std::size_t i : transect_order(lattice, lines, some))
      alone.push_back(some[i]);
    ASSERT_EQ(among_all, alone);
  }
}

TEST(WalkingOrder, TheOrderOfTheListDoesNotMatter) {
  const std::vector<Node> stops = {{3, 1}, {1, 2}, {2, 2}, {1, 1}, {3, 2}, {2, 1}};
  std::vector<Node> first;
  for (const std::size_t i : transect_order(kSquare, {1, 3}, stops))
    first.push_back(stops[i]);
  std::vector<Node> turned(stops.rbegin(), stops.rend());
  std::vector<Node> second;
  for (const std::size_t i : transect_order(kSquare, {1, 3}, turned))
    second.push_back(turned[i]);
  EXPECT_EQ(first, second);
  EXPECT_TRUE(transect_order(kSquare, {1, 3}, {}).empty());
}

// ---- always to the nearest ----

double walk_m(const Point& start, const std::vector<Point>& stops, const std::vector<std::size_t>& order) {
  double sum = 0;
  Point at = start;
  for (const std::size_t i : order) {
    sum += std::hypot(stops[i].x - at.x, stops[i].y - at.y);
    at = stops[i];
  }
  return sum;
}

// The plain way: looks at every stop before each leg; of stops nearer than a micrometre to equally near, the first given.
std::vector<std::size_t> naive_nearest(const Point& start, const std::vector<Point>& stops) {
  std::vector<std::size_t> order;
  std::vector<bool> done(stops.size(), false);
  Point at = start;
  while (order.size() < stops.size()) {
    double least = std::numeric_limits<double>::infinity();
    for (std::size_t i = 0; i < stops.size(); ++i) {
      if (!done[i]) least = std::min(least, std::hypot(stops[i].x - at.x, stops[i].y - at.y));
    }
    std::size_t next = 0;
    while (done[next] || std::hypot(stops[next].x - at.x, stops[next].y - at.y) > least + 1e-6)
      ++next;
    done[next] = true;
    order.push_back(next);
    at = stops[next];
  }
  return order;
}

std::vector<Point> random_stops(TestRandom& random, int most) {
  std::vector<Point> stops;
  const bool on_a_grid = random.chance(0.5);  // many equal distances, and places given twice
  for (int count = random.between(1, most); count > 0; --count) {
    if (on_a_grid) {
      stops.push_back({400'000 + 7.5 * random.between(0, 20), 5'000'000 + 7.5 * random.between(0, 20)});
    } else {
      stops.push_back({random.real(0, 300), random.real(0, 300)});
    }
  }
  return stops;
}

TEST(WalkingOrder, NearestIsThePlainWayBeyondTheFirst50) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(100); ++round) {
    const std::vector<Point> stops = random_stops(random, 250);
    const Point start{random.real(0, 300), random.real(0, 300)};
    const std::vector<std::size_t> order = nearest_order(start, stops);
    const std::vector<std::size_t> plain = naive_nearest(start, stops);
    ASSERT_EQ(order.size(), plain.size());
    const auto head = static_cast<std::ptrdiff_t>(std::min<std::size_t>(50, stops.size()));
    ASSERT_TRUE(std::equal(order.begin() + head, order.end(), plain.begin() + head));
    ASSERT_EQ(std::set<std::size_t>(order.begin(), order.begin() + head),
              std::set<std::size_t>(plain.begin(), plain.begin() + head));
    ASSERT_LE(walk_m(start, stops, order), walk_m(start, stops, plain) + 1e-6);
  }
}

TEST(WalkingOrder, NoExchangeOfTwoLegsShortensTheFirst50) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(20); ++round) {
    const std::vector<Point> stops = random_stops(random, 80);
    const Point start{random.real(0, 300), random.real(0, 300)};
    const std::vector<std::size_t> order = nearest_order(start, stops);
    const double length = walk_m(start, stops, order);
    const auto end = static_cast<std::ptrdiff_t>(std::min<std::size_t>(50, order.size()));
    for (std::ptrdiff_t first = 0; first < end; ++first) {
      for (std::ptrdiff_t last = first + 1; last < end; ++last) {
        std::vector<std::size_t> other = order;
        std::reverse(other.begin() + first, other.begin() + last + 1);
        ASSERT_GT(walk_m(start, stops, other), length - 2e-6) << first << ' ' << last;
      }
    }
  }
}

// On one line, nearest first walks to 1, -2, -8 and back to 4.5, 22.5 m; one side after the other is 17 m.
TEST(WalkingOrder, ExchangesOfLegsShortenTheWalk) {
  const std::vector<Point> stops = {{1, 0}, {-2, 0}, {4.5, 0}, {-8, 0}};
  EXPECT_DOUBLE_EQ(walk_m({0, 0}, stops, naive_nearest({0, 0}, stops)), 22.5);
  EXPECT_DOUBLE_EQ(walk_m({0, 0}, stops, nearest_order({0, 0}, stops)), 17);
}

TEST(WalkingOrder, OfEquallyNearStopsTheFirstGiven) {
  EXPECT_EQ(nearest_order({0, 0}, {{0, 1}, {0, -1}}), (std::vector<std::size_t>{0, 1}));
  EXPECT_EQ(nearest_order({0, 0}, {{0, -1}, {0, 1}}), (std::vector<std::size_t>{0, 1}));
  EXPECT_EQ(nearest_order({0, 0}, {{5, 5}, {5, 5}, {5, 5}}), (std::vector<std::size_t>{0, 1, 2}));
  EXPECT_TRUE(nearest_order({0, 0}, {}).empty());
}

TEST(WalkingOrder, ManyEquallyNearStops) {
  std::vector<Point> ring;  // whole numbers on one circle: every x, y with x^2 + y^2 = 325^2
  for (int x = -325; x <= 325; ++x) {
    for (int y = -325; y <= 325; ++y) {
      if (x * x + y * y == 325 * 325) ring.push_back({static_cast<double>(x), static_cast<double>(y)});
    }
  }
  ASSERT_GT(ring.size(), 16U);
  for (int i = 0; i < 60; ++i)
    ring.push_back({1000.0 + i, 0});
  const std::vector<std::size_t> order = nearest_order({0, 0}, ring);
  const std::vector<std::size_t> plain = naive_nearest({0, 0}, ring);
  EXPECT_TRUE(std::equal(order.begin() + 50, order.end(), plain.begin() + 50));
}

// Looking at every stop before each leg would take minutes.
#ifdef __OPTIMIZE__
constexpr int kRows = 400;
#else
constexpr int kRows = 40;
#endif
TEST(WalkingOrder, TwoHundredThousandStops) {
  std::vector<Point> stops;
  for (int row = 0; row < kRows; ++row) {
    for (int column = 0; column < 500; ++column)
      stops.push_back({10.0 * column, 10.0 * row});
  }
  const auto began = std::chrono::steady_clock::now();
  std::vector<std::size_t> order = nearest_order({0, 0}, stops);
  const std::chrono::duration<double> took = std::chrono::steady_clock::now() - began;
  EXPECT_LT(took.count(), 60);
  std::sort(order.begin(), order.end());
  std::vector<std::size_t> all(stops.size());
  std::iota(all.begin(), all.end(), 0U);
  EXPECT_EQ(order, all);
}

// ---- where a new stop goes ----

TEST(WalkingOrder, InsertsWhereTheWalkGrowsLeast) {
  const std::vector<Point> order = {{0, 0}, {10, 0}, {20, 0}};
  EXPECT_EQ(place_to_insert(order, {15, 1}), 2U);
  EXPECT_EQ(place_to_insert(order, {5, 1}), 1U);
  EXPECT_EQ(place_to_insert(order, {25, 0}), 3U);
}

TEST(WalkingOrder, TheStopBeingWalkedToStaysFirst) {
  EXPECT_EQ(place_to_insert({{0, 0}, {10, 0}}, {-5, 0}), 1U);
  EXPECT_EQ(place_to_insert({{0, 0}}, {-5, 0}), 1U);
  EXPECT_EQ(place_to_insert({}, {-5, 0}), 0U);
}

TEST(WalkingOrder, NoOtherPlaceIsBetter) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(300); ++round) {
    const std::vector<Point> order = random_stops(random, 30);
    const Point stop = random.chance(0.5) ? random.one_of(order) : Point{random.real(0, 300), random.real(0, 300)};
    const auto length_with = [&](std::size_t position) {
      std::vector<Point> with = order;
      with.insert(with.begin() + static_cast<std::ptrdiff_t>(position), stop);
      std::vector<std::size_t> given(with.size());
      std::iota(given.begin(), given.end(), 0U);
      return walk_m(with.front(), with, given);
    };
    const std::size_t place = place_to_insert(order, stop);
    ASSERT_GE(place, 1U);
    ASSERT_LE(place, order.size());
    for (std::size_t other = 1; other <= order.size(); ++other) {
      ASSERT_GE(length_with(other), length_with(place) - 2e-6) << other << ' ' << place;
    }
  }
}

}  // namespace
}  // namespace nearpit
