// The loop next pit -> record -> saved -> next pit, by touch, counted.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "screen/screen_driver.h"

namespace nearpit::ui {
namespace {

class RecordLoop : public testing::Test {
 protected:
  RecordLoop() { world.measured(TestGlass().px_per_mm()); }
  ScreenWorld world;
};

TEST_F(RecordLoop, NegativePitTakesThreeTouchesFromListToList) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  ASSERT_EQ(screen.widget("dig-list/record").label, "Record T1-1");
  const int before = screen.touches();
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/save"});
  EXPECT_EQ(screen.touches() - before, 3);
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T3-3");
  Session session = world.read(file);
  const PitRecord* record = world.record(session, "T1-1");
  ASSERT_NE(record, nullptr);
  EXPECT_EQ(record->status, PitStatus::kDug);
  EXPECT_EQ(record->counts, (std::vector<std::uint32_t>{0, 0, 0}));
  EXPECT_TRUE(record->started_at.starts_with("2026-05-04T09:00")) << record->started_at;
}

TEST_F(RecordLoop, PositivePitWithTwoKindsOfFindTakesAtMostEightTouches) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  const int before = screen.touches();
  screen.tap_all({"dig-list/record", "record/digits/1", "record/digits/2", "record/find-1/count", "record/digits/3",
                  "record/digits/4", "record/save"});
  EXPECT_LE(screen.touches() - before, 8);
  EXPECT_TRUE(screen.shows("dig-list/record"));
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->counts, (std::vector<std::uint32_t>{12, 34, 0}));
  // The ring it opened is on the list, and one of it is proposed next.
  for (const std::string pit : {"T1-2", "T2-1", "T2-2"}) {
    EXPECT_TRUE(session.model().survey().dig_list().due(session.model().name_of(pit)->node)) << pit;
    EXPECT_TRUE(screen.shows("dig-list/" + pit)) << pit;
  }
  EXPECT_THAT(screen.widget("dig-list/record").label, testing::AnyOf("Record T1-2", "Record T2-1", "Record T2-2"));
}

TEST_F(RecordLoop, DepthAndStopReasonAreRecorded) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/depth", "record/digits/4", "record/digits/5",
                  "record/stop", "record/stops/bedrock", "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->depth_cm, 45);
  EXPECT_EQ(world.record(session, "T1-1")->stop, StopReason::kBedrock);
}

TEST_F(RecordLoop, StepsCountUpAndDownAndNeverBelowNothing) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/find-2/more", "record/find-2/more", "record/find-2/more",
                  "record/find-2/less", "record/find-0/less", "record/find-0/more", "record/find-0/less",
                  "record/find-0/less"});
  EXPECT_EQ(screen.view().survey->draft->counts[2], "2");
  EXPECT_EQ(screen.view().survey->draft->counts[0], "0");
  screen.tap("record/save");
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->counts, (std::vector<std::uint32_t>{0, 0, 2}));
}

TEST_F(RecordLoop, DepthTakesOnePointAndRubsOut) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/depth", "record/digits/4", "record/digits/9",
                  "record/digits/rub-out", "record/digits/5", "record/digits/point", "record/digits/point",
                  "record/digits/5", "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->depth_cm, 45.5);
}

TEST_F(RecordLoop, TouchingANumberAgainBeginsItAnew) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/7", "record/digits/7", "record/find-0/count", "record/digits/3",
                  "record/save"});
  Session session = world.read(file);
  EXPECT_EQ(world.record(session, "T1-1")->counts[0], 3U);
}

TEST_F(RecordLoop, NothingFoundAndACountExcludeEachOther) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/7", "record/nothing-found"});
  EXPECT_TRUE(screen.widget("record/nothing-found").chosen);
  EXPECT_EQ(screen.said("record/find-0/count"), "7 flake") << "a count is never wiped by a touch beside it";
  screen.tap("record/save");
  ASSERT_TRUE(screen.shows("record/save")) << "they don't go together";
  EXPECT_EQ(world.record(world.read(file), "T1-1"), nullptr);
  screen.tap("record/find-1/more");
  EXPECT_FALSE(screen.widget("record/nothing-found").chosen);
  screen.tap("record/save");
  Session session = world.read(file);
  EXPECT_EQ(world.record(session, "T1-1")->counts, (std::vector<std::uint32_t>{7, 1, 0}));
}

TEST_F(RecordLoop, SavingBeforeWhatIsNeededSaysWhatIsMissingAndRecordsNothing) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap("dig-list/record");
  EXPECT_NE(screen.said("record/save").find("what was found"), std::string::npos) << screen.said("record/save");
  screen.tap("record/save");
  EXPECT_TRUE(screen.shows("record/save"));
  EXPECT_EQ(screen.said().find("Saved"), std::string::npos);
  EXPECT_EQ(world.read(file).revision(), 0);
  screen.tap_all({"record/nothing-found", "record/save"});
  EXPECT_EQ(world.read(file).revision(), 1);
}

TEST_F(RecordLoop, WhatThePlanAsksForIsNamedAndSavingIsAllowed) {
  PlanSays says;
  says.require = {"depth_cm", "stop"};
  const std::string file = world.make(says);
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found"});
  EXPECT_NE(screen.said("record").find("asked for"), std::string::npos) << screen.said("record");
  screen.tap("record/save");
  EXPECT_EQ(world.read(file).revision(), 1);
}

struct StopCase {
  const char* name;
  StopReason reason;
};

TEST_F(RecordLoop, EveryStopReasonIsOneTouchAndIsRecorded) {
  PlanSays says;
  says.first_sample = {"T1-1", "T1-2", "T1-3", "T1-4", "T1-5", "T2-5", "T2-4", "T2-3", "T2-2", "T2-1", "T3-1"};
  const std::string file = world.make(says);
  ScreenDriver screen(world, {}, file);
  const std::vector<StopCase> cases = {{"sterile_subsoil", StopReason::kSterileSubsoil},
                                       {"bedrock", StopReason::kBedrock},
                                       {"impenetrable", StopReason::kImpenetrable},
                                       {"water_table", StopReason::kWaterTable},
                                       {"max_depth", StopReason::kMaxDepth},
                                       {"roots", StopReason::kRoots},
                                       {"disturbance_fill", StopReason::kDisturbanceFill},
                                       {"feature_found", StopReason::kFeatureFound}};
  for (const StopCase& one : cases) {
    const std::string label = screen.view().survey->proposed->label;
    screen.tap_all({"dig-list/record", "record/nothing-found", "record/stop", std::string("record/stops/") + one.name});
    screen.tap("record/save");
    Session session = world.read(file);
    ASSERT_NE(world.record(session, label), nullptr) << one.name;
    EXPECT_EQ(world.record(session, label)->stop, one.reason) << one.name;
  }
}

TEST_F(RecordLoop, AStopThatIsDangerousIsRecordedAndTheCautionIsHeard) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all(
      {"dig-list/record", "record/nothing-found", "record/stop", "record/stops/human_remains_stop", "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->stop, StopReason::kHumanRemainsStop);
}

TEST_F(RecordLoop, OtherNeedsANote) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/stop", "record/stops/other"});
  EXPECT_NE(screen.said("record/save").find("note"), std::string::npos) << screen.said("record/save");
  screen.tap("record/note");
  screen.type("old drain");
  screen.tap_all({"typing/done", "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->note, "old drain");
}

TEST_F(RecordLoop, NotDugWithEachReason) {
  PlanSays says;
  says.first_sample = {"T1-1", "T1-2", "T1-3", "T1-4", "T1-5", "T2-5", "T2-4", "T2-3", "T2-2", "T2-1", "T3-1", "T3-2"};
  const std::string file = world.make(says);
  ScreenDriver screen(world, {}, file);
  const std::vector<NotDugReason> reasons = {
      NotDugReason::kStandingWater, NotDugReason::kSlope,     NotDugReason::kPaved,        NotDugReason::kDisturbed,
      NotDugReason::kBareGround,    NotDugReason::kStructure, NotDugReason::kNoPermission, NotDugReason::kUtility,
      NotDugReason::kHazard,        NotDugReason::kStopWork,  NotDugReason::kOther};
  for (const NotDugReason reason : reasons) {
    const std::string label = screen.view().survey->proposed->label;
    const std::string name(word(reason));
    screen.tap_all({"dig-list/record", "record/not-dug", "record/reasons/" + name});
    if (reason == NotDugReason::kOther) {
      screen.tap("record/note");
      screen.type("flooded by rain");
      screen.tap("typing/done");
    }
    screen.tap("record/save");
    Session session = world.read(file);
    ASSERT_NE(world.record(session, label), nullptr) << name;
    EXPECT_EQ(world.record(session, label)->status, PitStatus::kNotDug) << name;
    EXPECT_EQ(world.record(session, label)->reason, reason) << name;
  }
}

TEST_F(RecordLoop, ItWasDugAfterAllTakesNotDugBack) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/not-dug", "record/reasons/slope", "record/not-dug",
                  "record/reasons/was-dug", "record/find-0/more", "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->status, PitStatus::kDug);
  EXPECT_EQ(world.record(session, "T1-1")->counts[0], 1U);
}

TEST_F(RecordLoop, TheStripCountsPitsAndSaysWhenTheLastWasSaved) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  EXPECT_NE(screen.said("strip").find("0 pits today"), std::string::npos);
  EXPECT_NE(screen.said("strip").find("3 to dig"), std::string::npos);
  world.minute = 32;
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/save"});
  EXPECT_NE(screen.said("strip").find("Saved T1-1 at 09:32"), std::string::npos) << screen.said("strip");
  EXPECT_NE(screen.said("strip").find("1 pit today"), std::string::npos);
  EXPECT_NE(screen.said("strip").find("2 to dig"), std::string::npos);
  ScreenDriver again(world, {}, file);
  EXPECT_NE(again.said("strip").find("Last save 09:32"), std::string::npos) << again.said("strip");
}

TEST_F(RecordLoop, ANewDayBeginsAtMidnightWithNoPitsAndNoSavedLeftStanding) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/save"});
  EXPECT_THAT(screen.said("strip"), testing::HasSubstr("1 pit today"));
  world.minute = 16 * 60;
  screen.tap("strip/dig-list");
  EXPECT_THAT(screen.said("strip"), testing::HasSubstr("0 pits today"));
  EXPECT_THAT(screen.said("strip"), testing::HasSubstr("Last save 4 May 09:00"));
}

TEST_F(RecordLoop, AnotherPitOfTheListIsTakenAndStaysProposed) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap("dig-list/T5-5");
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T5-5");
  screen.tap_all({"strip/day", "strip/dig-list"});
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T5-5");
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/save"});
  Session session = world.read(file);
  EXPECT_NE(world.record(session, "T5-5"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1"), nullptr);
}

TEST_F(RecordLoop, GridPitsFirstLeavesNeighboursForLater) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/find-0/more", "record/save"});
  EXPECT_THAT(screen.said("dig-list"), testing::HasSubstr("next to T1-1"));
  screen.tap("dig-list/grid-pits-first");
  EXPECT_TRUE(screen.widget("dig-list/grid-pits-first").chosen);
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T3-3");
  EXPECT_FALSE(screen.shows("dig-list/T1-2"));
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/save"});
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T5-5");
  screen.tap("dig-list/grid-pits-first");
  EXPECT_TRUE(screen.shows("dig-list/T1-2"));
}

TEST_F(RecordLoop, NothingLeftToDigIsSaid) {
  PlanSays says;
  says.first_sample = {"T1-1"};
  const std::string file = world.make(says);
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/save"});
  EXPECT_FALSE(screen.shows("dig-list/record"));
  EXPECT_NE(screen.said("dig-list").find("Nothing is left to dig"), std::string::npos) << screen.said("dig-list");
}

}  // namespace
}  // namespace nearpit::ui
