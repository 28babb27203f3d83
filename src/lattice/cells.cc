#include "lattice/cells.h"

#include <algorithm>
#include <boost/geometry.hpp>
#include <boost/geometry/geometries/multi_polygon.hpp>
#include <boost/geometry/geometries/point_xy.hpp>
#include <boost/geometry/geometries/polygon.hpp>
#include <span>

namespace nearpit {
namespace {

namespace bg = boost::geometry;
using BoostPoint = bg::model::d2::point_xy<double>;
using BoostPolygon = bg::model::polygon<BoostPoint, false, false>;
using BoostMulti = bg::model::multi_polygon<BoostPolygon>;

// Nodes first..last of one row, side by side.
struct CellRun {
  Node first;
  std::int32_t last_column = 0;
};

std::vector<CellRun> runs_of(std::vector<Node> nodes) {
  std::sort(nodes.begin(), nodes.end());
  std::vector<CellRun> runs;
  for (const Node& node : nodes) {
    const bool goes_on =
        !runs.empty() && runs.back().first.row == node.row && runs.back().last_column + 1 == node.column;
    if (goes_on) {
      runs.back().last_column = node.column;
    } else {
      runs.push_back({node, node.column});
    }
  }
  return runs;
}

// Whole numbers of half spacings and half row distances: every corner is exact, so shared sides cancel exactly.
BoostPolygon half_steps_rectangle(const Lattice& lattice, const CellRun& run) {
  const double shift = lattice.rows_shift() && run.first.row % 2 == 0 ? 1 : 0;
  const double from = 2.0 * (run.first.column - 1) + shift - 1;
  const double to = 2.0 * (run.last_column - 1) + shift + 1;
  const double v = 2.0 * (run.first.row - 1);
  BoostPolygon rectangle;
  rectangle.outer() = {{from, v - 1}, {to, v - 1}, {to, v + 1}, {from, v + 1}};
  return rectangle;
}

BoostMulti united(const Lattice& lattice, std::span<const CellRun> runs) {
  BoostMulti out;
  if (runs.size() == 1) {
    out.push_back(half_steps_rectangle(lattice, runs.front()));
  } else if (runs.size() > 1) {
    const std::size_t half = runs.size() / 2;
    bg::union_(united(lattice, runs.first(half)), united(lattice, runs.subspan(half)), out);
  }
  return out;
}

}  // namespace

MultiPolygon cells_outline(const Lattice& lattice, const std::vector<Node>& nodes) {
  const auto ring_of = [&](const auto& ring) {
    Ring out;
    for (const BoostPoint& corner : ring) {
      out.push_back(
          lattice.to_ground(Along{corner.x() * lattice.spacing_m / 2, corner.y() * lattice.row_distance_m() / 2}));
    }
    return out;
  };
  MultiPolygon outline;
  const std::vector<CellRun> runs = runs_of(nodes);
  for (const BoostPolygon& polygon : united(lattice, runs)) {
    Polygon out{ring_of(polygon.outer()), {}};
    for (const auto& hole : polygon.inners())
      out.holes.push_back(ring_of(hole));
    outline.push_back(std::move(out));
  }
  return outline;
}

}  // namespace nearpit
