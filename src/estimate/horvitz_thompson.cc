#include "estimate/horvitz_thompson.h"

#include <algorithm>
#include <array>
#include <cassert>
#include <cmath>
#include <limits>
#include <map>
#include <unordered_map>
#include <vector>

#include "estimate/compensated_sum.h"

namespace nearpit {
namespace {

constexpr double kNever = -std::numeric_limits<double>::infinity();

double log_step(const StratumSize& stratum, std::uint32_t t) {
  return std::log1p(-static_cast<double>(stratum.drawn) / static_cast<double>(stratum.units - t));
}

// ln of the chance that the draw misses all of x units of a stratum: -infinity when it can't.
double log_missed(const StratumSize& stratum, std::uint32_t x) {
  if (x > stratum.units - stratum.drawn) return kNever;
  CompensatedSum sum;
  for (std::uint32_t t = 0; t < x; ++t)
    sum.add(log_step(stratum, t));
  return sum.value();
}

// R_h = ln q_jk - ln q_j - ln q_k in one stratum, term by term, so that no product of q cancels. Both q_j and q_k are above 0;
// -infinity when only the union can't be missed.
double log_joint_ratio(const StratumSize& stratum, std::uint32_t xj, std::uint32_t xk, std::uint32_t both) {
  if (xj < xk) std::swap(xj, xk);
  const std::uint32_t apart = xk - both;
  if (xj + apart > stratum.units - stratum.drawn) return kNever;
  const double product = static_cast<double>(xj) * stratum.drawn;
  CompensatedSum sum;
  for (std::uint32_t t = 0; t < apart; ++t) {
    const double missed = stratum.units - stratum.drawn - t;
    const double left = stratum.units - t - xj;
    sum.add(std::log1p(-product / (missed * left)));
  }
  for (std::uint32_t t = apart; t < xk; ++t)
    sum.add(-log_step(stratum, t));
  return sum.value();
}

// alpha_jk - alpha_j alpha_k = q_j q_k (exp(R) - 1), R the sum of R_h; neither network is surely met.
double excess(double log_qj, double log_qk, double ratio) {
  const double both = log_qj + log_qk;
  if (ratio > 1) return std::exp(both + ratio) - std::exp(both);  // expm1 alone could overflow; nothing cancels here
  return std::exp(both) * std::expm1(ratio);
}

// How many units of each stratum a network lies in; strata ascending, only those that it lies in.
struct SizeIn {
  std::uint16_t stratum = 0;
  std::uint32_t units = 0;
  friend auto operator<=>(const SizeIn&, const SizeIn&) = default;
};
using Sizes = std::vector<SizeIn>;

Sizes sizes_of(const std::vector<UnitRef>& units) {
  Sizes sizes;
  for (const UnitRef& unit : units) {
    if (sizes.empty() || sizes.back().stratum != unit.stratum) sizes.push_back({unit.stratum, 0});
    ++sizes.back().units;
  }
  return sizes;
}

double log_missed(const SampleDesign& design, const Sizes& sizes) {
  CompensatedSum sum;
  for (const SizeIn& size : sizes) {
    const double part = log_missed(design.strata[size.stratum], size.units);
    if (part == kNever) return kNever;
    sum.add(part);
  }
  return sum.value();
}

// One pair's part of N^2 v: y_j y_k delta_jk / (alpha_j alpha_k alpha_jk).
double pair_term(double yy, double alpha_j, double alpha_k, double delta) {
  return yy / (alpha_j * alpha_k) * (delta / (alpha_j * alpha_k + delta));
}

// Networks of one-node units with equal sizes by stratum: equal alpha, and one joint chance for every pair of them.
struct SizeGroup {
  double log_q = 0;
  double alpha = 1;
  CompensatedSum sum;      // of y
  CompensatedSum squares;  // of y^2
  CompensatedSum cross;    // of y_j y_k, j < k: exactly 0 for a group of one
};

double ratio_apart(const SampleDesign& design, const Sizes& j, const Sizes& k) {
  CompensatedSum sum;
  for (auto a = j.begin(), b = k.begin(); a != j.end() && b != k.end();) {
    if (a->stratum != b->stratum) {
      ++(a->stratum < b->stratum ? a : b);
      continue;
    }
    const double part = log_joint_ratio(design.strata[a->stratum], a->units, b->units, 0);
    if (part == kNever) return kNever;
    sum.add(part);
    ++a;
    ++b;
  }
  return sum.value();
}

// N^2 v.
double scaled_variance_of_pits(const SampleDesign& design, std::span<const MetNetwork> networks,
                               std::span<const double> y) {
  std::map<Sizes, SizeGroup> groups;
  for (std::size_t k = 0; k < networks.size(); ++k) {
    if (y[k] == 0) continue;
    SizeGroup& group = groups[sizes_of(networks[k].units)];
    group.cross.add(group.sum.value() * y[k]);
    group.sum.add(y[k]);
    group.squares.add(y[k] * y[k]);
  }
  CompensatedSum total;
  for (auto a = groups.begin(); a != groups.end(); ++a) {
    SizeGroup& j = a->second;
    j.log_q = log_missed(design, a->first);
    j.alpha = -std::expm1(j.log_q);
    total.add(j.squares.value() * std::exp(j.log_q) / (j.alpha * j.alpha));
    if (j.log_q == kNever) continue;  // surely met: independent of every other
    for (auto b = groups.begin(); b != a; ++b) {
      const SizeGroup& k = b->second;
      if (k.log_q == kNever) continue;
      const double delta = excess(j.log_q, k.log_q, ratio_apart(design, a->first, b->first));
      total.add(2 * pair_term(j.sum.value() * k.sum.value(), j.alpha, k.alpha, delta));
    }
    if (j.cross.value() == 0) continue;
    const double delta = excess(j.log_q, j.log_q, ratio_apart(design, a->first, a->first));
    total.add(2 * pair_term(j.cross.value(), j.alpha, j.alpha, delta));
  }
  return total.value();
}

// Networks that meet the same primary units, as one.
struct UnitSet {
  const std::vector<UnitRef>* units = nullptr;
  double y = 0;
  Sizes sizes;
  double log_q = 0;
  double alpha = 1;
};

std::vector<UnitSet> unit_sets(const SampleDesign& design, std::span<const MetNetwork> networks,
                               std::span<const double> y) {
  const auto by_units = [](const std::vector<UnitRef>* a, const std::vector<UnitRef>* b) { return *a < *b; };
  std::map<const std::vector<UnitRef>*, CompensatedSum, decltype(by_units)> totals(by_units);
  for (std::size_t k = 0; k < networks.size(); ++k) {
    if (y[k] != 0) totals[&networks[k].units].add(y[k]);
  }
  std::vector<UnitSet> sets;
  sets.reserve(totals.size());
  for (const auto& [units, total] : totals) {
    UnitSet set{.units = units, .y = total.value(), .sizes = sizes_of(*units), .log_q = 0, .alpha = 1};
    set.log_q = log_missed(design, set.sizes);
    set.alpha = -std::expm1(set.log_q);
    sets.push_back(std::move(set));
  }
  return sets;
}

// R_h by (stratum, x_j, x_k, x_jk), each worked out once.
class JointRatios {
 public:
  explicit JointRatios(const SampleDesign& design) : design_(&design) {}

  double of(const UnitSet& j, const UnitSet& k) {
    CompensatedSum sum;
    auto in_j = j.units->begin();
    auto in_k = k.units->begin();
    for (auto a = j.sizes.begin(), b = k.sizes.begin(); a != j.sizes.end() && b != k.sizes.end();) {
      if (a->stratum < b->stratum) {
        in_j += (a++)->units;
      } else if (b->stratum < a->stratum) {
        in_k += (b++)->units;
      } else {
        const std::uint32_t both = common(in_j, in_j + a->units, in_k, in_k + b->units);
        const double part = in_stratum(a->stratum, a->units, b->units, both);
        if (part == kNever) return kNever;
        sum.add(part);
        in_j += (a++)->units;
        in_k += (b++)->units;
      }
    }
    return sum.value();
  }

 private:
  using Key = std::array<std::uint32_t, 4>;
  struct KeyHash {
    std::size_t operator()(const Key& key) const {
      std::uint64_t hash = 0;
      for (const std::uint32_t part : key)
        hash = (hash ^ part) * 0x9E3779B97F4A7C15u;
      return static_cast<std::size_t>(hash ^ (hash >> 32));
    }
  };
  using At = std::vector<UnitRef>::const_iterator;

  static std::uint32_t common(At j, At j_end, At k, At k_end) {
    std::uint32_t both = 0;
    while (j != j_end && k != k_end) {
      const bool equal = j->unit == k->unit;
      const bool j_first = j->unit < k->unit;
      both += equal ? 1 : 0;
      if (j_first || equal) ++j;
      if (!j_first) ++k;
    }
    return both;
  }

  double in_stratum(std::uint16_t stratum, std::uint32_t xj, std::uint32_t xk, std::uint32_t both) {
    const Key key{stratum, std::max(xj, xk), std::min(xj, xk), both};
    const auto [at, fresh] = known_.try_emplace(key, 0.0);
    if (fresh) at->second = log_joint_ratio(design_->strata[stratum], xj, xk, both);
    return at->second;
  }

  const SampleDesign* design_;
  std::unordered_map<Key, double, KeyHash> known_;
};

double scaled_variance_of_units(const SampleDesign& design, std::span<const MetNetwork> networks,
                                std::span<const double> y) {
  const std::vector<UnitSet> sets = unit_sets(design, networks, y);
  JointRatios ratios(design);
  CompensatedSum total;
  for (auto j = sets.begin(); j != sets.end(); ++j) {
    total.add(j->y * j->y * std::exp(j->log_q) / (j->alpha * j->alpha));
    if (j->log_q == kNever) continue;  // surely met: independent of every other
    for (auto k = sets.begin(); k != j; ++k) {
      if (k->log_q == kNever) continue;
      const double ratio = ratios.of(*j, *k);
      if (ratio == 0) continue;  // no stratum in common
      total.add(2 * pair_term(j->y * k->y, j->alpha, k->alpha, excess(j->log_q, k->log_q, ratio)));
    }
  }
  return total.value();
}

}  // namespace

double inclusion_chance(const SampleDesign& design, const MetNetwork& network) {
  return -std::expm1(log_missed(design, sizes_of(network.units)));
}

double joint_excess(std::uint32_t N, std::uint32_t n, std::uint32_t xj, std::uint32_t xk, std::uint32_t both) {
  assert(n <= N && both <= std::min(xj, xk) && xj + (xk - both) <= N);
  const StratumSize stratum{N, n};
  const double log_qj = log_missed(stratum, xj);
  const double log_qk = log_missed(stratum, xk);
  if (log_qj == kNever || log_qk == kNever) return 0;
  return excess(log_qj, log_qk, log_joint_ratio(stratum, xj, xk, both));
}

double horvitz_thompson_mean(const SampleDesign& design, std::span<const MetNetwork> networks,
                             std::span<const double> y) {
  assert(networks.size() == y.size());
  std::map<Sizes, double> chances;
  CompensatedSum total;
  for (std::size_t k = 0; k < networks.size(); ++k) {
    if (y[k] == 0) continue;
    const auto [at, fresh] = chances.try_emplace(sizes_of(networks[k].units), 0.0);
    if (fresh) at->second = inclusion_chance(design, networks[k]);
    total.add(y[k] / at->second);
  }
  return total.value() / static_cast<double>(design.nodes);
}

Moments horvitz_thompson(const SampleDesign& design, std::span<const MetNetwork> networks, std::span<const double> y) {
  Moments moments;
  moments.mean = horvitz_thompson_mean(design, networks, y);
  if (design.lone_unit()) return moments;
  const double scaled = design.one_node_units ? scaled_variance_of_pits(design, networks, y)
                                              : scaled_variance_of_units(design, networks, y);
  const double nodes = static_cast<double>(design.nodes);
  moments.variance = zero_if_rounding(design, moments.mean, scaled / (nodes * nodes));
  return moments;
}

}  // namespace nearpit
