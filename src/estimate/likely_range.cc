#include "estimate/likely_range.h"

#include <algorithm>
#include <boost/math/distributions/students_t.hpp>
#include <cmath>
#include <limits>

namespace nearpit {
namespace {

constexpr char kSameValue[] = "every drawn unit carries the same value: the spread can't be judged";

std::optional<LikelyRange> refused(std::string reason, std::string* why) {
  *why = std::move(reason);
  return std::nullopt;
}

}  // namespace

std::optional<double> degrees_of_freedom(const std::vector<StratumPart>& parts) {
  double largest = 0;
  for (const StratumPart& part : parts)
    largest = std::max(largest, part.variance);
  if (largest <= 0) return std::nullopt;
  double sum = 0;  // parts over the largest, so that no square underflows
  double below = 0;
  for (const StratumPart& part : parts) {
    if (part.census) continue;
    const double relative = part.variance / largest;
    sum += relative;
    below += relative * relative / (part.drawn - 1);
  }
  return sum * sum / below;
}

double t_factor(double level, double nu) {
  const boost::math::students_t distribution(nu);
  return boost::math::quantile(boost::math::complement(distribution, (1 - level) / 2));
}

bool spread_is_unjudged(double mean, double variance, bool census) {
  return !census && variance >= 0 && variance <= 1e-18 * mean * mean;
}

std::optional<LikelyRange> plain_t_range(const RangeInput& input, std::string* why) {
  if (!input.variance) return refused("no spread can be given", why);
  const double variance = *input.variance;
  if (variance < 0) return refused("the variance estimate came out negative; use Hansen-Hurwitz", why);
  if (input.mean == 0) return refused("nothing found by the sample: no range of this kind can be given", why);
  if (input.census) {
    return LikelyRange{.level = input.level, .lower = input.mean, .upper = input.mean, .method = "every unit drawn"};
  }
  if (spread_is_unjudged(input.mean, variance, input.census) || !input.nu) return refused(kSameValue, why);
  const double most = input.most_per_node.value_or(std::numeric_limits<double>::infinity());
  const double reach = t_factor(input.level, *input.nu) * std::sqrt(variance);
  return LikelyRange{.level = input.level,
                     .lower = std::max(std::min(input.mean - reach, most), input.found_per_node),
                     .upper = std::max(std::min(input.mean + reach, most), input.found_per_node),
                     .method = "plain t"};
}

}  // namespace nearpit
