#include "lattice/coordinates.h"

#include <cmath>
#include <numbers>

namespace nearpit {

double distance_m(const Point& from, const Point& to) { return std::hypot(to.x - from.x, to.y - from.y); }

double bearing_deg(const Point& from, const Point& to) {
  const double dx = to.x - from.x;
  const double dy = to.y - from.y;
  if (dx == 0 && dy == 0) return 0;
  const double degrees = std::atan2(dx, dy) * 180 / std::numbers::pi;
  const double turned = degrees < 0 ? degrees + 360 : degrees;
  return turned >= 360 ? 0 : turned;
}

}  // namespace nearpit
