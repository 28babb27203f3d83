// The ground that nodes stand for: each node's cell is the rectangle, one spacing along the row by one row distance, centred on it. Cells tile the
// plane (in courses like bricks where rows shift), so an outline's area is the number of nodes times cell_area_m2().
#ifndef NEARPIT_LATTICE_CELLS_H_
#define NEARPIT_LATTICE_CELLS_H_

#include <vector>

#include "lattice/lattice.h"
#include "lattice/polygon.h"

namespace nearpit {

// The union of the nodes' cells, on the ground. Distinct nodes. Cost: nodes, and runs of
// neighbours in a row times log runs for compact sets.
MultiPolygon cells_outline(const Lattice& lattice, const std::vector<Node>& nodes);

}  // namespace nearpit

#endif  // NEARPIT_LATTICE_CELLS_H_
