#include "cards/keys_card.h"

#include <array>
#include <string>

#include "field_map/field_map.h"
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

struct MarkLine {
  PitMark mark;
  const char* means;
};

PitMark marked(Mark mark, bool judgement = false, bool conflict = false, bool asked = false) {
  PitMark out;
  out.mark = mark;
  out.judgement = judgement;
  out.conflict = conflict;
  out.asked = asked;
  return out;
}

float mark_lines(Ui& ui, PixelBox lines) {
  constexpr double kMark_mm = 6;
  const MarkLine marks[] = {{marked(Mark::kDue), "to dig"},
                            {marked(Mark::kPositive), "dug, positive"},
                            {marked(Mark::kNegative), "dug, negative"},
                            {marked(Mark::kNotDug), "not dug"},
                            {marked(Mark::kHalted), "halted: work is stopped near here"},
                            {marked(Mark::kPlain), "on the grid, not called for"},
                            {marked(Mark::kNegative, true), "with a stroke under it: judgement pit"},
                            {marked(Mark::kDue, false, false, true), "asked for around a judgement pit"},
                            {marked(Mark::kPositive, false, true), "with a corner: two records disagree"}};
  ui.text(cut_top(&lines, ui.mm(line_mm(TextSize::kBase)), ui.mm(1)), "Marks");
  for (const MarkLine& line : marks) {
    PixelBox row = cut_top(&lines, ui.mm(kMark_mm), ui.mm(1));
    draw_pit_mark(ui, line.mark, cut_left(&row, ui.mm(kMark_mm), ui.mm(2)).middle(), ui.mm(kMark_mm) * 0.9F);
    ui.text(row, line.means, {.size = TextSize::kSmall});
  }
  PixelBox ring = cut_top(&lines, ui.mm(line_mm(TextSize::kSmall)), ui.mm(1));
  ui.text(ring, "Ring: the next pit. Corner ticks: the pit that is chosen.", {.size = TextSize::kSmall, .lines = 2});
  ui.text(cut_top(&lines, ui.mm(line_mm(TextSize::kSmall)), ui.mm(2)), "Hatched: closed ground. Tinted: a cluster.",
          {.size = TextSize::kSmall});
  return lines.top;
}

}  // namespace

void keys_card(Ui& ui, const PixelBox& box, bool survey_open, KeysState& state, Sink& sink) {
  const Ui::Part part = ui.part("keys");
  PixelBox left = box;
  PixelBox head = cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  if (ui.button("back", cut_left(&head, ui.mm(20), ui.mm(kGap_mm)), "Back") || ui.take(Key::kEscape))
    sink.send(ShowCard{survey_open ? CardKind::kDigList : CardKind::kStart});
  ui.text(head, "Marks and keys");
  paged_text(ui, "lines", left, &state.scroll, [&](PixelBox lines) {
    lines.top = mark_lines(ui, lines);
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
