#include "widgets/text_line.h"

#include <gtest/gtest.h>

#include <vector>

#include "base/text.h"
#include "support/test_random.h"

namespace nearpit::ui {
namespace {

TextLine typed(const std::u32string& text, std::size_t most = 100) {
  TextLine line;
  for (const char32_t character : text)
    type_character(&line, character, most);
  return line;
}

TEST(TextLine, TypesCharactersOfOneToFourBytes) {
  EXPECT_EQ(typed(U"a\u00E9\u571F\U0001F3FA").text, "a\xC3\xA9\xE5\x9C\x9F\xF0\x9F\x8F\xBA");
}

TEST(TextLine, TakesNoControlCharactersAndWhatIsNoCharacter) {
  for (const char32_t none : {U'\0', U'\n', U'\t', char32_t{0x1B}, char32_t{0x7F}, char32_t{0x85}, char32_t{0xD800},
                              char32_t{0xDFFF}, char32_t{0x110000}}) {
    TextLine line;
    EXPECT_FALSE(type_character(&line, none, 10)) << static_cast<unsigned>(none);
    EXPECT_EQ(line.text, "");
  }
}

TEST(TextLine, StopsAtItsMostCodePoints) {
  TextLine line = typed(U"\u571F\u571F\u571F\u571F", 3);
  EXPECT_EQ(utf8_length(line.text), 3U);
  EXPECT_FALSE(type_character(&line, U'a', 3));
  EXPECT_TRUE(edit_with(&line, Key::kBackspace));
  EXPECT_TRUE(type_character(&line, U'a', 3));
}

TEST(TextLine, CaretStopsAtBothEnds) {
  TextLine line = typed(U"\u00E9");
  EXPECT_FALSE(edit_with(&line, Key::kRight));
  EXPECT_FALSE(edit_with(&line, Key::kDelete));
  EXPECT_TRUE(edit_with(&line, Key::kLeft));
  EXPECT_EQ(line.caret, 0U);
  EXPECT_FALSE(edit_with(&line, Key::kLeft));
  EXPECT_FALSE(edit_with(&line, Key::kBackspace));
  EXPECT_EQ(line.text, "\xC3\xA9");
}

TEST(TextLine, OtherKeysDoNothing) {
  TextLine line = typed(U"ab");
  for (const Key key :
       {Key::kTab, Key::kBackTab, Key::kEnter, Key::kEscape, Key::kUp, Key::kDown, Key::kPageUp, Key::kPageDown})
    EXPECT_FALSE(edit_with(&line, key));
  EXPECT_EQ(line.text, "ab");
  EXPECT_EQ(line.caret, 2U);
}

// The same edits on a row of whole code points.
struct NaiveLine {
  std::vector<char32_t> text;
  std::size_t caret = 0;

  void type(char32_t character, std::size_t most) {
    if (text.size() < most) text.insert(text.begin() + static_cast<long>(caret++), character);
  }
  void edit(Key key) {
    const auto at = [&](std::size_t place) { return text.begin() + static_cast<long>(place); };
    if (key == Key::kBackspace && caret > 0) text.erase(at(--caret));
    if (key == Key::kDelete && caret < text.size()) text.erase(at(caret));
    if (key == Key::kLeft && caret > 0) --caret;
    if (key == Key::kRight && caret < text.size()) ++caret;
    if (key == Key::kHome) caret = 0;
    if (key == Key::kEnd) caret = text.size();
  }
};

// How many code points stand in so many bytes.
std::size_t code_points(const std::string& text, std::size_t bytes) { return utf8_length(text.substr(0, bytes)); }

TEST(TextLine, RandomEditsAreThoseOfANaiveLine) {
  TestRandom random = TestRandom::of_this_run();
  const std::vector<char32_t> characters = {U'a', U' ', U'\u00E9', U'\u0416', U'\u1EA5', U'\u571F', U'\U0001F3FA'};
  const std::vector<Key> keys = {Key::kBackspace, Key::kDelete, Key::kLeft, Key::kRight, Key::kHome, Key::kEnd};
  for (int round = 0; round < rounds(100); ++round) {
    TextLine line;
    NaiveLine naive;
    const auto most = static_cast<std::size_t>(random.between(1, 20));
    for (int i = 0; i < 80; ++i) {
      if (random.chance(0.55)) {
        const char32_t character = random.one_of(characters);
        type_character(&line, character, most);
        naive.type(character, most);
      } else {
        const Key key = random.one_of(keys);
        edit_with(&line, key);
        naive.edit(key);
      }
      ASSERT_TRUE(is_utf8(line.text));
      ASSERT_EQ(code_points(line.text, line.caret), naive.caret);
      ASSERT_EQ(line.text, typed({naive.text.begin(), naive.text.end()}).text);
    }
  }
}

}  // namespace
}  // namespace nearpit::ui
