#include "widgets/text_line.h"

#include "base/text.h"

namespace nearpit::ui {
namespace {

std::string utf8(char32_t character) {
  const auto tail = [&](int shift) { return static_cast<char>(0x80U | ((character >> shift) & 0x3FU)); };
  std::string bytes;
  if (character < 0x80) {
    bytes = {static_cast<char>(character)};
  } else if (character < 0x800) {
    bytes = {static_cast<char>(0xC0U | character >> 6), tail(0)};
  } else if (character < 0x10000) {
    bytes = {static_cast<char>(0xE0U | character >> 12), tail(6), tail(0)};
  } else {
    bytes = {static_cast<char>(0xF0U | character >> 18), tail(12), tail(6), tail(0)};
  }
  return bytes;
}

bool inside_character(const std::string& text, std::size_t at) {
  return at < text.size() && (static_cast<unsigned char>(text[at]) & 0xC0U) == 0x80U;
}

std::size_t before(const TextLine& line) {
  std::size_t at = line.caret;
  while (at > 0 && inside_character(line.text, --at)) {
  }
  return at;
}

std::size_t after(const TextLine& line) {
  std::size_t at = line.caret;
  if (at < line.text.size()) ++at;
  while (inside_character(line.text, at))
    ++at;
  return at;
}

}  // namespace

bool type_character(TextLine* line, char32_t character, std::size_t most) {
  const bool control = character < 0x20 || (character >= 0x7F && character < 0xA0);
  const bool none = (character >= 0xD800 && character < 0xE000) || character > 0x10FFFF;
  if (control || none || utf8_length(line->text) >= most) return false;
  const std::string bytes = utf8(character);
  line->text.insert(line->caret, bytes);
  line->caret += bytes.size();
  return true;
}

bool edit_with(TextLine* line, Key key) {
  const TextLine was = *line;
  switch (key) {
    case Key::kBackspace: {
      const std::size_t start = before(*line);
      line->text.erase(start, line->caret - start);
      line->caret = start;
      break;
    }
    case Key::kDelete:
      line->text.erase(line->caret, after(*line) - line->caret);
      break;
    case Key::kLeft:
      line->caret = before(*line);
      break;
    case Key::kRight:
      line->caret = after(*line);
      break;
    case Key::kHome:
      line->caret = 0;
      break;
    case Key::kEnd:
      line->caret = line->text.size();
      break;
    default:
      return false;
  }
  return line->text != was.text || line->caret != was.caret;
}

}  // namespace nearpit::ui
