// Which pit a touch on the field map means: the nearest of those drawn.
#ifndef NEARPIT_UI_FIELD_MAP_MAP_PICK_H_
#define NEARPIT_UI_FIELD_MAP_MAP_PICK_H_

#include <optional>

#include "field_map/map_marks.h"

namespace nearpit::ui {

// The nearest drawn mark at most `within_m` from the place; of those within 1 mm of as near, the more telling. `apart_m` is the thinning in force (marks
// that it leaves out can't be picked); plain nodes only when they are shown. Cost: what lies about as near as the pit found, or within reach
// when nothing does.
std::optional<PitMark> nearest_pit(const SurveyModel& model, const MapMarks& marks, const Point& at, double within_m,
                                   double apart_m, bool plain_shown);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_FIELD_MAP_MAP_PICK_H_
