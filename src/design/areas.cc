#include "design/areas.h"

#include <algorithm>
#include <limits>

#include "base/numbers.h"
#include "base/text.h"
#include "lattice/label.h"

namespace nearpit {
namespace {

constexpr AreaId kNone = std::numeric_limits<AreaId>::max();

// Areas drawn side by side may overlap by a sliver: less than a thousandth of the smaller and less than one pit's ground.
Status refuse_overlaps(const Frame& frame, const std::vector<Area>& list) {
  for (std::size_t i = 0; i < list.size(); ++i) {
    const Box box = bounding_box(list[i].boundary);
    for (std::size_t j = i + 1; j < list.size(); ++j) {
      const Box other = bounding_box(list[j].boundary);
      if (box.high.x < other.low.x || other.high.x < box.low.x || box.high.y < other.low.y ||
          other.high.y < box.low.y) {
        continue;
      }
      const double common = common_area_m2(list[i].boundary, list[j].boundary);
      const double smaller = std::min(area_m2(list[i].boundary), area_m2(list[j].boundary));
      if (common <= std::min(frame.lattice().cell_area_m2(), 0.001 * smaller)) continue;
      return Error(ErrorKind::kBadInput, "strata: areas " + in_quotes(list[i].name) + " and " +
                                             in_quotes(list[j].name) + " overlap by " + format_fixed(common, 1) +
                                             " m2; areas must be disjoint, redraw one of them");
    }
  }
  return ok_status();
}

}  // namespace

Result<Areas> Areas::assign(const Frame& frame, std::vector<Area> list) {
  Areas areas;
  areas.list = std::move(list);
  if (areas.list.size() == 1 && areas.list.front().boundary.empty()) {
    areas.of_node.assign(static_cast<std::size_t>(frame.size()), 0);
    return areas;
  }
  NEARPIT_TRY(refuse_overlaps(frame, areas.list));
  areas.of_node.assign(static_cast<std::size_t>(frame.size()), kNone);
  for (std::size_t i = 0; i < areas.list.size(); ++i) {
    std::size_t nodes = 0;
    frame.each_inside(areas.list[i].boundary, [&](NodeId id) {
      AreaId& of = areas.of_node[static_cast<std::size_t>(id)];
      if (of != kNone) return;
      of = static_cast<AreaId>(i);
      ++nodes;
    });
    if (nodes == 0) {
      return Error(ErrorKind::kBadInput, "strata: area " + in_quotes(areas.list[i].name) +
                                             " holds no pit of the lattice; enlarge it or leave it out");
    }
  }
  const auto outside = std::find(areas.of_node.begin(), areas.of_node.end(), kNone);
  if (outside != areas.of_node.end()) {
    const auto id = static_cast<NodeId>(outside - areas.of_node.begin());
    const Point place = frame.ground(id);
    const auto more = std::count(outside, areas.of_node.end(), kNone) - 1;
    return Error(ErrorKind::kBadInput,
                 "strata: pit " + transect_label(frame.node(id)) + " at " + format_trimmed(place.x, 3) + ", " +
                     format_trimmed(place.y, 3) +
                     (more > 0 ? " and " + std::to_string(more) + " others lie" : " lies") +
                     " inside the boundary but in no area; the areas must cover every pit of the boundary");
  }
  return areas;
}

}  // namespace nearpit
