// The missed-cluster bound: the largest cluster of M pits, every one of which would prove positive, that the first sample misses with chance
// at least 1 - level for some placement. Pits design: q(m) = prod_h C(N_h - m_h, n_h)/C(N_h, n_h), greedy over strata (the next node goes where
// (N_h-n_h-m_h)/(N_h-m_h) is largest). Derived; golden values in the tests.
#ifndef NEARPIT_ESTIMATE_MISSED_CLUSTER_H_
#define NEARPIT_ESTIMATE_MISSED_CLUSTER_H_

#include <cstdint>
#include <span>

#include "estimate/sample_design.h"

namespace nearpit {

// One-node units; `strata` with the drawn units less those not dug. level in (0, 1). 0 when even one pit is met more surely.
std::uint64_t missed_cluster_pits(std::span<const StratumSize> strata, double level);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_MISSED_CLUSTER_H_
