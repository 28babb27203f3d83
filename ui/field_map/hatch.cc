#include "field_map/hatch.h"

#include <algorithm>
#include <cmath>
#include <numbers>

namespace nearpit::ui {
namespace {

// A line's number k, the part of the multipolygon, and how far along the line: (x + y) / 2.
struct Crossing {
  double line;
  std::size_t polygon;
  double along;
  friend auto operator<=>(const Crossing&, const Crossing&) = default;
};

// x - y, which a line keeps all along.
double across(const Point& point) { return point.x - point.y; }

struct LineRange {
  double first, last;  // whole numbers
  double count() const { return std::max(0.0, last - first + 1); }
};

LineRange lines_in(double low, double high, double step) { return {std::ceil(low / step), std::floor(high / step)}; }

void add_crossings(const Point& from, const Point& to, std::size_t polygon, const LineRange& shown, double step,
                   std::vector<Crossing>* crossings) {
  const auto [low, high] = std::minmax({across(from), across(to)});
  // One line more on each side: rounding must not decide which edges a corner's line meets, or crossings would not pair.
  const LineRange met = lines_in(low, high, step);
  for (double line = std::max(met.first - 1, shown.first); line <= std::min(met.last + 1, shown.last); ++line) {
    const double at = line * step;
    if ((across(from) <= at) == (across(to) <= at)) continue;
    const double part = (at - across(from)) / (across(to) - across(from));
    crossings->push_back({line, polygon, (from.x + from.y + part * (to.x + to.y - from.x - from.y)) / 2});
  }
}

std::vector<Crossing> crossings_of(const MultiPolygon& polygons, const LineRange& shown, double step) {
  std::vector<Crossing> crossings;
  for (std::size_t i = 0; i < polygons.size(); ++i) {
    const auto add_ring = [&](const Ring& ring) {
      for (std::size_t corner = 0; corner < ring.size(); ++corner) {
        add_crossings(ring[corner], ring[(corner + 1) % ring.size()], i, shown, step, &crossings);
      }
    };
    add_ring(polygons[i].outer);
    for (const Ring& hole : polygons[i].holes)
      add_ring(hole);
  }
  std::sort(crossings.begin(), crossings.end());
  return crossings;
}

// Only the lines that can meet both the polygons and the box.
LineRange shown_lines(const MultiPolygon& polygons, const Box& clip, double step) {
  const Box bounds = bounding_box(polygons);
  const Box both{{std::max(bounds.low.x, clip.low.x), std::max(bounds.low.y, clip.low.y)},
                 {std::min(bounds.high.x, clip.high.x), std::min(bounds.high.y, clip.high.y)}};
  if (both.low.x > both.high.x || both.low.y > both.high.y) return {1, 0};
  return lines_in(both.low.x - both.high.y, both.high.x - both.low.y, step);
}

std::vector<std::pair<Point, Point>> segments_of(const std::vector<Crossing>& crossings, const Box& clip, double step) {
  std::vector<std::pair<Point, Point>> segments;
  for (std::size_t i = 0; i + 1 < crossings.size(); i += 2) {
    const double half = crossings[i].line * step / 2;
    const double from = std::max({crossings[i].along, clip.low.x - half, clip.low.y + half});
    const double to = std::min({crossings[i + 1].along, clip.high.x - half, clip.high.y + half});
    if (from < to) segments.push_back({{from + half, from - half}, {to + half, to - half}});
  }
  return segments;
}

}  // namespace

std::vector<std::pair<Point, Point>> hatch_lines(const MultiPolygon& polygons, const Box& clip, double apart_m) {
  if (polygons.empty()) return {};
  for (double step = apart_m * std::numbers::sqrt2;; step *= 2) {
    const LineRange shown = shown_lines(polygons, clip, step);
    if (shown.count() > static_cast<double>(kMostHatchLines)) continue;
    std::vector<std::pair<Point, Point>> segments = segments_of(crossings_of(polygons, shown, step), clip, step);
    if (segments.size() <= kMostHatchLines) return segments;
  }
}

}  // namespace nearpit::ui
