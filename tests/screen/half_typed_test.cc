// What is half typed survives the end of the program at any moment, and 'Saved' is said only of what the disk holds.
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <signal.h>
#include <sys/wait.h>
#include <unistd.h>

#include <functional>
#include <optional>

#include "screen/screen_driver.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;
using testing::Not;

class HalfTyped : public testing::Test {
 protected:
  HalfTyped() : file(world.make()) { world.measured(TestGlass().px_per_mm()); }

  // Another process works at the screen and is killed, with nothing closed or flushed.
  void killed_after(const std::function<void(ScreenDriver&)>& work) {
    const pid_t child = fork();
    if (child == 0) {
      ScreenDriver screen(world, {}, file);
      work(screen);
      kill(getpid(), SIGKILL);
    }
    int status = 0;
    waitpid(child, &status, 0);
    ASSERT_TRUE(WIFSIGNALED(status) && WTERMSIG(status) == SIGKILL) << "the work before it failed";
  }

  ScreenWorld world;
  std::string file;
};

TEST_F(HalfTyped, RecordSurvivesAKillInTheMiddleOfIt) {
  killed_after([](ScreenDriver& screen) {
    screen.tap_all({"dig-list/T3-3", "dig-list/record", "record/digits/1", "record/digits/7", "record/find-2/more",
                    "record/depth", "record/digits/3", "record/stop", "record/stops/roots"});
  });
  EXPECT_EQ(world.read(file).revision(), 0);
  ScreenDriver screen(world, {}, file);
  EXPECT_THAT(screen.said("dig-list/T3-3"), HasSubstr("half written"));
  EXPECT_EQ(screen.widget("dig-list/record").label, "Go on with T3-3");
  screen.tap("dig-list/record");
  EXPECT_EQ(screen.said("record/find-0/count"), "17 flake");
  EXPECT_EQ(screen.said("record/find-2/count"), "1 brick");
  EXPECT_THAT(screen.said("record/depth"), HasSubstr("3 cm"));
  EXPECT_THAT(screen.said("record/stop"), HasSubstr("roots"));
  screen.tap("record/save");
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T3-3"), nullptr);
  EXPECT_EQ(world.record(session, "T3-3")->counts, (std::vector<std::uint32_t>{17, 0, 1}));
  EXPECT_EQ(world.record(session, "T3-3")->depth_cm, 3);
  EXPECT_EQ(world.record(session, "T3-3")->stop, StopReason::kRoots);
  ScreenDriver after(world, {}, file);
  EXPECT_THAT(after.said("dig-list"), Not(HasSubstr("half written")));
}

TEST_F(HalfTyped, NoteSurvivesAKillInTheMiddleOfAWord) {
  killed_after([](ScreenDriver& screen) {
    screen.tap_all({"dig-list/record", "record/nothing-found", "record/note"});
    screen.type("charcoal, \xCE\xBC\xE5\x9C\x9F");
    screen.tap("typing/letters/q");
  });
  ScreenDriver screen(world, {}, file);
  EXPECT_EQ(screen.widget("dig-list/record").label, "Go on with T1-1");
  screen.tap("dig-list/record");
  EXPECT_THAT(screen.said("record/note"), HasSubstr("charcoal, \xCE\xBC\xE5\x9C\x9Fq"));
  EXPECT_TRUE(screen.widget("record/nothing-found").chosen);
}

TEST_F(HalfTyped, NotDugWithItsReasonSurvives) {
  killed_after([](ScreenDriver& screen) {
    screen.tap_all({"dig-list/record", "record/not-dug", "record/reasons/paved"});
  });
  ScreenDriver screen(world, {}, file);
  screen.tap("dig-list/record");
  EXPECT_TRUE(screen.widget("record/not-dug").chosen);
  EXPECT_THAT(screen.said("record/reason"), HasSubstr("paved"));
}

TEST_F(HalfTyped, ChangeOfARecordSurvivesWithItsWhy) {
  world.write_elsewhere(file, "T1-1", 4);
  killed_after([](ScreenDriver& screen) {
    const Pixel pit = to_screen(screen.map_view(), screen.map_box(), {5, 5});
    screen.tap_at(pit);
    screen.tap_all({"map/record-chosen", "record/find-0/more", "record/why"});
    screen.type("found one mo");
  });
  ScreenDriver screen(world, {}, file);
  screen.tap_at(to_screen(screen.map_view(), screen.map_box(), {5, 5}));
  screen.tap("map/record-chosen");
  EXPECT_EQ(screen.said("record/find-0/count"), "5 flake");
  EXPECT_THAT(screen.said("record/why"), HasSubstr("found one mo"));
}

TEST_F(HalfTyped, SeveralPitsAreLeftHalfWrittenAndEachIsKept) {
  killed_after([](ScreenDriver& screen) {
    screen.tap_all({"dig-list/record", "record/digits/7", "record/back", "dig-list/T5-5", "dig-list/record",
                    "record/find-1/more"});
  });
  ScreenDriver screen(world, {}, file);
  EXPECT_THAT(screen.said("dig-list/T1-1"), HasSubstr("half written"));
  EXPECT_THAT(screen.said("dig-list/T5-5"), HasSubstr("half written"));
  EXPECT_THAT(screen.said("dig-list/T3-3"), Not(HasSubstr("half written")));
  screen.tap_all({"dig-list/T1-1", "dig-list/record"});
  EXPECT_EQ(screen.said("record/find-0/count"), "7 flake");
}

TEST_F(HalfTyped, APitOffTheListThatIsHalfWrittenIsOneTouchAway) {
  killed_after([](ScreenDriver& screen) {
    screen.tap_at(to_screen(screen.map_view(), screen.map_box(), {35, 15}));
    screen.tap_all({"map/record-chosen", "record/find-1/more"});
  });
  ScreenDriver screen(world, {}, file);
  EXPECT_THAT(screen.said("dig-list/T2-4"), HasSubstr("half written"));
  screen.tap("dig-list/T2-4");
  EXPECT_EQ(screen.said("record/find-1/count"), "1 sherd");
}

TEST_F(HalfTyped, ARecordThatIsOnlyLookedAtIsNotHalfWritten) {
  {
    ScreenDriver screen(world, {}, file);
    screen.tap_all({"dig-list/record", "record/more", "record/back", "record/stop", "record/back"});
  }
  ScreenDriver screen(world, {}, file);
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T1-1");
  EXPECT_THAT(screen.said("dig-list"), Not(HasSubstr("half written")));
}

TEST_F(HalfTyped, SavedRecordSurvivesAKillRightAfterItSaysSo) {
  killed_after([](ScreenDriver& screen) {
    screen.tap_all({"dig-list/record", "record/find-1/more", "record/save"});
    if (screen.said("strip").find("Saved T1-1") == std::string::npos) _exit(1);
  });
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->counts, (std::vector<std::uint32_t>{0, 1, 0}));
}

TEST_F(HalfTyped, SomebodyElseWritesThePitMeanwhileAndNothingTypedIsLost) {
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/2"});
  world.write_elsewhere(file, "T1-1", 9);
  screen.tap("record/save");
  // It is not saved over the other's record, and says so.
  EXPECT_THAT(screen.said("strip"), HasSubstr("NOT saved"));
  EXPECT_THAT(screen.said("notice"), HasSubstr("T1-1"));
  EXPECT_EQ(world.read(file).revision(), 1);
  screen.tap("notice/understood");
  EXPECT_EQ(screen.said("record/find-0/count"), "2 flake");
  // Theirs is in the history, and ours is saved as a change of it, with why.
  screen.tap_all({"record/more", "record/more/history"});
  EXPECT_THAT(screen.said("record/history"), HasSubstr("flake 9"));
  screen.tap("record/back");
  if (screen.shows("record/back") && !screen.shows("record/save")) screen.tap("record/back");
  EXPECT_THAT(screen.said("record/save"), HasSubstr("why"));
  screen.tap_all({"record/why", "typing/phrase/0", "typing/done", "record/save"});
  Session session = world.read(file);
  EXPECT_EQ(session.revision(), 2);
  EXPECT_EQ(world.record(session, "T1-1")->counts[0], 2U);
}

TEST_F(HalfTyped, SomebodyElseWritesAnotherPitMeanwhileAndBothStand) {
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/2"});
  world.write_elsewhere(file, "T5-5", 9);
  screen.tap("record/save");
  EXPECT_THAT(screen.said("strip"), HasSubstr("Saved T1-1"));
  EXPECT_THAT(screen.said("strip"), HasSubstr("2 pits today"));
  Session session = world.read(file);
  EXPECT_EQ(world.record(session, "T1-1")->counts[0], 2U);
  EXPECT_EQ(world.record(session, "T5-5")->counts[0], 9U);
}

TEST_F(HalfTyped, SomebodyElseChangesARecordThatIsAboutToBeWithdrawn) {
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/2", "record/save"});
  screen.tap_at(to_screen(screen.map_view(), screen.map_box(), {5, 5}));
  screen.tap_all({"map/record-chosen", "record/more", "record/more/withdraw", "typing/phrase/0"});
  world.write_elsewhere(file, "T1-1", 9);
  screen.tap("typing/done");
  EXPECT_THAT(screen.said("strip"), HasSubstr("NOT saved"));
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->counts[0], 9U);
}

TEST_F(HalfTyped, ADraftOvertakenWhileTheProgramWasShutIsSaidWhenItIsOpened) {
  killed_after([](ScreenDriver& screen) { screen.tap_all({"dig-list/record", "record/digits/2"}); });
  world.write_elsewhere(file, "T1-1", 9);
  ScreenDriver screen(world, {}, file);
  EXPECT_THAT(screen.said("notice"), HasSubstr("half-written record"));
  screen.tap("notice/understood");
  screen.tap_at(to_screen(screen.map_view(), screen.map_box(), {5, 5}));
  screen.tap("map/record-chosen");
  EXPECT_EQ(screen.said("record/find-0/count"), "2 flake");
  EXPECT_THAT(screen.said("record/save"), HasSubstr("Save the change"));
}

}  // namespace
}  // namespace nearpit::ui
