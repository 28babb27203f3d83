#include "cards/sizes_card.h"

#include <algorithm>

#include "base/numbers.h"

namespace nearpit::ui {
namespace {

constexpr double kSmallStep = 1.005;
constexpr double kLargeStep = 1.03;
constexpr double kLeastGlass_mm = 125;

}  // namespace

void sizes_card(Ui& ui, const PixelBox& box, bool survey_open, SizesState& state, Sink& sink) {
  const Ui::Part part = ui.part("sizes");
  if (state.px_per_mm <= 0) state.px_per_mm = ui.glass().px_per_mm;
  PixelBox left = box;
  ui.text(cut_top(&left, ui.mm(line_mm(TextSize::kLarge)), ui.mm(1)), "Sizes on this glass",
          {.size = TextSize::kLarge});
  ui.text(cut_top(&left, ui.mm(2 * line_mm(TextSize::kBase)), ui.mm(1)),
          "Hold a bank card against the glass and make the frame as wide as the card, so that buttons are as large as "
          "a finger in a glove needs.",
          {.lines = 2});
  const PixelBox last = cut_bottom(&left, ui.mm(kPrimary_mm), ui.mm(kGap_mm));
  PixelBox foot = cut_bottom(&left, ui.mm(kPrimary_mm), ui.mm(kGap_mm));
  const auto step = [&](std::string_view name, const std::string& label, double factor) {
    if (ui.button(name, cut_left(&foot, ui.mm(kPrimary_mm), ui.mm(kGap_mm)), label,
                  {.least_mm = kPrimary_mm, .size = TextSize::kLarge})) {
      // Never so large that a card no longer fits the glass.
      const double most = std::min(kMostPxPerMm, ui.glass().width_px / kLeastGlass_mm);
      state.px_per_mm = std::clamp(state.px_per_mm * factor, kLeastPxPerMm, std::max(kLeastPxPerMm, most));
    }
  };
  step("much-smaller", "\xE2\x88\x92\xE2\x88\x92", 1 / kLargeStep);
  step("smaller", "\xE2\x88\x92", 1 / kSmallStep);
  step("larger", "+", kSmallStep);
  step("much-larger", "++", kLargeStep);
  if (ui.button("later", cut_right(&foot, ui.mm(30)), "Not now", {.least_mm = kPrimary_mm}) || ui.take(Key::kEscape)) {
    state.px_per_mm = 0;
    sink.send(ShowCard{survey_open ? CardKind::kDigList : CardKind::kStart});
    return;
  }
  if (ui.button("fits", last, "The card fits", {.kind = ButtonKind::kPrimary, .least_mm = kPrimary_mm})) {
    sink.send(SetMillimetre{state.px_per_mm});
    state.px_per_mm = 0;
  }
  const auto width = static_cast<float>(kCardWidth_mm * state.px_per_mm);
  const auto height = static_cast<float>(kCardHeight_mm * state.px_per_mm);
  const PixelBox card{left.left, left.top, left.left + width, left.top + height};
  const PixelBox shown = card.shared_with(left);
  ui.outline(shown, ui.theme().line, std::max(2.0F, ui.mm(0.5)));
  ui.line({card.right, left.top}, {card.right, std::min(card.bottom, left.bottom)}, ui.theme().focus,
          std::max(3.0F, ui.mm(0.8)));
  ui.text(shown.inset(ui.mm(2)), "85.6 mm wide", {.tone = Tone::kQuiet});
}

}  // namespace nearpit::ui
