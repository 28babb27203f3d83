// Writes rows of one layer inside the transaction that is open. Touches only what differs: a row that is already as it should be is left alone, a
// changed one keeps its fid.
#ifndef NEARPIT_STORE_LAYER_WRITER_H_
#define NEARPIT_STORE_LAYER_WRITER_H_

#include <optional>
#include <string>

#include "base/clock.h"
#include "base/status.h"
#include "store/layer_tables.h"
#include "store/sqlite_handle.h"

namespace nearpit::store {

class LayerWriter {
 public:
  LayerWriter(Connection& db, const LayerTable& table);

  // Inserts, or replaces by key. A row with more or fewer values than the table has columns is our own mistake: kInternal.
  Status put(const LayerValues& row);
  Status remove(const std::string& key);
  // Brings the whole layer to these rows.
  Status become(const LayerContent& content);
  // Once at the end: if anything changed, gpkg_contents says when, and its box holds what was put (it only grows).
  Status stamp(const WallTime& now);

 private:
  Connection& db_;
  LayerTable table_;
  Statement put_;
  Statement remove_;
  std::int64_t changed_before_;
  std::optional<Box> box_;
};

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_LAYER_WRITER_H_
