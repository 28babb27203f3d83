#include "cards/office_card.h"

#include <string>

#include "session/preferences.h"
#include "widgets/paged_list.h"

namespace nearpit::ui {

void office_card(Ui& ui, const PixelBox& box, const DeskView& desk, OfficeState& state, TypingState& typing,
                 Sink& sink) {
  const Ui::Part part = ui.part("office");
  const SurveyView& survey = *desk.survey;
  const Plan& plan = survey.model->plan();
  PixelBox left = box;
  ui.text(cut_top(&left, ui.mm(line_mm(TextSize::kBase))), survey.name, {.shorten = true});
  ui.text(cut_top(&left, ui.mm(2 * line_mm(TextSize::kSmall)), ui.mm(kGap_mm)), survey.file,
          {.size = TextSize::kSmall, .tone = Tone::kQuiet, .lines = 2, .shorten = true});
  paged_text(ui, "rows", left, &state.scroll, [&](PixelBox rows) {
    const auto next = [&] { return cut_top(&rows, ui.mm(kTarget_mm), ui.mm(kGap_mm)); };
    for (std::size_t i = 0; i < plan.crews.size(); ++i) {
      const std::string& crew = plan.crews[i];
      if (ui.button("crew-" + std::to_string(i), next(), "At work: " + crew,
                    {.chosen = survey.crew == crew, .align = Align::kLeft, .shorten = true})) {
        sink.send(SetCrew{crew});
      }
    }
    if (ui.button("crew-name", next(), survey.crew.empty() ? "Who is at work?" : "Another name than " + survey.crew,
                  {.align = Align::kLeft, .shorten = true})) {
      begin_typing(&typing, TypingFor::kCrew, "Crew, or who keeps the record", survey.crew, {}, kMostCrew);
    }
    if (ui.button("theme", next(), desk.dusk ? "Sun colours (light)" : "Dusk colours (dark)", {.align = Align::kLeft}))
      sink.send(SetDusk{!desk.dusk});
    if (ui.button("sizes", next(), "Sizes on this glass", {.align = Align::kLeft}))
      sink.send(ShowCard{CardKind::kSizes});
    if (ui.button("keys", next(), "Marks and keys", {.align = Align::kLeft})) sink.send(ShowCard{CardKind::kKeys});
    if (ui.button("close", next(), "Another survey", {.align = Align::kLeft})) sink.send(CloseSurvey{});
    return rows.top - ui.mm(kGap_mm);
  });
}

}  // namespace nearpit::ui
