// The frame: the nodes of a lattice whose place lies inside a boundary, on it, or within 1 mm of it. Nodes are numbered
// 0 .. size()-1 in row, then column order; a NodeId is such a number. Kept as runs of columns, so a frame of a million
// nodes costs its rows, and clipping costs rows times edges plus runs.
#ifndef NEARPIT_LATTICE_FRAME_H_
#define NEARPIT_LATTICE_FRAME_H_

#include <algorithm>
#include <cstdint>
#include <optional>
#include <vector>

#include "base/status.h"
#include "lattice/lattice.h"
#include "lattice/neighbour_rule.h"
#include "lattice/polygon.h"

namespace nearpit {

using NodeId = std::int32_t;
constexpr NodeId kNoNode = -1;
constexpr double kBoundaryTolerance_m = 0.001;
constexpr std::int64_t kMostNodes = 10'000'000;

// Columns first..last (both inside) of one row; `start` is the number of its first node.
struct Run {
  std::int32_t row = 0;
  std::int32_t first = 0;
  std::int32_t last = 0;
  NodeId start = 0;
};

// The runs of lattice nodes that polygons hold, in row, column order; columns and rows may be below 1. Nothing is numbered.
// Only rows of the window are looked at.
struct RowWindow {
  std::int32_t first = -10'000'000;
  std::int32_t last = 10'000'000;
};
std::vector<Run> clip_to_runs(const Lattice& lattice, const MultiPolygon& polygons, RowWindow window = {});

class Frame {
 public:
  Frame() = default;
  // Errors: no node inside; more than kMostNodes; a node with row or column below 1 (says how many and which origin works).
  static Result<Frame> clip(const Lattice& lattice, const MultiPolygon& boundary);

  const Lattice& lattice() const { return lattice_; }
  NodeId size() const { return size_; }
  const std::vector<Run>& runs() const { return runs_; }

  Node node(NodeId id) const;
  // kNoNode when the node is not in the frame.
  NodeId find(const Node& node) const;
  Point ground(NodeId id) const { return lattice_.to_ground(node(id)); }
  // Calls visit(NodeId) for each in-frame node that the polygons hold (1 mm tolerance), ascending.
  template <class Visit>
  void each_inside(const MultiPolygon& polygons, Visit visit) const {
    if (runs_.empty()) return;
    for (const Run& run : clip_to_runs(lattice_, polygons, {runs_.front().row, runs_.back().row})) {
      for (std::int32_t i = first_run_of(run.row); i < first_run_of(run.row + 1); ++i) {
        const Run& own = runs_[static_cast<std::size_t>(i)];
        const std::int32_t last = std::min(run.last, own.last);
        for (std::int32_t column = std::max(run.first, own.first); column <= last; ++column) {
          visit(own.start + (column - own.first));
        }
      }
    }
  }
  // Calls visit(NodeId) for each in-frame neighbour.
  template <class Visit>
  void each_neighbour(NeighbourRule rule, NodeId id, Visit visit) const {
    const Node at = node(id);
    for (const Node& step : neighbour_offsets(rule, at.row)) {
      if (const NodeId other = find({at.row + step.row, at.column + step.column}); other != kNoNode) visit(other);
    }
  }

 private:
  // Index of the first run of a row from first_row_ on; one past the last row is legal.
  std::int32_t first_run_of(std::int32_t row) const { return row_starts_[static_cast<std::size_t>(row - first_row_)]; }

  Lattice lattice_;
  std::vector<Run> runs_;
  std::vector<std::int32_t> row_starts_;  // index of the first run of each row, from first_row_
  std::int32_t first_row_ = 1;
  NodeId size_ = 0;
};

// The origin that the plan leaves open: the lower-left corner of the boundary's bounding box in turned axes; `shift` (each
// 0 <= part < 1) moves it by that part of one cell, so that still no node of the frame has a row or column below 1.
Point default_origin(const Lattice& lattice, const MultiPolygon& boundary, double shift_along = 0,
                     double shift_across = 0);

}  // namespace nearpit

#endif  // NEARPIT_LATTICE_FRAME_H_
