#include "estimate/sample_design.h"

#include <algorithm>
#include <cmath>

namespace nearpit {

bool SampleDesign::lone_unit() const {
  return std::any_of(strata.begin(), strata.end(),
                     [](const StratumSize& stratum) { return stratum.drawn == 1 && stratum.units > 1; });
}

bool SampleDesign::census() const {
  return std::all_of(strata.begin(), strata.end(),
                     [](const StratumSize& stratum) { return stratum.drawn == stratum.units; });
}

double zero_if_rounding(const SampleDesign& design, double mean, double variance) {
  const bool pits_of_one_area = design.one_node_units && design.strata.size() == 1;
  return pits_of_one_area && std::abs(variance) < 1e-12 * mean * mean ? 0 : variance;
}

}  // namespace nearpit
