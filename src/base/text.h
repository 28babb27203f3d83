// UTF-8 and names that people type.
#ifndef NEARPIT_BASE_TEXT_H_
#define NEARPIT_BASE_TEXT_H_

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace nearpit {

// Well-formed UTF-8 (no overlong forms, no surrogates, at most U+10FFFF).
bool is_utf8(std::string_view text);
// Number of code points of well-formed UTF-8.
std::size_t utf8_length(std::string_view text);
// The code points of text; bytes that belong to none are left out.
std::u32string characters(std::string_view text);
// One code point (no surrogate, at most U+10FFFF) as UTF-8.
std::string utf8(char32_t character);
// Well-formed UTF-8: where the character that ends at `at` begins, and where the one that begins there ends; 0 and size() at the ends.
std::size_t character_before(std::string_view text, std::size_t at);
std::size_t character_after(std::string_view text, std::size_t at);
// A name or phrase: well-formed UTF-8, no control characters (a note may hold line feeds), 1 to `most` code points,
// and not only spaces.
bool is_name(std::string_view text, std::size_t most);
bool is_note(std::string_view text, std::size_t most);
// Case folded as far as finds' names need it: ASCII, Latin-1, Greek and Cyrillic letters.
std::string fold_case(std::string_view text);
// A value as an error line shows it: between double quotes, control characters and stray bytes escaped, cut to 60 code points.
std::string in_quotes(std::string_view text);
// "1 pit", "3 pits".
std::string counted(std::size_t number, const std::string& one, const std::string& many);
// "a, b and c".
std::string list_in_words(const std::vector<std::string>& words, std::string_view last_joint = "and");
std::string join(const std::vector<std::string>& words, std::string_view between);

}  // namespace nearpit

#endif  // NEARPIT_BASE_TEXT_H_
