// Random numbers for tests. A test that takes the seed of this run prints it: NEARPIT_SEED repeats a run, otherwise every run has a
// new one. NEARPIT_LONG multiplies how much a random test does.
#ifndef NEARPIT_TESTS_SUPPORT_TEST_RANDOM_H_
#define NEARPIT_TESTS_SUPPORT_TEST_RANDOM_H_

#include <cstdint>
#include <random>
#include <vector>

namespace nearpit {

class TestRandom {
 public:
  explicit TestRandom(std::uint64_t seed) : engine_(seed) {}
  // From the seed of this run, which it prints.
  static TestRandom of_this_run();

  // Both ends included.
  int between(int low, int high);
  double real(double low, double high);
  bool chance(double probability);
  template <class T>
  const T& one_of(const std::vector<T>& list) {
    return list[static_cast<std::size_t>(between(0, static_cast<int>(list.size()) - 1))];
  }

 private:
  std::mt19937_64 engine_;
};

// `usual` times NEARPIT_LONG.
int rounds(int usual);

// The chance that chi-squared reaches this value or more when every one of the counted things is equally likely.
double equal_chance_p_value(const std::vector<std::uint64_t>& counts);

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_TEST_RANDOM_H_
