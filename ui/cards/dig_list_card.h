// The dig list: the next pit, large, and the others in walking order, each with why it is due and how to walk there.
#ifndef NEARPIT_UI_CARDS_DIG_LIST_CARD_H_
#define NEARPIT_UI_CARDS_DIG_LIST_CARD_H_

#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct DigListState {
  ScrollState scroll;
};

void dig_list_card(Ui& ui, const PixelBox& box, const SurveyView& survey, DigListState& state, Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_DIG_LIST_CARD_H_
