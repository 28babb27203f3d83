#include "widgets/text_line.h"

#include "base/text.h"

namespace nearpit::ui {
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
      const std::size_t start = character_before(line->text, line->caret);
      line->text.erase(start, line->caret - start);
      line->caret = start;
      break;
    }
    case Key::kDelete:
      line->text.erase(line->caret, character_after(line->text, line->caret) - line->caret);
      break;
    case Key::kLeft:
      line->caret = character_before(line->text, line->caret);
      break;
    case Key::kRight:
      line->caret = character_after(line->text, line->caret);
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
