#include "lattice/polygon.h"

#include <algorithm>
#include <boost/geometry.hpp>
#include <boost/geometry/geometries/multi_polygon.hpp>
#include <boost/geometry/geometries/point_xy.hpp>
#include <boost/geometry/geometries/polygon.hpp>
#include <cmath>
#include <utility>

namespace nearpit {
namespace {

namespace bg = boost::geometry;
using BoostPoint = bg::model::d2::point_xy<double>;
using BoostPolygon = bg::model::polygon<BoostPoint, false, false>;
using BoostMulti = bg::model::multi_polygon<BoostPolygon>;

// Whole metres are taken off, so that areas of small fields far from the origin keep their digits.
Point near_corner(const MultiPolygon& polygons) {
  const Box box = bounding_box(polygons);
  return {std::floor(box.low.x), std::floor(box.low.y)};
}

BoostMulti converted(const MultiPolygon& polygons, const Point& zero) {
  BoostMulti multi;
  for (const Polygon& polygon : polygons) {
    BoostPolygon out;
    for (const Point& point : polygon.outer)
      out.outer().emplace_back(point.x - zero.x, point.y - zero.y);
    for (const Ring& hole : polygon.holes) {
      out.inners().emplace_back();
      for (const Point& point : hole)
        out.inners().back().emplace_back(point.x - zero.x, point.y - zero.y);
    }
    multi.push_back(std::move(out));
  }
  bg::correct(multi);
  return multi;
}

MultiPolygon converted_back(const BoostMulti& multi) {
  const auto ring_of = [](const auto& points) {
    Ring ring;
    for (const BoostPoint& point : points)
      ring.push_back({point.x(), point.y()});
    return ring;
  };
  MultiPolygon polygons;
  for (const BoostPolygon& polygon : multi) {
    polygons.push_back({ring_of(polygon.outer()), {}});
    for (const auto& hole : polygon.inners())
      polygons.back().holes.push_back(ring_of(hole));
  }
  return polygons;
}

std::string in_words(bg::validity_failure_type failure) {
  switch (failure) {
    case bg::failure_few_points:
      return "has a ring of fewer than three different points";
    case bg::failure_spikes:
      return "has a spike (a line that runs out and back)";
    case bg::failure_self_intersections:
      return "crosses or touches itself";
    case bg::failure_interior_rings_outside:
      return "has a hole outside its outer ring";
    case bg::failure_nested_interior_rings:
      return "has a hole inside another hole";
    case bg::failure_disconnected_interior:
      return "is cut in two by its holes";
    case bg::failure_intersecting_interiors:
      return "has parts that overlap";
    case bg::failure_duplicate_points:
      return "";
    default:
      return "is not a simple polygon";
  }
}

}  // namespace

std::optional<std::string> polygon_problem(const MultiPolygon& polygons) {
  if (polygons.empty()) return "has no ring";
  for (const Polygon& polygon : polygons) {
    if (polygon.outer.size() < 3) return in_words(bg::failure_few_points);
    for (const Ring& hole : polygon.holes) {
      if (hole.size() < 3) return in_words(bg::failure_few_points);
    }
  }
  const BoostMulti multi = converted(polygons, near_corner(polygons));
  bg::validity_failure_type failure = bg::no_failure;
  if (!bg::is_valid(multi, failure)) {
    const std::string words = in_words(failure);
    if (!words.empty()) return words;
  }
  if (!(bg::area(multi) > 0)) return "has no area";
  return std::nullopt;
}

double area_m2(const MultiPolygon& polygons) {
  if (polygons.empty()) return 0;
  return bg::area(converted(polygons, near_corner(polygons)));
}

double common_area_m2(const MultiPolygon& first, const MultiPolygon& second) {
  if (first.empty() || second.empty()) return 0;
  const Point zero = near_corner(first);
  BoostMulti common;
  bg::intersection(converted(first, zero), converted(second, zero), common);
  return bg::area(common);
}

// In pairs, then pairs of pairs, so that no part is gone through more often than the logarithm of their number.
MultiPolygon united(const std::vector<MultiPolygon>& parts) {
  if (parts.size() == 1) return parts.front();
  std::vector<BoostMulti> left;
  for (const MultiPolygon& part : parts)
    left.push_back(converted(part, {0, 0}));
  while (left.size() > 1) {
    std::vector<BoostMulti> next;
    for (std::size_t i = 0; i + 1 < left.size(); i += 2) {
      BoostMulti both;
      bg::union_(left[i], left[i + 1], both);
      next.push_back(std::move(both));
    }
    if (left.size() % 2 == 1) next.push_back(std::move(left.back()));
    left = std::move(next);
  }
  return left.empty() ? MultiPolygon{} : converted_back(left.front());
}

Box bounding_box(const MultiPolygon& polygons) {
  Box box{polygons.front().outer.front(), polygons.front().outer.front()};
  for (const Polygon& polygon : polygons) {
    for (const Point& point : polygon.outer) {
      box.low = {std::min(box.low.x, point.x), std::min(box.low.y, point.y)};
      box.high = {std::max(box.high.x, point.x), std::max(box.high.y, point.y)};
    }
  }
  return box;
}

bool covers(const MultiPolygon& polygons, const Point& point, double tolerance_m) {
  if (polygons.empty()) return false;
  const Point zero = near_corner(polygons);
  const BoostPoint at(point.x - zero.x, point.y - zero.y);
  return bg::distance(at, converted(polygons, zero)) <= tolerance_m;
}

}  // namespace nearpit
