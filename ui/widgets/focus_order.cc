#include "widgets/focus_order.h"

#include <cmath>
#include <optional>
#include <vector>

namespace nearpit::ui {
namespace {

// How far `to` is in the key's direction, sideways counted threefold; nothing when it lies the other way.
std::optional<float> far_in(Key key, Pixel from, Pixel to) {
  float ahead = 0;
  float aside = 0;
  switch (key) {
    case Key::kLeft:
      ahead = from.x - to.x, aside = to.y - from.y;
      break;
    case Key::kRight:
      ahead = to.x - from.x, aside = to.y - from.y;
      break;
    case Key::kUp:
      ahead = from.y - to.y, aside = to.x - from.x;
      break;
    case Key::kDown:
      ahead = to.y - from.y, aside = to.x - from.x;
      break;
    default:
      return std::nullopt;
  }
  if (ahead <= 1) return std::nullopt;
  return ahead + 3 * std::abs(aside);
}

}  // namespace

std::string next_focus(const WidgetLog& log, const std::string& path, Key key) {
  std::vector<const WidgetBox*> stops;
  std::optional<std::size_t> here;
  for (const WidgetBox& widget : log.widgets) {
    if (widget.kind != WidgetKind::kButton) continue;
    if (widget.path == path) here = stops.size();
    stops.push_back(&widget);
  }
  if (stops.empty()) return path;
  if (key == Key::kTab) return stops[here ? (*here + 1) % stops.size() : 0]->path;
  if (key == Key::kBackTab) return stops[here ? (*here + stops.size() - 1) % stops.size() : stops.size() - 1]->path;
  if (!here) return stops.front()->path;
  std::optional<float> nearest;
  std::string best = path;
  for (const WidgetBox* stop : stops) {
    const std::optional<float> far = far_in(key, stops[*here]->box.middle(), stop->box.middle());
    if (!far || (nearest && *far >= *nearest)) continue;
    nearest = far;
    best = stop->path;
  }
  return best;
}

}  // namespace nearpit::ui
