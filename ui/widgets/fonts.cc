#include "widgets/fonts.h"

#include <imgui.h>
#include <imgui_freetype.h>

#include <algorithm>
#include <cmath>
#include <vector>

#include "base/text.h"

namespace nearpit::ui {
namespace {

// Latin with its additions, Greek, Cyrillic, the marks of print, arrows, signs of arithmetic.
constexpr ImWchar kRanges[] = {0x0020, 0x007E, 0x00A0, 0x024F, 0x02C6, 0x02DD, 0x0370, 0x03FF, 0x0400,
                               0x052F, 0x1E00, 0x1EFF, 0x2010, 0x2027, 0x2030, 0x203A, 0x20AC, 0x20AC,
                               0x2190, 0x2193, 0x2212, 0x2212, 0x2248, 0x2248, 0x2264, 0x2265, 0};
// What labels and numbers are made of: the large size, which costs most, begins with these.
constexpr ImWchar kLargeRanges[] = {0x0020, 0x007E, 0x00A0, 0x00FF, 0x2013, 0x2013, 0x2026,
                                    0x2026, 0x2190, 0x2193, 0x2212, 0x2212, 0};
constexpr double kSmallMark_mm = 3;
constexpr double kLargeMark_mm = 7;
constexpr int kMargin_px = 2;  // free around each mark, so that none bleeds into its neighbour when it is drawn smaller
constexpr char32_t kLastOfPlane = 0xFFFF;  // the atlas holds the basic plane only

bool in_ranges(char32_t character, const ImWchar* ranges) {
  for (const ImWchar* range = ranges; *range != 0; range += 2) {
    if (character >= range[0] && character <= range[1]) return true;
  }
  return false;
}

std::vector<ImWchar> as_ranges(const std::set<char32_t>& characters) {
  std::vector<ImWchar> ranges;
  for (const char32_t character : characters) {
    ranges.push_back(static_cast<ImWchar>(character));
    ranges.push_back(static_cast<ImWchar>(character));
  }
  ranges.push_back(0);
  return ranges;
}

}  // namespace

double line_mm(TextSize size) {
  switch (size) {
    case TextSize::kSmall:
      return 3.7;
    case TextSize::kBase:
      return 4.6;
    case TextSize::kLarge:
      return 8.4;
  }
  return 0;
}

Fonts::Fonts() : sans_(sans_font()) {
  if (!sans_) complaint_ = "this machine has no scalable font; install one, such as the package fonts-dejavu-core";
}

void Fonts::build(ImFontAtlas* atlas, double px_per_mm, const Theme& theme) {
  atlas->Clear();
  atlas->FontBuilderIO = ImGuiFreeType::GetBuilderForFreeType();
  atlas->TexDesiredWidth = 0;
  std::vector<std::vector<ImWchar>> ranges;  // must outlive Build
  ranges.reserve(others_.size() + 2);
  ranges.push_back(as_ranges(own_));
  ranges.push_back(as_ranges(large_));
  for (const auto& [file, characters] : others_)
    ranges.push_back(as_ranges(characters));
  for (std::size_t i = 0; i < kTextSizes; ++i) {
    const auto px = static_cast<float>(std::round(line_mm(static_cast<TextSize>(i)) * px_per_mm));
    ImFontConfig config;
    config.SizePixels = px;
    if (!sans_) {
      fonts_[i] = atlas->AddFontDefault(&config);
      continue;
    }
    const auto add = [&](const FontFile& file, const ImWchar* range, bool merge) {
      if (*range == 0) return;
      config.MergeMode = merge;
      config.FontNo = file.face;
      ImFont* font = atlas->AddFontFromFileTTF(file.path.c_str(), px, &config, range);
      if (!merge) fonts_[i] = font;
    };
    const bool large = static_cast<TextSize>(i) == TextSize::kLarge;
    add(*sans_, large ? kLargeRanges : kRanges, false);
    add(*sans_, ranges[0].data(), true);
    if (large) add(*sans_, ranges[1].data(), true);
    std::size_t other = 2;
    for (const auto& [file, characters] : others_)
      add(file, ranges[other++].data(), true);
  }
  add_marks(atlas, px_per_mm);
  atlas->Build();
  paint_marks(atlas, theme);
}

void Fonts::add_marks(ImFontAtlas* atlas, double px_per_mm) {
  small_px_ = static_cast<float>(kSmallMark_mm * px_per_mm);
  for (std::size_t detail = 0; detail < rects_.size(); ++detail) {
    const int size = static_cast<int>(std::ceil((detail == 0 ? kSmallMark_mm : kLargeMark_mm) * px_per_mm));
    for (std::size_t shape = 0; shape < kMarkShapes; ++shape)
      rects_[detail][shape] = atlas->AddCustomRectRegular(size + 2 * kMargin_px, size + 2 * kMargin_px);
  }
}

void Fonts::paint_marks(ImFontAtlas* atlas, const Theme& theme) {
  unsigned char* pixels = nullptr;
  int width = 0;
  int height = 0;
  atlas->GetTexDataAsRGBA32(&pixels, &width, &height);
  for (std::size_t detail = 0; detail < rects_.size(); ++detail) {
    for (std::size_t shape = 0; shape < kMarkShapes; ++shape) {
      const ImFontAtlasCustomRect* rect = atlas->GetCustomRectByIndex(rects_[detail][shape]);
      const int size = rect->Width - 2 * kMargin_px;
      const int left = rect->X + kMargin_px;
      const int top = rect->Y + kMargin_px;
      const std::vector<Colour> mark = paint_mark(static_cast<MarkShape>(shape), size, theme);
      for (int row = 0; row < size; ++row) {
        unsigned char* out = pixels + 4 * ((top + row) * width + left);
        for (int column = 0; column < size; ++column, out += 4) {
          const Colour& colour =
              mark[static_cast<std::size_t>(row) * static_cast<std::size_t>(size) + static_cast<std::size_t>(column)];
          out[0] = colour.red, out[1] = colour.green, out[2] = colour.blue, out[3] = colour.alpha;
        }
      }
      marks_[detail][shape] = {static_cast<float>(left) / static_cast<float>(width),
                               static_cast<float>(top) / static_cast<float>(height),
                               static_cast<float>(left + size) / static_cast<float>(width),
                               static_cast<float>(top + size) / static_cast<float>(height)};
    }
  }
}

const MarkImage& Fonts::mark(MarkShape shape, float size_px) const {
  return marks_[size_px > small_px_ * 1.2F ? 1 : 0][static_cast<std::size_t>(shape)];
}

bool Fonts::want(std::string_view text, TextSize size) {
  bool found = false;
  for (const char32_t character : characters(text)) {
    if (character < 0x80 || character > kLastOfPlane) continue;
    if (in_ranges(character, kRanges)) {
      const bool lacks = size == TextSize::kLarge && sans_ && !in_ranges(character, kLargeRanges);
      found = (lacks && large_.insert(character).second) || found;
      continue;
    }
    if (!sans_ || !known_.insert(character).second) continue;
    const std::optional<FontFile> file = font_with(character);
    if (!file) continue;
    (*file == *sans_ ? own_ : others_[*file]).insert(character);
    found = true;
  }
  return found;
}

}  // namespace nearpit::ui
