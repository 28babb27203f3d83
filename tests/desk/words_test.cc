#include "desk/words.h"

#include <gtest/gtest.h>

#include "support/drawn_survey.h"

namespace nearpit::ui {
namespace {

TEST(Words, DistancesAreShortAndInTheUnitOfAWalk) {
  EXPECT_EQ(metres(0), "0 m");
  EXPECT_EQ(metres(3.54), "3.5 m");
  EXPECT_EQ(metres(9.96), "10 m");
  EXPECT_EQ(metres(20.4), "20 m");
  EXPECT_EQ(metres(999.4), "999 m");
  EXPECT_EQ(metres(1000), "1 km");
  EXPECT_EQ(metres(1254), "1.25 km");
}

TEST(Words, ADistanceThatRoundsToAKilometreIsOne) { EXPECT_EQ(metres(999.6), "1 km"); }

TEST(Words, BearingsHaveThreeDigitsAndNorthIsNought) {
  EXPECT_EQ(bearing(0), "000\xC2\xB0");
  EXPECT_EQ(bearing(7.4), "007\xC2\xB0");
  EXPECT_EQ(bearing(45), "045\xC2\xB0");
  EXPECT_EQ(bearing(359.4), "359\xC2\xB0");
  EXPECT_EQ(bearing(359.6), "000\xC2\xB0");
}

TEST(Words, StepsOut) {
  EXPECT_EQ(steps_out(0), "");
  EXPECT_EQ(steps_out(1), "one step out");
  EXPECT_EQ(steps_out(2), "two steps out");
  EXPECT_EQ(steps_out(3), "three steps out");
  EXPECT_EQ(steps_out(12), "12 steps out");
}

WallTime at(const std::string& text) { return parse_time(text, TimeZone::utc())->time; }

TEST(Words, WhenSaysNoMoreThanIsNeeded) {
  const WallTime now = at("2026-05-04T15:00Z");
  EXPECT_EQ(when(at("2026-05-04T09:05Z"), now), "09:05");
  EXPECT_EQ(when(at("2026-05-03T23:59Z"), now), "3 May 23:59");
  EXPECT_EQ(when(at("2026-11-24T00:00Z"), now), "24 Nov 00:00");
  EXPECT_EQ(when(at("2025-01-09T08:30Z"), now), "9 Jan 2025 08:30");
}

TEST(Words, WhenIsInTheOffsetOfTheTimeItself) {
  EXPECT_EQ(when(at("2026-05-04T23:30-04:00"), at("2026-05-04T23:50-04:00")), "23:30");
}

TEST(Words, NoWordOfAReasonHoldsALowLine) {
  for (int i = 0; i <= static_cast<int>(NotDugReason::kOther); ++i) {
    const std::string text = in_words(static_cast<NotDugReason>(i));
    EXPECT_FALSE(text.empty());
    EXPECT_EQ(text.find('_'), std::string::npos) << text;
  }
  for (int i = 0; i <= static_cast<int>(StopReason::kOther); ++i) {
    const std::string text = in_words(static_cast<StopReason>(i));
    EXPECT_FALSE(text.empty());
    EXPECT_EQ(text.find('_'), std::string::npos) << text;
  }
  EXPECT_EQ(in_words(StopReason::kSterileSubsoil), "sterile subsoil");
  EXPECT_EQ(in_words(StopReason::kUxoStop), "ordnance");
  EXPECT_EQ(in_words(NotDugReason::kStandingWater), "standing water");
}

TEST(Words, EveryStateOfAPitHasItsOwn) {
  std::vector<std::string> seen;
  for (const Mark mark : {Mark::kPlain, Mark::kDue, Mark::kHalted, Mark::kNegative, Mark::kPositive, Mark::kNotDug}) {
    PitMark pit;
    pit.mark = mark;
    const std::string text = state_in_words(pit);
    EXPECT_EQ(std::count(seen.begin(), seen.end(), text), 0) << text;
    seen.push_back(text);
  }
  PitMark pit;
  pit.mark = Mark::kPositive;
  pit.judgement = true;
  pit.conflict = true;
  EXPECT_EQ(state_in_words(pit), "dug, positive, judgement pit; two records disagree");
}

TEST(Words, ARecordInOneLine) {
  const std::vector<std::string> finds = {"flake", "sherd"};
  PitRecord record;
  record.status = PitStatus::kDug;
  record.counts = {2, 0};
  EXPECT_EQ(record_in_words(record, finds), "dug: flake 2");
  record.counts = {2, 11};
  record.depth_cm = 45.5;
  record.stop = StopReason::kSterileSubsoil;
  record.note = "wet";
  EXPECT_EQ(record_in_words(record, finds), "dug 45.5 cm: flake 2, sherd 11; stopped at sterile subsoil; wet");
  PitRecord none;
  none.status = PitStatus::kDug;
  none.counts = {0, 0};
  EXPECT_EQ(record_in_words(none, finds), "dug: nothing found");
  none.status = PitStatus::kNotDug;
  none.reason = NotDugReason::kSlope;
  EXPECT_EQ(record_in_words(none, finds), "not dug: slope");
  none.status = PitStatus::kWithdrawn;
  EXPECT_EQ(record_in_words(none, finds), "withdrawn");
}

}  // namespace
}  // namespace nearpit::ui
