// A small JSON Schema (2020-12) validator for the keywords that the project's schemas use, so that a test can hold the schemas against the
// readers. A keyword that it does not know is reported, never passed over.
#ifndef NEARPIT_TESTS_RECORD_SCHEMA_CHECK_H_
#define NEARPIT_TESTS_RECORD_SCHEMA_CHECK_H_

#include <map>
#include <nlohmann/json.hpp>
#include <set>
#include <string>

namespace nearpit {

nlohmann::json file_json(const std::string& path_in_tree);

class SchemaCheck {
 public:
  explicit SchemaCheck(nlohmann::json schema) : root_(std::move(schema)) {}

  bool accepts(const nlohmann::json& value) { return holds(root_, value); }
  // Keywords met that it does not know.
  const std::set<std::string>& unknown_keywords() const { return unknown_; }
  // The keys of each object of the schema by its place: "" the whole, "lattice", "strata[]" an element. Variants of one
  // place are put together.
  std::map<std::string, std::set<std::string>> keys() const;

 private:
  bool holds(const nlohmann::json& schema, const nlohmann::json& value);
  bool keyword_holds(const std::string& keyword, const nlohmann::json& wanted, const nlohmann::json& schema,
                     const nlohmann::json& value);
  bool number_holds(const std::string& keyword, const nlohmann::json& wanted, const nlohmann::json& value);
  bool text_holds(const std::string& keyword, const nlohmann::json& wanted, const nlohmann::json& value);
  bool list_holds(const std::string& keyword, const nlohmann::json& wanted, const nlohmann::json& value);
  bool object_holds(const std::string& keyword, const nlohmann::json& wanted, const nlohmann::json& schema,
                    const nlohmann::json& value);
  const nlohmann::json& target(const nlohmann::json& reference) const;
  void gather(const nlohmann::json& schema, const std::string& place,
              std::map<std::string, std::set<std::string>>* keys) const;

  nlohmann::json root_;
  std::set<std::string> unknown_;
};

}  // namespace nearpit

#endif  // NEARPIT_TESTS_RECORD_SCHEMA_CHECK_H_
