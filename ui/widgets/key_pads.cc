#include "widgets/key_pads.h"

#include <array>
#include <string>
#include <string_view>

#include "base/text.h"

namespace nearpit::ui {
namespace {

// The letters of each page, row by row; '^' stands for the key that changes small and capital letters.
constexpr std::array<std::u32string_view, 4> kLetters = {U"1234567890", U"qwertyuiop", U"asdfghjkl'", U"^zxcvbnm,."};
constexpr std::array<std::u32string_view, 4> kCapitals = {U"1234567890", U"QWERTYUIOP", U"ASDFGHJKL'", U"^ZXCVBNM,."};
constexpr std::array<std::u32string_view, 4> kSigns = {U"\u00E4\u00E5\u00E6\u00E7\u00E9\u00E8\u00F1\u00F6\u00F8\u00FC",
                                                       U"\u00C4\u00C5\u00C6\u00C7\u00C9\u00C8\u00D1\u00D6\u00D8\u00DC",
                                                       U"+-=/()%&#\u00DF", U":;?!\"\u00B0\u00D7@_*"};

bool number_key(Ui& ui, const PixelBox& box, const std::string& name, const std::string& label) {
  return ui.button(name, box, label, {.size = label.size() == 1 ? TextSize::kLarge : TextSize::kSmall});
}

}  // namespace

std::optional<char> number_pad(Ui& ui, const PixelBox& box) {
  const Ui::Part part = ui.part("digits");
  constexpr std::string_view kKeys = "123456789.0";
  std::optional<char> struck;
  for (int i = 0; i < 12; ++i) {
    const PixelBox cell = grid_cell(box, 3, 4, i % 3, i / 3, ui.mm(kGap_mm));
    const char key = i < 11 ? kKeys[static_cast<std::size_t>(i)] : '\b';
    const std::string name = key == '\b' ? "rub-out" : key == '.' ? "point" : std::string(1, key);
    if (number_key(ui, cell, name, key == '\b' ? "Rub out" : std::string(1, key))) struck = key;
  }
  for (const char key : kKeys) {
    if (ui.take(static_cast<char32_t>(key))) struck = key;
  }
  if (ui.take(U',')) struck = '.';
  if (ui.take(Key::kBackspace)) struck = '\b';
  return struck;
}

Struck letter_pad(Ui& ui, const PixelBox& box, LetterPadState* state) {
  const Ui::Part part = ui.part("letters");
  ui.typing();
  Struck struck;
  const float gap = ui.mm(kGap_mm);
  const auto& page = state->signs ? kSigns : state->capitals ? kCapitals : kLetters;
  for (int row = 0; row < 4; ++row) {
    for (int column = 0; column < 10; ++column) {
      const PixelBox cell = grid_cell(box, 10, 5, column, row, gap);
      const char32_t letter = page[static_cast<std::size_t>(row)][static_cast<std::size_t>(column)];
      if (letter == U'^') {
        if (ui.button("capitals", cell, "Aa", {.chosen = state->capitals})) state->capitals = !state->capitals;
      } else if (ui.button(utf8(letter), cell, utf8(letter), {.size = TextSize::kLarge})) {
        struck = letter;
        state->capitals = false;
      }
    }
  }
  const auto wide = [&](int first, int last) {
    PixelBox cell = grid_cell(box, 10, 5, first, 4, gap);
    cell.right = grid_cell(box, 10, 5, last, 4, gap).right;
    return cell;
  };
  if (ui.button("signs", wide(0, 1), state->signs ? "Letters" : "Signs")) state->signs = !state->signs;
  if (ui.button("space", wide(2, 5), "Space")) struck = U' ';
  if (ui.button("left", wide(6, 6), "\xE2\x86\x90")) struck = Key::kLeft;
  if (ui.button("right", wide(7, 7), "\xE2\x86\x92")) struck = Key::kRight;
  if (ui.button("rub-out", wide(8, 9), "Rub out")) struck = Key::kBackspace;
  if (const auto character = ui.take_character()) struck = *character;
  for (const Key key : {Key::kBackspace, Key::kDelete, Key::kLeft, Key::kRight, Key::kHome, Key::kEnd, Key::kEnter}) {
    if (ui.take(key)) struck = key;
  }
  return struck;
}

}  // namespace nearpit::ui
