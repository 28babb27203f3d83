#include "base/random.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <map>
#include <numeric>

#include "support/test_random.h"

namespace nearpit {
namespace {

constexpr double kLeastChance = 1e-6;  // of a right generator failing one check, when the seed is this run's

std::uint64_t seed_of_this_run() { return static_cast<std::uint64_t>(TestRandom::of_this_run().between(0, 1 << 30)); }

// C++ standard, [rand.predef]: the 10000th value of a default-constructed mt19937_64.
TEST(Random, EngineOfTheStandard) {
  std::mt19937_64 engine;
  engine.discard(9999);
  EXPECT_EQ(engine(), 9981545732273789042U);
}

// The first outputs of SplitMix64 from 1234567, as its implementations commonly publish them; from memory.
TEST(Random, EachStreamStartsAtItsOutputOfSplitmix64) {
  const std::pair<RandomStream, std::uint64_t> starts[] = {{RandomStream::kFirstSample, 6457827717110365317U},
                                                           {RandomStream::kOrigin, 3203168211198807973U},
                                                           {RandomStream::kWorlds, 9817491932198370423U}};
  for (const auto& [stream, start] : starts) {
    std::mt19937_64 engine(start);
    SeededRandom random(1234567, stream);
    for (int i = 0; i < 10; ++i)
      EXPECT_EQ(random.unit(), static_cast<double>(engine() >> 11U) / 9007199254740992.0);
  }
}

// Stored first samples are drawn again from their seeds: these values may never change. Worked out with an independent
// script (MT19937-64 and SplitMix64 written from their publications).
TEST(Random, FrozenSample) {
  SeededRandom random(7, RandomStream::kFirstSample);
  EXPECT_EQ(random.sample(100, 10), (std::vector<std::uint32_t>{4, 5, 55, 58, 60, 62, 72, 79, 84, 97}));
  EXPECT_EQ(random.below(1'000'000), 780804U);
}

TEST(Random, SeedsAndStreamsDiffer) {
  std::map<std::uint64_t, int> seen;
  for (std::uint64_t seed = 0; seed < 1000; ++seed) {
    for (const RandomStream stream : {RandomStream::kFirstSample, RandomStream::kOrigin, RandomStream::kWorlds}) {
      ++seen[SeededRandom(seed, stream).below(std::uint64_t{1} << 63U)];
    }
  }
  EXPECT_EQ(seen.size(), 3000U);
}

TEST(Random, BelowIsUniform) {
  SeededRandom random(seed_of_this_run(), RandomStream::kWorlds);
  for (const std::size_t bound : {2U, 3U, 7U, 10U, 100U}) {
    std::vector<std::uint64_t> counts(bound, 0);
    for (int i = 0; i < rounds(100'000); ++i)
      ++counts.at(random.below(bound));
    EXPECT_GT(equal_chance_p_value(counts), kLeastChance) << "bound " << bound;
  }
}

// With this bound, taking the remainder of 64 bits as they come would give the lower half twice the chance of the upper.
TEST(Random, BelowIsUniformForBoundsNear64Bits) {
  constexpr std::uint64_t kBound = 3 * (std::uint64_t{1} << 62U);
  SeededRandom random(seed_of_this_run(), RandomStream::kWorlds);
  std::vector<std::uint64_t> counts(12, 0);
  for (int i = 0; i < rounds(60'000); ++i)
    ++counts.at(random.below(kBound) / (kBound / 12));
  EXPECT_GT(equal_chance_p_value(counts), kLeastChance);
}

TEST(Random, BelowOneIsZero) {
  SeededRandom random(1, RandomStream::kOrigin);
  for (int i = 0; i < 100; ++i)
    EXPECT_EQ(random.below(1), 0U);
}

TEST(Random, UnitIsUniformFromZeroToBelowOne) {
  SeededRandom random(seed_of_this_run(), RandomStream::kOrigin);
  std::vector<std::uint64_t> counts(50, 0);
  for (int i = 0; i < rounds(100'000); ++i) {
    const double drawn = random.unit();
    ASSERT_GE(drawn, 0);
    ASSERT_LT(drawn, 1);
    ++counts.at(static_cast<std::size_t>(drawn * 50));
  }
  EXPECT_GT(equal_chance_p_value(counts), kLeastChance);
}

TEST(Random, SampleIsAscendingWithoutRepeats) {
  TestRandom sizes = TestRandom::of_this_run();
  SeededRandom random(3, RandomStream::kFirstSample);
  for (int i = 0; i < rounds(500); ++i) {
    const int total = sizes.between(0, 300);
    const int count = sizes.between(0, total);
    const auto sample = random.sample(static_cast<std::uint32_t>(total), static_cast<std::uint32_t>(count));
    ASSERT_EQ(sample.size(), static_cast<std::size_t>(count));
    ASSERT_TRUE(std::is_sorted(sample.begin(), sample.end()));
    ASSERT_EQ(std::adjacent_find(sample.begin(), sample.end()), sample.end());
    ASSERT_TRUE(sample.empty() || sample.back() < static_cast<std::uint32_t>(total));
  }
}

TEST(Random, SampleOfAllAndOfNone) {
  SeededRandom random(3, RandomStream::kFirstSample);
  std::vector<std::uint32_t> all(40);
  std::iota(all.begin(), all.end(), 0U);
  EXPECT_EQ(random.sample(40, 40), all);
  EXPECT_TRUE(random.sample(40, 0).empty());
  EXPECT_TRUE(random.sample(0, 0).empty());
}

// Simple random sampling: each of the C(6, 3) = 20 sets is equally likely, not only each member.
TEST(Random, EverySetIsEquallyLikely) {
  SeededRandom random(seed_of_this_run(), RandomStream::kFirstSample);
  std::map<std::vector<std::uint32_t>, std::uint64_t> seen;
  for (int i = 0; i < rounds(40'000); ++i)
    ++seen[random.sample(6, 3)];
  std::vector<std::uint64_t> counts;
  for (const auto& [set, count] : seen)
    counts.push_back(count);
  ASSERT_EQ(counts.size(), 20U);
  EXPECT_GT(equal_chance_p_value(counts), kLeastChance);
}

}  // namespace
}  // namespace nearpit
