// The layers that other programs read: pits, clusters, boundary, strata, closed_areas, and a table that explains the columns. Derived, never the truth:
// whatever they say, the log decides. Plain values; no sqlite3 here.
#ifndef NEARPIT_STORE_LAYERS_H_
#define NEARPIT_STORE_LAYERS_H_

#include <cstdint>
#include <optional>
#include <string>
#include <vector>

#include "lattice/polygon.h"

namespace nearpit {

// Every node of the first sample, and every other pit dug, due, halted or not dug; off the grid too.
struct PitRow {
  std::string label;  // unique
  // positive, negative, not dug, due, halted (a design pit whose record was taken back is due again)
  std::string outcome;
  Point place;       // as dug, else the node
  std::string area;  // "" off the grid
  bool first_sample = false;
  std::optional<std::int64_t> ring;  // nothing when the design does not reach it
  std::string chosen_by;
  std::string reason;  // why not dug
  std::string crew;
  std::string dug_at;
  std::optional<double> depth_cm;
  std::string stop;
  std::string bag;
  std::string note;
  std::vector<std::optional<std::int64_t>> finds;  // by the plan's order; nothing unless dug
  friend bool operator==(const PitRow&, const PitRow&) = default;
};

struct ClusterRow {
  std::string label;  // unique: its first dug pit
  std::int64_t pits = 0;
  std::int64_t in_first_sample = 0;
  double area_m2 = 0;
  bool closed = false;
  std::vector<std::int64_t> finds;
  MultiPolygon outline;  // union of its cells
  friend bool operator==(const ClusterRow&, const ClusterRow&);
};

struct AreaRow {
  std::string name;
  std::int64_t nodes = 0;
  std::int64_t primary_units = 0;
  std::int64_t drawn = 0;
  MultiPolygon outline;
};

struct ClosedAreaRow {
  std::string object;  // unique: id of the closed area
  std::string name;
  std::string reason;
  std::string by;
  bool open_again = false;
  MultiPolygon outline;
};

// The whole content.
struct LayerRows {
  std::vector<std::string> finds;
  std::vector<PitRow> pits;
  std::vector<ClusterRow> clusters;
  MultiPolygon boundary;
  std::string survey;  // name, in the boundary layer
  std::vector<AreaRow> strata;
  std::vector<ClosedAreaRow> closed_areas;
};

// What one save changes. `clusters` and `closed_areas` are whole when given (they are small).
struct LayerChanges {
  std::vector<PitRow> put_pits;          // inserted, or replaced by label
  std::vector<std::string> remove_pits;  // labels
  std::optional<std::vector<ClusterRow>> clusters;
  std::optional<std::vector<ClosedAreaRow>> closed_areas;
};

}  // namespace nearpit

#endif  // NEARPIT_STORE_LAYERS_H_
