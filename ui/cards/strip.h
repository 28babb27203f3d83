// The strip below everything: who is at work, pits today, pits to dig, the last save; and the way to each card.
#ifndef NEARPIT_UI_CARDS_STRIP_H_
#define NEARPIT_UI_CARDS_STRIP_H_

#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

// `with_map`: the glass is too narrow for both, a button shows the map or the card, and the strip is two rows high.
void strip(Ui& ui, const PixelBox& box, const DeskView& desk, bool with_map, bool* map_shown, Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_STRIP_H_
