#include "cards/strip.h"

#include <array>
#include <string>

#include "base/text.h"
#include "desk/words.h"

namespace nearpit::ui {
namespace {

struct Tab {
  CardKind card;
  const char* name;
  const char* label;
  char32_t key;
};
constexpr std::array kTabs = {
    Tab{CardKind::kDigList, "dig-list", "Dig list", U'd'}, Tab{CardKind::kClusters, "clusters", "Clusters", U'c'},
    Tab{CardKind::kDay, "day", "Day", U'y'}, Tab{CardKind::kOffice, "office", "Office", U'o'}};
constexpr double kTab_mm = 22;

void last_save(Ui& ui, const PixelBox& box, const DeskView& desk) {
  const Notice& notice = desk.notice;
  const SurveyView& survey = *desk.survey;
  if (!survey.refused.empty()) {
    ui.fill(box, ui.theme().warning.fill, 1);
    ui.text(box.inset(ui.mm(0.5)), "NOT saved: " + survey.refused,
            {.align = Align::kCentre, .tone = Tone::kOnWarning, .lines = 2, .shorten = true});
  } else if (notice.kind == NoticeKind::kSaved) {
    ui.fill(box, ui.theme().good.fill, 1);
    ui.text(box.inset(ui.mm(0.5)), "Saved " + notice.text,
            {.size = TextSize::kSmall, .align = Align::kCentre, .tone = Tone::kOnGood, .lines = 2, .shorten = true});
  } else {
    ui.text(box, survey.last_save.empty() ? "Nothing saved yet" : "Last save " + survey.last_save,
            {.size = TextSize::kSmall, .align = Align::kCentre, .lines = 2});
  }
}

}  // namespace

void strip(Ui& ui, const PixelBox& box, const DeskView& desk, bool with_map, bool* map_shown, Sink& sink) {
  const Ui::Part part = ui.part("strip");
  const SurveyView& survey = *desk.survey;
  PixelBox left = box;
  const float gap = ui.mm(kGap_mm);
  const auto tabs = static_cast<float>(kTabs.size() + (with_map ? 1u : 0u));
  PixelBox right = with_map ? cut_bottom(&left, ui.mm(kTarget_mm), gap)
                            : cut_right(&left, tabs * ui.mm(kTab_mm) + (tabs - 1) * gap, gap);
  const float tab_width = (right.width() - (tabs - 1) * gap) / tabs;
  for (const Tab& tab : kTabs) {
    const bool chosen = desk.card == tab.card;
    const bool asked = ui.button(tab.name, cut_left(&right, tab_width, gap), tab.label, {.chosen = chosen}) ||
                       (!desk.notice.to_be_read() && ui.take(tab.key));
    if (!asked) continue;
    *map_shown = false;
    sink.send(ShowCard{tab.card});
  }
  if (with_map && ui.button("map", cut_left(&right, tab_width), *map_shown ? "Card" : "Map", {.chosen = *map_shown}))
    *map_shown = !*map_shown;
  const PixelBox crew = cut_left(&left, left.width() * 0.32F, gap);
  if (ui.button("crew", crew, survey.crew.empty() ? "Who is at work?" : "At work: " + survey.crew,
                {.warning = survey.crew.empty(), .size = TextSize::kSmall, .shorten = true})) {
    sink.send(ShowCard{CardKind::kOffice});
  }
  const PixelBox save = cut_right(&left, left.width() * 0.56F, ui.mm(2));
  last_save(ui, save, desk);
  ui.text(cut_top(&left, left.height() / 2), counted(survey.pits_today, "pit today", "pits today"),
          {.size = TextSize::kSmall});
  ui.text(left, std::to_string(survey.order.due.size()) + " to dig", {.size = TextSize::kSmall});
}

}  // namespace nearpit::ui
