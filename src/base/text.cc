#include "base/text.h"

#include <algorithm>
#include <cstdint>
#include <optional>

namespace nearpit {
namespace {

struct CodePoint {
  char32_t value = 0;
  std::size_t size = 0;  // bytes
};

// Bytes of the sequence that a lead byte opens; 0 when it opens none.
std::size_t sequence_size(unsigned char lead) {
  if (lead < 0x80) return 1;
  if (lead >= 0xC2 && lead < 0xE0) return 2;
  if (lead >= 0xE0 && lead < 0xF0) return 3;
  if (lead >= 0xF0 && lead < 0xF5) return 4;
  return 0;
}

// The code point at the head of `text`, which is not empty; nothing when ill-formed.
std::optional<CodePoint> decode(std::string_view text) {
  const auto lead = static_cast<unsigned char>(text[0]);
  const std::size_t size = sequence_size(lead);
  if (size == 0 || size > text.size()) return std::nullopt;
  if (size == 1) return CodePoint{lead, 1};
  char32_t value = lead & (0xFFU >> (size + 1));
  for (std::size_t i = 1; i < size; ++i) {
    const auto next = static_cast<unsigned char>(text[i]);
    if ((next & 0xC0U) != 0x80U) return std::nullopt;
    value = value << 6U | (next & 0x3FU);
  }
  const bool overlong = (size == 3 && value < 0x800) || (size == 4 && value < 0x10000);
  const bool surrogate = value >= 0xD800 && value <= 0xDFFF;
  if (overlong || surrogate || value > 0x10FFFF) return std::nullopt;
  return CodePoint{value, size};
}

// A byte behind the first of a sequence.
bool continues(char c) { return (static_cast<unsigned char>(c) & 0xC0U) == 0x80U; }

// Also the two separators that break a line wherever they are shown.
bool is_control(char32_t c) { return c < 0x20 || (c >= 0x7F && c <= 0x9F) || c == 0x2028 || c == 0x2029; }

// Unicode's space separators, and the line feed.
bool is_blank(char32_t c) {
  return c == ' ' || c == '\n' || c == 0xA0 || c == 0x1680 || (c >= 0x2000 && c <= 0x200A) || c == 0x202F ||
         c == 0x205F || c == 0x3000;
}

bool is_phrase(std::string_view text, std::size_t most, bool line_feeds) {
  std::size_t count = 0;
  bool blank = true;
  while (!text.empty()) {
    const std::optional<CodePoint> c = decode(text);
    if (!c || (is_control(c->value) && !(line_feeds && c->value == '\n'))) return false;
    blank = blank && is_blank(c->value);
    ++count;
    text.remove_prefix(c->size);
  }
  return !blank && count <= most;
}

bool between(char32_t c, char32_t first, char32_t last) { return c >= first && c <= last; }

char32_t fold_latin1(char32_t c) { return between(c, 0xC0, 0xDE) && c != 0xD7 ? c + 0x20 : c; }

// The simple foldings of Unicode's CaseFolding.txt, U+0370 to U+03FF without archaic letters and symbols.
char32_t fold_greek(char32_t c) {
  if (between(c, 0x391, 0x3AB) && c != 0x3A2) return c + 0x20;
  if (between(c, 0x388, 0x38A)) return c + 0x25;
  switch (c) {
    case 0x386:
      return 0x3AC;
    case 0x38C:
      return 0x3CC;
    case 0x38E:
      return 0x3CD;
    case 0x38F:
      return 0x3CE;
    case 0x3C2:
      return 0x3C3;  // final sigma
    default:
      return c;
  }
}

// The same, U+0400 to U+052F.
char32_t fold_cyrillic(char32_t c) {
  if (between(c, 0x400, 0x40F)) return c + 0x50;
  if (between(c, 0x410, 0x42F)) return c + 0x20;
  if (c == 0x4C0) return 0x4CF;
  if (between(c, 0x4C1, 0x4CE)) return c % 2 == 1 ? c + 1 : c;
  if (between(c, 0x460, 0x481) || between(c, 0x48A, 0x4BF) || between(c, 0x4D0, 0x52F)) return c % 2 == 0 ? c + 1 : c;
  return c;
}

char32_t fold(char32_t c) {
  if (c < 0x100) return fold_latin1(c);
  if (between(c, 0x370, 0x3FF)) return fold_greek(c);
  if (between(c, 0x400, 0x52F)) return fold_cyrillic(c);
  return c;
}

std::string escaped_byte(unsigned char byte) {
  constexpr std::string_view kDigits = "0123456789abcdef";
  return {'\\', 'x', kDigits[byte >> 4U], kDigits[byte & 15U]};
}

// One code point, or one byte that belongs to none, as an error line shows it.
std::string shown(std::string_view text, const std::optional<CodePoint>& c) {
  if (!c) return escaped_byte(static_cast<unsigned char>(text[0]));
  if (c->value == '\n') return "\\n";
  if (c->value == '\r') return "\\r";
  if (c->value == '\t') return "\\t";
  if (!is_control(c->value)) return std::string(text.substr(0, c->size));
  std::string all;
  for (const char byte : text.substr(0, c->size))
    all += escaped_byte(static_cast<unsigned char>(byte));
  return all;
}

}  // namespace

bool is_utf8(std::string_view text) {
  while (!text.empty()) {
    const std::optional<CodePoint> c = decode(text);
    if (!c) return false;
    text.remove_prefix(c->size);
  }
  return true;
}

std::size_t utf8_length(std::string_view text) {
  return static_cast<std::size_t>(std::count_if(text.begin(), text.end(), [](char c) { return !continues(c); }));
}

std::u32string characters(std::string_view text) {
  std::u32string all;
  while (!text.empty()) {
    const std::optional<CodePoint> c = decode(text);
    if (c) all += c->value;
    text.remove_prefix(c ? c->size : 1);
  }
  return all;
}

std::string utf8(char32_t character) {
  const auto tail = [&](int shift) { return static_cast<char>(0x80U | ((character >> shift) & 0x3FU)); };
  if (character < 0x80) return {static_cast<char>(character)};
  if (character < 0x800) return {static_cast<char>(0xC0U | character >> 6), tail(0)};
  if (character < 0x10000) return {static_cast<char>(0xE0U | character >> 12), tail(6), tail(0)};
  return {static_cast<char>(0xF0U | character >> 18), tail(12), tail(6), tail(0)};
}

std::size_t character_before(std::string_view text, std::size_t at) {
  while (at > 0 && continues(text[--at])) {
  }
  return at;
}

std::size_t character_after(std::string_view text, std::size_t at) {
  if (at < text.size()) ++at;
  while (at < text.size() && continues(text[at]))
    ++at;
  return at;
}

bool is_name(std::string_view text, std::size_t most) { return is_phrase(text, most, false); }
bool is_note(std::string_view text, std::size_t most) { return is_phrase(text, most, true); }

// Every letter that folds takes one or two bytes, and folds to one of the same size.
std::string fold_case(std::string_view text) {
  std::string folded(text);
  for (std::size_t i = 0; i < folded.size();) {
    const std::optional<CodePoint> c = decode(text.substr(i));
    if (c && c->size == 1 && between(c->value, 'A', 'Z')) {
      folded[i] = static_cast<char>(c->value + 0x20);
    } else if (c && c->size == 2) {
      folded.replace(i, 2, utf8(fold(c->value)));
    }
    i += c ? c->size : 1;
  }
  return folded;
}

std::string in_quotes(std::string_view text) {
  constexpr std::size_t kMost = 60;
  std::string out = "\"";
  for (std::size_t count = 0; !text.empty(); ++count) {
    if (count == kMost) return out + "…\"";
    const std::optional<CodePoint> c = decode(text);
    out += shown(text, c);
    text.remove_prefix(c ? c->size : 1);
  }
  return out + "\"";
}

std::string counted(std::size_t number, const std::string& one, const std::string& many) {
  return std::to_string(number) + " " + (number == 1 ? one : many);
}

std::string list_in_words(const std::vector<std::string>& words, std::string_view last_joint) {
  std::string out;
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (i > 0) out += i + 1 < words.size() ? ", " : " " + std::string(last_joint) + " ";
    out += words[i];
  }
  return out;
}

std::string join(const std::vector<std::string>& words, std::string_view between_words) {
  std::string out;
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (i > 0) out += between_words;
    out += words[i];
  }
  return out;
}

}  // namespace nearpit
