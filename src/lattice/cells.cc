#include "lattice/cells.h"

#include <algorithm>

namespace nearpit {
namespace {

// Nodes first..last of one row, side by side.
struct CellRun {
  Node first;
  std::int32_t last_column = 0;
};

std::vector<CellRun> runs_of(std::vector<Node> nodes) {
  std::sort(nodes.begin(), nodes.end());
  std::vector<CellRun> runs;
  for (const Node& node : nodes) {
    const bool goes_on =
        !runs.empty() && runs.back().first.row == node.row && runs.back().last_column + 1 == node.column;
    if (goes_on) {
      runs.back().last_column = node.column;
    } else {
      runs.push_back({node, node.column});
    }
  }
  return runs;
}

// Whole numbers of half spacings and half row distances: every corner is exact, so shared sides cancel exactly.
MultiPolygon half_steps_rectangle(const Lattice& lattice, const CellRun& run) {
  const double shift = lattice.rows_shift() && run.first.row % 2 == 0 ? 1 : 0;
  const double from = 2.0 * (run.first.column - 1) + shift - 1;
  const double to = 2.0 * (run.last_column - 1) + shift + 1;
  const double v = 2.0 * (run.first.row - 1);
  return {{{{from, v - 1}, {to, v - 1}, {to, v + 1}, {from, v + 1}}, {}}};
}

}  // namespace

MultiPolygon cells_outline(const Lattice& lattice, const std::vector<Node>& nodes) {
  std::vector<MultiPolygon> rectangles;
  for (const CellRun& run : runs_of(nodes))
    rectangles.push_back(half_steps_rectangle(lattice, run));
  MultiPolygon outline = united(rectangles);
  const auto to_ground = [&](Ring& ring) {
    for (Point& corner : ring)
      corner = lattice.to_ground(Along{corner.x * lattice.spacing_m / 2, corner.y * lattice.row_distance_m() / 2});
  };
  for (Polygon& polygon : outline) {
    to_ground(polygon.outer);
    for (Ring& hole : polygon.holes)
      to_ground(hole);
  }
  return outline;
}

}  // namespace nearpit
