// The field map: the ground, its areas, closed parts and clusters, every pit by its mark, the next one to walk to, the one that is chosen. Drag, wheel, keys
// and buttons move it; a touch chooses the nearest pit within 12 mm.
#ifndef NEARPIT_UI_FIELD_MAP_FIELD_MAP_H_
#define NEARPIT_UI_FIELD_MAP_FIELD_MAP_H_

#include <optional>
#include <string>
#include <vector>

#include "desk/desk_view.h"
#include "field_map/map_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct FieldMapState {
  std::string of;  // the survey file that the view is of
  PixelBox box;    // where it was drawn last
  std::optional<MapView> view;
  TouchState touch;
  bool details = false;  // the chosen pit's whole history is shown
  ScrollState history;
  std::vector<PitMark> drawn;  // kept so that a frame asks for no memory
  std::vector<NodeId> plain;
};

void field_map(Ui& ui, const PixelBox& box, const SurveyView& survey, FieldMapState& state, Sink& sink);

// A pit's mark with what is laid over it.
void draw_pit_mark(Ui& ui, const PitMark& mark, Pixel middle, float size_px);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_FIELD_MAP_FIELD_MAP_H_
