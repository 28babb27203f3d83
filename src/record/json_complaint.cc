#include "record/json_complaint.h"

#include <algorithm>

#include "base/text.h"

namespace nearpit {
namespace {

bool is_space(char c) { return c == ' ' || c == '\t' || c == '\n' || c == '\r'; }
bool is_digit(char c) { return c >= '0' && c <= '9'; }
bool is_letter(char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z'); }
bool is_hex(char c) { return is_digit(c) || (c >= 'a' && c <= 'f') || (c >= 'A' && c <= 'F'); }

std::size_t skip_spaces(std::string_view text, std::size_t at) {
  while (at < text.size() && is_space(text[at]))
    ++at;
  return at;
}

// The word, number or sign at `at`, as a line quotes it.
std::string found(std::string_view text, std::size_t at) {
  if (at >= text.size()) return "found the end of the file";
  if (text[at] == '"') return "found a text in quotes";
  std::size_t end = at + 1;
  const auto of_word = [&](std::size_t i) { return is_letter(text[i]) || is_digit(text[i]) || text[i] == '_'; };
  if (of_word(at)) {
    while (end < text.size() && end < at + 40 && of_word(end))
      ++end;
  }
  while (end < text.size() && (static_cast<unsigned char>(text[end]) & 0xC0U) == 0x80U)
    ++end;
  return "found " + in_quotes(text.substr(at, end - at));
}

bool four_hex(std::string_view text, std::size_t at) {
  return at + 4 <= text.size() && std::all_of(text.begin() + static_cast<std::ptrdiff_t>(at),
                                              text.begin() + static_cast<std::ptrdiff_t>(at) + 4, is_hex);
}

// What is wrong inside the text in quotes that begins at `at`.
JsonComplaint complain_of_string(std::string_view text, std::size_t at) {
  for (std::size_t i = at + 1; i < text.size(); ++i) {
    const char c = text[i];
    if (c == '"') break;
    if (c == '\n' || c == '\r') return {i, "a text in quotes is not closed on its line; close it with '\"'"};
    if (static_cast<unsigned char>(c) < 0x20) {
      return {i, "a text in quotes holds a control character or tab; write it as \\t or \\u00XX"};
    }
    if (c != '\\') continue;
    if (++i >= text.size()) break;
    if (text[i] == 'u' && four_hex(text, i + 1)) continue;
    if (text[i] == 'u') return {i, "\\u wants four hexadecimal digits"};
    if (std::string_view("\"\\/bfnrt").find(text[i]) == std::string_view::npos) {
      return {i, "a '\\' in a text in quotes begins no escape that JSON has; write \\\\ for a '\\'"};
    }
  }
  const std::size_t close = text.find('"', at + 1);
  if (close == std::string_view::npos) return {text.size(), "a text in quotes is not closed; close it with '\"'"};
  return {close, "a \\u escape is one half of a pair without the other"};
}

// A number by RFC 8259 section 6 that was refused is one that no double holds.
bool number_is_well_formed(std::string_view text, std::size_t at) {
  if (at < text.size() && text[at] == '-') ++at;
  const std::size_t first = at;
  while (at < text.size() && is_digit(text[at]))
    ++at;
  if (at == first || (text[first] == '0' && at > first + 1)) return false;
  const auto digits = [&] {
    const std::size_t from = at;
    while (at < text.size() && is_digit(text[at]))
      ++at;
    return at > from;
  };
  if (at < text.size() && text[at] == '.') {
    ++at;
    if (!digits()) return false;
  }
  if (at < text.size() && (text[at] == 'e' || text[at] == 'E')) {
    ++at;
    if (at < text.size() && (text[at] == '+' || text[at] == '-')) ++at;
    return digits();
  }
  return true;
}

JsonComplaint complain_of_value(std::string_view text, std::size_t at, const std::string& expected) {
  if (at < text.size() && text[at] == '"') return complain_of_string(text, at);
  if (at < text.size() && (is_digit(text[at]) || text[at] == '-')) {
    if (number_is_well_formed(text, at)) return {at, "a number is too large to be kept"};
    return {at, "a number is not written as JSON has it (such as 7, -0.5 or 1e3)"};
  }
  if (at < text.size() && text[at] == '/') return {at, "comments have no place in JSON; take it out"};
  return {at, "expected " + expected + ", " + found(text, at)};
}

JsonComplaint complain_of_key(std::string_view text, std::size_t at, const std::string& expected) {
  if (at < text.size() && text[at] == '"') return complain_of_string(text, at);
  if (at < text.size() && text[at] == '/') return {at, "comments have no place in JSON; take it out"};
  return {at, "expected " + expected + ", " + found(text, at)};
}

JsonComplaint complain_after_key(std::string_view text, std::size_t at) {
  if (at >= text.size() || text[at] != ':') return {at, "expected ':' after a key, " + found(text, at)};
  return complain_of_value(text, skip_spaces(text, at + 1), "a value");
}

JsonComplaint complain_after_value(std::string_view text, std::size_t at, bool object) {
  const char close = object ? '}' : ']';
  if (at < text.size() && text[at] == '/') return {at, "comments have no place in JSON; take it out"};
  if (at >= text.size() || text[at] != ',') {
    return {at, std::string("expected ',' or '") + close + "', " + found(text, at)};
  }
  const std::size_t next = skip_spaces(text, at + 1);
  if (next < text.size() && text[next] == close) {
    return {at, std::string("a ',' stands before '") + close + "'; take it out"};
  }
  return object ? complain_of_key(text, next, "a key in quotes") : complain_of_value(text, next, "a value");
}

}  // namespace

JsonComplaint complain_of_json(std::string_view text, std::size_t after, JsonExpects expects) {
  const std::size_t at = skip_spaces(text, after);
  switch (expects) {
    case JsonExpects::kDocument:
      if (at >= text.size()) return {at, "the file is empty"};
      return complain_of_value(text, at, "'{' or '['");
    case JsonExpects::kEnd:
      return {at, "text stands behind the end of the document, " + found(text, at) + "; take it out"};
    case JsonExpects::kKeyOrClose:
      return complain_of_key(text, at, "a key in quotes or '}'");
    case JsonExpects::kValue:
      return complain_after_key(text, at);
    case JsonExpects::kElementOrClose:
      return complain_of_value(text, at, "a value or ']'");
    case JsonExpects::kInObject:
      return complain_after_value(text, at, true);
    case JsonExpects::kInArray:
      return complain_after_value(text, at, false);
  }
  return {at, "not JSON"};
}

}  // namespace nearpit
