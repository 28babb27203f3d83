#include "lattice/neighbour_rule.h"

namespace nearpit {
namespace {

// {row step, column step}, in row then column order.
constexpr std::array<Node, 8> kRing{{{-1, -1}, {-1, 0}, {-1, 1}, {0, -1}, {0, 1}, {1, -1}, {1, 0}, {1, 1}}};
constexpr std::array<Node, 4> kArms{{{-1, 0}, {0, -1}, {0, 1}, {1, 0}}};
constexpr std::array<Node, 8> kLongArms{{{-2, 0}, {-1, 0}, {0, -2}, {0, -1}, {0, 1}, {0, 2}, {1, 0}, {2, 0}}};
constexpr std::array<Node, 6> kSixOfOddRow{{{-1, -1}, {-1, 0}, {0, -1}, {0, 1}, {1, -1}, {1, 0}}};
constexpr std::array<Node, 6> kSixOfEvenRow{{{-1, 0}, {-1, 1}, {0, -1}, {0, 1}, {1, 0}, {1, 1}}};

}  // namespace

std::span<const Node> neighbour_offsets(NeighbourRule rule, std::int32_t row) {
  switch (rule) {
    case NeighbourRule::kEight:
      return kRing;
    case NeighbourRule::kFour:
      return kArms;
    case NeighbourRule::kFourByTwo:
      return kLongArms;
    case NeighbourRule::kSix:
      break;
  }
  return row % 2 == 0 ? std::span<const Node>(kSixOfEvenRow) : std::span<const Node>(kSixOfOddRow);
}

std::size_t neighbour_count(NeighbourRule rule) { return neighbour_offsets(rule, 1).size(); }

bool rule_fits(NeighbourRule rule, LatticeKind kind) {
  return (rule == NeighbourRule::kSix) == (kind != LatticeKind::kSquare);
}

NeighbourRule default_rule(LatticeKind kind) {
  return kind == LatticeKind::kSquare ? NeighbourRule::kEight : NeighbourRule::kSix;
}

std::string_view neighbour_rule_name(NeighbourRule rule) {
  switch (rule) {
    case NeighbourRule::kEight:
      return "8";
    case NeighbourRule::kFour:
      return "4";
    case NeighbourRule::kFourByTwo:
      return "4x2";
    case NeighbourRule::kSix:
      break;
  }
  return "6";
}

}  // namespace nearpit
