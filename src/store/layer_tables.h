// Which column of which layer holds what: the one place where a row of a layer becomes values of a table. Writing the layers and checking them both
// go through here.
#ifndef NEARPIT_STORE_LAYER_TABLES_H_
#define NEARPIT_STORE_LAYER_TABLES_H_

#include <optional>
#include <string>
#include <vector>

#include "lattice/polygon.h"
#include "store/layers.h"
#include "store/sqlite_handle.h"

namespace nearpit::store {

// What differs from file to file.
struct LayerShape {
  int srs_id = -1;
  std::vector<std::string> find_columns;  // by the plan's order of finds
};

struct LayerTable {
  std::string name;
  std::string key;                   // the unique column
  std::vector<std::string> columns;  // all but fid; geom first
};

struct LayerValues {
  std::string key;
  std::vector<Value> values;  // by LayerTable::columns; text that says nothing is NULL, except the key
  std::optional<Box> box;     // of the geometry
};

struct LayerContent {
  LayerTable table;
  std::vector<LayerValues> rows;
};

// find_<name> for each find. SQLite takes columns that differ only in the case of A to Z for one: a later one then ends in _2, _3 …
std::vector<std::string> find_columns(const std::vector<std::string>& finds);

LayerTable pits_table(const LayerShape& shape);
LayerValues values_of(const PitRow& row, const LayerShape& shape);

// Whole layers.
LayerContent clusters_content(const std::vector<ClusterRow>& rows, const LayerShape& shape);
LayerContent closed_areas_content(const std::vector<ClosedAreaRow>& rows, const LayerShape& shape);
// All five: pits, clusters, boundary, strata, closed_areas.
std::vector<LayerContent> all_contents(const LayerRows& rows, const LayerShape& shape);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_LAYER_TABLES_H_
