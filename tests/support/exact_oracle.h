// Adaptive cluster sampling in exact rational numbers, straight from the textbook formulas with binomial coefficients, and every sample
// of a small population one after another. Includes nothing of src: a population is nodes 0, 1, 2 ... with their neighbours and units.
//
// Thompson SK 1990, JASA 85:1050-1059; Thompson SK 1991, Biometrika 78:389-397; Thompson SK 1991, Biometrics 47:1103-1115 (formulas from
// memory; the enumerations prove them unbiased).
#ifndef NEARPIT_TESTS_SUPPORT_EXACT_ORACLE_H_
#define NEARPIT_TESTS_SUPPORT_EXACT_ORACLE_H_

#include <boost/multiprecision/cpp_int.hpp>
#include <cstddef>
#include <functional>
#include <optional>
#include <vector>

namespace nearpit::exact {

using Rational = boost::multiprecision::cpp_rational;
using Nodes = std::vector<std::size_t>;
using Values = std::vector<Rational>;  // by node

struct Population {
  std::vector<std::vector<Nodes>> units;  // by stratum, by unit: the unit's nodes; every node is in exactly one
  std::vector<Nodes> neighbours;          // by node; symmetric; where networks are confined only those of the same part
  std::vector<bool> positive;             // by node
};

// Numbers of the drawn units, by stratum.
using Sample = std::vector<Nodes>;

struct Figure {
  Rational mean;
  std::optional<Rational> variance;  // nothing when a stratum of several units has one drawn
};

// 0 when more are taken than there are.
Rational binomial(std::size_t of, std::size_t taken);

class Oracle {
 public:
  explicit Oracle(Population population);

  std::size_t nodes() const { return population_.positive.size(); }
  const std::vector<Nodes>& networks() const { return networks_; }
  const Population& population() const { return population_; }

  Figure hansen_hurwitz(const Sample& sample, const Values& y) const;
  Figure horvitz_thompson(const Sample& sample, const Values& y) const;
  Figure first_sample(const Sample& sample, const Values& y) const;

  // Every sample of count[h] units of each stratum h, all equally likely.
  void each_sample(const std::vector<std::size_t>& count, const std::function<void(const Sample&)>& visit) const;

 private:
  using Met = std::vector<Nodes>;  // by stratum: the units that something lies in, ascending

  Met units_met(const Nodes& network) const;
  Nodes met_networks(const Sample& sample) const;
  Rational missed(const Sample& sample, const Met& met) const;
  Figure expand(const Sample& sample, const std::function<Rational(std::size_t, std::size_t)>& value_of_unit) const;

  Population population_;
  std::vector<Nodes> networks_;  // of one node too
  Nodes network_of_;             // by node
  std::vector<Met> met_by_;      // by network
};

bool lone_unit(const Population& population, const Sample& sample);

// A statistic over all samples: exact mean and exact variance.
class OverSamples {
 public:
  void add(const Rational& value);
  Rational mean() const { return sum_ / count_; }
  Rational variance() const { return squares_ / count_ - mean() * mean(); }

 private:
  Rational sum_ = 0;
  Rational squares_ = 0;
  Rational count_ = 0;
};

}  // namespace nearpit::exact

#endif  // NEARPIT_TESTS_SUPPORT_EXACT_ORACLE_H_
