// Members of JSON objects from elsewhere, taken one by one with their checks. Every finding is one line, "FILE:LINE: FIELD: VALUE is …; legal: …",
// with FIELD dotted (initial.count.terrace; elements of a list counted from 0) and LINE that of the value.
#ifndef NEARPIT_RECORD_JSON_FIELDS_H_
#define NEARPIT_RECORD_JSON_FIELDS_H_

#include <cstdint>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "base/status.h"
#include "lattice/polygon.h"
#include "record/json_text.h"

namespace nearpit {

// "/initial/count/all" -> "initial.count.all"; "" -> "".
std::string dotted(const std::string& pointer);
// A value as an error line shows it: numbers and words whole, long texts cut, lists and objects as […] and {…}.
std::string shown(const Json& value);
// "a", "b", "c".
std::string quoted_list(std::span<const std::string_view> words);

// All that is wrong with one document.
class Findings {
 public:
  // `document` must outlive it.
  Findings(const JsonDocument& document, std::string file);

  void add(const std::string& pointer, const std::string& what);
  // The same, on the line of the member's key.
  void add_at_key(const std::string& pointer, const std::string& what);
  // A member that is not there, on the line of its object.
  void add_missing(const std::string& object, std::string_view key, const std::string& legal);
  bool none() const { return list_.empty(); }
  std::size_t size() const { return list_.size(); }
  // In order of line, then as found; at least one.
  Error error() const;
  int line(const std::string& pointer) const { return document_->line(pointer); }

 private:
  void add_on_line(int line, const std::string& pointer, const std::string& what);

  const JsonDocument* document_;
  std::string file_;
  std::vector<std::pair<int, std::string>> list_;
};

// low <= x <= high, or without an end that is open.
struct NumberRange {
  double low = 0;
  double high = 0;
  bool above_low = false;
  bool below_high = false;
  bool holds(double value) const;
  // "a number from 0.1 to 1000", "a number above 0 and up to 24", "a number from 0 to below 360".
  std::string in_words() const;
};

// Each appends a finding and gives nothing when the value is not what it should be.
std::optional<double> number_of(Findings* findings, const Json& value, const std::string& pointer,
                                const NumberRange& range);
// 8.0 counts as 8, as in JSON Schema, up to 2^53.
std::optional<std::int64_t> whole_of(Findings* findings, const Json& value, const std::string& pointer,
                                     std::int64_t low, std::int64_t high);
// One line of 1 to `most` characters without spaces at its ends.
std::optional<std::string> name_of(Findings* findings, const Json& value, const std::string& pointer, std::size_t most);
std::optional<std::string> choice_of(Findings* findings, const Json& value, const std::string& pointer,
                                     std::span<const std::string_view> words);
// [x, y], each from -1e8 to 1e8.
std::optional<Point> point_of(Findings* findings, const Json& value, const std::string& pointer);
// Names, distinct as written or (fold) ignoring case.
std::vector<std::string> names_of(Findings* findings, const Json& value, const std::string& pointer, std::size_t least,
                                  std::size_t most, std::size_t longest, bool fold);
// A Polygon or MultiPolygon with no other keys than GeoJSON's two.
MultiPolygon geometry_of(Findings* findings, const Json& value, const std::string& pointer,
                         std::span<const std::string_view> keys);

enum class Need { kOptional, kRequired };

// The members of one object. Making it checks that the value is an object and that it holds no other keys.
class Fields {
 public:
  Fields(Findings* findings, const Json& value, std::string pointer, std::span<const std::string_view> keys);

  bool is_object() const { return object_ != nullptr; }
  bool has(std::string_view key) const { return find(key) != nullptr; }
  std::string at(std::string_view key) const { return child_pointer(pointer_, key); }
  const std::string& pointer() const { return pointer_; }
  Findings* findings() const { return findings_; }
  // Null when absent; when required that is a finding.
  const Json* take(std::string_view key, Need need, const std::string& legal) const;
  const Json* find(std::string_view key) const;

  std::optional<double> number(std::string_view key, Need need, const NumberRange& range) const;
  std::optional<std::int64_t> whole(std::string_view key, Need need, std::int64_t low, std::int64_t high) const;
  std::optional<std::string> name(std::string_view key, Need need, std::size_t most) const;
  // Text that may have several lines.
  std::optional<std::string> note(std::string_view key, Need need, std::size_t most) const;
  std::optional<std::string> choice(std::string_view key, Need need, std::span<const std::string_view> words) const;
  // A member that may not stand beside what is already there.
  void refuse(std::string_view key, const std::string& why) const;

 private:
  void check_keys(std::span<const std::string_view> keys);

  Findings* findings_;
  const Json* object_;  // null when the value is none
  std::string pointer_;
  std::vector<std::string_view> meant_;  // keys that an unknown one was meant to be: not called missing too
};

}  // namespace nearpit

#endif  // NEARPIT_RECORD_JSON_FIELDS_H_
