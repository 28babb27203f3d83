#include "cards/typing_card.h"

#include <algorithm>
#include <utility>

#include "base/text.h"

namespace nearpit::ui {
namespace {

// The text with its caret; the part around the caret where it is longer than the box.
void typed_line(Ui& ui, const PixelBox& box, const TextLine& line) {
  ui.fill(box, ui.theme().map.fill, 1);
  ui.outline(box, ui.theme().line, std::max(1.0F, ui.mm(0.4)), 1);
  const PixelBox inside = box.inset(ui.mm(2));
  std::string before = line.text.substr(0, line.caret);
  const std::string after = line.text.substr(line.caret);
  const float room = inside.width() * (after.empty() ? 1.0F : 0.7F);
  while (!before.empty() && ui.text_width(before, TextSize::kBase) > room) {
    before.erase(0, character_after(before, 0));
  }
  const float caret = inside.left + ui.text_width(before, TextSize::kBase);
  ui.text(inside, before + after, {.tone = Tone::kOnMap, .shorten = true});
  ui.line({caret, inside.top}, {caret, inside.bottom}, ui.theme().focus, std::max(2.0F, ui.mm(0.5)));
}

bool phrase_buttons(Ui& ui, PixelBox box, TypingState& state) {
  if (state.phrases.empty()) return false;
  bool changed = false;
  const Ui::Part part = ui.part("phrase");
  const int count = static_cast<int>(state.phrases.size());
  for (int i = 0; i < count; ++i) {
    const std::string& phrase = state.phrases[static_cast<std::size_t>(i)];
    const PixelBox cell = grid_cell(box, count, 1, i, 0, ui.mm(kGap_mm));
    if (!ui.button(std::to_string(i), cell, phrase, {.size = TextSize::kSmall, .shorten = true})) continue;
    const bool apart = state.line.caret > 0 && state.line.text[state.line.caret - 1] != ' ';
    const std::string put = (apart ? " " : "") + phrase;
    state.line.text.insert(state.line.caret, put);
    state.line.caret += put.size();
    changed = true;
  }
  return changed;
}

}  // namespace

void begin_typing(TypingState* state, TypingFor what, const std::string& title, const std::string& text,
                  std::vector<std::string> phrases, std::size_t most) {
  *state = {what, title, std::move(phrases), most, {text, text.size()}, text, {}};
}

TypingAnswer typing_card(Ui& ui, const PixelBox& box, TypingState& state) {
  const Ui::Part part = ui.part("typing");
  PixelBox left = box;
  PixelBox head = cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  TypingAnswer answer = TypingAnswer::kNone;
  if (ui.button("done", cut_right(&head, ui.mm(34), ui.mm(kGap_mm)), "Done", {.kind = ButtonKind::kPrimary}))
    answer = TypingAnswer::kDone;
  if (ui.button("leave", cut_right(&head, ui.mm(34), ui.mm(kGap_mm)), "Leave as it was", {.size = TextSize::kSmall}))
    answer = TypingAnswer::kLeft;
  // Notes and reasons are kept with every letter: Esc goes back and throws none away.
  if (ui.take(Key::kEscape)) answer = TypingAnswer::kBack;
  ui.text(head, state.title, {.lines = 2, .shorten = true});
  typed_line(ui, cut_top(&left, ui.mm(10), ui.mm(kGap_mm)), state.line);
  if (!state.phrases.empty() && phrase_buttons(ui, cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm)), state) &&
      answer == TypingAnswer::kNone) {
    answer = TypingAnswer::kChanged;
  }
  const Struck struck = letter_pad(ui, left, &state.pad);
  bool changed = false;
  if (const auto* character = std::get_if<char32_t>(&struck))
    changed = type_character(&state.line, *character, state.most);
  if (const auto* key = std::get_if<Key>(&struck)) {
    if (*key == Key::kEnter) {
      answer = TypingAnswer::kDone;
    } else {
      changed = edit_with(&state.line, *key);
    }
  }
  if (changed && answer == TypingAnswer::kNone) answer = TypingAnswer::kChanged;
  if (answer == TypingAnswer::kLeft) state.line = {state.before, state.before.size()};
  return answer;
}

}  // namespace nearpit::ui
