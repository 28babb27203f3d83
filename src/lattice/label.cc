#include "lattice/label.h"

#include <cmath>

#include "base/numbers.h"

namespace nearpit {
namespace {

constexpr double kLabelTolerance_m = 0.006;

char lower(char letter) { return letter >= 'A' && letter <= 'Z' ? static_cast<char>(letter - 'A' + 'a') : letter; }

std::optional<std::int32_t> whole(std::string_view text) {
  const auto number = parse_int(text);
  if (!number || *number < -1'000'000'000 || *number > 1'000'000'000) return std::nullopt;
  return static_cast<std::int32_t>(*number);
}

// "T7-12" -> (7, 12).
std::optional<Node> transect_node(std::string_view text) {
  if (text.size() < 4 || lower(text[0]) != 't') return std::nullopt;
  const std::size_t dash = text.find('-', 2);
  if (dash == std::string_view::npos) return std::nullopt;
  const auto row = whole(text.substr(1, dash - 1));
  const auto column = whole(text.substr(dash + 1));
  if (!row || !column) return std::nullopt;
  return Node{*row, *column};
}

// One half of a grid label: letter and metres.
std::optional<double> grid_part(std::string_view text, char plus, char minus) {
  if (text.size() < 2 || text.find_first_of("eE", 1) != std::string_view::npos) return std::nullopt;
  const char letter = lower(text[0]);
  const auto metres = parse_double(text.substr(1));
  if (!metres || *metres < 0 || (letter != plus && letter != minus)) return std::nullopt;
  return letter == plus ? *metres : -*metres;
}

struct GridPlace {
  double north, east;
};

std::optional<GridPlace> grid_place(std::string_view text) {
  const std::size_t second = text.find_first_of("eEwW");
  if (second == std::string_view::npos) return std::nullopt;
  std::string_view first = text.substr(0, second);
  while (!first.empty() && first.back() == ' ')
    first.remove_suffix(1);
  const auto north = grid_part(first, 'n', 's');
  const auto east = grid_part(text.substr(second), 'e', 'w');
  if (!north || !east) return std::nullopt;
  return GridPlace{*north, *east};
}

std::string grid_text(double metres, char plus, char minus) {
  const std::string digits = format_trimmed(std::abs(metres), 2);
  return std::string(1, metres < 0 && digits != "0" ? minus : plus) + digits;
}

}  // namespace

std::string transect_label(const Node& node) {
  return "T" + std::to_string(node.row) + "-" + std::to_string(node.column);
}

std::string Labels::write(const Node& node) const {
  if (kind == LabelKind::kTransect) return transect_label(node);
  const Along at = lattice.along(node);
  const Along zero = lattice.along(datum);
  return grid_text(at.v - zero.v, 'N', 'S') + " " + grid_text(at.u - zero.u, 'E', 'W');
}

std::optional<Node> Labels::read(std::string_view text) const {
  if (const auto node = transect_node(text)) return node;
  const auto place = grid_place(text);
  if (!place) return std::nullopt;
  const Along zero = lattice.along(datum);
  const Along wanted{zero.u + place->east, zero.v + place->north};
  const Node node = lattice.nearest(lattice.to_ground(wanted));
  const Along at = lattice.along(node);
  const bool near = std::abs(at.u - wanted.u) <= kLabelTolerance_m && std::abs(at.v - wanted.v) <= kLabelTolerance_m;
  return near ? std::optional<Node>(node) : std::nullopt;
}

bool Labels::looks_like_node(std::string_view text) { return transect_node(text) || grid_place(text); }

}  // namespace nearpit
