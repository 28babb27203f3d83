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
  // By JSON pointer (RFC 6901); "" is the document. Only down to depth 6, and only where the line differs from that of the value around.
  std::map<std::string, int> line_of;
  std::map<std::string, int> key_line_of;  // of a member's key, where it differs from the member's own line
  // The line on which the value ends (an object or array: opens), or that of the nearest value around it that has one.
  int line(const std::string& pointer) const;
  // The line of the member's key.
  int key_line(const std::string& pointer) const;
};

// A step down a JSON pointer: "~" and "/" of a key are written ~0 and ~1 (RFC 6901 section 3).
std::string child_pointer(const std::string& pointer, std::string_view key);
std::string child_pointer(const std::string& pointer, std::size_t index);

// A byte-order mark is accepted. Errors: "FILE:LINE: what; what to do".
Result<JsonDocument> read_json(std::string_view text, const std::string& file, const JsonLimits& limits = {});

}  // namespace nearpit

#endif  // NEARPIT_RECORD_JSON_TEXT_H_
