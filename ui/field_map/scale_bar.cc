#include "field_map/scale_bar.h"

#include <array>
#include <cmath>

#include "base/numbers.h"

namespace nearpit::ui {
namespace {

// Powers of ten below 1 are divided by, not multiplied with, so that 0.2 is the double that is written 0.2.
double round_length(int digit, int power) {
  return power < 0 ? digit / std::pow(10.0, -power) : digit * std::pow(10.0, power);
}

std::string length_text(double metres) {
  if (metres >= 1000) return format_significant(metres / 1000, 6) + " km";
  if (metres >= 1) return format_significant(metres, 6) + " m";
  return format_significant(metres * 100, 6) + " cm";
}

}  // namespace

ScaleBar scale_bar(double px_per_m, float most_px) {
  const double most = most_px / px_per_m;
  double metres = 0;
  for (int power = static_cast<int>(std::floor(std::log10(most))) - 1; metres == 0 || round_length(1, power) <= most;
       ++power) {
    for (const int digit : std::array{1, 2, 5}) {
      if (const double length = round_length(digit, power); length <= most) metres = length;
    }
  }
  return {metres, static_cast<float>(metres * px_per_m), length_text(metres)};
}

}  // namespace nearpit::ui
