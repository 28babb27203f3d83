// What is wrong with a frame's layout, as its log of controls and texts tells.
#ifndef NEARPIT_TESTS_SCREEN_LAYOUT_LOOK_H_
#define NEARPIT_TESTS_SCREEN_LAYOUT_LOOK_H_

#include <string>
#include <vector>

#include "glass.h"
#include "widgets/widget_log.h"

namespace nearpit::ui {

// One line a fault: a control beyond the glass or wider than its scroll area, smaller than it promised or than a finger needs, on another or nearer to it
// than 3 mm; a text that is cut, shortened though it is ours, sticks out of its control, lies under another or on another text. `at_end` is a scroll area
// that was drawn to its end, so that what is still below it can't be reached.
std::vector<std::string> layout_faults(const WidgetLog& log, const Glass& glass, const std::string& at_end = "");

}  // namespace nearpit::ui

#endif  // NEARPIT_TESTS_SCREEN_LAYOUT_LOOK_H_
