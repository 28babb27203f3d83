// The letters in the sizes that the window uses, and the marks of pits, all in one texture.
#ifndef NEARPIT_UI_WIDGETS_FONTS_H_
#define NEARPIT_UI_WIDGETS_FONTS_H_

#include <array>
#include <map>
#include <optional>
#include <set>
#include <string>
#include <string_view>

#include "theme.h"
#include "widgets/font_files.h"
#include "widgets/mark_shapes.h"

struct ImFont;
struct ImFontAtlas;

namespace nearpit::ui {

enum class TextSize { kSmall, kBase, kLarge };
constexpr std::size_t kTextSizes = 3;
// Height of a line, millimetres on the glass.
double line_mm(TextSize size);

// Where a mark lies in the texture.
struct MarkImage {
  float u0 = 0, v0 = 0, u1 = 0, v1 = 0;
};

class Fonts {
 public:
  Fonts();

  // Makes the texture: letters for this many pixels a millimetre, marks in the theme's colours.
  void build(ImFontAtlas* atlas, double px_per_mm, const Theme& theme);

  ImFont* of(TextSize size) const { return fonts_[static_cast<std::size_t>(size)]; }
  // Two drawings of each: one for marks of about 3 mm and less, one for larger ones.
  const MarkImage& mark(MarkShape shape, float size_px) const;

  // Looks for letters that are not in the texture yet; whether there are new ones, so that build() should run before the next frame.
  // Letters that no font of this machine has are asked for once only.
  bool want(std::string_view text, TextSize size);
  // Nothing when this machine has a scalable font; else what to do.
  const std::string& complaint() const { return complaint_; }

 private:
  void add_marks(ImFontAtlas* atlas, double px_per_mm);
  void paint_marks(ImFontAtlas* atlas, const Theme& theme);

  std::optional<FontFile> sans_;
  std::string complaint_;
  std::map<FontFile, std::set<char32_t>> others_;  // faces for letters that the first lacks
  std::set<char32_t> own_;                         // letters of the first face beside its ranges
  std::set<char32_t> large_;                       // letters within its ranges that the large size was asked for
  std::set<char32_t> known_;                       // looked for already
  std::array<ImFont*, kTextSizes> fonts_{};
  std::array<std::array<int, kMarkShapes>, 2> rects_{};
  std::array<std::array<MarkImage, kMarkShapes>, 2> marks_{};
  float small_px_ = 0;
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_FONTS_H_
