#include "support/naive_dig_list.h"

#include <algorithm>
#include <cmath>
#include <set>

namespace nearpit::naive {

DigListOracle::DigListOracle(std::vector<Place> places, const Rules& rules)
    : places_(std::move(places)), rules_(rules), facts_(places_.size()), neighbours_(places_.size()) {
  std::map<std::pair<int, int>, std::size_t> frame;
  for (std::size_t node = 0; node < places_.size(); ++node)
    frame[{places_[node].row, places_[node].column}] = node;
  for (std::size_t node = 0; node < places_.size(); ++node) {
    for (int row = places_[node].row - 3; row <= places_[node].row + 3; ++row) {
      for (int column = places_[node].column - 3; column <= places_[node].column + 3; ++column) {
        const auto other = frame.find({row, column});
        if (other == frame.end() || other->second == node) continue;
        if (near_enough(places_[node], places_[other->second])) neighbours_[node].push_back(other->second);
      }
    }
  }
}

// Spacing 1.
std::pair<double, double> DigListOracle::ground_place(const Place& place) const {
  const bool shifted = rules_.grid != Grid::kSquare && place.row % 2 == 0;
  const double row_distance = rules_.grid == Grid::kTriangular ? std::sqrt(0.75) : 1.0;
  return {place.column + (shifted ? 0.5 : 0.0), place.row * row_distance};
}

bool DigListOracle::near_enough(const Place& from, const Place& to) const {
  const auto [from_x, from_y] = ground_place(from);
  const auto [to_x, to_y] = ground_place(to);
  const double apart = std::hypot(to_x - from_x, to_y - from_y);
  const auto about = [apart](double steps) { return std::abs(apart - steps) < 1e-6; };
  switch (rules_.neighbours) {
    case Neighbours::kEight:
      return about(1) || about(std::sqrt(2.0));
    case Neighbours::kFour:
      return about(1);
    case Neighbours::kFourByTwo:
      return about(1) || about(2);
    case Neighbours::kSix:
      return about(1) || (rules_.grid == Grid::kStaggered && about(std::sqrt(1.25)));
  }
  return false;
}

bool DigListOracle::same_part(std::size_t from, std::size_t to) const {
  const Place& a = places_[from];
  const Place& b = places_[to];
  switch (rules_.parts) {
    case Parts::kWhole:
      return true;
    case Parts::kAreas:
      return a.area == b.area;
    case Parts::kBlocks:
      return (a.row - 1) / rules_.block_rows == (b.row - 1) / rules_.block_rows &&
             (a.column - 1) / rules_.block_columns == (b.column - 1) / rules_.block_columns;
  }
  return false;
}

// Ring by ring: what a positive of the last ring opens, and no earlier ring holds, is the next ring.
std::vector<std::optional<int>> DigListOracle::rings() const {
  std::vector<std::optional<int>> ring(places_.size());
  for (std::size_t node = 0; node < places_.size(); ++node) {
    if (places_[node].first_sample) ring[node] = 0;
  }
  for (int last = 0; !rules_.ring_limit || last < *rules_.ring_limit; ++last) {
    bool grew = false;
    for (std::size_t node = 0; node < places_.size(); ++node) {
      if (ring[node] != last || facts_[node].said != Said::kPositive) continue;
      for (const std::size_t other : neighbours_[node]) {
        if (ring[other] || !same_part(node, other)) continue;
        ring[other] = last + 1;
        grew = true;
      }
    }
    if (!grew) break;
  }
  return ring;
}

Standing DigListOracle::standing(std::size_t node, const std::vector<std::optional<int>>& ring) const {
  Standing result;
  result.ring = ring[node];
  if (!result.ring) return result;
  const Fact& fact = facts_[node];
  const bool unrecorded = fact.said == Said::kNothing;
  const bool closed = fact.ground + fact.access > 0;
  result.halted = unrecorded && !closed && fact.halts > 0;
  result.due = unrecorded && !closed && !result.halted;
  result.not_dug_access = fact.said == Said::kAccessReason || (unrecorded && fact.access > 0);
  result.not_dug_ground = fact.said == Said::kGroundReason || (unrecorded && fact.ground > 0 && fact.access == 0);
  for (const std::size_t other : neighbours_[node]) {
    if (ring[other] && facts_[other].said == Said::kPositive && same_part(other, node))
      result.opened_by.push_back(other);
  }
  std::sort(result.opened_by.begin(), result.opened_by.end());
  return result;
}

std::vector<Cluster> DigListOracle::clusters(const std::vector<Standing>& nodes) const {
  const auto positive = [&](std::size_t node) { return nodes[node].ring && facts_[node].said == Said::kPositive; };
  std::vector<Cluster> found;
  std::set<std::size_t> seen;
  for (std::size_t first = 0; first < places_.size(); ++first) {
    if (!positive(first) || seen.count(first) != 0) continue;
    std::set<std::size_t> members;
    std::set<std::size_t> open;
    Cluster cluster;
    std::vector<std::size_t> to_visit{first};
    while (!to_visit.empty()) {
      const std::size_t node = to_visit.back();
      to_visit.pop_back();
      if (!members.insert(node).second) continue;
      for (const std::size_t other : neighbours_[node]) {
        if (!same_part(node, other)) {
          cluster.cut_at_edge = true;
        } else if (positive(other)) {
          to_visit.push_back(other);
        } else if (nodes[other].due || nodes[other].halted) {
          open.insert(other);
        }
      }
    }
    seen.insert(members.begin(), members.end());
    cluster.nodes.assign(members.begin(), members.end());
    cluster.open.assign(open.begin(), open.end());
    found.push_back(cluster);
  }
  return found;
}

Answer DigListOracle::answer() const {
  Answer answer;
  const std::vector<std::optional<int>> ring = rings();
  for (std::size_t node = 0; node < places_.size(); ++node) {
    answer.nodes.push_back(standing(node, ring));
    if (!ring[node] || facts_[node].said != Said::kPositive) continue;
    for (const std::size_t other : neighbours_[node])
      answer.truncated |= same_part(node, other) && !ring[other];
  }
  answer.clusters = clusters(answer.nodes);
  return answer;
}

}  // namespace nearpit::naive
