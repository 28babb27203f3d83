// How large a millimetre is on this glass, set against a bank card.
#ifndef NEARPIT_UI_CARDS_SIZES_CARD_H_
#define NEARPIT_UI_CARDS_SIZES_CARD_H_

#include "desk/desk_view.h"
#include "widgets/ui.h"

namespace nearpit::ui {

struct SizesState {
  double px_per_mm = 0;  // as tried; 0: the glass's own
};

void sizes_card(Ui& ui, const PixelBox& box, bool survey_open, SizesState& state, Sink& sink);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_SIZES_CARD_H_
