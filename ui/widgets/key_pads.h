// Keys on the glass, because a tablet shows none for this window: digits, and letters.
#ifndef NEARPIT_UI_WIDGETS_KEY_PADS_H_
#define NEARPIT_UI_WIDGETS_KEY_PADS_H_

#include <optional>
#include <variant>

#include "widgets/ui.h"

namespace nearpit::ui {

// Digits, the point and 'rub out', in four rows of three. What was struck on the glass or on a keyboard: a digit, '.', or '\b'.
std::optional<char> number_pad(Ui& ui, const PixelBox& box);

struct LetterPadState {
  bool capitals = false;
  bool signs = false;  // the second page: signs and letters with accents
};
// A character, or one of Backspace, Left, Right, Enter; from the glass or a keyboard.
using Struck = std::variant<std::monostate, char32_t, Key>;
// Five rows of ten.
Struck letter_pad(Ui& ui, const PixelBox& box, LetterPadState* state);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_KEY_PADS_H_
