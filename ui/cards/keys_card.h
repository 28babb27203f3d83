// What the marks on the map mean, and every key that does something.
#ifndef NEARPIT_UI_CARDS_KEYS_CARD_H_
#define NEARPIT_UI_CARDS_KEYS_CARD_H_

#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct KeysState {
  ScrollState scroll;
};

void keys_card(Ui& ui, const PixelBox& box, bool survey_open, KeysState& state, Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_KEYS_CARD_H_
