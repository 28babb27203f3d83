// The order in which stops are walked. Points only: route knows no pit, no crew and no find.
#ifndef NEARPIT_ROUTE_WALKING_ORDER_H_
#define NEARPIT_ROUTE_WALKING_ORDER_H_

#include <cstddef>
#include <vector>

#include "lattice/lattice.h"

namespace nearpit {

// Up one line and down the next. `lines` are the rows that the first sample holds (ascending, fixed for the survey); a stop in one of them, or in a row within
// one spacing of one, is walked with that line (the nearer one; of two equally near the lower), when passing. Other rows are lines of their own.
// The order of two stops depends on nothing but the two, so a new stop is inserted and the rest keeps its order.
// Returns indices into `stops`.
std::vector<std::size_t> transect_order(const Lattice& lattice, const std::vector<std::int32_t>& lines,
                                        const std::vector<Node>& stops);

// Always to the nearest stop not yet walked, from `start`; then exchanges of two legs that shorten the walk among the first 50
// stops. Cost n log n, and 50 squared a sweep.
std::vector<std::size_t> nearest_order(const Point& start, const std::vector<Point>& stops);

// Where a new stop goes into an order already walked from `start`: the place that lengthens the walk least, never before the stop being walked to
// (position 0). The rest keeps its order. Returns a position 1 .. order.size(), or 0 when the order is empty.
std::size_t place_to_insert(const std::vector<Point>& order, const Point& stop);

}  // namespace nearpit

#endif  // NEARPIT_ROUTE_WALKING_ORDER_H_
