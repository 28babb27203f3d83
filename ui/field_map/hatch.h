// Hatching of closed areas: parallel lines that run north-east over the inside of polygons.
#ifndef NEARPIT_UI_FIELD_MAP_HATCH_H_
#define NEARPIT_UI_FIELD_MAP_HATCH_H_

#include <cstddef>
#include <utility>
#include <vector>

#include "lattice/polygon.h"

namespace nearpit::ui {

constexpr std::size_t kMostHatchLines = 4000;

// Segments of lines x - y = k * apart_m * sqrt(2), k integer, so `apart_m` (> 0) lies between neighbouring lines and panning does not move them: the parts
// inside the polygons (holes left out) and the box. While there would be more than kMostHatchLines lines or segments, every second line is left out.
// Cost: lines times the polygons' edges that they meet.
std::vector<std::pair<Point, Point>> hatch_lines(const MultiPolygon& polygons, const Box& clip, double apart_m);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_FIELD_MAP_HATCH_H_
