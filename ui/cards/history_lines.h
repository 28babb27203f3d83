// What was written of a pit, newest first, as text.
#ifndef NEARPIT_UI_CARDS_HISTORY_LINES_H_
#define NEARPIT_UI_CARDS_HISTORY_LINES_H_

#include <vector>

#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

// Draws from the top of the box on; returns where it ended.
float history_lines(Ui& ui, PixelBox box, const std::vector<HistoryLine>& history);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_HISTORY_LINES_H_
