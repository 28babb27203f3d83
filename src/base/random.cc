#include "base/random.h"

#include <algorithm>
#include <cassert>

namespace nearpit {
namespace {

// Output number `n` (from 1) of SplitMix64 started at `seed`: Steele, Lea and Flood, Fast Splittable Pseudorandom Number
// Generators, OOPSLA 2014, with the multipliers of Stafford's variant 13. Frozen.
std::uint64_t splitmix64(std::uint64_t seed, std::uint64_t n) {
  std::uint64_t z = seed + n * 0x9E3779B97F4A7C15U;
  z = (z ^ (z >> 30U)) * 0xBF58476D1CE4E5B9U;
  z = (z ^ (z >> 27U)) * 0x94D049BB133111EBU;
  return z ^ (z >> 31U);
}

}  // namespace

SeededRandom::SeededRandom(std::uint64_t seed, RandomStream stream)
    : engine_(splitmix64(seed, static_cast<std::uint64_t>(stream))) {}

std::uint64_t SeededRandom::below(std::uint64_t bound) {
  assert(bound > 0);
  // 2^64 mod bound: leaving out so many of the lowest values leaves a whole multiple of bound.
  const std::uint64_t left_out = (0 - bound) % bound;
  std::uint64_t drawn = engine_();
  while (drawn < left_out)
    drawn = engine_();
  return drawn % bound;
}

double SeededRandom::unit() { return static_cast<double>(engine_() >> 11U) * 0x1p-53; }

// Floyd's algorithm: Bentley and Floyd, Programming Pearls: A Sample of Brilliance, CACM 30(9), 1987.
std::vector<std::uint32_t> SeededRandom::sample(std::uint32_t total, std::uint32_t count) {
  assert(count <= total);
  std::vector<bool> taken(total, false);
  std::vector<std::uint32_t> sampled;
  sampled.reserve(count);
  for (std::uint32_t last = total - count; last < total; ++last) {
    const auto drawn = static_cast<std::uint32_t>(below(std::uint64_t{last} + 1));
    const std::uint32_t chosen = taken[drawn] ? last : drawn;
    taken[chosen] = true;
    sampled.push_back(chosen);
  }
  std::sort(sampled.begin(), sampled.end());
  return sampled;
}

}  // namespace nearpit
