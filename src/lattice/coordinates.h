// The glossary of coordinates. Every quantity in this program is in one of these:
//
//   node        (row, column) of the lattice, both counted from 1 inside the frame; integers
//   along       metres in the lattice's own turned axes about its origin: u along a row, v across rows
//   ground      metres in the plan's coordinate system: x east, y north
//   lon/lat     degrees, WGS 84, longitude first; only `position` and `exchange` speak it
//   screen      pixels; only the window speaks it
#ifndef NEARPIT_LATTICE_COORDINATES_H_
#define NEARPIT_LATTICE_COORDINATES_H_

#include <compare>
#include <cstdint>

namespace nearpit {

struct Node {
  std::int32_t row = 0;
  std::int32_t column = 0;
  friend auto operator<=>(const Node&, const Node&) = default;
};

// Ground metres.
struct Point {
  double x = 0;
  double y = 0;
  friend bool operator==(const Point&, const Point&) = default;
};

// Lattice axes, metres.
struct Along {
  double u = 0;
  double v = 0;
};

double distance_m(const Point& from, const Point& to);
// Clockwise from grid north, 0 <= bearing < 360; 0 for equal points.
double bearing_deg(const Point& from, const Point& to);

}  // namespace nearpit

#endif  // NEARPIT_LATTICE_COORDINATES_H_
