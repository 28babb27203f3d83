#include "base/clock.h"

#include <gtest/gtest.h>

#include <chrono>
#include <cstdlib>

#include "support/test_random.h"

namespace nearpit {
namespace {

constexpr std::int64_t kHour_ms = 3'600'000;

TimeZone zone(const std::string& name) {
  Result<TimeZone> found = TimeZone::named(name);
  EXPECT_TRUE(found.ok()) << name;
  return found.ok() ? *found : TimeZone::utc();
}

std::int64_t utc_ms(std::string_view text, const TimeZone& in = TimeZone::utc()) {
  const std::optional<ParsedTime> parsed = parse_time(text, in);
  EXPECT_TRUE(parsed) << text;
  return parsed ? parsed->time.utc_ms : -1;
}

// Sets a variable of the environment until the end of its block.
class Environment {
 public:
  Environment(const char* name, const char* value) : name_(name) {
    if (const char* before = std::getenv(name)) before_ = before;
    if (value != nullptr) {
      setenv(name, value, 1);
    } else {
      unsetenv(name);
    }
  }
  ~Environment() { before_ ? setenv(name_, before_->c_str(), 1) : unsetenv(name_); }
  Environment(const Environment&) = delete;
  Environment& operator=(const Environment&) = delete;

 private:
  const char* name_;
  std::optional<std::string> before_;
};

TEST(Clock, KnownInstants) {
  EXPECT_EQ(utc_ms("1970-01-01T00:00:00Z"), 0);
  // RFC 9562 appendix A.6.
  EXPECT_EQ(utc_ms("2022-02-22T14:22:22-05:00"), 1645557742000);
  // RFC 3339 section 5.8: its first example, and two that are the same instant.
  EXPECT_EQ(utc_ms("1985-04-12T23:20:50.52Z") % 60'000, 50'520);
  EXPECT_EQ(utc_ms("1996-12-19T16:39:57-08:00"), utc_ms("1996-12-20T00:39:57Z"));
  // POSIX.1-2017 section 4.16, the formula for seconds since the Epoch, by hand: derived.
  EXPECT_EQ(utc_ms("2001-09-09T01:46:40Z"), 1'000'000'000'000);
  EXPECT_EQ(utc_ms("1969-12-31T23:59:59.999Z"), -1);
}

TEST(Clock, AnOffsetIsKept) {
  const std::optional<ParsedTime> parsed = parse_time("2026-05-04T10:20:30.25-04:00", TimeZone::utc());
  ASSERT_TRUE(parsed);
  EXPECT_EQ(parsed->time.offset_min, -240);
  EXPECT_FALSE(parsed->date_only);
  EXPECT_EQ(format_time(parsed->time), "2026-05-04T10:20:30.250-04:00");
  EXPECT_EQ(format_time_utc(parsed->time), "2026-05-04T14:20:30.250Z");
}

TEST(Clock, WithoutAnOffsetTheZoneDecides) {
  const std::optional<ParsedTime> parsed = parse_time("2026-05-04T10:20", zone("America/New_York"));
  ASSERT_TRUE(parsed);
  EXPECT_EQ(format_time(parsed->time), "2026-05-04T10:20:00.000-04:00");
  EXPECT_EQ(parse_time("2026-01-04T10:20", zone("America/New_York"))->time.offset_min, -300);
  EXPECT_EQ(parse_time("2026-01-04T10:20", zone("Asia/Kathmandu"))->time.offset_min, 345);
  EXPECT_EQ(parse_time("2026-01-04T10:20", TimeZone::utc())->time.offset_min, 0);
}

TEST(Clock, ADateIsItsLocalMidnight) {
  const std::optional<ParsedTime> parsed = parse_time("2026-05-04", zone("America/New_York"));
  ASSERT_TRUE(parsed);
  EXPECT_TRUE(parsed->date_only);
  EXPECT_EQ(parsed->time.utc_ms, utc_ms("2026-05-04T04:00:00Z"));
  EXPECT_EQ(format_date(parsed->time), "2026-05-04");
}

TEST(Clock, FractionsAreCutToTheMillisecond) {
  EXPECT_EQ(utc_ms("1970-01-01T00:00:00.5Z"), 500);
  EXPECT_EQ(utc_ms("1970-01-01T00:00:00.05Z"), 50);
  EXPECT_EQ(utc_ms("1970-01-01T00:00:00.001Z"), 1);
  EXPECT_EQ(utc_ms("1970-01-01T00:00:00.9999999999999Z"), 999);
}

TEST(Clock, RefusesEverythingElse) {
  for (const char* text : {"",
                           "2026",
                           "2026-05",
                           "2026-5-4",
                           "26-05-04",
                           "2026-13-01",
                           "2026-00-01",
                           "2026-02-29",
                           "2026-04-31",
                           "2026-05-00",
                           "0000-05-04",
                           "2026/05/04",
                           "2026-05-04 10:20",
                           "2026-05-04T",
                           "2026-05-04T10",
                           "2026-05-04T1020",
                           "2026-05-04T24:00",
                           "2026-05-04T10:60",
                           "2026-05-04T10:20:60Z",
                           "2026-05-04T10:20:",
                           "2026-05-04T10:20:30.",
                           "2026-05-04T10:20:30.Z",
                           "2026-05-04T10:20z",
                           "2026-05-04T10:20+4",
                           "2026-05-04T10:20+04",
                           "2026-05-04T10:20+0400",
                           "2026-05-04T10:20+04:60",
                           "2026-05-04T10:20+18:01",
                           "2026-05-04T10:20+19:00",
                           "2026-05-04Z",
                           " 2026-05-04",
                           "2026-05-04 ",
                           "2026-05-04T10:20ZZ",
                           "+2026-05-04",
                           "2026-05-04T10:20:30,5Z",
                           "yesterday"}) {
    EXPECT_FALSE(parse_time(text, TimeZone::utc())) << '"' << text << '"';
  }
  EXPECT_TRUE(parse_time("2024-02-29", TimeZone::utc()));
  EXPECT_TRUE(parse_time("2026-05-04T10:20+18:00", TimeZone::utc()));
  EXPECT_TRUE(parse_time("2026-05-04T10:20-18:00", TimeZone::utc()));
}

TEST(Clock, RealDates) {
  EXPECT_TRUE(is_date("2026-05-04"));
  EXPECT_TRUE(is_date("2000-02-29"));
  EXPECT_FALSE(is_date("1900-02-29"));
  EXPECT_FALSE(is_date("2026-02-29"));
  EXPECT_FALSE(is_date("2026-05-04T10:20"));
  EXPECT_FALSE(is_date("2026-05-4"));
  EXPECT_FALSE(is_date(""));
}

TEST(Clock, WhatIsWrittenReadsBack) {
  TestRandom random = TestRandom::of_this_run();
  for (int i = 0; i < rounds(5000); ++i) {
    const WallTime time{random.between(-2'000'000'000, 2'000'000'000) * std::int64_t{12'345} + random.between(0, 999),
                        random.between(-1080, 1080)};
    const std::optional<ParsedTime> back = parse_time(format_time(time), TimeZone::utc());
    ASSERT_TRUE(back) << format_time(time);
    ASSERT_EQ(back->time, time) << format_time(time);
    ASSERT_EQ(utc_ms(format_time_utc(time)), time.utc_ms);
    ASSERT_EQ(format_time(time).substr(0, 10), format_date(time));
  }
}

// 15 U.S.C. 260a: from the second Sunday of March to the first of November, changing at two in the morning.
TEST(Clock, AGapTakesTheEarlierOffset) {
  const TimeZone there = zone("America/New_York");
  EXPECT_EQ(there.offset_min_at(utc_ms("2026-03-08T06:59:59Z")), -300);
  EXPECT_EQ(there.offset_min_at(utc_ms("2026-03-08T07:00:00Z")), -240);
  const std::optional<ParsedTime> parsed = parse_time("2026-03-08T02:30", there);
  ASSERT_TRUE(parsed);
  EXPECT_EQ(parsed->time.utc_ms, utc_ms("2026-03-08T07:30:00Z"));
  EXPECT_EQ(format_time(parsed->time), "2026-03-08T03:30:00.000-04:00");
}

TEST(Clock, AnOverlapTakesTheEarlierOffset) {
  const TimeZone there = zone("America/New_York");
  EXPECT_EQ(there.offset_min_at(utc_ms("2026-11-01T05:59:59Z")), -240);
  EXPECT_EQ(there.offset_min_at(utc_ms("2026-11-01T06:00:00Z")), -300);
  EXPECT_EQ(utc_ms("2026-11-01T01:30", there), utc_ms("2026-11-01T05:30:00Z"));
  EXPECT_EQ(utc_ms("2026-11-01T02:00", there), utc_ms("2026-11-01T07:00:00Z"));
  EXPECT_EQ(utc_ms("2026-11-02", there) - utc_ms("2026-11-01", there), 25 * kHour_ms);
}

TEST(Clock, LocalTimeReadsBackOutsideGapsAndOverlaps) {
  TestRandom random = TestRandom::of_this_run();
  const TimeZone there = zone("America/New_York");
  for (int i = 0; i < rounds(2000); ++i) {
    // Noon of some day from 1800 to 2060: no change of the clocks falls there. The oldest have offsets with seconds.
    const std::int64_t noon = random.between(-62'091, 32'871) * 24 * kHour_ms + 12 * kHour_ms;
    const std::int64_t instant = there.utc_ms_of_local(noon);
    ASSERT_EQ(instant + there.offset_min_at(instant) * std::int64_t{60'000}, noon) << format_time_utc({noon, 0});
  }
}

TEST(Clock, AnUnknownZoneIsNamed) {
  const Result<TimeZone> unknown = TimeZone::named("Nowhere/At_All");
  ASSERT_FALSE(unknown.ok());
  EXPECT_EQ(unknown.error().kind, ErrorKind::kNotFound);
  EXPECT_NE(unknown.error().one_line().find("\"Nowhere/At_All\""), std::string::npos);
  EXPECT_FALSE(TimeZone::named("").ok());
  EXPECT_FALSE(TimeZone::named("../etc/passwd").ok());
  EXPECT_EQ(zone("UTC").offset_min_at(0), 0);
}

TEST(Clock, TheSameInstantInAnotherZone) {
  const WallTime time{utc_ms("2026-05-04T02:00:00Z"), 0};
  const WallTime there = in_zone(time, zone("America/New_York"));
  EXPECT_EQ(there.utc_ms, time.utc_ms);
  EXPECT_EQ(format_time(there), "2026-05-03T22:00:00.000-04:00");
  EXPECT_EQ(format_date(there), "2026-05-03");
  EXPECT_EQ(format_date(time), "2026-05-04");
}

TEST(Clock, TheEnvironmentStandsInForTheClock) {
  const Environment set("NEARPIT_CLOCK", "2026-05-04T08:00:00-04:00");
  Result<std::unique_ptr<Clock>> clock = system_clock();
  ASSERT_TRUE(clock.ok());
  EXPECT_EQ((*clock)->now(), (WallTime{1777896000000, -240}));  // 2026-05-04T12:00:00Z, derived
  EXPECT_EQ((*clock)->now(), (*clock)->now());
}

TEST(Clock, AnUnreadableStandInIsAnError) {
  for (const char* value : {"", "noon", "2026-05-04", "2026-05-04T08:00:00"}) {
    const Environment set("NEARPIT_CLOCK", value);
    const Result<std::unique_ptr<Clock>> clock = system_clock();
    ASSERT_FALSE(clock.ok()) << value;
    EXPECT_EQ(clock.error().kind, ErrorKind::kBadInput);
    EXPECT_NE(clock.error().one_line().find("NEARPIT_CLOCK is \"" + std::string(value) + "\""), std::string::npos);
  }
}

TEST(Clock, TheMachinesClockKnowsItsOffset) {
  const Environment unset("NEARPIT_CLOCK", nullptr);
  const Environment local("TZ", "Asia/Kathmandu");
  Result<std::unique_ptr<Clock>> clock = system_clock();
  ASSERT_TRUE(clock.ok());
  const auto before = std::chrono::floor<std::chrono::milliseconds>(std::chrono::system_clock::now());
  const WallTime now = (*clock)->now();
  const auto after = std::chrono::floor<std::chrono::milliseconds>(std::chrono::system_clock::now());
  EXPECT_LE(before.time_since_epoch().count(), now.utc_ms);
  EXPECT_GE(after.time_since_epoch().count(), now.utc_ms);
  EXPECT_EQ(now.offset_min, 345);
}

}  // namespace
}  // namespace nearpit
