#include "record/json_fields.h"

#include <algorithm>
#include <cmath>
#include <set>

#include "base/nearest_word.h"
#include "base/numbers.h"
#include "base/text.h"
#include "record/geometry_json.h"

namespace nearpit {
namespace {

std::string characters(std::size_t most) { return "1 to " + std::to_string(most) + " characters"; }
std::string name_legal(std::size_t most) {
  return "a text on one line, " + characters(most) + ", no space at its ends";
}
std::string note_legal(std::size_t most) { return "a text of " + characters(most); }
std::string whole_legal(std::int64_t low, std::int64_t high) {
  return "a whole number from " + std::to_string(low) + " to " + std::to_string(high);
}

// What keeps a value from being a text of 1 to `most` characters.
std::string text_problem(const Json& value, std::size_t most) {
  if (!value.is_string()) return " is not a text";
  const auto& text = value.get_ref<const std::string&>();
  if (text.find_first_not_of(" \n") == std::string::npos) return " is empty";
  if (utf8_length(text) > most) return " is too long";
  if (is_name(text, most) && (text.front() == ' ' || text.back() == ' ')) return " begins or ends with a space";
  return " holds a character that may not stand here";
}

std::string list_problem(const Json& value, std::size_t least) {
  return !value.is_array() ? " is not a list" : value.size() < least ? " is too short" : " is too long";
}

std::optional<std::int64_t> whole_number(const Json& value) {
  if (value.is_number_unsigned()) {
    const auto number = value.get<std::uint64_t>();
    if (number > static_cast<std::uint64_t>(INT64_MAX)) return std::nullopt;
    return static_cast<std::int64_t>(number);
  }
  if (value.is_number_integer()) return value.get<std::int64_t>();
  if (!value.is_number_float()) return std::nullopt;
  const auto number = value.get<double>();
  if (std::abs(number) > 9007199254740992.0 || std::trunc(number) != number) return std::nullopt;
  return static_cast<std::int64_t>(number);
}

}  // namespace

std::string dotted(const std::string& pointer) {
  std::string out;
  for (std::size_t i = pointer.empty() ? 0 : 1; i < pointer.size(); ++i) {
    if (pointer[i] == '/') {
      out += '.';
    } else if (pointer[i] == '~' && i + 1 < pointer.size()) {
      out += pointer[++i] == '0' ? '~' : '/';
    } else {
      out += pointer[i];
    }
  }
  return out;
}

std::string shown(const Json& value) {
  if (value.is_string()) return in_quotes(value.get_ref<const std::string&>());
  if (value.is_array()) return value.empty() ? "[]" : "[…]";
  if (value.is_object()) return value.empty() ? "{}" : "{…}";
  return value.dump();
}

std::string quoted_list(std::span<const std::string_view> words) {
  std::vector<std::string> list;
  for (const std::string_view word : words)
    list.push_back(in_quotes(word));
  return join(list, ", ");
}

Findings::Findings(const JsonDocument& document, std::string file) : document_(&document), file_(std::move(file)) {}

void Findings::add_on_line(int line, const std::string& pointer, const std::string& what) {
  // A key is shown as it may be shown: it came from elsewhere too.
  std::string field = dotted(pointer);
  if (!is_name(field, 200)) field = in_quotes(field);
  const std::string where = pointer.empty() ? "" : field + ": ";
  list_.emplace_back(line, file_ + ":" + std::to_string(line) + ": " + where + what);
}

void Findings::add(const std::string& pointer, const std::string& what) {
  add_on_line(document_->line(pointer), pointer, what);
}

void Findings::add_at_key(const std::string& pointer, const std::string& what) {
  add_on_line(document_->key_line(pointer), pointer, what);
}

void Findings::add_missing(const std::string& object, std::string_view key, const std::string& legal) {
  add_on_line(document_->line(object), child_pointer(object, key), "missing; legal: " + legal);
}

Error Findings::error() const {
  auto sorted = list_;
  std::stable_sort(sorted.begin(), sorted.end(), [](const auto& a, const auto& b) { return a.first < b.first; });
  std::vector<std::string> lines;
  lines.reserve(sorted.size());
  for (auto& [line, text] : sorted)
    lines.push_back(std::move(text));
  return {ErrorKind::kBadInput, std::move(lines)};
}

bool NumberRange::holds(double value) const {
  return std::isfinite(value) && (above_low ? value > low : value >= low) &&
         (below_high ? value < high : value <= high);
}

std::string NumberRange::in_words() const {
  const auto written = [](double end) { return format_trimmed(end, 9); };
  const std::string from = (above_low ? "above " : "from ") + written(low);
  const std::string to = below_high ? "to below " : above_low ? "and up to " : "to ";
  return "a number " + from + " " + to + written(high);
}

std::optional<double> number_of(Findings* findings, const Json& value, const std::string& pointer,
                                const NumberRange& range) {
  if (value.is_number() && range.holds(value.get<double>())) return value.get<double>();
  const std::string wrong = value.is_number() ? " is out of range; legal: " : " is not a number; legal: ";
  findings->add(pointer, shown(value) + wrong + range.in_words());
  return std::nullopt;
}

std::optional<std::int64_t> whole_of(Findings* findings, const Json& value, const std::string& pointer,
                                     std::int64_t low, std::int64_t high) {
  const auto whole = whole_number(value);
  if (whole && *whole >= low && *whole <= high) return whole;
  const bool out = whole.has_value() || value.is_number_unsigned();
  findings->add(pointer, shown(value) + (out ? " is out of range" : " is not a whole number") +
                             "; legal: " + whole_legal(low, high));
  return std::nullopt;
}

std::optional<std::string> name_of(Findings* findings, const Json& value, const std::string& pointer,
                                   std::size_t most) {
  if (value.is_string()) {
    const auto& text = value.get_ref<const std::string&>();
    if (is_name(text, most) && text.front() != ' ' && text.back() != ' ') return text;
  }
  findings->add(pointer, shown(value) + text_problem(value, most) + "; legal: " + name_legal(most));
  return std::nullopt;
}

std::optional<std::string> choice_of(Findings* findings, const Json& value, const std::string& pointer,
                                     std::span<const std::string_view> words) {
  if (value.is_string()) {
    const auto& text = value.get_ref<const std::string&>();
    if (std::find(words.begin(), words.end(), text) != words.end()) return text;
  }
  findings->add(pointer, shown(value) + " is not known here; legal: " + quoted_list(words));
  return std::nullopt;
}

std::optional<Point> point_of(Findings* findings, const Json& value, const std::string& pointer) {
  if (!value.is_array() || value.size() != 2) {
    findings->add(pointer, shown(value) + " is not a point; legal: [x, y], metres");
    return std::nullopt;
  }
  const auto x = number_of(findings, value[0], child_pointer(pointer, std::size_t{0}), {-1e8, 1e8});
  const auto y = number_of(findings, value[1], child_pointer(pointer, std::size_t{1}), {-1e8, 1e8});
  if (!x || !y) return std::nullopt;
  return Point{*x, *y};
}

std::vector<std::string> names_of(Findings* findings, const Json& value, const std::string& pointer, std::size_t least,
                                  std::size_t most, std::size_t longest, bool fold) {
  std::vector<std::string> names;
  if (!value.is_array() || value.size() < least || value.size() > most) {
    findings->add(pointer, shown(value) + list_problem(value, least) + "; legal: a list of " + std::to_string(least) +
                               " to " + std::to_string(most) + " texts");
    return names;
  }
  std::set<std::string> seen;
  for (std::size_t i = 0; i < value.size(); ++i) {
    const std::string place = child_pointer(pointer, i);
    const auto name = name_of(findings, value[i], place, longest);
    if (!name) continue;
    if (!seen.insert(fold ? fold_case(*name) : *name).second) {
      findings->add(place, shown(value[i]) + " stands twice; legal: distinct texts" + (fold ? ", ignoring case" : ""));
      continue;
    }
    names.push_back(*name);
  }
  return names;
}

MultiPolygon geometry_of(Findings* findings, const Json& value, const std::string& pointer,
                         std::span<const std::string_view> keys) {
  if (value.is_object()) Fields(findings, value, pointer, keys);
  std::vector<JsonFault> faults;
  MultiPolygon polygons = polygons_of(value, &faults);
  for (const JsonFault& fault : faults)
    findings->add(pointer + fault.field, fault.what);
  return polygons;
}

Fields::Fields(Findings* findings, const Json& value, std::string pointer, std::span<const std::string_view> keys)
    : findings_(findings), object_(value.is_object() ? &value : nullptr), pointer_(std::move(pointer)) {
  if (object_ == nullptr) {
    findings_->add(pointer_, shown(value) + " is not an object; legal: {…} with the keys " + quoted_list(keys));
    return;
  }
  check_keys(keys);
}

void Fields::check_keys(std::span<const std::string_view> keys) {
  constexpr std::size_t kMostNamed = 20;
  std::size_t named = 0;
  for (const auto& [key, value] : object_->items()) {
    if (std::find(keys.begin(), keys.end(), key) != keys.end()) continue;
    if (++named > kMostNamed) return;
    const std::string_view meant = nearest_word(key, keys);
    if (!meant.empty()) meant_.push_back(meant);
    const std::string hint = meant.empty() ? "" : "did you mean " + in_quotes(meant) + "? ";
    findings_->add_at_key(at(key), "this key is unknown; " + hint + "legal: " + quoted_list(keys));
  }
}

const Json* Fields::find(std::string_view key) const {
  if (object_ == nullptr) return nullptr;
  const auto found = object_->find(key);
  return found == object_->end() ? nullptr : &*found;
}

const Json* Fields::take(std::string_view key, Need need, const std::string& legal) const {
  const Json* value = find(key);
  const bool misspelt = std::find(meant_.begin(), meant_.end(), key) != meant_.end();
  if (value == nullptr && need == Need::kRequired && object_ != nullptr && !misspelt) {
    findings_->add_missing(pointer_, key, legal);
  }
  return value;
}

std::optional<double> Fields::number(std::string_view key, Need need, const NumberRange& range) const {
  const Json* value = take(key, need, range.in_words());
  return value == nullptr ? std::nullopt : number_of(findings_, *value, at(key), range);
}

std::optional<std::int64_t> Fields::whole(std::string_view key, Need need, std::int64_t low, std::int64_t high) const {
  const Json* value = take(key, need, whole_legal(low, high));
  return value == nullptr ? std::nullopt : whole_of(findings_, *value, at(key), low, high);
}

std::optional<std::string> Fields::name(std::string_view key, Need need, std::size_t most) const {
  const Json* value = take(key, need, name_legal(most));
  return value == nullptr ? std::nullopt : name_of(findings_, *value, at(key), most);
}

std::optional<std::string> Fields::note(std::string_view key, Need need, std::size_t most) const {
  const Json* value = take(key, need, note_legal(most));
  if (value == nullptr) return std::nullopt;
  if (value->is_string() && is_note(value->get_ref<const std::string&>(), most)) return value->get<std::string>();
  findings_->add(at(key), shown(*value) + text_problem(*value, most) + "; legal: " + note_legal(most));
  return std::nullopt;
}

std::optional<std::string> Fields::choice(std::string_view key, Need need,
                                          std::span<const std::string_view> words) const {
  const Json* value = take(key, need, quoted_list(words));
  return value == nullptr ? std::nullopt : choice_of(findings_, *value, at(key), words);
}

void Fields::refuse(std::string_view key, const std::string& why) const {
  if (has(key)) findings_->add_at_key(at(key), why);
}

}  // namespace nearpit
