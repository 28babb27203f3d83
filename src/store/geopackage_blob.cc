#include "store/geopackage_blob.h"

#include <algorithm>
#include <bit>
#include <compare>
#include <cstdint>
#include <utility>
#include <vector>

namespace nearpit::store {
namespace {

constexpr std::uint8_t kLittleEndian = 1;
constexpr std::uint8_t kFlagsPoint = 0x01;
constexpr std::uint8_t kFlagsEnvelope = 0x03;
constexpr std::uint32_t kWkbPoint = 1;
constexpr std::uint32_t kWkbPolygon = 3;
constexpr std::uint32_t kWkbMultiPolygon = 6;

class Bytes {
 public:
  Bytes& byte(std::uint8_t value) {
    out_ += static_cast<char>(value);
    return *this;
  }
  Bytes& word(std::uint32_t value) {
    for (int shift = 0; shift < 32; shift += 8)
      byte(static_cast<std::uint8_t>(value >> shift & 0xffu));
    return *this;
  }
  Bytes& number(double value) {
    const auto bits = std::bit_cast<std::uint64_t>(value);
    for (int shift = 0; shift < 64; shift += 8)
      byte(static_cast<std::uint8_t>(bits >> shift & 0xffu));
    return *this;
  }
  Bytes& header(std::uint8_t flags, int srs_id) {
    return byte('G').byte('P').byte(0).byte(flags).word(static_cast<std::uint32_t>(srs_id));
  }
  std::string take() { return std::move(out_); }

 private:
  std::string out_;
};

bool before(const Point& a, const Point& b) { return a.x < b.x || (a.x == b.x && a.y < b.y); }

bool ring_before(const Ring& a, const Ring& b) {
  return std::lexicographical_compare(a.begin(), a.end(), b.begin(), b.end(), before);
}

// Twice the signed area, about the ring's own first point: coordinates in the millions leave it exact enough for the sign.
double winding(const Ring& ring) {
  double sum = 0;
  for (std::size_t i = 1; i + 1 < ring.size(); ++i) {
    const double ax = ring[i].x - ring[0].x;
    const double ay = ring[i].y - ring[0].y;
    const double bx = ring[i + 1].x - ring[0].x;
    const double by = ring[i + 1].y - ring[0].y;
    sum += ax * by - ay * bx;
  }
  return sum;
}

Ring canonical(Ring ring, bool counter_clockwise) {
  if (ring.empty()) return ring;
  if ((winding(ring) > 0) != counter_clockwise) std::reverse(ring.begin(), ring.end());
  std::rotate(ring.begin(), std::min_element(ring.begin(), ring.end(), before), ring.end());
  return ring;
}

MultiPolygon canonical(MultiPolygon polygons) {
  for (Polygon& polygon : polygons) {
    polygon.outer = canonical(std::move(polygon.outer), true);
    for (Ring& hole : polygon.holes)
      hole = canonical(std::move(hole), false);
    std::sort(polygon.holes.begin(), polygon.holes.end(), ring_before);
  }
  std::sort(polygons.begin(), polygons.end(),
            [](const Polygon& a, const Polygon& b) { return ring_before(a.outer, b.outer); });
  return polygons;
}

void put_ring(Bytes& out, const Ring& ring) {
  if (ring.empty()) {
    out.word(0);
    return;
  }
  out.word(static_cast<std::uint32_t>(ring.size() + 1));
  for (const Point& point : ring)
    out.number(point.x).number(point.y);
  out.number(ring.front().x).number(ring.front().y);
}

}  // namespace

std::string point_blob(const Point& point, int srs_id) {
  Bytes out;
  out.header(kFlagsPoint, srs_id).byte(kLittleEndian).word(kWkbPoint).number(point.x).number(point.y);
  return out.take();
}

std::string multipolygon_blob(const MultiPolygon& polygons, int srs_id) {
  const Box box = bounding_box(polygons);
  Bytes out;
  out.header(kFlagsEnvelope, srs_id);
  out.number(box.low.x).number(box.high.x).number(box.low.y).number(box.high.y);
  out.byte(kLittleEndian).word(kWkbMultiPolygon).word(static_cast<std::uint32_t>(polygons.size()));
  for (const Polygon& polygon : canonical(polygons)) {
    out.byte(kLittleEndian).word(kWkbPolygon).word(static_cast<std::uint32_t>(polygon.holes.size() + 1));
    put_ring(out, polygon.outer);
    for (const Ring& hole : polygon.holes)
      put_ring(out, hole);
  }
  return out.take();
}

}  // namespace nearpit::store
