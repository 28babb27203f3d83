#include "store/layer_check.h"

#include <map>
#include <set>
#include <utility>

#include "base/numbers.h"
#include "base/text.h"

namespace nearpit::store {
namespace {

constexpr const char* kAction =
    "the record is not touched, it decides; undo the change in the program that made it, and edit nothing in these "
    "layers";

std::string in_words(const Value& value) {
  if (const auto* integer = std::get_if<std::int64_t>(&value)) return std::to_string(*integer);
  if (const auto* real = std::get_if<double>(&value)) return format_double(*real);
  if (const auto* text = std::get_if<std::string>(&value)) return in_quotes(*text);
  if (std::holds_alternative<Blob>(value)) return "another geometry";
  return "empty";
}

std::string difference(const LayerTable& table, const std::vector<Value>& is, const std::vector<Value>& should) {
  std::vector<std::string> parts;
  for (std::size_t i = 0; i < table.columns.size() && i < should.size(); ++i) {
    if (is[i] == should[i]) continue;
    std::string wanted = in_words(should[i]);
    if (std::holds_alternative<Blob>(should[i])) wanted = "that of the record";
    parts.push_back(in_quotes(table.columns[i]) + " is " + in_words(is[i]) + ", the record says " + wanted);
  }
  return join(parts, "; ");
}

std::string select_sql(const LayerTable& table) {
  std::vector<std::string> columns{quoted_identifier(table.key)};
  for (const std::string& column : table.columns)
    columns.push_back(quoted_identifier(column));
  return "SELECT " + join(columns, ", ") + " FROM " + quoted_identifier(table.name) + " ORDER BY 1";
}

std::string where(const LayerTable& table, const std::string& key) {
  return "layer " + table.name + ", " + in_quotes(key);
}

}  // namespace

void Findings::add(FileProblem problem) {
  ++all_;
  if (kept_.size() < most_) kept_.push_back(std::move(problem));
}

void Findings::move_to(std::vector<FileProblem>& out, const std::string& kind, const std::string& where_of_rest) {
  const std::size_t more = all_ - kept_.size();
  const std::string action = kept_.empty() ? "" : kept_.back().action;
  out.insert(out.end(), std::make_move_iterator(kept_.begin()), std::make_move_iterator(kept_.end()));
  if (more > 0) out.push_back({kind, where_of_rest, "and " + std::to_string(more) + " more", action});
  kept_.clear();
  all_ = 0;
}

void compare_layer(Connection& db, const LayerContent& expected, Findings& findings) {
  const LayerTable& table = expected.table;
  std::map<std::string, const LayerValues*> missing;
  for (const LayerValues& row : expected.rows)
    missing.emplace(row.key, &row);
  std::set<std::string> seen;
  Statement rows(db, select_sql(table));
  while (true) {
    const Result<bool> row = rows.next();
    if (!row) {
      findings.add({"layer", "layer " + table.name, row.error().one_line(), kAction});
      return;
    }
    if (!*row) break;
    const std::string key = rows.text(0);
    const auto wanted = missing.find(key);
    if (wanted == missing.end()) {
      const std::string what = seen.contains(key) ? "stands there twice" : "stands there, the record knows none";
      findings.add({"layer", where(table, key), what, kAction});
      continue;
    }
    std::vector<Value> is;
    for (std::size_t i = 0; i < table.columns.size(); ++i)
      is.push_back(rows.value(static_cast<int>(i) + 1));
    if (is != wanted->second->values) {
      findings.add({"layer", where(table, key), difference(table, is, wanted->second->values), kAction});
    }
    seen.insert(key);
    missing.erase(wanted);
  }
  for (const auto& [key, row] : missing)
    findings.add({"layer", where(table, key), "is missing, the record has it", kAction});
}

}  // namespace nearpit::store
