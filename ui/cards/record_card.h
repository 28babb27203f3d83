// A pit's record: counters for each find, depth, why the pit stopped, a note, judgement, not dug, and what may be done to a record that stands.
#ifndef NEARPIT_UI_CARDS_RECORD_CARD_H_
#define NEARPIT_UI_CARDS_RECORD_CARD_H_

#include <cstddef>
#include <string>

#include "cards/typing_card.h"
#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

enum class RecordPanel { kMain, kStop, kNotDug, kMore, kMove, kHistory };

struct RecordCardState {
  int opened = 0;  // the record that this state belongs to (SurveyView::opened)
  RecordPanel panel = RecordPanel::kMain;
  std::size_t field = 0;  // what the digits go to: a find by number, or the depth behind the last
  bool fresh = true;      // the next digit begins the number anew
  ScrollState scroll;
  ScrollState history;
  std::string move_to;          // the pit that the record belongs to
  bool sure_to_forget = false;  // 'Forget' was touched once
};

// `typing` is opened for notes and reasons.
void record_card(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordCardState& state, TypingState& typing,
                 Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_RECORD_CARD_H_
