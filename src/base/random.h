// Seeded random numbers that are the same on every machine: the standard fixes std::mt19937_64 to the bit, and the
// bounded integers are our own because the standard library's distributions differ between makers.
#ifndef NEARPIT_BASE_RANDOM_H_
#define NEARPIT_BASE_RANDOM_H_

#include <cstdint>
#include <random>
#include <vector>

namespace nearpit {

// Separate streams of one seed, so that drawing more of one thing never changes another. Stored results depend on
// these numbers: frozen.
enum class RandomStream : std::uint64_t { kFirstSample = 1, kOrigin = 2, kWorlds = 3 };

class SeededRandom {
 public:
  SeededRandom(std::uint64_t seed, RandomStream stream);

  // Uniform on 0 .. bound-1, exactly (rejection); bound > 0.
  std::uint64_t below(std::uint64_t bound);
  // Uniform on [0, 1), a multiple of 2^-53.
  double unit();
  // A simple random sample without replacement of `count` of 0 .. total-1, ascending; count <= total.
  std::vector<std::uint32_t> sample(std::uint32_t total, std::uint32_t count);

 private:
  std::mt19937_64 engine_;
};

}  // namespace nearpit

#endif  // NEARPIT_BASE_RANDOM_H_
