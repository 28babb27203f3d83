#include "store/layer_writer.h"

#include <algorithm>
#include <set>
#include <vector>

#include "base/text.h"

namespace nearpit::store {
namespace {

std::string columns_of(const LayerTable& table, const std::string& before) {
  std::vector<std::string> columns;
  for (const std::string& column : table.columns)
    columns.push_back(before + quoted_identifier(column));
  return join(columns, ", ");
}

// The row as it stands is compared with the one that comes, so that an equal one is not written again.
std::string put_sql(const LayerTable& table) {
  std::vector<std::string> places;
  std::vector<std::string> sets;
  for (std::size_t i = 0; i < table.columns.size(); ++i) {
    const std::string column = quoted_identifier(table.columns[i]);
    places.push_back("?" + std::to_string(i + 1));
    sets.push_back(column + " = excluded." + column);
  }
  const std::string name = quoted_identifier(table.name);
  return "INSERT INTO " + name + " (" + columns_of(table, "") + ") VALUES (" + join(places, ", ") + ") ON CONFLICT (" +
         quoted_identifier(table.key) + ") DO UPDATE SET " + join(sets, ", ") + " WHERE (" +
         columns_of(table, name + ".") + ") IS NOT (" + columns_of(table, "excluded.") + ")";
}

std::string remove_sql(const LayerTable& table) {
  return "DELETE FROM " + quoted_identifier(table.name) + " WHERE " + quoted_identifier(table.key) + " = ?1";
}

}  // namespace

LayerWriter::LayerWriter(Connection& db, const LayerTable& table)
    : db_(db),
      table_(table),
      put_(db, put_sql(table)),
      remove_(db, remove_sql(table)),
      changed_before_(db.rows_changed()) {}

Status LayerWriter::put(const LayerValues& row) {
  if (row.values.size() != table_.columns.size()) {
    return Error(ErrorKind::kInternal, db_.shown() + ": layer " + table_.name + ", " + in_quotes(row.key) + ": " +
                                           std::to_string(row.values.size()) + " values for " +
                                           std::to_string(table_.columns.size()) + " columns");
  }
  for (const Value& value : row.values)
    put_.add(value);
  NEARPIT_TRY(put_.finish());
  if (!row.box) return ok_status();
  if (!box_) box_ = row.box;
  box_->low = {std::min(box_->low.x, row.box->low.x), std::min(box_->low.y, row.box->low.y)};
  box_->high = {std::max(box_->high.x, row.box->high.x), std::max(box_->high.y, row.box->high.y)};
  return ok_status();
}

Status LayerWriter::remove(const std::string& key) { return remove_.add(key).finish(); }

Status LayerWriter::become(const LayerContent& content) {
  std::set<std::string> wanted;
  for (const LayerValues& row : content.rows)
    wanted.insert(row.key);
  std::vector<std::string> gone;
  Statement present(db_, "SELECT " + quoted_identifier(table_.key) + " FROM " + quoted_identifier(table_.name));
  while (true) {
    NEARPIT_ASSIGN(row, present.next());
    if (!row) break;
    if (!wanted.contains(present.text(0))) gone.push_back(present.text(0));
  }
  for (const std::string& key : gone)
    NEARPIT_TRY(remove(key));
  for (const LayerValues& row : content.rows)
    NEARPIT_TRY(put(row));
  return ok_status();
}

Status LayerWriter::stamp(const WallTime& now) {
  if (db_.rows_changed() == changed_before_) return ok_status();
  NEARPIT_TRY(Statement(db_, "UPDATE gpkg_contents SET last_change = ?1 WHERE table_name = ?2")
                  .add(format_time_utc(now))
                  .add(table_.name)
                  .finish());
  if (!box_) return ok_status();
  return Statement(
             db_,
             "UPDATE gpkg_contents SET min_x = min(coalesce(min_x, ?1), ?1), min_y = min(coalesce(min_y, ?2), ?2), "
             "max_x = max(coalesce(max_x, ?3), ?3), max_y = max(coalesce(max_y, ?4), ?4) WHERE table_name = ?5")
      .add(box_->low.x)
      .add(box_->low.y)
      .add(box_->high.x)
      .add(box_->high.y)
      .add(table_.name)
      .finish();
}

}  // namespace nearpit::store
