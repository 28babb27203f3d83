// What a crew needs seldom: another survey, colours, sizes, keys, who is at work.
#ifndef NEARPIT_UI_CARDS_OFFICE_CARD_H_
#define NEARPIT_UI_CARDS_OFFICE_CARD_H_

#include "cards/typing_card.h"
#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct OfficeState {
  ScrollState scroll;
};

void office_card(Ui& ui, const PixelBox& box, const DeskView& desk, OfficeState& state, TypingState& typing,
                 Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_OFFICE_CARD_H_
