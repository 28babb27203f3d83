// The lattice of possible pits: node <-> ground.
//
// Laws: to_ground(Node) and nearest() are inverse to within 1 mm at any bearing; moving by two rows or by one column is the
// same translation everywhere (kinds other than square shift every second row by half a spacing, so one row is not).
#ifndef NEARPIT_LATTICE_LATTICE_H_
#define NEARPIT_LATTICE_LATTICE_H_

#include <string_view>

#include "lattice/coordinates.h"

namespace nearpit {

enum class LatticeKind {
  kSquare,
  kStaggered,   // every second row shifted half a spacing, rows one spacing apart
  kTriangular,  // equilateral: shifted, rows spacing * sqrt(3)/2 apart
};

struct Lattice {
  LatticeKind kind = LatticeKind::kSquare;
  double spacing_m = 1;     // between pits of a row, > 0
  Point origin;             // ground place of node (1, 1)
  double bearing_deg = 90;  // the way rows run, clockwise from grid north

  double row_distance_m() const;
  // Ground that one node stands for, m2.
  double cell_area_m2() const;
  bool rows_shift() const { return kind != LatticeKind::kSquare; }

  Along along(const Node& node) const;
  Along along(const Point& ground) const;
  Point to_ground(const Along& along) const;
  Point to_ground(const Node& node) const { return to_ground(along(node)); }
  // The node whose place is nearest; of equally near ones the lower row, then the lower column.
  Node nearest(const Point& ground) const;
};

std::string_view lattice_kind_name(LatticeKind kind);

}  // namespace nearpit

#endif  // NEARPIT_LATTICE_LATTICE_H_
