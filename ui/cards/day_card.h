// The day: how far the survey is, and the figures as sentences and as bars with their likely ranges, and what keeps them from being final.
#ifndef NEARPIT_UI_CARDS_DAY_CARD_H_
#define NEARPIT_UI_CARDS_DAY_CARD_H_

#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct DayCardState {
  ScrollState scroll;
};

void day_card(Ui& ui, const PixelBox& box, const SurveyView& survey, DayCardState& state);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_DAY_CARD_H_
