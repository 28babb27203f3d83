// Opening a survey, or making one from a plan: surveys opened lately, and files in big rows.
#ifndef NEARPIT_UI_CARDS_START_CARD_H_
#define NEARPIT_UI_CARDS_START_CARD_H_

#include <string>

#include "cards/typing_card.h"
#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct StartState {
  ScrollState recent;
  ScrollState files;
  std::string plan;  // the plan file that a survey is to be made from
  std::string name;  // what the survey file will be called
};

void start_card(Ui& ui, const PixelBox& box, const DeskView& desk, StartState& state, TypingState& typing, Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_START_CARD_H_
