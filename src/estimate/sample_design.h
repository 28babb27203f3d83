// What the estimators know of a sample: how many primary units each stratum has and which were drawn, and which primary units each met
// network lies in. One engine for all designs: a simple random sample of pits is one stratum of one-node units.
#ifndef NEARPIT_ESTIMATE_SAMPLE_DESIGN_H_
#define NEARPIT_ESTIMATE_SAMPLE_DESIGN_H_

#include <compare>
#include <cstdint>
#include <vector>

namespace nearpit {

// A primary unit: unit number within a stratum.
struct UnitRef {
  std::uint16_t stratum = 0;
  std::uint32_t unit = 0;
  friend auto operator<=>(const UnitRef&, const UnitRef&) = default;
};

struct StratumSize {
  std::uint32_t units = 0;  // N_h >= 1
  std::uint32_t drawn = 0;  // n_h, 1 .. N_h
};

// A network met by the first sample: the distinct primary units that it lies in, ascending. A dug node of a drawn unit that is not positive is a network of its
// own, in the one unit that holds it. The totals y*_k of a variable stand beside, in the same order.
struct MetNetwork {
  std::vector<UnitRef> units;
};

struct SampleDesign {
  std::vector<StratumSize> strata;
  std::vector<UnitRef> drawn;   // ascending
  std::uint64_t nodes = 0;      // N of the frame
  bool one_node_units = false;  // pits: every primary unit is one node

  bool lone_unit() const;  // some stratum has n_h = 1 < N_h: no variance
  bool census() const;     // every stratum has n_h = N_h
};

// The variance, or 0 where pits of one area gave less than 1e-12 mean^2: that is rounding. Any other value, negative ones too, stays.
double zero_if_rounding(const SampleDesign& design, double mean, double variance);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_SAMPLE_DESIGN_H_
