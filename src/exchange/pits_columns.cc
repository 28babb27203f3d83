#include "exchange/pits_columns.h"

#include <algorithm>

#include "base/nearest_word.h"
#include "base/text.h"

namespace nearpit {
namespace {

constexpr std::array<std::string_view, kPitColumns> kNames = {
    "pit", "status", "reason", "crew",    "started_at", "dug_at", "depth_cm", "stop", "chosen_by",
    "x",   "y",      "moved",  "mesh_mm", "backfilled", "bag",    "note",     "by",   "why",
};
constexpr std::string_view kCount = "find:";
constexpr std::string_view kWeight = "weight:";

std::string all_columns() {
  std::string all;
  for (const std::string_view name : kNames) {
    all += name;
    all += ", ";
  }
  return all + "find:<name>, weight:<name>";
}

class HeaderReader {
 public:
  HeaderReader(const CsvTable& table, const std::vector<std::string>& finds, TableFindings* findings)
      : table_(table), finds_(finds), findings_(findings) {}

  PitsColumns read() {
    for (std::size_t i = 0; i < table_.header.size(); ++i)
      read_name(trimmed(table_.header[i]), i);
    if (!columns_.field(PitColumn::kPit)) add("pit", "missing; one column must be named pit and hold the pits' labels");
    const bool x = columns_.field(PitColumn::kX).has_value();
    const bool y = columns_.field(PitColumn::kY).has_value();
    if (x != y) add(x ? "y" : "x", "missing; x and y go together");
    return columns_;
  }

 private:
  void read_name(std::string_view name, std::size_t field) {
    if (name.empty()) return add("", "column " + std::to_string(field + 1) + " has no name; name it or take it out");
    if (name.starts_with(kCount)) return read_find(name, kCount, field, &columns_.counts);
    if (name.starts_with(kWeight)) return read_find(name, kWeight, field, &columns_.weights);
    const auto known = std::find(kNames.begin(), kNames.end(), name);
    if (known == kNames.end()) return unknown(name);
    auto& place = columns_.fields[static_cast<std::size_t>(known - kNames.begin())];
    if (place) return twice(std::string(name), *place, field);
    place = field;
  }

  void read_find(std::string_view name, std::string_view prefix, std::size_t field,
                 std::map<std::size_t, std::size_t>* places) {
    const std::string_view written = trimmed(name.substr(prefix.size()));
    const auto found = std::find_if(finds_.begin(), finds_.end(),
                                    [&](const std::string& find) { return fold_case(find) == fold_case(written); });
    if (found == finds_.end()) {
      return add(std::string(prefix.substr(0, prefix.size() - 1)),
                 in_quotes(written) + " is no find of the plan; legal: " + join(finds_, ", "));
    }
    const auto [place, fresh] = places->emplace(static_cast<std::size_t>(found - finds_.begin()), field);
    if (!fresh) twice(std::string(prefix) + *found, place->second, field);
  }

  void unknown(std::string_view name) {
    const std::string_view meant = nearest_word(name, kNames);
    const std::string hint = meant.empty() ? "" : "did you mean " + in_quotes(meant) + "? ";
    add("", in_quotes(name) + " is no column; " + hint + "legal: " + all_columns());
  }
  void twice(const std::string& name, std::size_t first, std::size_t second) {
    add(name, "stands twice, in columns " + std::to_string(first + 1) + " and " + std::to_string(second + 1) +
                  "; take one out");
  }
  void add(const std::string& column, const std::string& what) { findings_->add(table_.header_line, column, what); }

  const CsvTable& table_;
  const std::vector<std::string>& finds_;
  TableFindings* findings_;
  PitsColumns columns_;
};

}  // namespace

std::string_view word(PitColumn column) { return kNames[static_cast<std::size_t>(column)]; }

std::string_view trimmed(std::string_view text) {
  constexpr std::string_view kSpaces = " \t";
  const std::size_t first = std::min(text.find_first_not_of(kSpaces), text.size());
  text.remove_prefix(first);
  return text.substr(0, text.find_last_not_of(kSpaces) + 1);
}

PitsColumns PitsColumns::of(const CsvTable& table, const std::vector<std::string>& finds, TableFindings* findings) {
  return HeaderReader(table, finds, findings).read();
}

}  // namespace nearpit
