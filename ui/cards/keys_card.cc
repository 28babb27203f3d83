#include "cards/keys_card.h"

#include <array>
#include <string>

#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

struct KeyLine {
  const char* key;
  const char* does;
};
constexpr std::array kLines = {
    KeyLine{"", "Everywhere"},
    KeyLine{"Tab, Shift Tab", "ring to the next or last control"},
    KeyLine{"arrows", "with the ring: to the control that way; without: the map moves"},
    KeyLine{"Enter, space", "with the ring: do what it stands on"},
    KeyLine{"Esc", "back; the ring goes"},
    KeyLine{"Page up, Page down", "the list or text goes on by a page"},
    KeyLine{"?", "this list"},
    KeyLine{"d", "dig list"},
    KeyLine{"c", "clusters"},
    KeyLine{"y", "the day"},
    KeyLine{"o", "office"},
    KeyLine{"", "Map"},
    KeyLine{"+, -", "nearer, farther"},
    KeyLine{"f", "the whole survey"},
    KeyLine{"m", "the next pit in the middle"},
    KeyLine{"", "Dig list"},
    KeyLine{"Enter or r", "record the pit proposed"},
    KeyLine{"g", "grid pits first, or all in order"},
    KeyLine{"", "Pit record"},
    KeyLine{"0-9, point", "number of the find, or the depth, that is lit"},
    KeyLine{"Down, Up", "the next or last of these"},
    KeyLine{"+, -", "one more, one less"},
    KeyLine{"n", "nothing found"},
    KeyLine{"x", "not dug"},
    KeyLine{"s", "stopped at"},
    KeyLine{"t", "note"},
    KeyLine{"Enter", "save"},
    KeyLine{"Esc", "to the list; what is typed stays"},
};

}  // namespace

void keys_card(Ui& ui, const PixelBox& box, bool survey_open, KeysState& state, Sink& sink) {
  const Ui::Part part = ui.part("keys");
  PixelBox left = box;
  PixelBox head = cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  if (ui.button("back", cut_left(&head, ui.mm(20), ui.mm(kGap_mm)), "Back") || ui.take(Key::kEscape))
    sink.send(ShowCard{survey_open ? CardKind::kDigList : CardKind::kStart});
  ui.text(head, "List of keys");
  paged_text(ui, "lines", left, &state.scroll, [&](PixelBox lines) {
    for (const KeyLine& line : kLines) {
      const bool heading = *line.key == '\0';
      if (heading) {
        lines.top += ui.mm(1.5);
        ui.text(cut_top(&lines, ui.mm(line_mm(TextSize::kBase)), ui.mm(0.5)), line.does, {});
        continue;
      }
      PixelBox does = lines;
      does.left += lines.width() * 0.34F;
      const float height =
          std::max(ui.text_height(line.does, does.width(), TextSize::kSmall), ui.mm(line_mm(TextSize::kSmall)));
      PixelBox row = cut_top(&lines, height, ui.mm(1));
      ui.text(cut_left(&row, lines.width() * 0.34F), line.key, {.size = TextSize::kSmall});
      ui.text(row, line.does, {.size = TextSize::kSmall, .lines = 4});
    }
    return lines.top;
  });
}

}  // namespace nearpit::ui
