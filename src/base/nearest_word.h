// The word that somebody probably meant: 'did you mean …' in error lines.
#ifndef NEARPIT_BASE_NEAREST_WORD_H_
#define NEARPIT_BASE_NEAREST_WORD_H_

#include <span>
#include <string_view>

namespace nearpit {

// The known word with the fewest characters to add, drop or change (Levenshtein VI 1966), at most two or a third of what was written; a known word that what was
// written begins, or that begins it, counts as one change. Ignoring case; empty when none is near. The first of equally near ones.
std::string_view nearest_word(std::string_view written, std::span<const std::string_view> known);

}  // namespace nearpit

#endif  // NEARPIT_BASE_NEAREST_WORD_H_
