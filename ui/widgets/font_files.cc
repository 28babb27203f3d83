#include "widgets/font_files.h"

#include <fontconfig/fontconfig.h>

#include <memory>

namespace nearpit::ui {
namespace {

struct Free {
  void operator()(FcPattern* pattern) const { FcPatternDestroy(pattern); }
  void operator()(FcCharSet* set) const { FcCharSetDestroy(set); }
};
using Pattern = std::unique_ptr<FcPattern, Free>;
using CharSet = std::unique_ptr<FcCharSet, Free>;

const FcChar8* text(const char* name) { return reinterpret_cast<const FcChar8*>(name); }

std::optional<FontFile> file_of(FcPattern* found) {
  FcChar8* path = nullptr;
  int face = 0;
  if (found == nullptr || FcPatternGetString(found, FC_FILE, 0, &path) != FcResultMatch) return std::nullopt;
  FcPatternGetInteger(found, FC_INDEX, 0, &face);
  // The upper half of the index names an instance of a variable font, which the atlas does not know.
  return FontFile{reinterpret_cast<const char*>(path), face & 0xFFFF};
}

// The best scalable sans-serif match, for a character when `set` is given.
Pattern best_match(FcCharSet* set) {
  const Pattern wanted(FcPatternCreate());
  FcPatternAddString(wanted.get(), FC_FAMILY, text("sans-serif"));
  FcPatternAddBool(wanted.get(), FC_SCALABLE, FcTrue);
  FcPatternAddInteger(wanted.get(), FC_WEIGHT, FC_WEIGHT_REGULAR);
  if (set != nullptr) FcPatternAddCharSet(wanted.get(), FC_CHARSET, set);
  FcConfigSubstitute(nullptr, wanted.get(), FcMatchPattern);
  FcDefaultSubstitute(wanted.get());
  FcResult result = FcResultNoMatch;
  return Pattern(FcFontMatch(nullptr, wanted.get(), &result));
}

bool scalable(FcPattern* found) {
  FcBool answer = FcFalse;
  return FcPatternGetBool(found, FC_SCALABLE, 0, &answer) == FcResultMatch && answer == FcTrue;
}

bool draws(FcPattern* found, char32_t character) {
  FcCharSet* own = nullptr;
  return FcPatternGetCharSet(found, FC_CHARSET, 0, &own) == FcResultMatch && FcCharSetHasChar(own, character) == FcTrue;
}

}  // namespace

std::optional<FontFile> sans_font() {
  const Pattern found = best_match(nullptr);
  return found && scalable(found.get()) ? file_of(found.get()) : std::nullopt;
}

std::optional<FontFile> font_with(char32_t character) {
  const CharSet set(FcCharSetCreate());
  FcCharSetAddChar(set.get(), character);
  const Pattern found = best_match(set.get());
  if (!found || !scalable(found.get()) || !draws(found.get(), character)) return std::nullopt;
  return file_of(found.get());
}

}  // namespace nearpit::ui
