// Which pits are neighbours: fixed by the plan before the draw, and known without looking at any find.
//
// Laws, for every kind of lattice:
//   symmetric      b is a neighbour of a exactly when a is one of b
//   irreflexive    no node is its own neighbour
//   constant       every node of an unbounded lattice has neighbour_count() of them
//   translation    the same shape after moving by two rows (and by one row on square lattices)
// At the frame's edge the missing ones are simply not there; nothing wraps round.
//
// square      8: the ring around (the default); 4: the four arms; 4x2: one and two steps out on each arm, the trade's 'two
//             negatives in a row'
// staggered   6: the two in the row and the two nearest in each adjacent row
// triangular  6: the same, all at one spacing
#ifndef NEARPIT_LATTICE_NEIGHBOUR_RULE_H_
#define NEARPIT_LATTICE_NEIGHBOUR_RULE_H_

#include <array>
#include <cstddef>
#include <span>
#include <string_view>

#include "lattice/lattice.h"

namespace nearpit {

enum class NeighbourRule { kEight, kFour, kFourByTwo, kSix };

constexpr std::size_t kMostNeighbours = 8;

// The offsets from a node of this row to its neighbours, in row then column order.
std::span<const Node> neighbour_offsets(NeighbourRule rule, std::int32_t row);
std::size_t neighbour_count(NeighbourRule rule);
// kSix goes with staggered and triangular, the others with square.
bool rule_fits(NeighbourRule rule, LatticeKind kind);
NeighbourRule default_rule(LatticeKind kind);
// "8", "4", "4x2", "6".
std::string_view neighbour_rule_name(NeighbourRule rule);

}  // namespace nearpit

#endif  // NEARPIT_LATTICE_NEIGHBOUR_RULE_H_
