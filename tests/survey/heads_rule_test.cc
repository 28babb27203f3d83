#include "survey/heads_rule.h"

#include <gtest/gtest.h>

#include "support/drawn_survey.h"
#include "support/test_random.h"

namespace nearpit {
namespace {

const PositiveRule kRule{{0}, 1};

const PitRecord kPositive = dug_record(2);
const PitRecord kNegative = dug_record(0);
const PitRecord kNotDug = not_dug_record(NotDugReason::kSlope);
const PitRecord kWithdrawn = withdrawn_record();

TEST(HeadsRule, OneHeadCounts) {
  const HeadsVerdict verdict = judge_heads({head_of(kNegative, 5)}, kRule);
  EXPECT_EQ(verdict.counts, 0U);
  EXPECT_EQ(verdict.latest, 0U);
  EXPECT_EQ(verdict.conflict, Conflict::kNone);
}

// Positive before dug before not dug before withdrawn, however early.
TEST(HeadsRule, TheBetterOutcomeCountsHoweverEarly) {
  const std::vector<PitRecord> best_first{kPositive, kNegative, kNotDug, kWithdrawn};
  for (std::size_t better = 0; better < best_first.size(); ++better) {
    for (std::size_t worse = better + 1; worse < best_first.size(); ++worse) {
      const HeadsVerdict verdict =
          judge_heads({head_of(best_first[worse], 9, "b"), head_of(best_first[better], 2, "a")}, kRule);
      EXPECT_EQ(verdict.counts, 1U) << better << ' ' << worse;
      EXPECT_EQ(verdict.latest, 0U);
      EXPECT_EQ(verdict.conflict, better == 0 ? Conflict::kOutcome : Conflict::kSameOutcome);
    }
  }
}

TEST(HeadsRule, OfTwoPositivesTheLaterCounts) {
  const HeadsVerdict verdict = judge_heads({head_of(dug_record(3), 4, "a"), head_of(dug_record(1), 7, "b")}, kRule);
  EXPECT_EQ(verdict.counts, 1U);
  EXPECT_EQ(verdict.latest, 1U);
  EXPECT_EQ(verdict.conflict, Conflict::kSameOutcome);
}

TEST(HeadsRule, LaterMeansByClockThenByWriter) {
  EXPECT_EQ(judge_heads({head_of(dug_record(3), 4, "b"), head_of(dug_record(1), 4, "a")}, kRule).counts, 0U);
  EXPECT_EQ(judge_heads({head_of(dug_record(3), 4, "b"), head_of(dug_record(1), 4, "a")}, kRule).latest, 0U);
  EXPECT_EQ(judge_heads({head_of(dug_record(3), 4, "b"), head_of(dug_record(1), 5, "a")}, kRule).counts, 1U);
}

TEST(HeadsRule, EqualRecordsAreNoConflict) {
  const HeadsVerdict verdict = judge_heads({head_of(kPositive, 4, "a"), head_of(kPositive, 7, "b")}, kRule);
  EXPECT_EQ(verdict.conflict, Conflict::kNone);
}

TEST(HeadsRule, ADefaultedDugAtMakesNoConflict) {
  PitRecord first = kPositive;
  first.dug_at = "2026-05-04T10:00:00+01:00";
  first.dug_at_defaulted = true;
  PitRecord second = first;
  second.dug_at = "2026-05-04T10:25:00+01:00";
  EXPECT_EQ(judge_heads({head_of(first, 4, "a"), head_of(second, 7, "b")}, kRule).conflict, Conflict::kNone);
  first.dug_at_defaulted = second.dug_at_defaulted = false;
  EXPECT_EQ(judge_heads({head_of(first, 4, "a"), head_of(second, 7, "b")}, kRule).conflict, Conflict::kSameOutcome);
}

TEST(HeadsRule, AnyOtherDifferenceIsAConflict) {
  PitRecord other = kNegative;
  other.note = "much root";
  EXPECT_EQ(judge_heads({head_of(kNegative, 4, "a"), head_of(other, 7, "b")}, kRule).conflict, Conflict::kSameOutcome);
  other = kNegative;
  other.weights_g = {1.5};
  EXPECT_EQ(judge_heads({head_of(kNegative, 4, "a"), head_of(other, 7, "b")}, kRule).conflict, Conflict::kSameOutcome);
}

// Two heads that agree do not hide a third that differs.
TEST(HeadsRule, AThirdHeadThatDiffersIsAConflict) {
  const std::vector<Head> heads{head_of(kNegative, 4, "a"), head_of(kNegative, 7, "b"), head_of(kPositive, 1, "c")};
  const HeadsVerdict verdict = judge_heads(heads, kRule);
  EXPECT_EQ(verdict.conflict, Conflict::kOutcome);
  EXPECT_EQ(verdict.counts, 2U);
  EXPECT_EQ(verdict.latest, 1U);
}

// Whatever order the heads come in, the same revision counts.
TEST(HeadsRule, TheOrderOfHeadsDoesNotMatter) {
  TestRandom random = TestRandom::of_this_run();
  const std::vector<PitRecord> records{kPositive, dug_record(5), kNegative, kNotDug, kWithdrawn};
  for (int round = 0; round < rounds(300); ++round) {
    std::vector<Head> heads;
    const int count = random.between(2, 5);
    for (int head = 0; head < count; ++head) {
      heads.push_back(
          head_of(random.one_of(records), random.between(1, 3), std::string(1, static_cast<char>('a' + head))));
    }
    const HeadsVerdict first = judge_heads(heads, kRule);
    std::vector<Head> reversed(heads.rbegin(), heads.rend());
    const HeadsVerdict second = judge_heads(reversed, kRule);
    EXPECT_EQ(heads[first.counts].revision, reversed[second.counts].revision);
    EXPECT_EQ(heads[first.latest].revision, reversed[second.latest].revision);
    EXPECT_EQ(first.conflict, second.conflict);
  }
}

}  // namespace
}  // namespace nearpit
