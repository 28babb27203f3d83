#include "cards/record_card.h"

#include <algorithm>
#include <array>

#include "base/text.h"
#include "cards/record_panels.h"
#include "desk/words.h"
#include "widgets/key_pads.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr std::size_t kMostDigits = 6;
constexpr std::size_t kMostDepthDigits = 5;
constexpr double kPad_mm = 3 * kTarget_mm + 2 * kGap_mm;
constexpr double kPadHeight_mm = 4 * kTarget_mm + 3 * kGap_mm;
constexpr double kMostKey_mm = 18;

// A draft being changed while the card is drawn; sent when it differs.
struct Editing {
  const SurveyView& survey;
  RecordCardState& state;
  RecordDraft draft;

  std::size_t finds() const { return draft.counts.size(); }
  bool on_depth() const { return state.field >= finds(); }
  std::string& typed() { return on_depth() ? draft.depth_cm : draft.counts[state.field]; }

  void choose(std::size_t field) {
    state.field = field;
    state.fresh = true;
  }
  // A count above nothing takes 'nothing found' back.
  void counted() {
    if (on_depth()) return;
    const std::string& count = draft.counts[state.field];
    if (!count.empty() && count != "0") draft.nothing_found = false;
  }
  void strike(char key) {
    if (key == '\b') {
      if (!typed().empty()) typed().pop_back();
      state.fresh = false;
      return;
    }
    if (key == '.' && !on_depth()) return;
    if (state.fresh) typed().clear();
    state.fresh = false;
    type_digit(&typed(), key, on_depth() ? kMostDepthDigits : kMostDigits);
    counted();
  }
  void step(std::size_t field, int by) {
    choose(field);
    step_count(&typed(), by);
    counted();
  }
  // Counts that are typed stay: the record then says what does not go together.
  void nothing_found() { draft.nothing_found = !draft.nothing_found; }
  bool counts_typed() const {
    return std::any_of(draft.counts.begin(), draft.counts.end(),
                       [](const std::string& count) { return !count.empty(); });
  }
};

bool required(const SurveyView& survey, const std::string& field) {
  return std::find(survey.blanks.begin(), survey.blanks.end(), field) != survey.blanks.end();
}

void find_row(Ui& ui, PixelBox box, Editing& edit, std::size_t find) {
  const std::string& name = edit.survey.model->plan().finds[find];
  const Ui::Part part = ui.part("find-" + std::to_string(find));
  const float side = std::max(ui.mm(kTarget_mm), std::min(box.height(), ui.mm(kMostKey_mm)));
  if (ui.button("less", cut_left(&box, side, ui.mm(kGap_mm)), "\xE2\x88\x92", {.size = TextSize::kLarge}))
    edit.step(find, -1);
  if (ui.button("more", cut_right(&box, side, ui.mm(kGap_mm)), "+", {.size = TextSize::kLarge})) edit.step(find, 1);
  const bool chosen = edit.state.field == find;
  if (ui.row("count", box, name, chosen)) edit.choose(find);
  const std::string& count = edit.draft.counts[find];
  PixelBox inside = in_row(ui, box);
  const std::string shown = count.empty() ? (edit.draft.nothing_found ? "0" : "\xE2\x80\x93") : count;
  const Tone tone = chosen ? Tone::kOnChosen : Tone::kOnKey;
  const float width = std::min(inside.width() * 0.6F, std::max(ui.mm(8), ui.text_width(shown, TextSize::kLarge) + 1));
  const Ui::Part inner = ui.part("count");
  ui.text(cut_right(&inside, width, ui.mm(1)), shown, {.size = TextSize::kLarge, .align = Align::kRight, .tone = tone});
  ui.text(inside, name, {.tone = tone, .lines = 2, .shorten = true});
}

void depth_row(Ui& ui, const PixelBox& box, Editing& edit) {
  const bool chosen = edit.on_depth();
  const bool wanted = required(edit.survey, "depth_cm");
  if (ui.row("depth", box, "Depth", chosen)) edit.choose(edit.finds());
  PixelBox inside = in_row(ui, box);
  const Tone tone = chosen ? Tone::kOnChosen : Tone::kOnKey;
  const Ui::Part inner = ui.part("depth");
  const std::string shown = edit.draft.depth_cm.empty() ? "\xE2\x80\x93" : edit.draft.depth_cm + " cm";
  ui.text(cut_right(&inside, inside.width() * 0.45F), shown,
          {.size = TextSize::kLarge, .align = Align::kRight, .tone = tone});
  ui.text(inside, wanted ? "Depth (asked for)" : "Depth", {.tone = tone, .lines = 2});
}

// Label at the left, what was said at the right; touching it opens something.
bool said_row(Ui& ui, const std::string& name, const PixelBox& box, const std::string& label, const std::string& said,
              bool wanted) {
  const bool touched = ui.row(name, box, label, false);
  PixelBox inside = in_row(ui, box);
  const Ui::Part inner = ui.part(name);
  ui.text(cut_left(&inside, inside.width() * 0.34F, ui.mm(1)), wanted ? label + " (asked for)" : label,
          {.size = TextSize::kSmall, .tone = Tone::kOnKey, .lines = 2});
  ui.text(inside, said.empty() ? "\xE2\x80\x93" : said,
          {.align = Align::kRight, .tone = Tone::kOnKey, .lines = 2, .shorten = true});
  return touched;
}

void open_note(TypingState& typing, const RecordDraft& draft) {
  begin_typing(&typing, TypingFor::kNote, "Note on " + draft.pit, draft.note, {}, kMostNote);
}

void open_why(TypingState& typing, const RecordDraft& draft) {
  begin_typing(&typing, TypingFor::kWhyChanged, "Why the record of " + draft.pit + " is changed", draft.why,
               {"miscounted", "typed wrong", "seen again in the lab"}, kMostWhy);
}

float main_rows(Ui& ui, PixelBox box, float shown, Editing& edit, TypingState& typing) {
  RecordDraft& draft = edit.draft;
  const float gap = ui.mm(kGap_mm);
  // Counts typed before 'not dug' must be seen, because they don't go together.
  const bool finds = !draft.not_dug || edit.counts_typed();
  const std::size_t rows = (draft.amends ? 1u : 0u) + (draft.not_dug ? 1u : 2u) + (finds ? edit.finds() : 0u);
  // As tall as there is room for, up to a primary target.
  const float height =
      std::clamp((shown + gap) / static_cast<float>(rows) - gap, ui.mm(kTarget_mm), ui.mm(kPrimary_mm));
  if (draft.amends && said_row(ui, "why", cut_top(&box, height, gap), "Why changed", draft.why, false))
    open_why(typing, draft);
  if (draft.not_dug && said_row(ui, "reason", cut_top(&box, height, gap), "Not dug",
                                draft.reason ? in_words(*draft.reason) : "", false)) {
    edit.state.panel = RecordPanel::kNotDug;
  }
  for (std::size_t find = 0; finds && find < edit.finds(); ++find)
    find_row(ui, cut_top(&box, height, gap), edit, find);
  if (draft.not_dug) return box.top - gap;
  depth_row(ui, cut_top(&box, height, gap), edit);
  if (said_row(ui, "stop", cut_top(&box, height, gap), "Stopped at", draft.stop ? in_words(*draft.stop) : "",
               required(edit.survey, "stop"))) {
    edit.state.panel = RecordPanel::kStop;
  }
  return box.top - gap;
}

// What is still to be said stands on the button; until then it saves nothing.
void save_button(Ui& ui, const PixelBox& box, Editing& edit, Sink& sink) {
  const std::vector<std::string>& lacking = edit.survey.missing;
  const bool ready = lacking.empty();
  const bool asked = ui.button("save", box, edit.draft.amends ? "Save the change" : "Save",
                               {.kind = ready ? ButtonKind::kPrimary : ButtonKind::kPlain,
                                .least_mm = kPrimary_mm,
                                .size = TextSize::kLarge,
                                .under = ready ? "" : "still to say: " + lacking.front(),
                                .shorten = true}) ||
                     ui.take(Key::kEnter);
  if (!asked || !ready) return;
  sink.send(KeepDraft{edit.draft});
  sink.send(SaveRecord{});
}

void main_panel(Ui& ui, PixelBox box, Editing& edit, TypingState& typing, Sink& sink) {
  const SurveyView& survey = edit.survey;
  RecordDraft& draft = edit.draft;
  PixelBox foot = cut_bottom(&box, ui.mm(kPrimary_mm), ui.mm(kGap_mm));
  const float third = ui.mm(30);
  if (ui.button("nothing-found", cut_left(&foot, third, ui.mm(kGap_mm)), "Nothing found",
                {.chosen = draft.nothing_found && !draft.not_dug, .least_mm = kPrimary_mm}) ||
      (!draft.not_dug && ui.take(U'n'))) {
    draft.not_dug = false;
    draft.reason.reset();
    edit.nothing_found();
  }
  if (ui.button("not-dug", cut_left(&foot, third, ui.mm(kGap_mm)), "Not dug",
                {.chosen = draft.not_dug, .least_mm = kPrimary_mm}) ||
      ui.take(U'x')) {
    edit.state.panel = RecordPanel::kNotDug;
  }
  save_button(ui, foot, edit, sink);
  if (!draft.not_dug) {
    PixelBox right =
        cut_right(&box, std::clamp(box.width() * 0.36F, ui.mm(kPad_mm), ui.mm(3 * kMostKey_mm)), ui.mm(kGap_mm));
    const float pad_height = std::clamp(right.height() - ui.mm(2 * line_mm(TextSize::kSmall)), ui.mm(kPadHeight_mm),
                                        ui.mm(4 * kMostKey_mm + 3 * kGap_mm));
    const PixelBox pad = cut_bottom(&right, pad_height, ui.mm(1));
    const std::string field = edit.on_depth() ? "Depth, cm" : survey.model->plan().finds[edit.state.field];
    ui.text(right, field,
            {.size = TextSize::kSmall, .align = Align::kCentre, .tone = Tone::kQuiet, .lines = 2, .shorten = true});
    if (const auto key = number_pad(ui, pad)) edit.strike(*key);
    if (ui.take(U'+') && !edit.on_depth()) edit.step(edit.state.field, 1);
    if (ui.take(U'-') && !edit.on_depth()) edit.step(edit.state.field, -1);
    if (!ui.ring_shown() && ui.take(Key::kDown)) edit.choose((edit.state.field + 1) % (edit.finds() + 1));
    if (!ui.ring_shown() && ui.take(Key::kUp)) edit.choose((edit.state.field + edit.finds()) % (edit.finds() + 1));
  }
  PixelBox rows = ui.begin_scroll("rows", box, &edit.state.scroll);
  rows.right -= ui.mm(kGap_mm) / 2;
  ui.end_scroll(main_rows(ui, rows, box.height(), edit, typing));
}

// The row at the top: back, the pit, what it is, more.
void head(Ui& ui, PixelBox box, Editing& edit, TypingState& typing, Sink& sink) {
  RecordCardState& state = edit.state;
  const bool main = state.panel == RecordPanel::kMain;
  if (ui.button("back", cut_left(&box, ui.mm(20), ui.mm(kGap_mm)), main ? "To the list" : "Back",
                {.size = TextSize::kSmall}) ||
      ui.take(Key::kEscape)) {
    if (main) {
      sink.send(ShowCard{CardKind::kDigList});
    } else {
      state.panel = RecordPanel::kMain;
      state.sure_to_forget = false;
    }
  }
  if (main) {
    if (ui.button("more", cut_right(&box, ui.mm(18), ui.mm(kGap_mm)), "More", {})) state.panel = RecordPanel::kMore;
    const std::string& note = edit.draft.note;
    const bool asked_for = required(edit.survey, "note");
    if (ui.button("note", cut_right(&box, ui.mm(24), ui.mm(kGap_mm)), "Note",
                  {.under = !note.empty() ? note
                            : asked_for   ? "asked for"
                                          : "",
                   .shorten = true})) {
      open_note(typing, edit.draft);
    }
    if (ui.take(U's')) state.panel = RecordPanel::kStop;
    if (ui.take(U't')) open_note(typing, edit.draft);
  }
  const float label = std::min(ui.text_width(edit.draft.pit, TextSize::kLarge) + 1, box.width() * 0.6F);
  ui.text(cut_left(&box, label, ui.mm(2)), edit.draft.pit, {.size = TextSize::kLarge, .shorten = true});
  std::string what = edit.survey.recorded_pit ? edit.survey.recorded_pit->state : "";
  if (edit.draft.judgement) what = "judgement pit";
  if (edit.draft.amends) what = "recorded: " + what;
  ui.text(box, what, {.size = TextSize::kSmall, .tone = Tone::kQuiet, .lines = 3, .shorten = true});
}

}  // namespace

void record_card(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordCardState& state, TypingState& typing,
                 Sink& sink) {
  if (!survey.draft) return;
  if (state.opened != survey.opened) {
    state = {};
    state.opened = survey.opened;
  }
  const Ui::Part part = ui.part("record");
  Editing edit{survey, state, *survey.draft};
  PixelBox left = box;
  head(ui, cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm)), edit, typing, sink);
  switch (state.panel) {
    case RecordPanel::kMain:
      main_panel(ui, left, edit, typing, sink);
      break;
    case RecordPanel::kStop:
      stop_panel(ui, left, edit.draft, state);
      break;
    case RecordPanel::kNotDug:
      not_dug_panel(ui, left, edit.draft, state);
      break;
    case RecordPanel::kMore:
      more_panel(ui, left, survey, edit.draft, state, typing, sink);
      break;
    case RecordPanel::kMove:
      move_panel(ui, left, survey, state, typing, sink);
      break;
    case RecordPanel::kHistory:
      history_panel(ui, left, survey, state);
      break;
  }
  if (edit.draft != *survey.draft) sink.send(KeepDraft{edit.draft});
}

}  // namespace nearpit::ui
