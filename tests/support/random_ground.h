// Random lattices and boundaries for tests: simple polygons with holes, in one or two parts.
#ifndef NEARPIT_TESTS_SUPPORT_RANDOM_GROUND_H_
#define NEARPIT_TESTS_SUPPORT_RANDOM_GROUND_H_

#include "lattice/frame.h"
#include "support/test_random.h"

namespace nearpit {

inline const std::vector<LatticeKind> kAllLatticeKinds{LatticeKind::kSquare, LatticeKind::kStaggered,
                                                       LatticeKind::kTriangular};

// Any bearing (often a round one), spacing 2 to 30 m, origin up to `far_m` from zero.
Lattice random_lattice(TestRandom& random, LatticeKind kind, double far_m);

// Corners at growing angles about the centre, so it never crosses itself; holds every point within `inner_m` of the centre, and
// nothing farther than `outer_m`.
Ring random_star(TestRandom& random, const Point& centre, double inner_m, double outer_m);

// About `size_m` across, nought to two holes a part, one or two parts that do not meet.
MultiPolygon random_boundary(TestRandom& random, const Point& centre, double size_m);

// A frame of between `least` and `most` nodes, its origin the default one.
Frame random_frame(TestRandom& random, LatticeKind kind, NodeId least, NodeId most, MultiPolygon* boundary);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_RANDOM_GROUND_H_
