// Ways in which a crew could lose what it typed, record what it did not mean, or be told what is not so.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "screen/screen_driver.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;
using testing::Not;

class NothingLost : public testing::Test {
 protected:
  NothingLost() { world.measured(TestGlass{}.px_per_mm()); }

  ScreenWorld world;
};

TEST_F(NothingLost, AnotherPitOpenedFromTheMapLeavesThisOneHalfWritten) {
  const std::string file = world.make();
  {
    ScreenDriver screen(world, {}, file);
    screen.tap_all({"dig-list/record", "record/digits/7"});
    screen.open_pit("T3-3");
    screen.tap_all({"record/digits/5", "record/back"});
    EXPECT_THAT(screen.said("dig-list/T1-1"), HasSubstr("half written"));
  }
  ScreenDriver again(world, {}, file);
  again.open_pit("T1-1");
  EXPECT_THAT(again.said("record/find-0/count"), HasSubstr("7"));
  again.open_pit("T3-3");
  EXPECT_THAT(again.said("record/find-0/count"), HasSubstr("5"));
}

TEST_F(NothingLost, AHalfTypedChangeKeepsTheRecordFromBeingMovedOrWithdrawn) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/3", "record/save"});
  screen.open_pit("T1-1");
  screen.tap_all({"record/digits/9", "record/more"});
  EXPECT_FALSE(screen.shows("record/more/move"));
  EXPECT_FALSE(screen.shows("record/more/withdraw"));
  screen.tap_all({"record/back", "record/back", "strip/day"});
  screen.open_pit("T1-1");
  EXPECT_THAT(screen.said("record/find-0/count"), HasSubstr("9"));
}

TEST_F(NothingLost, APitThatSomebodyElseRecordsMeanwhileCanStillBeSavedWithAReason) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.open_pit("T3-3");
  screen.tap_all({"record/digits/5", "record/back"});
  world.write_elsewhere(file, "T3-3", 1);
  screen.open_pit("T1-1");
  screen.tap_all({"record/nothing-found", "record/save"});  // brings the news in
  screen.open_pit("T3-3");
  EXPECT_THAT(screen.said("notice"), HasSubstr("recorded by somebody else"));
  screen.tap("notice/understood");
  EXPECT_THAT(screen.said("record/find-0/count"), HasSubstr("5"));
  screen.tap_all({"record/why", "typing/phrase/0", "typing/done", "record/save"});
  EXPECT_EQ(world.record(world.read(file), "T3-3")->counts[0], 5U);
}

TEST_F(NothingLost, EscFromANoteKeepsTheNote) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/note"});
  screen.type("dark fill");
  screen.key(Key::kEscape);
  EXPECT_THAT(screen.said("record/note"), HasSubstr("dark fill"));
}

TEST_F(NothingLost, AReasonForARefusedWithdrawalIsKept) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/3", "record/save"});
  screen.open_pit("T1-1");
  world.write_elsewhere(file, "T1-1", 4);
  screen.tap_all({"record/more", "record/more/withdraw"});
  screen.type("typed on the wrong line");
  screen.tap("typing/done");
  ASSERT_TRUE(screen.shows("notice/understood"));
  screen.tap("notice/understood");
  EXPECT_EQ(screen.view().survey->draft->why, "typed on the wrong line");
  EXPECT_NE(world.record(world.read(file), "T1-1"), nullptr);
}

TEST_F(NothingLost, NotSavedStaysOnTheStripUntilItIsSaved) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/3"});
  world.write_elsewhere(file, "T1-1", 4);
  screen.tap_all({"record/save", "notice/understood"});
  EXPECT_THAT(screen.said("strip"), HasSubstr("NOT saved: T1-1"));
  screen.tap_all({"record/why", "typing/phrase/0", "typing/done", "record/save"});
  EXPECT_THAT(screen.said("strip"), HasSubstr("Saved T1-1"));
  EXPECT_THAT(screen.said("strip"), Not(HasSubstr("NOT saved")));
}

TEST_F(NothingLost, TheMovePanelMeansOnlyAPitTouchedSinceItWasOpened) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/3", "record/save"});
  screen.open_pit("T1-1");
  screen.tap_pit("T3-3");
  screen.tap_all({"record/more", "record/more/move"});
  EXPECT_THAT(screen.said("record/move"), Not(HasSubstr("T3-3")));
  screen.tap_pit("T3-3");
  EXPECT_THAT(screen.said("record/move"), HasSubstr("It was T3-3"));
  screen.tap_all({"record/move/why", "typing/phrase/0", "typing/done", "record/move/do"});
  // The next record opens on its rows, not where the last one was left.
  screen.open_pit("T1-1");
  EXPECT_TRUE(screen.shows("record/save"));
  EXPECT_EQ(screen.view().survey->draft->why, "");
}

TEST_F(NothingLost, AHalfTypedChangeOfARecordStandsOnTheList) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/3", "record/save"});
  screen.open_pit("T1-1");
  screen.tap_all({"record/digits/8", "record/back"});
  EXPECT_THAT(screen.said("dig-list/T1-1"), HasSubstr("half written"));
  screen.tap("dig-list/T1-1");
  EXPECT_THAT(screen.said("record/find-0/count"), HasSubstr("8"));
}

TEST_F(NothingLost, TwoWindowsKeepEachOthersDrafts) {
  const std::string file = world.make();
  {
    ScreenDriver one(world, {}, file);
    one.tap_all({"dig-list/record", "record/digits/7", "record/back"});
    ScreenDriver other(world, {}, file);
    one.open_pit("T5-5");
    one.tap_all({"record/digits/1", "record/back"});
    other.open_pit("T3-3");
    other.tap_all({"record/digits/2", "record/back"});
  }
  ScreenDriver again(world, {}, file);
  for (const std::string pit : {"T1-1", "T3-3", "T5-5"})
    EXPECT_THAT(again.said("dig-list/" + pit), HasSubstr("half written")) << pit;
}

TEST_F(NothingLost, KeysActOnNothingUnderANotice) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/3"});
  world.write_elsewhere(file, "T1-1", 4);
  screen.tap("record/save");
  screen.type("dyco?rgnx");
  screen.key(Key::kEnter);
  screen.key(Key::kEscape);
  EXPECT_TRUE(screen.shows("notice/understood"));
  screen.tap("notice/understood");
  EXPECT_THAT(screen.said("record/find-0/count"), HasSubstr("3"));
}

}  // namespace
}  // namespace nearpit::ui
