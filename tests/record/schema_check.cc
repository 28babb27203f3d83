#include "record/schema_check.h"

#include <algorithm>
#include <cmath>
#include <fstream>
#include <regex>
#include <stdexcept>

namespace nearpit {
namespace {

using Json = nlohmann::json;

const std::set<std::string> kAnnotations{"$schema", "title", "description", "$defs", "then", "else"};
const std::set<std::string> kNumbers{"minimum", "maximum", "exclusiveMinimum", "exclusiveMaximum"};
const std::set<std::string> kTexts{"minLength", "maxLength", "pattern"};
const std::set<std::string> kLists{"minItems", "maxItems", "uniqueItems", "items", "prefixItems"};
const std::set<std::string> kObjects{"required", "properties", "additionalProperties", "minProperties",
                                     "maxProperties"};

bool is_of_type(const Json& value, const std::string& type) {
  if (type == "integer") {
    return value.is_number_integer() ||
           (value.is_number_float() && std::trunc(value.get<double>()) == value.get<double>());
  }
  return (type == "number" && value.is_number()) || (type == "null" && value.is_null()) || type == value.type_name();
}

// Code points, of text known to be well-formed UTF-8.
std::wstring wide(const std::string& text) {
  std::wstring out;
  for (const char c : text) {
    const auto byte = static_cast<unsigned char>(c);
    if ((byte & 0xC0U) != 0x80U) {
      out += static_cast<wchar_t>(byte < 0x80U   ? byte
                                  : byte < 0xE0U ? byte & 0x1FU
                                  : byte < 0xF0U ? byte & 0xFU
                                                 : byte & 7U);
    } else {
      out.back() = static_cast<wchar_t>(static_cast<unsigned>(out.back()) << 6U | (byte & 0x3FU));
    }
  }
  return out;
}

}  // namespace

Json file_json(const std::string& path_in_tree) {
  std::ifstream file(std::string(NEARPIT_SOURCE) + "/" + path_in_tree);
  return Json::parse(file);
}

const Json& SchemaCheck::target(const Json& reference) const {
  const auto text = reference.get<std::string>();
  if (!text.starts_with("#")) throw std::runtime_error("a reference to elsewhere: " + text);
  return root_.at(Json::json_pointer(text.substr(1)));
}

bool SchemaCheck::holds(const Json& schema, const Json& value) {
  if (schema.is_boolean()) return schema.get<bool>();
  bool all = true;
  for (const auto& [keyword, wanted] : schema.items())
    all = keyword_holds(keyword, wanted, schema, value) && all;
  return all;
}

bool SchemaCheck::keyword_holds(const std::string& keyword, const Json& wanted, const Json& schema, const Json& value) {
  const auto one = [&](const Json& part) { return holds(part, value); };
  if (kAnnotations.contains(keyword)) return true;
  if (kNumbers.contains(keyword)) return !value.is_number() || number_holds(keyword, wanted, value);
  if (kTexts.contains(keyword)) return !value.is_string() || text_holds(keyword, wanted, value);
  if (kLists.contains(keyword)) return !value.is_array() || list_holds(keyword, wanted, value);
  if (kObjects.contains(keyword)) return !value.is_object() || object_holds(keyword, wanted, schema, value);
  if (keyword == "$ref") return holds(target(wanted), value);
  if (keyword == "const") return value == wanted;
  if (keyword == "enum") return std::find(wanted.begin(), wanted.end(), value) != wanted.end();
  if (keyword == "not") return !holds(wanted, value);
  if (keyword == "allOf") return std::all_of(wanted.begin(), wanted.end(), one);
  if (keyword == "oneOf") return std::count_if(wanted.begin(), wanted.end(), one) == 1;
  if (keyword == "type") {
    const Json types = wanted.is_array() ? wanted : Json::array({wanted});
    return std::any_of(types.begin(), types.end(), [&](const Json& type) { return is_of_type(value, type); });
  }
  if (keyword == "if") {
    const char* branch = holds(wanted, value) ? "then" : "else";
    return !schema.contains(branch) || holds(schema.at(branch), value);
  }
  unknown_.insert(keyword);
  return false;
}

bool SchemaCheck::number_holds(const std::string& keyword, const Json& wanted, const Json& value) {
  if (keyword == "minimum") return value >= wanted;
  if (keyword == "maximum") return value <= wanted;
  if (keyword == "exclusiveMinimum") return value > wanted;
  return value < wanted;
}

bool SchemaCheck::text_holds(const std::string& keyword, const Json& wanted, const Json& value) {
  const std::wstring text = wide(value.get<std::string>());
  if (keyword == "minLength") return text.size() >= wanted.get<std::size_t>();
  if (keyword == "maxLength") return text.size() <= wanted.get<std::size_t>();
  return std::regex_search(text, std::wregex(wide(wanted.get<std::string>())));
}

bool SchemaCheck::list_holds(const std::string& keyword, const Json& wanted, const Json& value) {
  if (keyword == "minItems") return value.size() >= wanted.get<std::size_t>();
  if (keyword == "maxItems") return value.size() <= wanted.get<std::size_t>();
  if (keyword == "uniqueItems") return std::set<Json>(value.begin(), value.end()).size() == value.size();
  if (keyword == "items") {
    return std::all_of(value.begin(), value.end(), [&](const Json& item) { return holds(wanted, item); });
  }
  for (std::size_t i = 0; i < std::min(wanted.size(), value.size()); ++i) {
    if (!holds(wanted[i], value[i])) return false;
  }
  return true;
}

bool SchemaCheck::object_holds(const std::string& keyword, const Json& wanted, const Json& schema, const Json& value) {
  if (keyword == "minProperties") return value.size() >= wanted.get<std::size_t>();
  if (keyword == "maxProperties") return value.size() <= wanted.get<std::size_t>();
  if (keyword == "required") {
    return std::all_of(wanted.begin(), wanted.end(), [&](const Json& key) { return value.contains(key); });
  }
  for (const auto& [key, member] : value.items()) {
    const bool listed = schema.contains("properties") && schema["properties"].contains(key);
    if (keyword == "properties" && listed && !holds(wanted[key], member)) return false;
    if (keyword == "additionalProperties" && !listed && !holds(wanted, member)) return false;
  }
  return true;
}

std::map<std::string, std::set<std::string>> SchemaCheck::keys() const {
  std::map<std::string, std::set<std::string>> all;
  gather(root_, "", &all);
  return all;
}

void SchemaCheck::gather(const Json& schema, const std::string& place,
                         std::map<std::string, std::set<std::string>>* keys) const {
  if (!schema.is_object()) return;
  for (const auto& [keyword, part] : schema.items()) {
    if (keyword == "$ref") gather(target(part), place, keys);
    if (keyword == "items") gather(part, place + "[]", keys);
    if (keyword == "oneOf" || keyword == "allOf") {
      for (const Json& variant : part)
        gather(variant, place, keys);
    }
    if (keyword != "properties") continue;
    for (const auto& [key, member] : part.items()) {
      (*keys)[place].insert(key);
      gather(member, place.empty() ? key : place + "." + key, keys);
    }
  }
}

}  // namespace nearpit
