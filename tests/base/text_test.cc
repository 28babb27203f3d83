#include "base/text.h"

#include <gtest/gtest.h>

#include <locale.h>
#include <cwctype>

#include "support/test_random.h"

namespace nearpit {
namespace {

// The Unicode Standard, table 3-6: the bits of a code point in one to four bytes.
std::string encoded(char32_t c) {
  const auto byte = [](char32_t value) { return static_cast<char>(static_cast<unsigned char>(value)); };
  if (c < 0x80) return {byte(c)};
  if (c < 0x800) return {byte(0xC0 | c >> 6), byte(0x80 | (c & 0x3F))};
  if (c < 0x10000) return {byte(0xE0 | c >> 12), byte(0x80 | (c >> 6 & 0x3F)), byte(0x80 | (c & 0x3F))};
  return {byte(0xF0 | c >> 18), byte(0x80 | (c >> 12 & 0x3F)), byte(0x80 | (c >> 6 & 0x3F)), byte(0x80 | (c & 0x3F))};
}

// The Unicode Standard, table 3-7: well-formed byte sequences, as lowest and highest of each byte.
struct Sequence {
  std::size_t size;
  int low[4];
  int high[4];
};
constexpr Sequence kWellFormed[] = {
    {1, {0x00}, {0x7F}},
    {2, {0xC2, 0x80}, {0xDF, 0xBF}},
    {3, {0xE0, 0xA0, 0x80}, {0xE0, 0xBF, 0xBF}},
    {3, {0xE1, 0x80, 0x80}, {0xEC, 0xBF, 0xBF}},
    {3, {0xED, 0x80, 0x80}, {0xED, 0x9F, 0xBF}},
    {3, {0xEE, 0x80, 0x80}, {0xEF, 0xBF, 0xBF}},
    {4, {0xF0, 0x90, 0x80, 0x80}, {0xF0, 0xBF, 0xBF, 0xBF}},
    {4, {0xF1, 0x80, 0x80, 0x80}, {0xF3, 0xBF, 0xBF, 0xBF}},
    {4, {0xF4, 0x80, 0x80, 0x80}, {0xF4, 0x8F, 0xBF, 0xBF}},
};

bool heads(const Sequence& sequence, std::string_view text) {
  if (text.size() < sequence.size) return false;
  for (std::size_t i = 0; i < sequence.size; ++i) {
    const int byte = static_cast<unsigned char>(text[i]);
    if (byte < sequence.low[i] || byte > sequence.high[i]) return false;
  }
  return true;
}

bool well_formed_by_the_table(std::string_view text) {
  while (!text.empty()) {
    std::size_t size = 0;
    for (const Sequence& sequence : kWellFormed) {
      if (heads(sequence, text)) size = sequence.size;
    }
    if (size == 0) return false;
    text.remove_prefix(size);
  }
  return true;
}

TEST(Text, EveryCodePointIsWellFormedButSurrogates) {
  for (char32_t c = 0; c <= 0x10FFFF; ++c) {
    const bool surrogate = c >= 0xD800 && c <= 0xDFFF;
    ASSERT_EQ(is_utf8(encoded(c)), !surrogate) << std::hex << static_cast<unsigned>(c);
  }
  EXPECT_FALSE(is_utf8("\xF4\x90\x80\x80"));  // U+110000
}

TEST(Text, EverySequenceOfTwoBytes) {
  for (unsigned bytes = 0; bytes < 0x10000; ++bytes) {
    const std::string text = {static_cast<char>(bytes >> 8U), static_cast<char>(bytes & 0xFFU)};
    ASSERT_EQ(is_utf8(text), well_formed_by_the_table(text)) << std::hex << bytes;
  }
}

// Lead bytes and the bytes at the edges of the table's rows.
TEST(Text, EdgesOfLongerSequences) {
  const std::string edges =
      "\x41\x7F\x80\x8F\x90\x9F\xA0\xBF\xC0\xC1\xC2\xDF\xE0\xE1\xEC\xED\xEE\xEF\xF0\xF1\xF3\xF4\xF5\xFF";
  int good = 0;
  for (const char a : edges) {
    for (const char b : edges) {
      for (const char c : edges) {
        for (const char d : edges) {
          const std::string text = {a, b, c, d};
          ASSERT_EQ(is_utf8(text), well_formed_by_the_table(text)) << ::testing::PrintToString(text);
          good += is_utf8(text) ? 1 : 0;
        }
      }
    }
  }
  EXPECT_GT(good, 100);
}

TEST(Text, LengthCountsCodePoints) {
  EXPECT_EQ(utf8_length(""), 0U);
  EXPECT_EQ(utf8_length("pit"), 3U);
  EXPECT_EQ(utf8_length("Gr\u00E4ber"), 6U);
  EXPECT_EQ(utf8_length("\u20AC\U0001F600"), 2U);
}

TEST(Text, Names) {
  EXPECT_TRUE(is_name("flint flake", 80));
  EXPECT_TRUE(is_name("\u03B1\u03B2\u03B3", 3));
  EXPECT_FALSE(is_name("\u03B1\u03B2\u03B3", 2));
  EXPECT_FALSE(is_name("", 80));
  EXPECT_FALSE(is_name("   ", 80));
  EXPECT_FALSE(is_name("\u00A0\u3000 ", 80));
  EXPECT_FALSE(is_name("a\tb", 80));
  EXPECT_FALSE(is_name("a\nb", 80));
  EXPECT_FALSE(is_name(std::string("a\0b", 3), 80));
  EXPECT_FALSE(is_name("a\x7F", 80));
  EXPECT_FALSE(is_name("a\u0085", 80));
  EXPECT_FALSE(is_name("a\u2028z", 80));
  EXPECT_FALSE(is_name("a\xFFz", 80));
}

TEST(Text, NotesMayHoldLineFeeds) {
  EXPECT_TRUE(is_note("dark soil\nno finds", 80));
  EXPECT_FALSE(is_note("dark soil\r\nno finds", 80));
  EXPECT_FALSE(is_note("\n \n", 80));
  EXPECT_FALSE(is_note("a\nb", 2));
}

TEST(Text, FoldsLetters) {
  EXPECT_EQ(fold_case("Flint FLAKE 12 @[`{"), "flint flake 12 @[`{");
  EXPECT_EQ(fold_case("\u00C4\u00D6\u00DC \u00D7 \u00DF \u00FF"), "\u00E4\u00F6\u00FC \u00D7 \u00DF \u00FF");
  EXPECT_EQ(fold_case("\u039F\u0394\u039F\u03A3"), fold_case("\u03BF\u03B4\u03BF\u03C2"));  // both sigmas
  EXPECT_EQ(fold_case("\u0427\u0415\u0420\u0401"), "\u0447\u0435\u0440\u0451");
  EXPECT_EQ(fold_case("\u65E5\u672C \U0001F600 \u0141"), "\u65E5\u672C \U0001F600 \u0141");
  EXPECT_EQ(fold_case("A\xFF\xC3"
                      "B\xC3"),
            "a\xFF\xC3"
            "b\xC3");  // stray bytes stay
}

// Against the C library's table of small letters.
TEST(Text, FoldsAsTheLibraryDoes) {
  const locale_t library = newlocale(LC_CTYPE_MASK, "C.UTF-8", nullptr);
  ASSERT_NE(library, nullptr);
  int folded = 0;
  for (char32_t c = 0; c < 0x530; ++c) {
    const bool promised = c < 0x100 || (c >= 0x386 && c < 0x3CF && c != 0x3C2) || c >= 0x400;
    if (!promised) continue;
    const auto small = static_cast<char32_t>(towlower_l(static_cast<wint_t>(c), library));
    ASSERT_EQ(fold_case(encoded(c)), encoded(small)) << std::hex << static_cast<unsigned>(c);
    folded += small != c ? 1 : 0;
  }
  freelocale(library);
  EXPECT_GT(folded, 200);
}

TEST(Text, FoldingTwiceChangesNothing) {
  for (char32_t c = 0; c < 0x3000; ++c) {
    const std::string once = fold_case(encoded(c));
    ASSERT_EQ(fold_case(once), once) << std::hex << static_cast<unsigned>(c);
    ASSERT_TRUE(is_utf8(once));
  }
}

TEST(Text, ValuesInQuotes) {
  EXPECT_EQ(in_quotes("T7-12"), "\"T7-12\"");
  EXPECT_EQ(in_quotes(""), "\"\"");
  EXPECT_EQ(in_quotes("a\nb\tc\rd"), "\"a\\nb\\tc\\rd\"");
  EXPECT_EQ(in_quotes("\x1b[2J"), "\"\\x1b[2J\"");
  EXPECT_EQ(in_quotes("a\xFFz"), "\"a\\xffz\"");
  EXPECT_EQ(in_quotes("\u00E4\u0085"), "\"\u00E4\\xc2\\x85\"");
}

TEST(Text, LongValuesAreCut) {
  std::string sixty;
  for (int i = 0; i < 60; ++i)
    sixty += "\u00E4";
  EXPECT_EQ(in_quotes(sixty), "\"" + sixty + "\"");
  EXPECT_EQ(in_quotes(sixty + "b"), "\"" + sixty + "\u2026\"");
}

TEST(Text, QuotedBytesAreAlwaysOneLineOfUtf8) {
  TestRandom random = TestRandom::of_this_run();
  for (int i = 0; i < rounds(5000); ++i) {
    std::string bytes;
    for (int length = random.between(0, 80); length > 0; --length)
      bytes += static_cast<char>(random.between(-128, 127));
    const std::string shown = in_quotes(bytes);
    ASSERT_TRUE(is_name(shown, 300)) << ::testing::PrintToString(bytes);
  }
}

TEST(Text, Lists) {
  EXPECT_EQ(list_in_words({}), "");
  EXPECT_EQ(list_in_words({"a"}), "a");
  EXPECT_EQ(list_in_words({"a", "b"}), "a and b");
  EXPECT_EQ(list_in_words({"a", "b", "c"}, "or"), "a, b or c");
  EXPECT_EQ(join({}, ", "), "");
  EXPECT_EQ(join({"a"}, ", "), "a");
  EXPECT_EQ(join({"a", "", "c"}, "|"), "a||c");
}

TEST(Text, CountsKnowOneFromMany) {
  EXPECT_EQ(counted(0, "pit", "pits"), "0 pits");
  EXPECT_EQ(counted(1, "pit", "pits"), "1 pit");
  EXPECT_EQ(counted(2, "pit", "pits"), "2 pits");
}

TEST(Text, CharactersAndUtf8AreInverse) {
  for (const char32_t c : {U'a', U'\u00E9', U'\u20AC', U'\U0001F642'}) {
    EXPECT_EQ(utf8(c), encoded(c));
    EXPECT_EQ(characters("x" + encoded(c) + "y"), (std::u32string{U'x', c, U'y'}));
  }
  EXPECT_EQ(characters("a\xFF\xE2"
                       "b"),
            U"ab")
      << "bytes that belong to none are left out";
}

TEST(Text, CharactersAreSteppedOverWhole) {
  const std::string text = "a" + encoded(0xE9) + encoded(0x20AC) + encoded(0x1F642);
  std::vector<std::size_t> ends{0};
  while (ends.back() < text.size())
    ends.push_back(character_after(text, ends.back()));
  EXPECT_EQ(ends, (std::vector<std::size_t>{0, 1, 3, 6, 10}));
  for (std::size_t i = 1; i < ends.size(); ++i)
    EXPECT_EQ(character_before(text, ends[i]), ends[i - 1]);
  EXPECT_EQ(character_before(text, 0), 0U);
  EXPECT_EQ(character_after(text, text.size()), text.size());
}

}  // namespace
}  // namespace nearpit
