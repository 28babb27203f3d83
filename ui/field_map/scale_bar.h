// The field map's scale bar: a round length of ground, and how long it is on the screen.
#ifndef NEARPIT_UI_FIELD_MAP_SCALE_BAR_H_
#define NEARPIT_UI_FIELD_MAP_SCALE_BAR_H_

#include <string>

namespace nearpit::ui {

struct ScaleBar {
  double metres = 0;
  float px = 0;
  std::string text;  // "20 m", "1 km", "5 cm"
};

// The largest of 1, 2 and 5 times a power of ten metres that is at most `most_px` long. Both > 0.
ScaleBar scale_bar(double px_per_m, float most_px);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_FIELD_MAP_SCALE_BAR_H_
