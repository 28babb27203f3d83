// Where the keyboard's ring goes: from control to control in the order of drawing, or to the next one in a direction.
#ifndef NEARPIT_UI_WIDGETS_FOCUS_ORDER_H_
#define NEARPIT_UI_WIDGETS_FOCUS_ORDER_H_

#include <string>

#include "widgets/input_queue.h"
#include "widgets/widget_log.h"

namespace nearpit::ui {

// The control that the ring moves to from the control `path` (empty or gone: none) on a Tab, back Tab or arrow; `path` itself when there is none that way.
// Only buttons are stopped at.
std::string next_focus(const WidgetLog& log, const std::string& path, Key key);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_FOCUS_ORDER_H_
