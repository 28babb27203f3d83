// Which nodes polygons hold, by Boost.Geometry's covered_by and distance: the oracle of clipping.
#ifndef NEARPIT_TESTS_SUPPORT_HELD_NODES_H_
#define NEARPIT_TESTS_SUPPORT_HELD_NODES_H_

#include <set>
#include <vector>

#include "lattice/frame.h"

namespace nearpit {

Ring rectangle(double x, double y, double width, double height);

// Nought inside and on the line.
double distance_by_boost(const MultiPolygon& polygons, const Point& place);
bool sound_by_boost(const MultiPolygon& polygons);

struct Held {
  std::set<Node> nodes;     // inside or within 1 mm
  std::set<Node> doubtful;  // within 2 micrometres of that limit, in neither list
};

// Of every node about the polygons.
Held held_by(const Lattice& lattice, const MultiPolygon& polygons);

std::set<Node> nodes_of(const std::vector<Run>& runs, const std::set<Node>& but);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_HELD_NODES_H_
