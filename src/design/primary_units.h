// Primary units: what the first sample draws. Thompson SK 1991, Biometrics 47:1103-1115 (primary and secondary units).
//
//   pits        one node
//   transects   one row of the area's nodes
//   systematic  one of the k x k interleaved sub-lattices of the area. Square: start ((c-1) mod k, (r-1) mod k). Six-neighbour
//               kinds: axial p = r-1, q = (c-1) - floor((r-1)/2), start (q mod k, p mod k), so each is of that kind again.
//
// Law: within each area every node is in exactly one unit, and no unit is empty.
#ifndef NEARPIT_DESIGN_PRIMARY_UNITS_H_
#define NEARPIT_DESIGN_PRIMARY_UNITS_H_

#include <cstdint>
#include <string_view>
#include <vector>

#include "design/areas.h"
#include "lattice/frame.h"

namespace nearpit {

enum class DrawKind { kPits, kTransects, kSystematic };
std::string_view draw_kind_name(DrawKind kind);
// What people call one primary unit, or several.
std::string_view unit_word(DrawKind kind, bool several);

// 0 .. N_h - 1 within its area, in the order of its first node (systematic: by q start, then p start)
using UnitId = std::uint32_t;

struct PrimaryUnits {
  DrawKind kind = DrawKind::kPits;
  std::int32_t every = 1;            // systematic only, k >= 2
  std::vector<UnitId> of_node;       // by NodeId, number within the node's area
  std::vector<std::uint32_t> count;  // N_h by AreaId

  static PrimaryUnits of(const Frame& frame, const Areas& areas, DrawKind kind, std::int32_t every);
};

}  // namespace nearpit

#endif  // NEARPIT_DESIGN_PRIMARY_UNITS_H_
