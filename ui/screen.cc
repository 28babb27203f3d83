#include "screen.h"

#include <algorithm>
#include <string>

#include "cards/strip.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {
namespace {

constexpr double kMargin_mm = 1;
constexpr double kSide_mm = 1.5;
constexpr double kLeastCard_mm = 122;
constexpr double kMostCard_mm = 160;
constexpr double kLeastMap_mm = 60;
constexpr double kLeastHeight_mm = 124;
constexpr double kSecondRow_mm = kTarget_mm + kGap_mm;  // of the strip, on a narrow glass

void typed_for(const TypingState& typing, TypingAnswer answer, const DeskView& desk, ScreenState& state, Sink& sink) {
  const std::string& text = typing.line.text;
  const bool done = answer == TypingAnswer::kDone;
  switch (typing.what) {
    case TypingFor::kNote:
    case TypingFor::kWhyChanged:
    case TypingFor::kWhyMoved:
    case TypingFor::kWhyWithdrawn:
    case TypingFor::kWhyNeighbours: {
      // Kept with every letter, so that a crash or a refusal loses none.
      if (!desk.survey || !desk.survey->draft) return;
      RecordDraft draft = *desk.survey->draft;
      (typing.what == TypingFor::kNote ? draft.note : draft.why) = text;
      sink.send(KeepDraft{draft});
      if (!done || text.find_first_not_of(' ') == std::string::npos) return;
      if (typing.what == TypingFor::kWhyWithdrawn) sink.send(WithdrawRecord{text});
      if (typing.what == TypingFor::kWhyNeighbours) sink.send(OpenNeighbours{text});
      return;
    }
    case TypingFor::kMoveTo:
      if (done) {
        state.record.move_to = text;
        sink.send(ChoosePit{text});
      }
      return;
    case TypingFor::kCrew:
      if (done) sink.send(SetCrew{text});
      return;
    case TypingFor::kFileName:
      if (done) state.start.name = text;
      return;
    case TypingFor::kNothing:
      return;
  }
}

void typing_over_all(Ui& ui, const PixelBox& box, const DeskView& desk, ScreenState& state, Sink& sink) {
  const TypingAnswer answer = typing_card(ui, box, state.typing);
  if (answer == TypingAnswer::kNone) return;
  typed_for(state.typing, answer, desk, state, sink);
  if (answer != TypingAnswer::kChanged) state.typing = {};
}

// What must be read stands over the card until somebody says that it was.
void notice_card(Ui& ui, PixelBox box, const Notice& notice, ScreenState& state, Sink& sink) {
  const Ui::Part part = ui.part("notice");
  const bool bad = notice.kind != NoticeKind::kSaved;
  if (state.notice_read != notice.text) {
    state.notice = {};  // another one: from its top
    state.notice_read = notice.text;
  }
  PixelBox head = cut_top(&box, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  const Surface& surface = bad ? ui.theme().warning : ui.theme().good;
  ui.fill(head, surface.fill, 1);
  const std::string title = notice.kind == NoticeKind::kNotSaved ? "NOT saved"
                            : notice.kind == NoticeKind::kSaved  ? "Saved; but read this"
                                                                 : "Please read";
  ui.text(head.inset(ui.mm(1)), title, {.size = TextSize::kLarge, .tone = bad ? Tone::kOnWarning : Tone::kOnGood});
  const PixelBox foot = cut_bottom(&box, ui.mm(kPrimary_mm), ui.mm(kGap_mm));
  if (ui.button("understood", foot,
                notice.kind == NoticeKind::kNotSaved ? "Back to the record; nothing typed is lost" : "I have read this",
                {.kind = ButtonKind::kPrimary, .least_mm = kPrimary_mm})) {
    sink.send(DismissNotice{});
  }
  paged_text(ui, "text", box, &state.notice, [&](PixelBox lines) {
    const auto put = [&](const std::string& text) {
      const float height = ui.text_height(text, lines.width(), TextSize::kBase);
      ui.text(cut_top(&lines, height, ui.mm(kGap_mm)), text, {.lines = 100, .shorten = true, .top = true});
    };
    put(notice.text);
    for (const std::string& more : notice.more)
      put(more);
    return lines.top;
  });
}

void card(Ui& ui, const PixelBox& box, const DeskView& desk, ScreenState& state, Sink& sink) {
  if (desk.notice.to_be_read()) {
    notice_card(ui, box, desk.notice, state, sink);
    return;
  }
  const SurveyView& survey = *desk.survey;
  switch (desk.card) {
    case CardKind::kRecord:
      record_card(ui, box, survey, state.record, state.typing, sink);
      break;
    case CardKind::kClusters:
      clusters_card(ui, box, survey, state.clusters, sink);
      break;
    case CardKind::kDay:
      day_card(ui, box, survey, state.day);
      break;
    case CardKind::kOffice:
      office_card(ui, box, desk, state.office, state.typing, sink);
      break;
    case CardKind::kKeys:
      keys_card(ui, box, true, state.keys, sink);
      break;
    default:
      dig_list_card(ui, box, survey, state.dig_list, sink);
      break;
  }
}

void keys_of_the_screen(Ui& ui, const DeskView& desk, Sink& sink) {
  if (desk.notice.to_be_read()) return;
  if (ui.take(U'?')) sink.send(ShowCard{CardKind::kKeys});
  if (!desk.survey) return;
  const SurveyView& survey = *desk.survey;
  if (desk.card == CardKind::kDigList) {
    if (survey.proposed && (ui.take(U'r') || ui.take(Key::kEnter))) sink.send(OpenRecord{survey.proposed->label});
    if (ui.take(U'g')) sink.send(GridPitsFirst{!survey.grid_pits_first});
  } else if (desk.card != CardKind::kRecord && ui.take(Key::kEscape)) {
    sink.send(ShowCard{CardKind::kDigList});
  }
}

// Too narrow for map and card side by side.
bool is_narrow(const Ui& ui, const PixelBox& box) { return ui.glass().mm(box.width()) < kLeastCard_mm + kLeastMap_mm; }

void survey_screen(Ui& ui, PixelBox box, const DeskView& desk, ScreenState& state, Sink& sink) {
  const double wide_mm = ui.glass().mm(box.width());
  const bool narrow = is_narrow(ui, box);
  const PixelBox foot = cut_bottom(&box, ui.mm(kTarget_mm + (narrow ? kSecondRow_mm : 0)), ui.mm(kGap_mm));
  // Another card, or something to be read, comes in front of the map.
  const std::string showing =
      std::to_string(static_cast<int>(desk.card)) + (desk.survey->draft ? desk.survey->draft->pit : "");
  if (showing != state.showing || desk.notice.to_be_read()) state.map_shown = false;
  state.showing = showing;
  if (narrow) {
    if (!state.map_shown) card(ui, box, desk, state, sink);
  } else {
    const double card_mm = std::clamp(wide_mm * 0.5, kLeastCard_mm, kMostCard_mm);
    card(ui, cut_right(&box, ui.mm(card_mm), ui.mm(kGap_mm)), desk, state, sink);
  }
  strip(ui, foot, desk, narrow, &state.map_shown, sink);
  keys_of_the_screen(ui, desk, sink);
  if (!narrow || state.map_shown) field_map(ui, box, *desk.survey, state.map, sink);
}

void what_is_shown(Ui& ui, const PixelBox& box, const DeskView& desk, ScreenState& state, Sink& sink) {
  if (state.typing.what != TypingFor::kNothing) {
    typing_over_all(ui, box, desk, state, sink);
  } else if (desk.card == CardKind::kSizes) {
    sizes_card(ui, box, desk.survey.has_value(), state.sizes, sink);
  } else if (desk.survey) {
    state.start.plan.clear();
    survey_screen(ui, box, desk, state, sink);
  } else if (desk.notice.to_be_read()) {
    notice_card(ui, box, desk.notice, state, sink);
  } else if (desk.card == CardKind::kKeys) {
    keys_card(ui, box, false, state.keys, sink);
  } else {
    start_card(ui, box, desk, state.start, state.typing, sink);
    keys_of_the_screen(ui, desk, sink);
  }
}

void whole_up_and_down(Ui& ui, PixelBox box, float step, ScrollState* whole) {
  const Ui::Part part = ui.part("whole");
  const PixelBox up = cut_top(&box, (box.height() - ui.mm(kGap_mm)) / 2, ui.mm(kGap_mm));
  if (ui.button("up", up, "\xE2\x86\x91")) whole->offset -= step;
  if (ui.button("down", box, "\xE2\x86\x93")) whole->offset += step;
}

}  // namespace

std::string under_the_finger(const DeskView& desk, const ScreenState& state) {
  std::string what = std::to_string(static_cast<int>(desk.card)) + "/" +
                     std::to_string(static_cast<int>(state.typing.what)) + "/" +
                     std::to_string(desk.notice.to_be_read());
  if (desk.survey) {
    what += "/" + std::to_string(desk.survey->opened);
    if (desk.card == CardKind::kRecord) what += "/" + std::to_string(static_cast<int>(state.record.panel));
  }
  return what + "/" + state.start.plan + "/" + (desk.folder ? desk.folder->path : "");
}

void draw_screen(Ui& ui, const DeskView& desk, ScreenState& state, Sink& sink) {
  PixelBox box = ui.window();
  box = {box.left + ui.mm(kSide_mm), box.top + ui.mm(kMargin_mm), box.right - ui.mm(kSide_mm),
         box.bottom - ui.mm(kMargin_mm)};
  const float least = ui.mm(kLeastHeight_mm + (is_narrow(ui, box) ? kSecondRow_mm : 0));
  if (box.height() >= least) {
    what_is_shown(ui, box, desk, state, sink);
    return;
  }
  // Too low for what must stand on it: drawn at the least height, with buttons to move it up and down.
  PixelBox buttons = cut_right(&box, ui.mm(kTarget_mm), ui.mm(kGap_mm));
  whole_up_and_down(ui, buttons, box.height() * 0.6F, &state.whole);
  PixelBox content = ui.begin_scroll("whole", box, &state.whole, false);
  content.bottom = content.top + least;
  what_is_shown(ui, content, desk, state, sink);
  ui.end_scroll(content.bottom);
}

}  // namespace nearpit::ui
