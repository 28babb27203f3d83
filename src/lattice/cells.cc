#include "lattice/cells.h"

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

// Whole numbers of half spacings and half row distances: every corner is exact, so shared sides cancel exactly.
BoostPolygon half_steps_cell(const Lattice& lattice, const Node& node) {
  const double u = 2.0 * (node.column - 1) + (lattice.rows_shift() && node.row % 2 == 0 ? 1 : 0);
  const double v = 2.0 * (node.row - 1);
  BoostPolygon cell;
  cell.outer() = {{u - 1, v - 1}, {u + 1, v - 1}, {u + 1, v + 1}, {u - 1, v + 1}};
  return cell;
}

BoostMulti united(const Lattice& lattice, std::span<const Node> nodes) {
  BoostMulti out;
  if (nodes.size() == 1) {
    out.push_back(half_steps_cell(lattice, nodes.front()));
  } else if (nodes.size() > 1) {
    const std::size_t half = nodes.size() / 2;
    bg::union_(united(lattice, nodes.first(half)), united(lattice, nodes.subspan(half)), out);
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
  for (const BoostPolygon& polygon : united(lattice, nodes)) {
    Polygon out{ring_of(polygon.outer()), {}};
    for (const auto& hole : polygon.inners())
      out.holes.push_back(ring_of(hole));
    outline.push_back(std::move(out));
  }
  return outline;
}

}  // namespace nearpit
