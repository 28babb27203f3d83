#include "field_map/map_view.h"

#include <algorithm>
#include <limits>

namespace nearpit::ui {
namespace {

constexpr double kWidestSpacing_mm = 60;
constexpr double kLeastPartOfBox = 0.25;
// The survey's box reaches this part of the map's width and height into it.
constexpr double kLeastOverlap = 0.125;

// Pixels a metre at which the ground just fits; infinite for ground that is a point.
double fitting(const Box& ground, double width_px, double height_px) {
  const auto along = [](double px, double metres) {
    return metres > 0 ? px / metres : std::numeric_limits<double>::infinity();
  };
  return std::min(along(width_px, ground.high.x - ground.low.x), along(height_px, ground.high.y - ground.low.y));
}

}  // namespace

Pixel to_screen(const MapView& view, const PixelBox& box, const Point& ground) {
  const Pixel middle = box.middle();
  return {static_cast<float>(middle.x + (ground.x - view.centre.x) * view.px_per_m),
          static_cast<float>(middle.y - (ground.y - view.centre.y) * view.px_per_m)};
}

Point to_ground(const MapView& view, const PixelBox& box, const Pixel& at) {
  const Pixel middle = box.middle();
  return {view.centre.x + (static_cast<double>(at.x) - middle.x) / view.px_per_m,
          view.centre.y - (static_cast<double>(at.y) - middle.y) / view.px_per_m};
}

Box visible_ground(const MapView& view, const PixelBox& box) {
  return {to_ground(view, box, {box.left, box.bottom}), to_ground(view, box, {box.right, box.top})};
}

MapView fitted(const Box& ground, const PixelBox& box, float margin_px) {
  const auto room = [&](float px) {
    const double inner = static_cast<double>(px) - 2.0 * margin_px;
    return inner > 1 ? inner : std::max(1.0, static_cast<double>(px));
  };
  const double px_per_m = fitting(ground, room(box.width()), room(box.height()));
  return {{(ground.low.x + ground.high.x) / 2, (ground.low.y + ground.high.y) / 2},
          px_per_m < std::numeric_limits<double>::infinity() ? px_per_m : 1};
}

MapView panned(const MapView& view, float dx_px, float dy_px) {
  return {{view.centre.x - dx_px / view.px_per_m, view.centre.y + dy_px / view.px_per_m}, view.px_per_m};
}

ZoomLimits zoom_limits(const Box& ground, double spacing_m, const PixelBox& box, float px_per_mm) {
  const double whole = fitted(ground, box, 0).px_per_m;
  return {whole * kLeastPartOfBox, std::max(whole, kWidestSpacing_mm * px_per_mm / spacing_m)};
}

MapView zoomed(const MapView& view, const PixelBox& box, const Pixel& about, double factor, const ZoomLimits& limits) {
  const Point kept = to_ground(view, box, about);
  const Pixel middle = box.middle();
  const double px_per_m = std::clamp(view.px_per_m * factor, limits.least_px_per_m, limits.most_px_per_m);
  return {{kept.x - (static_cast<double>(about.x) - middle.x) / px_per_m,
           kept.y + (static_cast<double>(about.y) - middle.y) / px_per_m},
          px_per_m};
}

MapView kept_near(const MapView& view, const PixelBox& box, const Box& ground) {
  const double reach = (0.5 - kLeastOverlap) / view.px_per_m;
  const double across = reach * box.width();
  const double up = reach * box.height();
  return {{std::clamp(view.centre.x, ground.low.x - across, ground.high.x + across),
           std::clamp(view.centre.y, ground.low.y - up, ground.high.y + up)},
          view.px_per_m};
}

}  // namespace nearpit::ui
