#include "route/walking_order.h"

#include <algorithm>
#include <boost/geometry.hpp>
#include <boost/geometry/index/rtree.hpp>
#include <cassert>
#include <cmath>
#include <iterator>
#include <map>
#include <tuple>
#include <utility>

namespace nearpit {
namespace {

// ---- up one line and down the next ----

// A row that is walked along, up its columns when `rank` is even and down when it is odd.
struct Line {
  std::int64_t row = 0;
  std::int64_t rank = 0;
};

// How many rows away a stop may lie and still be within one spacing.
std::int64_t reach_in_rows(const Lattice& lattice) {
  return static_cast<std::int64_t>(std::floor(lattice.spacing_m / lattice.row_distance_m() * (1 + 1e-9)));
}

// The line that a row is walked with. The lines of the first sample alternate among themselves; rows of their own alternate
// on from the line below them (those below every line: from the lowest), so that no rank depends on which rows hold stops.
Line line_of(const std::vector<std::int32_t>& lines, std::int64_t reach, std::int64_t row) {
  const auto above = std::lower_bound(lines.begin(), lines.end(), row);
  const auto rank_above = static_cast<std::int64_t>(above - lines.begin());
  const bool some_above = above != lines.end();
  const bool some_below = above != lines.begin();
  const std::int64_t to_above = some_above ? *above - row : reach + 1;
  const std::int64_t to_below = some_below ? row - *std::prev(above) : reach + 1;
  if (to_below <= reach && to_below <= to_above) return {*std::prev(above), rank_above - 1};
  if (to_above <= reach) return {*above, rank_above};
  if (some_below) return {row, rank_above - 1 + to_below - reach};
  if (some_above) return {row, -(to_above - reach)};
  return {row, row - 1};
}

// ---- always to the nearest ----

using Place = boost::geometry::model::point<double, 2, boost::geometry::cs::cartesian>;
using Entry = std::pair<Place, std::size_t>;
using Tree = boost::geometry::index::rtree<Entry, boost::geometry::index::quadratic<16>>;

// Distances that differ by less are equal, so that rounding never decides a walk.
constexpr double kEqual_m = 1e-6;
constexpr std::size_t kExchanged = 50;

Place place(const Point& point) { return {point.x, point.y}; }

// The nearest entry; of equally near ones the one with the lowest index.
Entry nearest_entry(const Tree& tree, const Point& from) {
  const auto metres = [&](const Entry& entry) { return boost::geometry::distance(place(from), entry.first); };
  std::vector<Entry> found;
  for (std::size_t asked = 8;; asked *= 2) {
    found.clear();
    tree.query(boost::geometry::index::nearest(place(from), static_cast<unsigned>(asked)), std::back_inserter(found));
    std::sort(found.begin(), found.end(), [&](const Entry& a, const Entry& b) { return metres(a) < metres(b); });
    const double equal = metres(found.front()) + kEqual_m;
    const auto farther = std::find_if(found.begin(), found.end(), [&](const Entry& e) { return metres(e) > equal; });
    if (farther == found.end() && found.size() < tree.size()) continue;
    return *std::min_element(found.begin(), farther,
                             [](const Entry& a, const Entry& b) { return a.second < b.second; });
  }
}

// The stops at each place that holds any, both in the order in which they were given.
std::vector<std::vector<std::size_t>> stops_by_place(const std::vector<Point>& stops) {
  std::map<std::pair<double, double>, std::size_t> numbers;
  std::vector<std::vector<std::size_t>> groups;
  for (std::size_t i = 0; i < stops.size(); ++i) {
    const auto [at, is_new] = numbers.try_emplace({stops[i].x, stops[i].y}, groups.size());
    if (is_new) groups.emplace_back();
    groups[at->second].push_back(i);
  }
  return groups;
}

std::vector<std::size_t> greedy_order(const Point& start, const std::vector<Point>& stops) {
  const std::vector<std::vector<std::size_t>> groups = stops_by_place(stops);
  std::vector<Entry> entries;
  entries.reserve(groups.size());
  for (std::size_t i = 0; i < groups.size(); ++i)
    entries.emplace_back(place(stops[groups[i].front()]), i);
  Tree tree(entries);
  std::vector<std::size_t> order;
  order.reserve(stops.size());
  Point at = start;
  while (!tree.empty()) {
    const Entry next = nearest_entry(tree, at);
    tree.remove(next);
    const std::vector<std::size_t>& group = groups[next.second];
    order.insert(order.end(), group.begin(), group.end());
    at = stops[group.front()];
  }
  return order;
}

// How much longer the walk gets when the stops first..last of the order are walked the other way round.
double reversal_m(const Point& start, const std::vector<Point>& stops, const std::vector<std::size_t>& order,
                  std::size_t first, std::size_t last) {
  const Point& before = first == 0 ? start : stops[order[first - 1]];
  const Point& head = stops[order[first]];
  const Point& tail = stops[order[last]];
  double longer = distance_m(before, tail) - distance_m(before, head);
  if (last + 1 < order.size()) {
    const Point& after = stops[order[last + 1]];
    longer += distance_m(head, after) - distance_m(tail, after);
  }
  return longer;
}

// One pass over every pair of legs; whether it found one to exchange.
bool exchange_legs(const Point& start, const std::vector<Point>& stops, std::vector<std::size_t>& order) {
  bool shorter = false;
  const std::size_t end = std::min(order.size(), kExchanged);
  for (std::size_t first = 0; first < end; ++first) {
    for (std::size_t last = first + 1; last < end; ++last) {
      if (reversal_m(start, stops, order, first, last) >= -kEqual_m) continue;
      std::reverse(order.begin() + static_cast<std::ptrdiff_t>(first),
                   order.begin() + static_cast<std::ptrdiff_t>(last) + 1);
      shorter = true;
    }
  }
  return shorter;
}

}  // namespace

std::vector<std::size_t> transect_order(const Lattice& lattice, const std::vector<std::int32_t>& lines,
                                        const std::vector<Node>& stops) {
  assert(std::is_sorted(lines.begin(), lines.end()));
  const std::int64_t reach = reach_in_rows(lattice);
  // Line, metres along it in the direction of the walk, row, column, index.
  using Key = std::tuple<std::int64_t, double, std::int32_t, std::int32_t, std::size_t>;
  std::vector<Key> keys;
  keys.reserve(stops.size());
  for (std::size_t i = 0; i < stops.size(); ++i) {
    const Line line = line_of(lines, reach, stops[i].row);
    const double u = lattice.along(stops[i]).u;
    keys.emplace_back(line.row, line.rank % 2 == 0 ? u : -u, stops[i].row, stops[i].column, i);
  }
  std::sort(keys.begin(), keys.end());
  std::vector<std::size_t> order;
  order.reserve(stops.size());
  for (const Key& key : keys)
    order.push_back(std::get<std::size_t>(key));
  return order;
}

std::vector<std::size_t> nearest_order(const Point& start, const std::vector<Point>& stops) {
  std::vector<std::size_t> order = greedy_order(start, stops);
  while (exchange_legs(start, stops, order)) {
  }
  return order;
}

std::size_t place_to_insert(const std::vector<Point>& order, const Point& stop) {
  if (order.empty()) return 0;
  std::vector<double> longer_m;  // by position - 1
  longer_m.reserve(order.size());
  for (std::size_t i = 1; i < order.size(); ++i) {
    longer_m.push_back(distance_m(order[i - 1], stop) + distance_m(stop, order[i]) -
                       distance_m(order[i - 1], order[i]));
  }
  longer_m.push_back(distance_m(order.back(), stop));
  const double least = *std::min_element(longer_m.begin(), longer_m.end());
  const auto first =
      std::find_if(longer_m.begin(), longer_m.end(), [&](double longer) { return longer <= least + kEqual_m; });
  return static_cast<std::size_t>(first - longer_m.begin()) + 1;
}

}  // namespace nearpit
