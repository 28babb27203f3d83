// The glass that the window stands on: how large a millimetre is, and the sizes that every layout keeps. A finger in a glove hits 20 mm nearly
// always and 12 mm mostly (Duff et al. 2010: errors fall until about 20 mm); neighbours stand 3 mm apart.
#ifndef NEARPIT_UI_GLASS_H_
#define NEARPIT_UI_GLASS_H_

#include "pixel_box.h"
#include "session/preferences.h"

namespace nearpit::ui {

constexpr double kPrimary_mm = 20;
constexpr double kTarget_mm = 12;
constexpr double kGap_mm = 3;
// A bank card (ISO/IEC 7810 ID-1), against which the glass is calibrated.
constexpr double kCardWidth_mm = 85.60;
constexpr double kCardHeight_mm = 53.98;

struct Glass {
  float width_px = 0;
  float height_px = 0;
  double px_per_mm = 96 / 25.4;

  float px(double mm) const { return static_cast<float>(mm * px_per_mm); }
  double mm(float px) const { return px / px_per_mm; }
  PixelBox whole() const { return {0, 0, width_px, height_px}; }
  friend bool operator==(const Glass&, const Glass&) = default;
};

// From what the monitor says of itself: its width in pixels and millimetres (0: it does not say), else 96 px an inch times the scale that the
// desktop asks for. What can't be (under 1 or over 40 px a millimetre) is not believed.
double guessed_px_per_mm(double monitor_px, double monitor_mm, double content_scale);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_GLASS_H_
