#include "estimate/hansen_hurwitz.h"

#include <algorithm>
#include <cassert>

#include "estimate/compensated_sum.h"

namespace nearpit {
namespace {

double sum_of(std::span<const double> values) {
  CompensatedSum sum;
  for (const double value : values)
    sum.add(value);
  return sum.value();
}

// Two passes, the second corrected by what rounding left of sum (W - mean).
double sample_variance(std::span<const double> values) {
  const double count = static_cast<double>(values.size());
  const double mean = sum_of(values) / count;
  CompensatedSum squares;
  CompensatedSum rest;
  for (const double value : values) {
    squares.add((value - mean) * (value - mean));
    rest.add(value - mean);
  }
  return (squares.value() - rest.value() * rest.value() / count) / (count - 1);
}

StratumPart part_of(const StratumSize& stratum, std::span<const double> values, double nodes) {
  StratumPart part{.variance = 0, .drawn = stratum.drawn, .census = stratum.drawn == stratum.units};
  if (part.census) return part;
  const double units = stratum.units;
  const double weight = units / nodes;
  const double left_out = static_cast<double>(stratum.units - stratum.drawn) / units;
  part.variance = weight * weight * left_out * sample_variance(values) / stratum.drawn;
  return part;
}

}  // namespace

std::vector<double> unit_values(const SampleDesign& design, std::span<const MetNetwork> networks,
                                std::span<const double> y) {
  assert(networks.size() == y.size());
  std::vector<CompensatedSum> sums(design.drawn.size());
  for (std::size_t k = 0; k < networks.size(); ++k) {
    if (y[k] == 0) continue;
    const double share = y[k] / static_cast<double>(networks[k].units.size());
    for (const UnitRef& unit : networks[k].units) {
      const auto at = std::lower_bound(design.drawn.begin(), design.drawn.end(), unit);
      if (at != design.drawn.end() && *at == unit) sums[static_cast<std::size_t>(at - design.drawn.begin())].add(share);
    }
  }
  std::vector<double> values;
  values.reserve(sums.size());
  for (const CompensatedSum& sum : sums)
    values.push_back(sum.value());
  return values;
}

Moments hansen_hurwitz(const SampleDesign& design, std::span<const MetNetwork> networks, std::span<const double> y) {
  const std::vector<double> values = unit_values(design, networks, y);
  const double nodes = static_cast<double>(design.nodes);
  const bool estimable = !design.lone_unit();
  Moments moments;
  CompensatedSum total;
  CompensatedSum variance;
  std::span<const double> rest(values);
  for (const StratumSize& stratum : design.strata) {
    assert(stratum.drawn >= 1 && stratum.drawn <= stratum.units && rest.size() >= stratum.drawn);
    const std::span<const double> own = rest.first(stratum.drawn);
    rest = rest.subspan(stratum.drawn);
    total.add(sum_of(own) * stratum.units / stratum.drawn);
    if (!estimable) continue;
    moments.parts.push_back(part_of(stratum, own, nodes));
    variance.add(moments.parts.back().variance);
  }
  moments.mean = total.value() / nodes;
  if (estimable) moments.variance = zero_if_rounding(design, moments.mean, variance.value());
  return moments;
}

}  // namespace nearpit
