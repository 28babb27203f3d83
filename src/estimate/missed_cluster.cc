#include "estimate/missed_cluster.h"

#include <cmath>
#include <queue>
#include <vector>

#include "estimate/compensated_sum.h"

namespace nearpit {
namespace {

// A stratum while nodes are taken from it: `left` of its nodes are free, `missed` of those are not drawn.
struct Pool {
  std::uint64_t missed = 0;
  std::uint64_t left = 0;
};

// The smaller chance that one more node is missed; exact.
struct SmallerChance {
  bool operator()(const Pool& a, const Pool& b) const { return a.missed * b.left < b.missed * a.left; }
};

}  // namespace

std::uint64_t missed_cluster_pits(std::span<const StratumSize> strata, double level) {
  std::priority_queue<Pool, std::vector<Pool>, SmallerChance> pools;
  std::uint64_t pits = 0;
  for (const StratumSize& stratum : strata) {
    if (stratum.drawn == 0) {
      pits += stratum.units;
    } else if (stratum.drawn < stratum.units) {
      pools.push({stratum.units - stratum.drawn, stratum.units});
    }
  }
  const double least = std::log(1 - level) - 1e-12;  // a chance of exactly 1 - level counts, whatever rounding says
  CompensatedSum log_chance;
  while (!pools.empty()) {
    Pool best = pools.top();
    pools.pop();
    log_chance.add(-std::log1p(static_cast<double>(best.left - best.missed) / static_cast<double>(best.missed)));
    if (log_chance.value() < least) break;
    ++pits;
    --best.missed;
    --best.left;
    if (best.missed > 0) pools.push(best);
  }
  return pits;
}

}  // namespace nearpit
