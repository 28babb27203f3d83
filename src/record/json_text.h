// JSON from elsewhere, read with its guards: size, depth, number of elements, no key twice, whole well-formed UTF-8. The line of every value
// is kept, so that an error can say where in the file it is.
#ifndef NEARPIT_RECORD_JSON_TEXT_H_
#define NEARPIT_RECORD_JSON_TEXT_H_

#include <cstddef>
#include <map>
#include <nlohmann/json.hpp>
#include <string>
#include <string_view>

#include "base/status.h"

namespace nearpit {

using Json = nlohmann::ordered_json;

struct JsonLimits {
  std::size_t bytes = 64u << 20;
  std::size_t depth = 64;
  std::size_t elements = 2'000'000;
};

struct JsonDocument {
  Json value;
  std::map<std::string, int> line_of;  // by JSON pointer (RFC 6901); "" is the document; only down to depth 6
  // The line of the value, or of the nearest value around it that has one.
  int line(const std::string& pointer) const;
};

// A byte-order mark is accepted. Errors: "FILE:LINE: what; what to do".
Result<JsonDocument> read_json(std::string_view text, const std::string& file, const JsonLimits& limits = {});

}  // namespace nearpit

#endif  // NEARPIT_RECORD_JSON_TEXT_H_
