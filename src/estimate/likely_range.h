// Likely ranges (confidence intervals) of a mean per node.
#ifndef NEARPIT_ESTIMATE_LIKELY_RANGE_H_
#define NEARPIT_ESTIMATE_LIKELY_RANGE_H_

#include <optional>
#include <string>
#include <vector>

#include "estimate/moments.h"

namespace nearpit {

struct LikelyRange {
  double level = 0.95;
  double lower = 0;
  double upper = 0;
  std::string method;
};

// Degrees of freedom nu = v^2 / sum over sampled strata of v_h^2/(n_h - 1) (Satterthwaite FE 1946, Biometrics Bulletin 2:110-114);
// nothing when no stratum varies.
std::optional<double> degrees_of_freedom(const std::vector<StratumPart>& parts);

// Quantile of Student's t (Boost.Math): the two-sided level's factor.
double t_factor(double level, double nu);

// Every drawn unit carries the same value though not all were drawn (v <= 1e-18 mean^2): no standard error and no range can be given.
bool spread_is_unjudged(double mean, double variance, bool census);

struct RangeInput {
  double mean = 0;
  std::optional<double> variance;
  std::optional<double> nu;
  double level = 0.95;
  // Found over all dug nodes, per node of the frame: no range lies below it.
  double found_per_node = 0;
  // For 0/1: 1 less the share of nodes dug and found empty, at least found_per_node: no range lies above it.
  std::optional<double> most_per_node = {};
  bool census = false;  // every unit drawn
};
// mean +- t sqrt(v), never below what was found nor above what is possible. Nothing, with the reason in `why`, when the variance is missing
// or negative, the estimate is 0, or every drawn unit carries the same value.
std::optional<LikelyRange> plain_t_range(const RangeInput& input, std::string* why);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_LIKELY_RANGE_H_
