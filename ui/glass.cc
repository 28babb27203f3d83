#include "glass.h"

namespace nearpit::ui {

double guessed_px_per_mm(double monitor_px, double monitor_mm, double content_scale) {
  const auto believable = [](double value) { return value >= kLeastPxPerMm && value <= kMostPxPerMm; };
  if (monitor_mm > 0 && believable(monitor_px / monitor_mm)) return monitor_px / monitor_mm;
  const double scaled = 96 / 25.4 * content_scale;
  return believable(scaled) ? scaled : 96 / 25.4;
}

}  // namespace nearpit::ui
