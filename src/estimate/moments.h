// What an estimator hands back.
#ifndef NEARPIT_ESTIMATE_MOMENTS_H_
#define NEARPIT_ESTIMATE_MOMENTS_H_

#include <cstdint>
#include <optional>
#include <vector>

namespace nearpit {

struct StratumPart {
  double variance = 0;  // v_h, of the mean per node
  std::uint32_t drawn = 0;
  bool census = false;  // n_h = N_h
};

struct Moments {
  // Per node of the frame.
  double mean = 0;
  // Of the mean; design-unbiased, may be negative for Horvitz-Thompson; nothing: not estimable.
  std::optional<double> variance;
  // Hansen-Hurwitz only, by stratum; empty when the variance is not estimable.
  std::vector<StratumPart> parts;
};

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_MOMENTS_H_
