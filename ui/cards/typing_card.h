// A line of text typed over the whole glass, with keys of our own. What it is for decides what becomes of it.
#ifndef NEARPIT_UI_CARDS_TYPING_CARD_H_
#define NEARPIT_UI_CARDS_TYPING_CARD_H_

#include <string>
#include <vector>

#include "widgets/key_pads.h"
#include "widgets/text_line.h"
#include "widgets/ui.h"

namespace nearpit::ui {

enum class TypingFor {
  kNothing,
  kNote,
  kWhyChanged,
  kWhyWithdrawn,
  kMoveTo,
  kWhyMoved,
  kWhyNeighbours,
  kCrew,
  kFileName
};

struct TypingState {
  TypingFor what = TypingFor::kNothing;  // kNothing: not shown
  std::string title;
  std::vector<std::string> phrases;  // one touch puts one in
  std::size_t most = 200;            // code points
  TextLine line;
  std::string before;  // what stood before, for 'Leave as it was'
  LetterPadState pad;
};

void begin_typing(TypingState* state, TypingFor what, const std::string& title, const std::string& text,
                  std::vector<std::string> phrases, std::size_t most);

// kBack: closed by Esc, the text as typed; kLeft: the text is again what stood before.
enum class TypingAnswer { kNone, kChanged, kDone, kBack, kLeft };
TypingAnswer typing_card(Ui& ui, const PixelBox& box, TypingState& state);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_CARDS_TYPING_CARD_H_
