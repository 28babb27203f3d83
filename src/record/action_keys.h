// Every action word that a file may hold and the keys of each, in one place: the reader refuses all others, and schema/action.schema.json lists the same
// (a test compares).
#ifndef NEARPIT_RECORD_ACTION_KEYS_H_
#define NEARPIT_RECORD_ACTION_KEYS_H_

#include <span>
#include <string_view>

namespace nearpit {

std::span<const std::string_view> action_words();
// Empty for a word that is not among them.
std::span<const std::string_view> action_keys(std::string_view word);
std::span<const std::string_view> closed_polygon_keys();

}  // namespace nearpit

#endif  // NEARPIT_RECORD_ACTION_KEYS_H_
