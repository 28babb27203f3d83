#include "lattice/frame.h"

#include <algorithm>
#include <cmath>
#include <limits>

#include "base/numbers.h"

namespace nearpit {
namespace {

struct Interval {
  double low, high;
};

// What one row line meets: crossings with each polygon, and stretches within tolerance of an edge.
struct RowMeets {
  std::vector<std::pair<std::size_t, double>> crossings;  // polygon, u
  std::vector<Interval> near_edges;
};

struct Edge {
  Along from, to;
  std::size_t polygon;
};

std::vector<Edge> edges_of(const Lattice& lattice, const MultiPolygon& polygons) {
  std::vector<Edge> edges;
  const auto add_ring = [&](const Ring& ring, std::size_t polygon) {
    for (std::size_t i = 0; i < ring.size(); ++i) {
      edges.push_back({lattice.along(ring[i]), lattice.along(ring[(i + 1) % ring.size()]), polygon});
    }
  };
  for (std::size_t i = 0; i < polygons.size(); ++i) {
    add_ring(polygons[i].outer, i);
    for (const Ring& hole : polygons[i].holes)
      add_ring(hole, i);
  }
  return edges;
}

void widen(Interval* interval, double u) {
  interval->low = std::min(interval->low, u);
  interval->high = std::max(interval->high, u);
}

// The stretch of the line v that lies within `tolerance` of the segment (a convex set, so one stretch or none).
Interval near_segment(const Edge& edge, double v, double tolerance) {
  Interval found{std::numeric_limits<double>::infinity(), -std::numeric_limits<double>::infinity()};
  for (const Along& end : {edge.from, edge.to}) {
    const double off = std::abs(end.v - v);
    if (off > tolerance) continue;
    const double half = std::sqrt(tolerance * tolerance - off * off);
    widen(&found, end.u - half);
    widen(&found, end.u + half);
  }
  const double du = edge.to.u - edge.from.u;
  const double dv = edge.to.v - edge.from.v;
  const double length = std::hypot(du, dv);
  if (length == 0) return found;
  const double nu = -dv / length * tolerance;
  const double nv = du / length * tolerance;
  const Along corners[4] = {{edge.from.u + nu, edge.from.v + nv},
                            {edge.to.u + nu, edge.to.v + nv},
                            {edge.to.u - nu, edge.to.v - nv},
                            {edge.from.u - nu, edge.from.v - nv}};
  for (int i = 0; i < 4; ++i) {
    const Along& a = corners[i];
    const Along& b = corners[(i + 1) % 4];
    if ((a.v <= v) == (b.v <= v)) continue;
    widen(&found, a.u + (v - a.v) / (b.v - a.v) * (b.u - a.u));
  }
  return found;
}

// Columns of the row whose places lie in the stretch.
void add_columns(const Lattice& lattice, std::int32_t row, const Interval& stretch, std::vector<Run>* runs) {
  constexpr double kMost = 1e9;
  const double first_u = lattice.along(Node{row, 1}).u;
  const double first = std::ceil((stretch.low - first_u) / lattice.spacing_m) + 1;
  const double last = std::floor((stretch.high - first_u) / lattice.spacing_m) + 1;
  if (!(first <= last) || first < -kMost || last > kMost) return;
  runs->push_back({row, static_cast<std::int32_t>(first), static_cast<std::int32_t>(last), 0});
}

void add_row(const Lattice& lattice, std::int32_t row, RowMeets& meets, std::vector<Run>* out) {
  std::vector<Run> runs;
  std::sort(meets.crossings.begin(), meets.crossings.end());
  for (std::size_t i = 0; i + 1 < meets.crossings.size(); i += 2) {
    add_columns(lattice, row, {meets.crossings[i].second, meets.crossings[i + 1].second}, &runs);
  }
  for (const Interval& stretch : meets.near_edges)
    add_columns(lattice, row, stretch, &runs);
  std::sort(runs.begin(), runs.end(), [](const Run& a, const Run& b) { return a.first < b.first; });
  for (const Run& run : runs) {
    if (!out->empty() && out->back().row == row && run.first <= out->back().last + 1) {
      out->back().last = std::max(out->back().last, run.last);
    } else {
      out->push_back(run);
    }
  }
}

std::string origin_text(const Point& origin) {
  return "[" + format_trimmed(origin.x, 4) + ", " + format_trimmed(origin.y, 4) + "]";
}

// Rows and columns below 1: how many, and the same lattice counted from farther out.
Error below_one(const Lattice& lattice, const std::vector<Run>& runs) {
  std::int64_t outside = 0;
  std::int32_t lowest_row = 1;
  std::int32_t lowest_column = 1;
  for (const Run& run : runs) {
    lowest_row = std::min(lowest_row, run.row);
    lowest_column = std::min(lowest_column, run.first);
    const std::int32_t last_outside = run.row < 1 ? run.last : std::min(run.last, 0);
    if (last_outside >= run.first) outside += last_outside - run.first + 1;
  }
  std::int32_t rows = 1 - lowest_row;
  if (lattice.rows_shift()) rows += rows % 2;  // two rows are one translation
  const Point origin = lattice.to_ground(Node{1 - rows, lowest_column});
  return {ErrorKind::kBadInput, "lattice.origin: " + origin_text(lattice.origin) + " leaves " +
                                    std::to_string(outside) +
                                    " pits inside the boundary with a row or column below 1; use " +
                                    origin_text(origin) + ", which keeps every pit where it is, or leave origin out"};
}

}  // namespace

std::vector<Run> clip_to_runs(const Lattice& lattice, const MultiPolygon& polygons, RowWindow window) {
  const double height = lattice.row_distance_m();
  const std::vector<Edge> edges = edges_of(lattice, polygons);
  if (edges.empty()) return {};
  const auto row_at_or_above = [&](double v) { return std::ceil(v / height) + 1; };
  const auto row_at_or_below = [&](double v) { return std::floor(v / height) + 1; };
  double low = std::numeric_limits<double>::infinity();
  double high = -low;
  for (const Edge& edge : edges) {
    low = std::min(low, edge.from.v);
    high = std::max(high, edge.from.v);
  }
  low = std::max(row_at_or_above(low - kBoundaryTolerance_m), static_cast<double>(window.first));
  high = std::min(row_at_or_below(high + kBoundaryTolerance_m), static_cast<double>(window.last));
  if (!(low <= high)) return {};
  const auto first_row = static_cast<std::int32_t>(low);
  std::vector<RowMeets> rows(static_cast<std::size_t>(high - low) + 1);
  for (const Edge& edge : edges) {
    const auto [bottom, top] = std::minmax(edge.from.v, edge.to.v);
    const double from = std::max(low, row_at_or_above(bottom - kBoundaryTolerance_m));
    const double to = std::min(high, row_at_or_below(top + kBoundaryTolerance_m));
    for (double row = from; row <= to; ++row) {
      RowMeets& meets = rows[static_cast<std::size_t>(row - low)];
      const double v = (row - 1) * height;
      if ((edge.from.v <= v) != (edge.to.v <= v)) {
        const double part = (v - edge.from.v) / (edge.to.v - edge.from.v);
        meets.crossings.emplace_back(edge.polygon, edge.from.u + part * (edge.to.u - edge.from.u));
      }
      const Interval near = near_segment(edge, v, kBoundaryTolerance_m);
      if (near.low <= near.high) meets.near_edges.push_back(near);
    }
  }
  std::vector<Run> runs;
  for (std::size_t i = 0; i < rows.size(); ++i) {
    add_row(lattice, first_row + static_cast<std::int32_t>(i), rows[i], &runs);
  }
  return runs;
}

Result<Frame> Frame::clip(const Lattice& lattice, const MultiPolygon& boundary) {
  constexpr double kMostRows = 10'000'000;
  const Box box = bounding_box(boundary);
  const double across = std::hypot(box.high.x - box.low.x, box.high.y - box.low.y);
  if (area_m2(boundary) / lattice.cell_area_m2() > 1.01 * kMostNodes || across / lattice.row_distance_m() > kMostRows) {
    return Error(ErrorKind::kBadInput, "lattice.spacing_m: " + format_double(lattice.spacing_m) + " gives more than " +
                                           std::to_string(kMostNodes) +
                                           " pits inside the boundary; use a larger spacing or a smaller boundary");
  }
  Frame frame;
  frame.lattice_ = lattice;
  frame.runs_ = clip_to_runs(lattice, boundary);
  if (frame.runs_.empty()) {
    return Error(ErrorKind::kBadInput,
                 "boundary: no pit of the lattice lies inside it; use a smaller spacing or another origin");
  }
  for (Run& run : frame.runs_) {
    if (run.row < 1 || run.first < 1) return below_one(lattice, frame.runs_);
    run.start = frame.size_;
    frame.size_ += run.last - run.first + 1;
    if (frame.size_ > kMostNodes) {
      return Error(ErrorKind::kBadInput, "lattice.spacing_m: more than " + std::to_string(kMostNodes) +
                                             " pits inside the boundary; use a larger spacing");
    }
  }
  frame.first_row_ = frame.runs_.front().row;
  const std::int32_t last_row = frame.runs_.back().row;
  frame.row_starts_.assign(static_cast<std::size_t>(last_row - frame.first_row_) + 2, 0);
  for (const Run& run : frame.runs_)
    ++frame.row_starts_[static_cast<std::size_t>(run.row - frame.first_row_) + 1];
  for (std::size_t i = 1; i < frame.row_starts_.size(); ++i)
    frame.row_starts_[i] += frame.row_starts_[i - 1];
  return frame;
}

Node Frame::node(NodeId id) const {
  const auto after = std::upper_bound(runs_.begin(), runs_.end(), id,
                                      [](NodeId wanted, const Run& run) { return wanted < run.start; });
  const Run& run = *(after - 1);
  return {run.row, run.first + (id - run.start)};
}

NodeId Frame::find(const Node& node) const {
  const std::int64_t line = std::int64_t{node.row} - first_row_;
  if (line < 0 || line + 1 >= static_cast<std::int64_t>(row_starts_.size())) return kNoNode;
  const auto at = static_cast<std::size_t>(line);
  for (std::int32_t i = row_starts_[at]; i < row_starts_[at + 1]; ++i) {
    const Run& run = runs_[static_cast<std::size_t>(i)];
    if (node.column < run.first) return kNoNode;
    if (node.column <= run.last) return run.start + (node.column - run.first);
  }
  return kNoNode;
}

Point default_origin(const Lattice& lattice, const MultiPolygon& boundary, double shift_along, double shift_across) {
  constexpr double kMargin_m = 1.5 * kBoundaryTolerance_m;
  Lattice turned = lattice;
  turned.origin = bounding_box(boundary).low;
  Along low{std::numeric_limits<double>::infinity(), std::numeric_limits<double>::infinity()};
  for (const Polygon& polygon : boundary) {
    for (const Point& point : polygon.outer) {
      const Along at = turned.along(point);
      low = {std::min(low.u, at.u), std::min(low.v, at.v)};
    }
  }
  const double spacing = lattice.spacing_m;
  const double height = lattice.row_distance_m();
  // Column 0 must lie outside, in rows shifted by half a spacing too; else count from one column farther out.
  const double room = lattice.rows_shift() ? spacing / 2 : spacing;
  double u = shift_along * spacing;
  if (u > room - kMargin_m) u -= spacing;
  double v = shift_across * height;
  if (v > height - kMargin_m) v -= lattice.rows_shift() ? 2 * height : height;
  return turned.to_ground(Along{low.u + u, low.v + v});
}

}  // namespace nearpit
