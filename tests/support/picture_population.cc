#include "support/picture_population.h"

#include <algorithm>
#include <cstdlib>
#include <map>
#include <utility>

namespace nearpit {
namespace {

// Half spacings east, so that a shifted row has odd numbers.
int half_steps(const Node& node, LatticeKind kind) {
  const bool shifted = kind != LatticeKind::kSquare && node.row % 2 == 0;
  return 2 * node.column + (shifted ? 1 : 0);
}

bool adjacent(const Node& a, const Node& b, const PicturePlan& plan) {
  const int east = std::abs(half_steps(a, plan.kind) - half_steps(b, plan.kind));
  const int rows = std::abs(a.row - b.row);
  switch (plan.neighbours) {
    case NeighbourRule::kEight:
      return std::max(east / 2, rows) == 1;
    case NeighbourRule::kFour:
      return east / 2 + rows == 1;
    case NeighbourRule::kFourByTwo:
      return (rows == 0 && (east == 2 || east == 4)) || (east == 0 && (rows == 1 || rows == 2));
    case NeighbourRule::kSix:
      break;
  }
  return (rows == 0 && east == 2) || (rows == 1 && east == 1);
}

bool same_part(const PictureNode& a, const PictureNode& b, const Confinement& confinement) {
  if (confinement.kind == Confinement::Kind::kNone) return true;
  if (confinement.kind == Confinement::Kind::kArea) return a.area == b.area;
  const auto part = [&](const Node& node) {
    return std::pair((node.column - 1) / confinement.block_columns, (node.row - 1) / confinement.block_rows);
  };
  return part(a.node) == part(b.node);
}

using Key = std::pair<int, int>;

Key unit_key(const Node& node, const PicturePlan& plan) {
  if (plan.draw == DrawKind::kPits) return {node.row, node.column};
  if (plan.draw == DrawKind::kTransects) return {node.row, 0};
  const int k = plan.every;
  int q = node.column - 1;
  if (plan.kind != LatticeKind::kSquare) q -= (node.row - 1) / 2;
  return {((q % k) + k) % k, (node.row - 1) % k};
}

}  // namespace

exact::Population population_of(const LatticePicture& picture) {
  const std::vector<PictureNode>& nodes = picture.nodes();
  const PicturePlan& plan = picture.plan();
  exact::Population population;
  population.neighbours.resize(nodes.size());
  std::vector<std::map<Key, exact::Nodes>> units(picture.areas());
  for (std::size_t i = 0; i < nodes.size(); ++i) {
    population.positive.push_back(nodes[i].mark == PictureMark::kDug && nodes[i].counts[0] >= plan.at_least);
    units[nodes[i].area][unit_key(nodes[i].node, plan)].push_back(i);
    for (std::size_t j = 0; j < nodes.size(); ++j) {
      if (adjacent(nodes[i].node, nodes[j].node, plan) && same_part(nodes[i], nodes[j], plan.confinement)) {
        population.neighbours[i].push_back(j);
      }
    }
  }
  for (const auto& of_area : units) {
    population.units.emplace_back();
    for (const auto& [key, unit] : of_area)
      population.units.back().push_back(unit);
  }
  return population;
}

std::vector<std::vector<UnitId>> drawn_units(const LatticePicture& picture, const exact::Population& population,
                                             const exact::Sample& sample) {
  std::vector<std::vector<UnitId>> drawn(sample.size());
  for (std::size_t h = 0; h < sample.size(); ++h) {
    for (const std::size_t unit : sample[h]) {
      drawn[h].push_back(picture.unit_of(static_cast<NodeId>(population.units[h][unit].front())));
    }
    std::sort(drawn[h].begin(), drawn[h].end());
  }
  return drawn;
}

exact::Values find_values(const LatticePicture& picture, std::size_t find) {
  exact::Values values;
  for (const PictureNode& node : picture.nodes())
    values.emplace_back(node.counts[find]);
  return values;
}

exact::Values positive_values(const LatticePicture& picture) {
  exact::Values values;
  for (const PictureNode& node : picture.nodes()) {
    const bool positive = node.mark == PictureMark::kDug && node.counts[0] >= picture.plan().at_least;
    values.emplace_back(positive ? 1 : 0);
  }
  return values;
}

exact::Values squared(const exact::Values& values) {
  exact::Values squares;
  for (const exact::Rational& value : values)
    squares.push_back(value * value);
  return squares;
}

}  // namespace nearpit
