#include "survey/confinement.h"

namespace nearpit {

bool Confinement::allows(const Frame& frame, const Areas& areas, NodeId from, NodeId to) const {
  switch (kind) {
    case Kind::kNone:
      return true;
    case Kind::kArea:
      return areas.of_node[static_cast<std::size_t>(from)] == areas.of_node[static_cast<std::size_t>(to)];
    case Kind::kBlock:
      break;
  }
  const Node a = frame.node(from);
  const Node b = frame.node(to);
  return (a.column - 1) / block_columns == (b.column - 1) / block_columns &&
         (a.row - 1) / block_rows == (b.row - 1) / block_rows;
}

}  // namespace nearpit
