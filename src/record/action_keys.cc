#include "record/action_keys.h"

namespace nearpit {
namespace {

constexpr std::string_view kWords[] = {"withdraw", "belongs_to", "ask_neighbours", "close_area", "reopen_area"};
constexpr std::string_view kPitKeys[] = {"action", "by", "why", "pit"};
constexpr std::string_view kBelongsKeys[] = {"action", "by", "why", "pit", "other"};
constexpr std::string_view kCloseKeys[] = {"action", "by", "why", "area", "polygon", "rows", "reason"};
constexpr std::string_view kReopenKeys[] = {"action", "by", "why", "area"};
constexpr std::string_view kPolygonKeys[] = {"type", "coordinates"};

}  // namespace

std::span<const std::string_view> action_words() { return kWords; }

std::span<const std::string_view> action_keys(std::string_view word) {
  if (word == "withdraw" || word == "ask_neighbours") return kPitKeys;
  if (word == "belongs_to") return kBelongsKeys;
  if (word == "close_area") return kCloseKeys;
  if (word == "reopen_area") return kReopenKeys;
  return {};
}

std::span<const std::string_view> closed_polygon_keys() { return kPolygonKeys; }

}  // namespace nearpit
