#include "session/session.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "record/record_json.h"
#include "session/two_devices.h"

namespace nearpit {
namespace {

using ::testing::HasSubstr;
using ::testing::IsEmpty;
using ::testing::SizeIs;

const PitRecord& record_of(const Session& session, const std::string& pit) {
  return session.model().entry(session.model().name_of(pit).value())->record();
}

std::size_t heads_of(const Session& session, const std::string& pit) {
  return session.model().entry(session.model().name_of(pit).value())->heads.size();
}

Progress progress(const Session& session) { return progress_of(session.model().survey()); }

// Both tablets wrote of T3-3 without knowing of one another.
struct Disagreement : TwoDevices {
  Disagreement(std::uint32_t flakes_a, std::uint32_t flakes_b) {
    a.open().apply({dug("T3-3", flakes_a)}).value();
    b.minute = 5;
    b.open().apply({dug("T3-3", flakes_b)}).value();
    take_in(b.file, a.file);
  }
};

TEST(Session, AConflictCountsAsPositiveUntilSomebodySettlesIt) {
  Disagreement both(2, 0);
  Session session = both.a.open();
  EXPECT_EQ(heads_of(session, "T3-3"), 2u);
  EXPECT_EQ(progress(session).conflicts, 1u);
  EXPECT_EQ(progress(session).positive, 1u);
  EXPECT_EQ(progress(session).due, 2u + 8u);
  EXPECT_FALSE(progress(session).complete);
  const Estimate& target = session.figures().estimates.front();
  EXPECT_EQ(target.status, FigureStatus::kProvisional);
  EXPECT_FALSE(target.variance_of_mean);

  const auto silent = session.apply({dug("T3-3", 0)});
  ASSERT_FALSE(silent);
  EXPECT_THAT(silent.error().one_line(), HasSubstr("rows.csv:2: why: missing; T3-3 has 2 records that disagree"));

  Action settling = dug("T3-3", 0);
  settling.why = "the flakes were from T3-4's bag";
  ASSERT_TRUE(session.apply({settling}));
  EXPECT_EQ(heads_of(session, "T3-3"), 1u);
  EXPECT_EQ(progress(session).conflicts, 0u);
  EXPECT_EQ(progress(session).due, 2u);
}

TEST(Session, EqualRecordsAreNoConflict) {
  Disagreement same(1, 1);
  const Session session = same.a.open();
  EXPECT_EQ(heads_of(session, "T3-3"), 2u);
  EXPECT_EQ(progress(session).conflicts, 0u);
}

TEST(Session, AConflictThatChangesNoOutcomeKeepsItsRanges) {
  Disagreement more(1, 2);
  Session session = more.a.open();
  const Progress now = progress(session);
  EXPECT_EQ(now.conflicts, 1u);
  EXPECT_EQ(now.outcome_conflicts, 0u);
  EXPECT_EQ(record_of(session, "T3-3").counts[0], 2u);  // the later
}

TEST(Session, ARowOfAPitInConflictTakesWhatItDoesNotGiveFromTheLaterHead) {
  TwoDevices devices;
  Action first = dug("T3-3", 2);
  std::get<RecordPit>(first.what).depth_cm = std::optional<double>(40.0);
  Action later = dug("T3-3", 0);
  std::get<RecordPit>(later.what).depth_cm = std::optional<double>(55.0);
  devices.a.open().apply({first}).value();
  devices.b.minute = 5;
  devices.b.open().apply({later}).value();
  take_in(devices.b.file, devices.a.file);
  Session session = devices.a.open();
  Action settling = dug("T3-3", 2);
  settling.why = "both dug it";
  ASSERT_TRUE(session.apply({settling}));
  EXPECT_EQ(record_of(session, "T3-3").depth_cm, 55.0);
  EXPECT_EQ(record_of(session, "T3-3").counts[0], 2u);
}

// What broke: the row became a withdrawal, because the later head was one.
TEST(Session, ARowIsNotLostWhenTheLaterHeadIsAWithdrawal) {
  TwoDevices devices;
  devices.a.open().apply({dug("T3-3", 0)}).value();
  take_in(devices.a.file, devices.b.file);
  devices.b.minute = 5;
  devices.b.open().apply({{WithdrawPit{"T3-3"}, "B", "wrong line", {}}}).value();
  devices.a.open().apply({dug("T3-3", 1)}).value();
  take_in(devices.b.file, devices.a.file);
  Session session = devices.a.open();
  Action row = dug("T3-3", 3);
  row.why = "dug after all";
  ASSERT_TRUE(session.apply({row}));
  EXPECT_EQ(record_of(session, "T3-3").status, PitStatus::kDug);
  EXPECT_EQ(record_of(session, "T3-3").counts[0], 3u);
}

TEST(Session, ARefusedBatchLeavesTheSurveyInMemoryAsItWas) {
  TwoDevices devices;
  Session session = devices.a.open();
  session.apply({dug("T1-1", 1)}).value();
  const std::size_t due = progress(session).due;
  const std::int64_t revision = session.revision();
  const auto refused = session.apply({dug("T3-3", 4), dug("T4-4", 0), dug("T1-5", 0)});
  ASSERT_FALSE(refused);
  EXPECT_THAT(refused.error().lines, SizeIs(1));  // T4-4 is reached by T3-3; T1-5 is not
  EXPECT_THAT(refused.error().one_line(), HasSubstr("T1-5 is not due"));
  EXPECT_EQ(progress(session).due, due);
  EXPECT_EQ(session.revision(), revision);
  EXPECT_EQ(session.model().entry(session.model().name_of("T3-3").value()), nullptr);
  EXPECT_TRUE(session.check().whole);
}

TEST(Session, ASecondSessionOnTheFileSeesWhatTheFirstWrote) {
  TwoDevices devices;
  Session one = devices.a.open();
  Session two = devices.a.open();
  one.apply({dug("T1-1", 0)}).value();
  two.apply({dug("T5-5", 0)}).value();
  EXPECT_EQ(progress(two).due, 1u);
  EXPECT_TRUE(two.check().whole);
}

// What broke: a copy one save old was taken for this device's own, and two copies went on under one writer with one number.
TEST(Session, ACopyOneSaveOldBeginsANewWriter) {
  TwoDevices devices;
  devices.a.open().apply({dug("T1-1", 0)}).value();
  take_in(devices.a.file, devices.b.file);
  EXPECT_THAT(devices.a.open().apply({dug("T3-3", 0)}).value().notes, IsEmpty());
  // The older copy in the hands of the same device.
  Session older = Session::open(devices.b.file, devices.a.environment, false).value();
  const Applied applied = older.apply({dug("T5-5", 0)}).value();
  ASSERT_THAT(applied.notes, SizeIs(1));
  EXPECT_THAT(applied.notes.front(), HasSubstr("new writer"));
  take_in(devices.b.file, devices.a.file);
  EXPECT_EQ(progress(devices.a.open()).due, 0u);
}

TEST(Session, AStopWorkInTheLogHaltsThePitsAround) {
  TwoDevices devices;
  StopWork stop;
  stop.place = {5, 5};
  stop.distance_m = 8;
  stop.reason = "possible human remains";
  add_foreign_revision(devices.a.file, "stop/1", stop_work_json(stop));
  const Session session = devices.a.open();
  EXPECT_EQ(progress(session).halted, 1u);
  EXPECT_EQ(progress(session).due, 2u);
}

TEST(Session, ARecordOfALaterProgramIsNotPassedOver) {
  TwoDevices devices;
  add_foreign_revision(devices.a.file, "share/1", "{}");
  const auto opened = Session::open(devices.a.file, devices.a.environment, true);
  ASSERT_FALSE(opened);
  EXPECT_THAT(opened.error().one_line(), HasSubstr("a later Nearpit wrote it"));
}

TEST(Session, ARecordThatSaysWorkHadToStopGivesACaution) {
  TwoDevices devices;
  Action stopped = dug("T3-3", 0);
  std::get<RecordPit>(stopped.what).stop = std::optional<StopReason>(StopReason::kHumanRemainsStop);
  const Applied applied = devices.a.open().apply({stopped}).value();
  ASSERT_THAT(applied.notes, SizeIs(1));
  EXPECT_THAT(applied.notes.front(), HasSubstr("T3-3: possible human remains"));
}

// What broke: the record taken back got the reason that the other pit needs for its place.
TEST(Session, ARecordThatBelongsElsewhereIsWithdrawnAsItWas) {
  TwoDevices devices;
  Session session = devices.a.open();
  Action off_grid = dug("J1", 0);
  RecordPit& record = std::get<RecordPit>(off_grid.what);
  record.chosen_by = std::optional<ChosenBy>(ChosenBy::kJudgement);
  record.x = std::optional<double>(26.5);
  record.y = std::optional<double>(25);
  session.apply({off_grid}).value();
  session.apply({{BelongsTo{"J1", "T3-3"}, "A", "it was the grid pit, beside a root", {}}}).value();
  EXPECT_EQ(record_of(session, "J1").status, PitStatus::kWithdrawn);
  EXPECT_EQ(record_of(session, "J1").moved, "");
  EXPECT_EQ(record_of(session, "T3-3").moved, "it was the grid pit, beside a root");
}

// A device that can't remember who it is still saves, and says once what follows.
TEST(Session, AWriterThatCantBeRememberedIsSaidOnce) {
  TwoDevices devices;
  devices.a.environment.memory = WriterMemory("/dev/null/config");
  const Applied applied = devices.a.open().apply({dug("T3-3", 0)}).value();
  ASSERT_THAT(applied.notes, SizeIs(1));
  EXPECT_THAT(applied.notes.front(), HasSubstr("the records are saved"));
  EXPECT_EQ(progress(devices.a.open()).dug, 1u);
}

// A plan changed under the records changes every figure, so the chains begin with it.
TEST(Session, TheChainsHoldThePlanAndTheDraw) {
  const std::vector<std::vector<std::uint32_t>> drawn{{1, 2}};
  const std::string start = start_hash("id", "plan", drawn);
  EXPECT_NE(start, start_hash("id", "plan ", drawn));
  EXPECT_NE(start, start_hash("id2", "plan", drawn));
  EXPECT_NE(start, start_hash("id", "plan", {{1, 3}}));
  EXPECT_NE(start, start_hash("id", "plan", {{1}, {2}}));
}

}  // namespace
}  // namespace nearpit
