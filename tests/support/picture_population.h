// A picture as a population of the exact oracle. Neighbours and primary units are worked out here once more, by distance on the lattice and by
// remainders, and not asked of the product.
#ifndef NEARPIT_TESTS_SUPPORT_PICTURE_POPULATION_H_
#define NEARPIT_TESTS_SUPPORT_PICTURE_POPULATION_H_

#include "support/exact_oracle.h"
#include "support/lattice_picture.h"

namespace nearpit {

exact::Population population_of(const LatticePicture& picture);

// An oracle's sample in the picture's own numbers of units, by area and ascending.
std::vector<std::vector<UnitId>> drawn_units(const LatticePicture& picture, const exact::Population& population,
                                             const exact::Sample& sample);

// By node: the first find, the second, 1 for a positive pit.
exact::Values find_values(const LatticePicture& picture, std::size_t find);
exact::Values positive_values(const LatticePicture& picture);
exact::Values squared(const exact::Values& values);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_PICTURE_POPULATION_H_
