// A line of text being typed, from keys of the glass or of a keyboard alike: pure editing, whole characters of UTF-8 at a time.
#ifndef NEARPIT_UI_WIDGETS_TEXT_LINE_H_
#define NEARPIT_UI_WIDGETS_TEXT_LINE_H_

#include <cstddef>
#include <string>

#include "widgets/input_queue.h"

namespace nearpit::ui {

struct TextLine {
  std::string text;       // well-formed UTF-8
  std::size_t caret = 0;  // a byte between two characters, 0 .. text.size()
};

// Puts the character at the caret; control characters, what is no character, and what would make more than `most` code points is not taken.
// Whether anything changed, in both.
bool type_character(TextLine* line, char32_t character, std::size_t most);
// Backspace, Delete, Left, Right, Home, End; other keys do nothing.
bool edit_with(TextLine* line, Key key);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_TEXT_LINE_H_
