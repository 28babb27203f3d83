// Confinement: the lattice cut into blocks, or by areas, before the draw; a positive then opens only neighbours in its own part. It caps the effort,
// and the estimators stay unbiased because the parts are fixed in advance.
#ifndef NEARPIT_SURVEY_CONFINEMENT_H_
#define NEARPIT_SURVEY_CONFINEMENT_H_

#include <cstdint>

#include "design/areas.h"
#include "lattice/frame.h"

namespace nearpit {

struct Confinement {
  enum class Kind { kNone, kBlock, kArea };
  Kind kind = Kind::kNone;
  std::int32_t block_columns = 0;  // kBlock: counted from column 1
  std::int32_t block_rows = 0;     // kBlock: counted from row 1

  bool allows(const Frame& frame, const Areas& areas, NodeId from, NodeId to) const;
};

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_CONFINEMENT_H_
