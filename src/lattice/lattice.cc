#include "lattice/lattice.h"

#include <cmath>
#include <limits>
#include <numbers>

namespace nearpit {
namespace {

struct Axes {
  double along_x, along_y;
};

// Whole multiples of 90 degrees are exact, so that an unturned lattice has exact coordinates.
Axes axes_of(double bearing) {
  if (bearing == 90) return {1, 0};
  if (bearing == 0) return {0, 1};
  if (bearing == 180) return {0, -1};
  if (bearing == 270) return {-1, 0};
  const double radians = bearing * std::numbers::pi / 180;
  return {std::sin(radians), std::cos(radians)};
}

double row_shift(const Lattice& lattice, std::int32_t row) {
  return lattice.rows_shift() && row % 2 == 0 ? lattice.spacing_m / 2 : 0;
}

std::int32_t clamped(double value) {
  constexpr double kMost = std::numeric_limits<std::int32_t>::max() / 2.0;
  if (!(value > -kMost)) return static_cast<std::int32_t>(-kMost);
  return static_cast<std::int32_t>(value < kMost ? value : kMost);
}

}  // namespace

double Lattice::row_distance_m() const {
  return kind == LatticeKind::kTriangular ? spacing_m * std::numbers::sqrt3 / 2 : spacing_m;
}

double Lattice::cell_area_m2() const { return spacing_m * row_distance_m(); }

Along Lattice::along(const Node& node) const {
  return {(node.column - 1.0) * spacing_m + row_shift(*this, node.row), (node.row - 1.0) * row_distance_m()};
}

Along Lattice::along(const Point& ground) const {
  const Axes axes = axes_of(bearing_deg);
  const double dx = ground.x - origin.x;
  const double dy = ground.y - origin.y;
  return {dx * axes.along_x + dy * axes.along_y, -dx * axes.along_y + dy * axes.along_x};
}

Point Lattice::to_ground(const Along& at) const {
  const Axes axes = axes_of(bearing_deg);
  return {origin.x + at.u * axes.along_x - at.v * axes.along_y, origin.y + at.u * axes.along_y + at.v * axes.along_x};
}

Node Lattice::nearest(const Point& ground) const {
  const Along at = along(ground);
  const std::int32_t middle = clamped(std::floor(at.v / row_distance_m()) + 1);
  Node best;
  double best_distance = std::numeric_limits<double>::infinity();
  for (std::int32_t row = middle - 1; row <= middle + 2; ++row) {
    const double steps = (at.u - row_shift(*this, row)) / spacing_m;
    const Node node{row, clamped(std::ceil(steps - 0.5) + 1)};
    const Along place = along(node);
    const double distance = std::hypot(place.u - at.u, place.v - at.v);
    if (distance < best_distance) {
      best_distance = distance;
      best = node;
    }
  }
  return best;
}

std::string_view lattice_kind_name(LatticeKind kind) {
  switch (kind) {
    case LatticeKind::kSquare:
      return "square";
    case LatticeKind::kStaggered:
      return "staggered";
    case LatticeKind::kTriangular:
      return "triangular";
  }
  return "";
}

}  // namespace nearpit
