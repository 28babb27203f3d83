#include "cards/record_panels.h"

#include <array>
#include <span>
#include <string>

#include "cards/history_lines.h"
#include "desk/words.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr std::array kStops = {StopReason::kSterileSubsoil,   StopReason::kBedrock,      StopReason::kImpenetrable,
                               StopReason::kWaterTable,       StopReason::kMaxDepth,     StopReason::kRoots,
                               StopReason::kDisturbanceFill,  StopReason::kFeatureFound, StopReason::kOther,
                               StopReason::kHumanRemainsStop, StopReason::kUxoStop,      StopReason::kUtilityStop};
constexpr std::array kGround = {NotDugReason::kStandingWater, NotDugReason::kSlope,      NotDugReason::kPaved,
                                NotDugReason::kDisturbed,     NotDugReason::kBareGround, NotDugReason::kStructure};
constexpr std::array kAccess = {NotDugReason::kNoPermission, NotDugReason::kUtility, NotDugReason::kHazard,
                                NotDugReason::kStopWork, NotDugReason::kOther};
constexpr int kColumns = 3;

bool warns(StopReason reason) {
  return reason == StopReason::kHumanRemainsStop || reason == StopReason::kUxoStop ||
         reason == StopReason::kUtilityStop;
}

void reasons(Ui& ui, const PixelBox& box, std::span<const NotDugReason> all, RecordDraft& draft,
             RecordCardState& state) {
  for (std::size_t i = 0; i < all.size(); ++i) {
    const auto at = static_cast<int>(i);
    const PixelBox cell = grid_cell(box, kColumns, 2, at % kColumns, at / kColumns, ui.mm(kGap_mm));
    if (!ui.button(word(all[i]), cell, in_words(all[i]), {.chosen = draft.not_dug && draft.reason == all[i]})) continue;
    draft.not_dug = true;
    draft.nothing_found = false;
    draft.reason = all[i];
    state.panel = RecordPanel::kMain;
  }
}

struct MoreAction {
  std::string name;
  std::string label;
};

}  // namespace

void stop_panel(Ui& ui, const PixelBox& box, RecordDraft& draft, RecordCardState& state) {
  const Ui::Part part = ui.part("stops");
  PixelBox left = box;
  ui.text(cut_top(&left, ui.mm(line_mm(TextSize::kBase)), ui.mm(1)), "Why the pit stopped where it did");
  for (std::size_t i = 0; i < kStops.size(); ++i) {
    const auto at = static_cast<int>(i);
    const PixelBox cell = grid_cell(left, kColumns, 4, at % kColumns, at / kColumns, ui.mm(kGap_mm));
    const bool chosen = draft.stop == kStops[i];
    if (!ui.button(word(kStops[i]), cell, in_words(kStops[i]), {.chosen = chosen, .warning = warns(kStops[i])}))
      continue;
    draft.stop = chosen ? std::nullopt : std::optional(kStops[i]);
    state.panel = RecordPanel::kMain;
  }
}

void not_dug_panel(Ui& ui, const PixelBox& box, RecordDraft& draft, RecordCardState& state) {
  const Ui::Part part = ui.part("reasons");
  PixelBox left = box;
  const float line = ui.mm(line_mm(TextSize::kBase));
  PixelBox foot = cut_bottom(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  if (draft.not_dug && ui.button("was-dug", foot, "It was dug after all")) {
    draft.not_dug = false;
    draft.reason.reset();
    state.panel = RecordPanel::kMain;
  }
  if (!draft.not_dug) {
    ui.text(foot, "Out of time is no reason: such a pit stays on the list.",
            {.size = TextSize::kSmall, .tone = Tone::kQuiet, .lines = 2});
  }
  const float half = (left.height() - 2 * line - ui.mm(kGap_mm + 2)) / 2;
  ui.text(cut_top(&left, line, ui.mm(1)), "The ground can't be dug");
  reasons(ui, cut_top(&left, half, ui.mm(kGap_mm)), kGround, draft, state);
  ui.text(cut_top(&left, line, ui.mm(1)), "We may not or must not dig here (the figures stay open)", {.shorten = true});
  reasons(ui, left, kAccess, draft, state);
}

void more_panel(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordDraft& draft, RecordCardState& state,
                TypingState& typing, Sink& sink) {
  const Ui::Part part = ui.part("more");
  PixelBox left = box;
  const auto next = [&] { return cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm)); };
  const ButtonLook plain{.align = Align::kLeft};
  if (ui.button("judgement", next(), draft.judgement ? "Judgement pit: yes" : "Judgement pit: no",
                {.chosen = draft.judgement, .align = Align::kLeft})) {
    draft.judgement = !draft.judgement;
  }
  const bool judgement_positive =
      survey.recorded_pit && survey.recorded_pit->mark.judgement && survey.recorded_pit->mark.mark == Mark::kPositive;
  if (draft.amends && survey.typed) {
    ui.text(next(), "To move or withdraw the record, first save or forget what you changed.",
            {.size = TextSize::kSmall, .tone = Tone::kQuiet, .lines = 3});
  } else if (draft.amends) {
    if (ui.button("move", next(), "This record belongs to another pit", plain)) {
      state.panel = RecordPanel::kMove;
      state.move_to.clear();
      sink.send(ChoosePit{draft.pit});  // so that only a pit touched from now on is meant
    }
    if (ui.button("withdraw", next(), "Withdraw this record", plain)) {
      begin_typing(&typing, TypingFor::kWhyWithdrawn, "Why the record of " + draft.pit + " is withdrawn", draft.why,
                   {"written on the wrong pit", "never dug", "written twice"}, kMostWhy);
    }
    if (judgement_positive && ui.button("neighbours", next(), "Put its neighbours on the list", plain)) {
      begin_typing(&typing, TypingFor::kWhyNeighbours, "Why the neighbours of " + draft.pit + " are dug", draft.why,
                   {"to see how far it goes"}, kMostWhy);
    }
  }
  if (survey.recorded_pit && !survey.recorded_pit->history.empty() &&
      ui.button("history", next(), "History of this pit", plain)) {
    state.panel = RecordPanel::kHistory;
  }
  left.top += ui.mm(kGap_mm);
  const std::string what = draft.amends ? "Forget what I changed just now" : "Forget what I typed just now";
  if (!ui.button("drop", next(), state.sure_to_forget ? "Touch again to forget all of it" : what,
                 {.warning = state.sure_to_forget, .align = Align::kLeft}))
    return;
  if (state.sure_to_forget) sink.send(DropDraft{});
  state.sure_to_forget = !state.sure_to_forget;
}

void move_panel(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordCardState& state, TypingState& typing,
                Sink& sink) {
  const Ui::Part part = ui.part("move");
  PixelBox left = box;
  const std::string& pit = survey.draft->pit;
  const std::string& why = survey.draft->why;
  // The pit that was touched on the map since this panel was opened.
  if (survey.chosen && survey.chosen->name.label != pit) state.move_to = survey.chosen->name.label;
  ui.text(cut_top(&left, ui.mm(2 * line_mm(TextSize::kBase)), ui.mm(kGap_mm)),
          "Which pit was it really? Touch it on the map, or type its label.", {.lines = 2});
  if (ui.button("other", cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm)),
                state.move_to.empty() ? "Type the label" : "It was " + state.move_to, {.shorten = true})) {
    begin_typing(&typing, TypingFor::kMoveTo, "The record of " + pit + " belongs to", state.move_to, {},
                 kLongestFreeLabel);
  }
  if (ui.button("why", cut_top(&left, ui.mm(kTarget_mm), ui.mm(kGap_mm)), why.empty() ? "Say why" : "Why: " + why,
                {.shorten = true})) {
    begin_typing(&typing, TypingFor::kWhyMoved, "Why the record moves from " + pit, why,
                 {"written on the wrong pit", "wrong line"}, kMostWhy);
  }
  const bool ready = !state.move_to.empty() && !why.empty();
  const std::string label = ready ? "Move the record to " + state.move_to : "Say which pit and why";
  if (ui.button(
          "do", cut_top(&left, ui.mm(kPrimary_mm)), label,
          {.kind = ready ? ButtonKind::kPrimary : ButtonKind::kPlain, .least_mm = kPrimary_mm, .shorten = true}) &&
      ready) {
    sink.send(MoveRecord{state.move_to, why});
  }
}

void history_panel(Ui& ui, const PixelBox& box, const SurveyView& survey, RecordCardState& state) {
  const Ui::Part part = ui.part("history");
  paged_text(ui, "lines", box, &state.history,
             [&](const PixelBox& lines) { return history_lines(ui, lines, survey.recorded_pit->history); });
}

}  // namespace nearpit::ui
