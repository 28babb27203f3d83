// Polygons on the ground with holes. Plain data, checked once when a plan is read (polygon_problem); everything else
// here takes checked polygons.
#ifndef NEARPIT_LATTICE_POLYGON_H_
#define NEARPIT_LATTICE_POLYGON_H_

#include <optional>
#include <string>
#include <vector>

#include "lattice/coordinates.h"

namespace nearpit {

// The closing point is not repeated; either winding.
using Ring = std::vector<Point>;

struct Polygon {
  Ring outer;
  std::vector<Ring> holes;
};

using MultiPolygon = std::vector<Polygon>;

struct Box {
  Point low;
  Point high;
};

// Nothing when the polygons are simple, have area, don't overlap one another and hold their holes; otherwise what is wrong,
// in words that end a sentence ("crosses itself near 12.5, 40").
std::optional<std::string> polygon_problem(const MultiPolygon& polygons);

// Square metres, holes left out.
double area_m2(const MultiPolygon& polygons);
// Square metres that two have in common.
double common_area_m2(const MultiPolygon& first, const MultiPolygon& second);
// The union of parts that may touch or overlap; a part alone comes back as it is. Corners that no crossing makes keep their numbers.
MultiPolygon united(const std::vector<MultiPolygon>& parts);
// Of all outer points; not for an empty list.
Box bounding_box(const MultiPolygon& polygons);
// Inside, on the line, or within `tolerance_m` of it.
bool covers(const MultiPolygon& polygons, const Point& point, double tolerance_m);

}  // namespace nearpit

#endif  // NEARPIT_LATTICE_POLYGON_H_
