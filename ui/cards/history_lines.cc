#include "cards/history_lines.h"

#include <string>

namespace nearpit::ui {

float history_lines(Ui& ui, PixelBox box, const std::vector<HistoryLine>& history) {
  const auto put = [&](const std::string& text, TextSize size, Tone tone) {
    const float height = ui.text_height(text, box.width(), size);
    ui.text(cut_top(&box, height), text, {.size = size, .tone = tone, .lines = 40, .shorten = true, .top = true});
  };
  for (const HistoryLine& line : history) {
    const std::string who = line.by.empty() ? "" : ", " + line.by;
    const std::string why = line.why.empty() ? "" : " (why: " + line.why + ")";
    put("written " + line.when + who, TextSize::kSmall, Tone::kQuiet);
    put(line.what + why, TextSize::kSmall, Tone::kPlain);
    box.top += ui.mm(kGap_mm / 2);
  }
  return box.top;
}

}  // namespace nearpit::ui
