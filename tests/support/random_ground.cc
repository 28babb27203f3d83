#include "support/random_ground.h"

#include <cmath>
#include <numbers>

namespace nearpit {
namespace {

constexpr double kTurn = 2 * std::numbers::pi;

Point moved(const Point& from, double angle, double distance_m) {
  return {from.x + distance_m * std::cos(angle), from.y + distance_m * std::sin(angle)};
}

Polygon random_part(TestRandom& random, const Point& centre, double size_m) {
  const double inner = size_m * 0.25;
  Polygon part{random_star(random, centre, inner, size_m * 0.5), {}};
  const int holes = random.between(0, 2);
  const double angle = random.real(0, kTurn);
  for (int hole = 0; hole < holes; ++hole) {
    const Point middle = moved(centre, angle + hole * kTurn / 2, inner * 0.5);
    const double radius = inner * random.real(0.1, 0.45);
    part.holes.push_back(random_star(random, middle, radius * 0.3, radius));
  }
  return part;
}

}  // namespace

Lattice random_lattice(TestRandom& random, LatticeKind kind, double far_m) {
  Lattice lattice;
  lattice.kind = kind;
  lattice.spacing_m = random.chance(0.5) ? random.between(2, 30) : random.real(2, 30);
  lattice.origin = {random.real(-far_m, far_m), random.real(-far_m, far_m)};
  lattice.bearing_deg = random.chance(0.5) ? 15.0 * random.between(0, 23) : random.real(0, 360);
  return lattice;
}

Ring random_star(TestRandom& random, const Point& centre, double inner_m, double outer_m) {
  const int corners = random.between(6, 14);
  const double step = kTurn / corners;
  // A side between two corners at most 1.8 steps apart comes nearer to the centre than its ends.
  const double least = inner_m / std::cos(0.9 * step);
  Ring ring;
  for (int corner = 0; corner < corners; ++corner) {
    const double angle = (corner + random.real(-0.4, 0.4)) * step;
    ring.push_back(moved(centre, angle, random.real(std::min(least, outer_m), outer_m)));
  }
  if (random.chance(0.5)) return {ring.rbegin(), ring.rend()};
  return ring;
}

MultiPolygon random_boundary(TestRandom& random, const Point& centre, double size_m) {
  MultiPolygon parts{random_part(random, centre, size_m)};
  if (random.chance(0.3)) {
    const Point middle = moved(centre, random.real(0, kTurn), size_m * random.real(0.85, 1.2));
    parts.push_back(random_part(random, middle, size_m * 0.65));
  }
  return parts;
}

Frame random_frame(TestRandom& random, LatticeKind kind, NodeId least, NodeId most, MultiPolygon* boundary) {
  for (;;) {
    Lattice lattice = random_lattice(random, kind, 1e6);
    const double pits = random.real(least, 1.2 * most);
    *boundary = random_boundary(random, lattice.origin, std::sqrt(pits * lattice.cell_area_m2() / 0.4));
    lattice.origin = default_origin(lattice, *boundary, random.real(0, 1), random.real(0, 1));
    Result<Frame> frame = Frame::clip(lattice, *boundary);
    if (frame && frame->size() >= least && frame->size() <= most) return std::move(frame).value();
  }
}

}  // namespace nearpit
