#include "cards/dig_list_card.h"

#include <string>

#include "base/text.h"
#include "desk/words.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr double kRow_mm = 14;
constexpr double kMark_mm = 6;

void proposed_pit(Ui& ui, PixelBox box, const SurveyView& survey, Sink& sink) {
  const DueRow& pit = *survey.proposed;
  const PixelBox button = cut_bottom(&box, ui.mm(kPrimary_mm), ui.mm(kGap_mm) / 2);
  std::string place = pit.walk + " from " + (survey.walk_from.empty() ? "the grid's corner" : survey.walk_from);
  PixelBox head = cut_top(&box, ui.mm(line_mm(TextSize::kLarge)));
  const float label_width = ui.text_width(pit.label, TextSize::kLarge);
  ui.text(cut_left(&head, std::min(label_width + 1, head.width()), ui.mm(kGap_mm)), pit.label,
          {.size = TextSize::kLarge, .shorten = true});
  ui.text(head, pit.why(), {.lines = 2, .shorten = true});
  ui.text(cut_top(&box, ui.mm(line_mm(TextSize::kBase))), place, {.shorten = true});
  const std::string verb = pit.half_written ? "Go on with " : "Record ";
  if (ui.button("record", button, verb + pit.label,
                {.kind = ButtonKind::kPrimary, .least_mm = kPrimary_mm, .size = TextSize::kLarge})) {
    sink.send(OpenRecord{pit.label});
  }
}

enum class RowKind { kDue, kAsked, kLeft };

// What a touch on the row asks for.
Request touched(const DueRow& row, RowKind kind) {
  if (kind == RowKind::kDue) return WalkTo{row.stop.node};
  if (kind == RowKind::kAsked) return ChoosePit{row.label};
  return OpenRecord{row.label};
}

void due_row(Ui& ui, const PixelBox& box, const DueRow& row, bool chosen, RowKind kind, Sink& sink) {
  const bool asked = kind == RowKind::kAsked;
  if (ui.row(row.label, box, row.label, chosen)) sink.send(touched(row, kind));
  const Ui::Part part = ui.part(row.label);
  PixelBox inside = in_row(ui, box);
  const PixelBox mark = cut_left(&inside, ui.mm(kMark_mm), ui.mm(2));
  if (kind != RowKind::kLeft) ui.mark(asked ? MarkShape::kDueAsked : MarkShape::kDue, mark.middle(), ui.mm(kMark_mm));
  const Tone tone = chosen ? Tone::kOnChosen : Tone::kOnKey;
  const PixelBox label = cut_left(
      &inside, std::clamp(ui.text_width(row.label, TextSize::kBase) + 1, ui.mm(22), inside.width() * 0.42F), ui.mm(2));
  if (row.half_written) {
    PixelBox lines = label;
    ui.text(cut_top(&lines, label.height() * 0.55F), row.label, {.tone = tone, .shorten = true});
    ui.text(lines, "half written", {.size = TextSize::kSmall, .tone = tone});
  } else {
    ui.text(label, row.label, {.tone = tone, .shorten = true});
  }
  ui.text(cut_top(&inside, inside.height() / 2), row.why(), {.size = TextSize::kSmall, .tone = tone, .shorten = true});
  ui.text(inside, asked ? "judgement pit" : row.walk, {.size = TextSize::kSmall, .tone = tone, .shorten = true});
}

std::string list_summary(const SurveyView& survey) {
  const DigOrder& order = survey.order;
  std::string text = counted(order.due.size(), "pit", "pits") + " to dig";
  if (order.due.empty()) return text;
  if (order.neighbours_left == 0) return text + ", all grid pits";
  if (order.first_sample_left == 0) return text + ", all next to finds";
  return text + ": " + counted(order.first_sample_left, "grid pit", "grid pits") + ", " +
         std::to_string(order.neighbours_left) + " next to finds";
}

std::string nothing_to_dig(const SurveyView& survey) {
  const Survey& state = survey.model->survey();
  if (!state.dig_list().halted().empty())
    return "Nothing to dig but " + counted(state.dig_list().halted().size(), "pit", "pits") + " where work is stopped.";
  return "Nothing is left to dig. See the day for what may be said, and what may not.";
}

}  // namespace

void dig_list_card(Ui& ui, const PixelBox& box, const SurveyView& survey, DigListState& state, Sink& sink) {
  const Ui::Part part = ui.part("dig-list");
  PixelBox left = box;
  if (survey.proposed) {
    const double head_mm = line_mm(TextSize::kLarge) + line_mm(TextSize::kBase) + kGap_mm / 2 + kPrimary_mm;
    proposed_pit(ui, cut_top(&left, ui.mm(head_mm), ui.mm(kGap_mm)), survey, sink);
  } else {
    ui.text(cut_top(&left, ui.mm(3 * line_mm(TextSize::kBase)), ui.mm(kGap_mm)), nothing_to_dig(survey), {.lines = 3});
  }
  PixelBox tools = cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  const PixelBox toggle = cut_right(&tools, ui.mm(34), ui.mm(kGap_mm));
  if (ui.button("grid-pits-first", toggle, "Grid pits first",
                {.chosen = survey.grid_pits_first, .size = TextSize::kSmall})) {
    sink.send(GridPitsFirst{!survey.grid_pits_first});
  }
  ui.text(tools, list_summary(survey), {.size = TextSize::kSmall, .lines = 3});
  const std::size_t due = survey.due.size();
  const std::size_t asked = survey.asked.size();
  paged_list(ui, "list", left, &state.scroll, due + asked + survey.left_half_written.size(), ui.mm(kRow_mm),
             [&](std::size_t index, const PixelBox& row) {
               if (index < due) {
                 const DueRow& one = survey.due[index];
                 due_row(ui, row, one, survey.proposed && survey.proposed->stop.node == one.stop.node, RowKind::kDue,
                         sink);
               } else if (index < due + asked) {
                 const DueRow& one = survey.asked[index - due];
                 due_row(ui, row, one, survey.chosen && survey.chosen->name.label == one.label, RowKind::kAsked, sink);
               } else {
                 due_row(ui, row, survey.left_half_written[index - due - asked], false, RowKind::kLeft, sink);
               }
             });
}

}  // namespace nearpit::ui
