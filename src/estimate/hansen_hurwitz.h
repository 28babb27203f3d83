// The Hansen-Hurwitz estimator of adaptive cluster sampling: each drawn primary unit i carries
//   W_hi = sum over the networks k that it meets of y*_k / x_k,     x_k = primary units of the frame that network k lies in
//   mean = N^-1 sum_h (N_h/n_h) sum_i W_hi
//   v    = sum_h (N_h/N)^2 (1 - n_h/N_h) s_h^2 / n_h,               s_h^2 the sample variance of W_hi
// Thompson SK 1990, JASA 85:1050-1059; Thompson SK 1991, Biometrics 47:1103-1115 and Biometrika 78:389-397.
// Unbiased, and so is v. v is nothing when a stratum has n_h = 1 < N_h; a stratum with n_h = N_h adds 0. Cost: networks' units.
#ifndef NEARPIT_ESTIMATE_HANSEN_HURWITZ_H_
#define NEARPIT_ESTIMATE_HANSEN_HURWITZ_H_

#include <span>
#include <vector>

#include "estimate/moments.h"
#include "estimate/sample_design.h"

namespace nearpit {

// y[k] is network k's total y*_k, any finite number.
Moments hansen_hurwitz(const SampleDesign& design, std::span<const MetNetwork> networks, std::span<const double> y);

// W_hi of every drawn unit, in the order of design.drawn.
std::vector<double> unit_values(const SampleDesign& design, std::span<const MetNetwork> networks,
                                std::span<const double> y);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_HANSEN_HURWITZ_H_
