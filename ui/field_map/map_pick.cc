#include "field_map/map_pick.h"

#include <algorithm>
#include <limits>
#include <vector>

namespace nearpit::ui {
namespace {

constexpr double kAsNear_m = 0.001;

Box around(const Point& at, double reach_m) {
  return {{at.x - reach_m, at.y - reach_m}, {at.x + reach_m, at.y + reach_m}};
}

// What is drawn in the square of this reach.
std::vector<PitMark> drawn_within(const SurveyModel& model, const MapMarks& marks, const Box& square, double apart_m,
                                  bool plain_shown) {
  std::vector<PitMark> drawn;
  marks.visible(square, apart_m, &drawn);
  if (!plain_shown) return drawn;
  std::vector<NodeId> nodes;
  plain_nodes(model, square, std::numeric_limits<std::size_t>::max(), &nodes);
  for (const NodeId id : nodes) {
    if (!marks.has_mark(id)) drawn.push_back(mark_of(model, id));
  }
  return drawn;
}

std::optional<PitMark> most_telling(const std::vector<PitMark>& drawn, const Point& at, double within_m) {
  std::optional<PitMark> best;
  for (const PitMark& pit : drawn) {
    if (distance_m(at, pit.place) <= within_m && (!best || more_telling(pit, *best))) best = pit;
  }
  return best;
}

}  // namespace

std::optional<PitMark> nearest_pit(const SurveyModel& model, const MapMarks& marks, const Point& at, double within_m,
                                   double apart_m, bool plain_shown) {
  if (!(within_m >= 0)) return std::nullopt;
  const double spacing = model.survey().ground().frame.lattice().spacing_m;
  for (double reach = std::min(spacing, within_m);; reach = std::min(2 * reach, within_m)) {
    const std::vector<PitMark> drawn = drawn_within(model, marks, around(at, reach + kAsNear_m), apart_m, plain_shown);
    double nearest = std::numeric_limits<double>::infinity();
    for (const PitMark& pit : drawn)
      nearest = std::min(nearest, distance_m(at, pit.place));
    if (nearest <= reach) return most_telling(drawn, at, std::min(nearest + kAsNear_m, within_m));
    if (reach >= within_m) return std::nullopt;
  }
}

}  // namespace nearpit::ui
