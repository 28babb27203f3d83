// The first sample: a simple random sample of primary units without replacement in each area, drawn from a seed and the
// same on every machine; or a listed one drawn elsewhere. What is drawn is written into the survey file, which is then the authority.
#ifndef NEARPIT_DESIGN_FIRST_SAMPLE_H_
#define NEARPIT_DESIGN_FIRST_SAMPLE_H_

#include <cstdint>
#include <vector>

#include "base/status.h"
#include "design/primary_units.h"

namespace nearpit {

struct FirstSample {
  std::vector<std::vector<UnitId>> drawn;  // by AreaId, ascending, distinct
  std::vector<bool> holds;                 // by NodeId: the node lies in a drawn unit
  NodeId nodes = 0;                        // how many do

  static FirstSample from_units(const Areas& areas, const PrimaryUnits& units, std::vector<std::vector<UnitId>> drawn);
};

// count[h] units of area h; areas in order share one stream of the seed. Error: count outside 1 .. N_h, naming the area.
Result<FirstSample> draw_first_sample(const Areas& areas, const PrimaryUnits& units,
                                      const std::vector<std::uint32_t>& count, std::uint64_t seed);

// Each listed node stands for the primary unit that holds it; two of one unit count once. Error: an area without any.
Result<FirstSample> listed_first_sample(const Areas& areas, const PrimaryUnits& units,
                                        const std::vector<NodeId>& listed);

// Warnings for the person who plans: one line each (a lone unit in an area gives no variance, one systematic start, fewer than 4 units, 5 for transects).
std::vector<std::string> first_sample_warnings(const Areas& areas, const PrimaryUnits& units,
                                               const FirstSample& sample);

}  // namespace nearpit

#endif  // NEARPIT_DESIGN_FIRST_SAMPLE_H_
