#include "support/test_random.h"

#include <boost/math/distributions/chi_squared.hpp>
#include <cstdlib>
#include <iostream>
#include <numeric>
#include <string>

namespace nearpit {

TestRandom TestRandom::of_this_run() {
  const char* given = std::getenv("NEARPIT_SEED");
  const std::uint64_t seed = given != nullptr ? std::stoull(given) : std::random_device{}();
  std::cout << "NEARPIT_SEED=" << seed << std::endl;
  return TestRandom(seed);
}

int TestRandom::between(int low, int high) { return std::uniform_int_distribution<int>(low, high)(engine_); }

double TestRandom::real(double low, double high) { return std::uniform_real_distribution<double>(low, high)(engine_); }

bool TestRandom::chance(double probability) { return real(0, 1) < probability; }

int rounds(int usual) {
  const char* given = std::getenv("NEARPIT_LONG");
  return given != nullptr ? usual * std::stoi(given) : usual;
}

double equal_chance_p_value(const std::vector<std::uint64_t>& counts) {
  const double total = static_cast<double>(std::accumulate(counts.begin(), counts.end(), std::uint64_t{0}));
  const double expected = total / static_cast<double>(counts.size());
  double chi_squared = 0;
  for (const std::uint64_t count : counts) {
    const double off = static_cast<double>(count) - expected;
    chi_squared += off * off / expected;
  }
  const boost::math::chi_squared distribution(static_cast<double>(counts.size() - 1));
  return boost::math::cdf(boost::math::complement(distribution, chi_squared));
}

}  // namespace nearpit
