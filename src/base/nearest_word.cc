#include "base/nearest_word.h"

#include <algorithm>
#include <numeric>
#include <string>
#include <vector>

#include "base/text.h"

namespace nearpit {
namespace {

std::size_t changes_between(std::string_view from, std::string_view to) {
  std::vector<std::size_t> row(to.size() + 1);
  std::iota(row.begin(), row.end(), std::size_t{0});
  for (std::size_t i = 0; i < from.size(); ++i) {
    std::size_t above_left = row[0];
    row[0] = i + 1;
    for (std::size_t j = 0; j < to.size(); ++j) {
      const std::size_t changed = above_left + (from[i] == to[j] ? 0 : 1);
      above_left = row[j + 1];
      row[j + 1] = std::min({changed, row[j] + 1, row[j + 1] + 1});
    }
  }
  return row.back();
}

}  // namespace

std::string_view nearest_word(std::string_view written, std::span<const std::string_view> known) {
  constexpr std::size_t kLongest = 60;
  if (written.size() > kLongest) return "";
  const std::string folded = fold_case(written);
  std::size_t least = std::max<std::size_t>(2, folded.size() / 3) + 1;
  std::string_view nearest;
  for (const std::string_view word : known) {
    const bool begun = folded.size() >= 3 && (word.starts_with(folded) || folded.starts_with(word));
    const std::size_t changes = begun ? 1 : changes_between(folded, word);
    if (changes < least && changes < word.size()) {
      least = changes;
      nearest = word;
    }
  }
  return nearest;
}

}  // namespace nearpit
