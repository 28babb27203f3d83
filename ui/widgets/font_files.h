// Which font files draw the window's text: fontconfig picks them, first one sans-serif face, then for each letter that it lacks a face that has it.
#ifndef NEARPIT_UI_WIDGETS_FONT_FILES_H_
#define NEARPIT_UI_WIDGETS_FONT_FILES_H_

#include <optional>
#include <string>

namespace nearpit::ui {

struct FontFile {
  std::string path;
  int face = 0;  // index in a collection
  friend auto operator<=>(const FontFile&, const FontFile&) = default;
};

// The sans-serif face of this machine; nothing when it has no scalable font at all.
std::optional<FontFile> sans_font();
// A scalable face that draws the character; nothing when there is none.
std::optional<FontFile> font_with(char32_t character);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_FONT_FILES_H_
