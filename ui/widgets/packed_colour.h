// Our colours as Dear ImGui's draw lists take them.
#ifndef NEARPIT_UI_WIDGETS_PACKED_COLOUR_H_
#define NEARPIT_UI_WIDGETS_PACKED_COLOUR_H_

#include <imgui.h>

#include "theme.h"

namespace nearpit::ui {

inline ImU32 packed(const Colour& colour) { return IM_COL32(colour.red, colour.green, colour.blue, colour.alpha); }

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_PACKED_COLOUR_H_
