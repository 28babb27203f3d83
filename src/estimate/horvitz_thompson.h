// The Horvitz-Thompson estimator of adaptive cluster sampling over distinct met networks:
//   q_k = prod_h C(N_h - x_hk, n_h) / C(N_h, n_h),  alpha_k = 1 - q_k;  q_jk with x_hj + x_hk - x_hjk;  alpha_jk = 1 - q_j - q_k + q_jk
//   mean = N^-1 sum_k y*_k / alpha_k
//   v    = N^-2 sum_jk (y*_j y*_k / alpha_jk) (alpha_jk / (alpha_j alpha_k) - 1),   alpha_kk = alpha_k
// Thompson SK 1990, JASA 85:1050-1059; Thompson SK 1991, Biometrics 47:1103-1115; Thompson SK & Seber GAF 1996, Adaptive Sampling.
// Computed in the digit-safe form (log1p, expm1), so that no product of q cancels; networks that meet the same set of primary units
// are one (exact), with one-node units networks of equal size by stratum are grouped. v may be negative and is then kept; it is nothing when a stratum
// has n_h = 1 < N_h. Cost: networks, plus the square of distinct size vectors (one-node units) or distinct sets of units (others).
#ifndef NEARPIT_ESTIMATE_HORVITZ_THOMPSON_H_
#define NEARPIT_ESTIMATE_HORVITZ_THOMPSON_H_

#include <cstdint>
#include <span>

#include "estimate/moments.h"
#include "estimate/sample_design.h"

namespace nearpit {

Moments horvitz_thompson(const SampleDesign& design, std::span<const MetNetwork> networks, std::span<const double> y);

// The mean alone. Cost: networks.
double horvitz_thompson_mean(const SampleDesign& design, std::span<const MetNetwork> networks,
                             std::span<const double> y);

// alpha_k of one network, in (0, 1].
double inclusion_chance(const SampleDesign& design, const MetNetwork& network);

// alpha_jk - alpha_j alpha_k for one stratum of N units, n drawn, networks in xj and xk units of which `both` are common. Digit-safe.
double joint_excess(std::uint32_t N, std::uint32_t n, std::uint32_t xj, std::uint32_t xk, std::uint32_t both);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_HORVITZ_THOMPSON_H_
