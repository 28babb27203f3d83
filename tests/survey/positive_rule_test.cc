#include "survey/positive_rule.h"

#include <gtest/gtest.h>

namespace nearpit {
namespace {

PitRecord dug(std::vector<std::uint32_t> counts) {
  PitRecord record;
  record.counts = std::move(counts);
  return record;
}

TEST(PositiveRule, SumsTheTargetFindsOnly) {
  const PositiveRule rule{{0, 2}, 3};
  EXPECT_EQ(rule.target(dug({1, 50, 1})), 2U);
  EXPECT_FALSE(rule.positive(dug({1, 50, 1})));
  EXPECT_TRUE(rule.positive(dug({1, 0, 2})));
  EXPECT_TRUE(rule.positive(dug({3, 0, 0})));
  EXPECT_TRUE(rule.positive(dug({0, 0, 9})));
}

TEST(PositiveRule, OneIsEnoughUnlessThePlanSaysOtherwise) {
  const PositiveRule rule{{1}};
  EXPECT_FALSE(rule.positive(dug({7, 0})));
  EXPECT_TRUE(rule.positive(dug({0, 1})));
}

TEST(PositiveRule, OnlyDugPitsArePositive) {
  const PositiveRule rule{{0}, 1};
  PitRecord record = dug({5});
  record.status = PitStatus::kNotDug;
  record.reason = NotDugReason::kSlope;
  EXPECT_FALSE(rule.positive(record));
  record.status = PitStatus::kWithdrawn;
  record.reason.reset();
  EXPECT_FALSE(rule.positive(record));
}

TEST(PositiveRule, LargeCountsDoNotWrap) {
  const PositiveRule rule{{0, 1}, 4'000'000'000};
  EXPECT_EQ(rule.target(dug({4'294'967'295, 4'294'967'295})), 8'589'934'590U);
  EXPECT_TRUE(rule.positive(dug({4'294'967'295, 4'294'967'295})));
}

}  // namespace
}  // namespace nearpit
