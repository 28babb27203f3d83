// Areas (strata): the parts of a survey that the first sample is drawn in separately. Areas are disjoint; a node on the
// line of two belongs to the one that the plan names first.
#ifndef NEARPIT_DESIGN_AREAS_H_
#define NEARPIT_DESIGN_AREAS_H_

#include <cstdint>
#include <string>
#include <vector>

#include "base/status.h"
#include "lattice/frame.h"

namespace nearpit {

using AreaId = std::uint16_t;
constexpr std::size_t kMostAreas = 1000;

struct Area {
  std::string name;
  MultiPolygon boundary;  // empty for the one area named "all" of a plan without areas
};

struct Areas {
  std::vector<Area> list;       // at least one
  std::vector<AreaId> of_node;  // by NodeId

  // Errors name the node that is in no area (its transect label and place), two areas that overlap, an area with no node.
  static Result<Areas> assign(const Frame& frame, std::vector<Area> list);
};

}  // namespace nearpit

#endif  // NEARPIT_DESIGN_AREAS_H_
