// What a pit's record opens over its rows: lists of reasons, what else may be done, its history.
#ifndef NEARPIT_UI_CARDS_RECORD_PANELS_H_
#define NEARPIT_UI_CARDS_RECORD_PANELS_H_

#include "cards/record_card.h"

namespace nearpit::ui {

void stop_panel(Ui& ui, const PixelBox& box, RecordDraft& draft, RecordCardState& state);
void not_dug_panel(Ui& ui, const PixelBox& box, RecordDraft& draft, RecordCardState& state);
void more_panel(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordDraft& draft, RecordCardState& state,
                TypingState& typing, Sink& sink);
void move_panel(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordCardState& state, TypingState& typing,
                Sink& sink);
void history_panel(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordCardState& state);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_RECORD_PANELS_H_
