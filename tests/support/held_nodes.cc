#include "support/held_nodes.h"

#include <algorithm>
#include <boost/geometry.hpp>
#include <boost/geometry/geometries/point_xy.hpp>
#include <boost/geometry/geometries/polygon.hpp>
#include <cmath>

namespace nearpit {
namespace {

namespace bg = boost::geometry;
using BoostPoint = bg::model::d2::point_xy<double>;
using BoostPolygon = bg::model::polygon<BoostPoint, true, false>;
using BoostMulti = bg::model::multi_polygon<BoostPolygon>;

BoostMulti to_boost(const MultiPolygon& polygons) {
  BoostMulti result;
  for (const Polygon& polygon : polygons) {
    BoostPolygon part;
    for (const Point& point : polygon.outer)
      part.outer().push_back({point.x, point.y});
    for (const Ring& hole : polygon.holes) {
      part.inners().emplace_back();
      for (const Point& point : hole)
        part.inners().back().push_back({point.x, point.y});
    }
    result.push_back(part);
  }
  bg::correct(result);
  return result;
}

double distance_of(const Point& place, const BoostMulti& polygons) {
  const BoostPoint point{place.x, place.y};
  return bg::covered_by(point, polygons) ? 0 : bg::distance(point, polygons);
}

Box box_with_margin(const MultiPolygon& polygons) {
  Box box{polygons[0].outer[0], polygons[0].outer[0]};
  for (const Polygon& polygon : polygons) {
    for (const Point& corner : polygon.outer) {
      box.low = {std::min(box.low.x, corner.x - 1), std::min(box.low.y, corner.y - 1)};
      box.high = {std::max(box.high.x, corner.x + 1), std::max(box.high.y, corner.y + 1)};
    }
  }
  return box;
}

bool inside(const Box& box, const Point& place) {
  return box.low.x <= place.x && place.x <= box.high.x && box.low.y <= place.y && place.y <= box.high.y;
}

}  // namespace

Ring rectangle(double x, double y, double width, double height) {
  return {{x, y}, {x + width, y}, {x + width, y + height}, {x, y + height}};
}

double distance_by_boost(const MultiPolygon& polygons, const Point& place) {
  return distance_of(place, to_boost(polygons));
}

bool sound_by_boost(const MultiPolygon& polygons) { return bg::is_valid(to_boost(polygons)); }

Held held_by(const Lattice& lattice, const MultiPolygon& polygons) {
  const BoostMulti boost_polygons = to_boost(polygons);
  const Box box = box_with_margin(polygons);
  Node low{1 << 30, 1 << 30};
  Node high{-(1 << 30), -(1 << 30)};
  for (const Polygon& polygon : polygons) {
    for (const Point& point : polygon.outer) {
      const Node node = lattice.nearest(point);
      low = {std::min(low.row, node.row), std::min(low.column, node.column)};
      high = {std::max(high.row, node.row), std::max(high.column, node.column)};
    }
  }
  Held held;
  for (int row = low.row - 2; row <= high.row + 2; ++row) {
    for (int column = low.column - 2; column <= high.column + 2; ++column) {
      const Point place = lattice.to_ground(Node{row, column});
      if (!inside(box, place)) continue;
      const double distance = distance_of(place, boost_polygons);
      if (std::abs(distance - 0.001) < 2e-6) {
        held.doubtful.insert({row, column});
      } else if (distance < 0.001) {
        held.nodes.insert({row, column});
      }
    }
  }
  return held;
}

std::set<Node> nodes_of(const std::vector<Run>& runs, const std::set<Node>& but) {
  std::set<Node> nodes;
  for (const Run& run : runs) {
    for (std::int32_t column = run.first; column <= run.last; ++column) {
      if (but.count({run.row, column}) == 0) nodes.insert({run.row, column});
    }
  }
  return nodes;
}

}  // namespace nearpit
