#include "record/refusal_table.h"

#include <stdexcept>

#include "record/schema_check.h"

namespace nearpit {

RefusalTable::RefusalTable(const std::string& path_in_tree) {
  const nlohmann::json table = file_json(path_in_tree);
  for (const auto& line : table.at("base"))
    base_ += line.get<std::string>() + "\n";
  for (const auto& row : table.at("cases")) {
    Refusal refusal{base_, row.at("lines").get<std::vector<std::string>>(), row.contains("schema")};
    for (const auto& change : row.at("change")) {
      const auto from = change.at(0).get<std::string>();
      const std::size_t at = refusal.text.find(from);
      if (at == std::string::npos) throw std::runtime_error("the table changes what is not there: " + from);
      refusal.text.replace(at, from.size(), change.at(1).get<std::string>());
    }
    cases_.push_back(std::move(refusal));
  }
}

}  // namespace nearpit
