// Notes, judgement pits, and what becomes of a record that stands already.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "screen/screen_driver.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;

class RecordChanges : public testing::Test {
 protected:
  RecordChanges() { world.measured(TestGlass().px_per_mm()); }

  static void record_negative(ScreenDriver& screen) {
    screen.tap_all({"dig-list/record", "record/nothing-found", "record/save"});
  }
  ScreenWorld world;
};

TEST_F(RecordChanges, ANoteIsTypedWithTheKeysOnTheGlass) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/note"});
  screen.tap_all({"typing/letters/capitals", "typing/letters/W", "typing/letters/e", "typing/letters/t",
                  "typing/letters/space", "typing/letters/c", "typing/letters/l", "typing/letters/a",
                  "typing/letters/s", "typing/letters/rub-out", "typing/letters/y", "typing/letters/signs",
                  "typing/letters/\xC3\xA9", "typing/letters/signs", "typing/letters/left", "typing/letters/left",
                  "typing/letters/x", "typing/letters/right", "typing/letters/."});
  screen.tap_all({"typing/done", "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->note, "Wet claxy.\xC3\xA9");
}

TEST_F(RecordChanges, ANoteIsTypedWithAKeyboardInAnyScript) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/note"});
  const std::string note =
      "dark fill, \xCE\xB3\xE1\xBF\x86 \xD1\x82\xD1\x91\xD0\xBC\xD0\xBD\xD0\xB0\xD1\x8F "
      "\xC4\x91\xE1\xBA\xA5t \xE5\x9C\x9F";
  screen.type(note);
  screen.key(Key::kHome);
  screen.type("!");
  screen.key(Key::kDelete);
  screen.key(Key::kEnd);
  screen.key(Key::kEnter);
  ASSERT_TRUE(screen.shows("record/save"));
  EXPECT_THAT(screen.said("record/note"), HasSubstr("!"));
  screen.tap("record/save");
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->note, "!" + note.substr(1));
}

TEST_F(RecordChanges, LeaveAsItWasTakesTheTypingBack) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/note"});
  screen.type("first");
  screen.tap_all({"typing/done", "record/note"});
  screen.type(" and second");
  screen.tap_all({"typing/leave", "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->note, "first");
}

TEST_F(RecordChanges, EscapeLeavesATextAndThrowsNoneOfItAway) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/note"});
  screen.type("kept");
  screen.key(Key::kEscape);
  screen.tap("record/save");
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->note, "kept");
}

TEST_F(RecordChanges, AReasonOfBlanksIsNone) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  record_negative(screen);
  screen.open_pit("T1-1");
  screen.tap_all(
      {"record/more", "record/more/withdraw", "typing/letters/space", "typing/letters/space", "typing/done"});
  EXPECT_EQ(world.read(file).revision(), 1);
}

TEST_F(RecordChanges, ANodeThatIsNotDueBecomesAJudgementPitAndOpensNeighboursOnRequest) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.open_pit("T2-4");
  EXPECT_THAT(screen.said("record"), HasSubstr("judgement"));
  screen.tap_all({"record/find-0/more", "record/save"});
  {
    Session session = world.read(file);
    ASSERT_NE(world.record(session, "T2-4"), nullptr);
    EXPECT_EQ(world.record(session, "T2-4")->chosen_by, ChosenBy::kJudgement);
    EXPECT_EQ(session.model().survey().dig_list().due().size(), 3U);
  }
  screen.open_pit("T2-4");
  screen.tap_all({"record/more", "record/more/neighbours", "typing/phrase/0", "typing/done"});
  Session session = world.read(file);
  EXPECT_FALSE(session.model().survey().asked().empty());
  EXPECT_THAT(screen.said("dig-list"), HasSubstr("judgement pit"));
}

TEST_F(RecordChanges, JudgementIsSwitchedByHand) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/more", "record/more/judgement", "record/back", "record/nothing-found",
                  "record/save"});
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->chosen_by, ChosenBy::kJudgement);
}

TEST_F(RecordChanges, ARecordIsChangedWithWhyAndTheFirstStaysInTheHistory) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/find-0/more", "record/save"});
  screen.open_pit("T1-1");
  screen.tap_all({"record/find-0/more", "record/find-1/more"});
  EXPECT_THAT(screen.said("record/save"), HasSubstr("why"));
  screen.tap("record/save");
  EXPECT_EQ(world.read(file).revision(), 1);
  screen.tap_all({"record/why", "typing/phrase/0", "typing/done", "record/save"});
  Session session = world.read(file);
  EXPECT_EQ(session.revision(), 2);
  EXPECT_EQ(world.record(session, "T1-1")->counts, (std::vector<std::uint32_t>{2, 1, 0}));
  screen.open_pit("T1-1");
  screen.tap_all({"record/more", "record/more/history"});
  const std::string history = screen.said("record/history");
  EXPECT_THAT(history, HasSubstr("flake 2, sherd 1"));
  EXPECT_THAT(history, HasSubstr("flake 1"));
  EXPECT_THAT(history, HasSubstr("miscounted"));
  EXPECT_LT(history.find("flake 2"), history.find("flake 1")) << history;
}

TEST_F(RecordChanges, ARecordIsWithdrawnWithWhyAndThePitIsDueAgain) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  record_negative(screen);
  screen.open_pit("T1-1");
  screen.tap_all({"record/more", "record/more/withdraw", "typing/done"});
  EXPECT_NE(world.record(world.read(file), "T1-1"), nullptr) << "withdrawn without a reason";
  if (!screen.shows("record/more/withdraw")) screen.tap("record/more");
  screen.tap_all({"record/more/withdraw", "typing/phrase/1", "typing/done"});
  Session session = world.read(file);
  EXPECT_EQ(world.record(session, "T1-1"), nullptr);
  EXPECT_TRUE(session.model().survey().dig_list().due(session.model().name_of("T1-1")->node));
  const auto past = session.history(*session.model().name_of("T1-1"));
  ASSERT_TRUE(past.ok());
  ASSERT_EQ(past->size(), 2U);
  EXPECT_EQ(past->back().why, "never dug");
}

TEST_F(RecordChanges, ARecordBelongsToAnotherPitThatIsTouchedOnTheMap) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/find-0/more", "record/save"});
  screen.open_pit("T1-1");
  screen.tap_all({"record/more", "record/more/move"});
  screen.tap_pit("T3-3");
  EXPECT_THAT(screen.said("record/move"), HasSubstr("T3-3"));
  screen.tap_all({"record/move/why", "typing/phrase/0", "typing/done", "record/move/do"});
  Session session = world.read(file);
  EXPECT_EQ(world.record(session, "T1-1"), nullptr);
  ASSERT_NE(world.record(session, "T3-3"), nullptr) << screen.said();
  EXPECT_EQ(world.record(session, "T3-3")->counts[0], 1U);
}

TEST_F(RecordChanges, ARecordBelongsToAnotherPitWhoseLabelIsTyped) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  record_negative(screen);
  screen.open_pit("T1-1");
  screen.tap_all({"record/more", "record/more/move", "record/move/other"});
  screen.type("T5-5");
  screen.tap_all({"typing/done", "record/move/why"});
  screen.type("two crews, one sheet");
  screen.tap("typing/done");
  EXPECT_THAT(screen.said("record/move"), HasSubstr("T5-5"));
  screen.tap("record/move/do");
  Session session = world.read(file);
  EXPECT_EQ(world.record(session, "T1-1"), nullptr);
  ASSERT_NE(world.record(session, "T5-5"), nullptr) << screen.said();
}

TEST_F(RecordChanges, APitThatIsNotThereIsSaidAndWhatWasTypedStays) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  record_negative(screen);
  screen.open_pit("T1-1");
  screen.tap_all({"record/more", "record/more/move", "record/move/other"});
  screen.type("T99-5");
  screen.tap_all({"typing/done", "record/move/why", "typing/phrase/1", "typing/done", "record/move/do"});
  EXPECT_THAT(screen.said("notice"), HasSubstr("T99-5"));
  screen.tap("notice/understood");
  EXPECT_THAT(screen.said("record/move"), HasSubstr("T99-5"));
  EXPECT_THAT(screen.said("record/move"), HasSubstr("wrong line"));
  EXPECT_NE(world.record(world.read(file), "T1-1"), nullptr);
}

TEST_F(RecordChanges, ForgetWhatITypedEmptiesTheRecord) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/digits/7", "record/more", "record/more/drop"});
  EXPECT_FALSE(screen.shows("dig-list/record")) << "one touch forgets nothing";
  screen.tap("record/more/drop");
  ASSERT_TRUE(screen.shows("dig-list/record"));
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T1-1");
  screen.tap("dig-list/record");
  EXPECT_EQ(screen.view().survey->draft->counts[0], "");
}

TEST_F(RecordChanges, TheCrewIsChosenByTouchFromThePlanOrTypedAndStandsInTheRecord) {
  PlanSays says;
  says.crews = {"A", "B"};
  const std::string file = world.make(says);
  {
    ScreenDriver screen(world, {}, file);
    EXPECT_THAT(screen.widget("strip/crew").label, HasSubstr("Who"));
    screen.tap_all({"strip/crew", "office/crew-1"});
    EXPECT_THAT(screen.widget("strip/crew").label, testing::EndsWith("B"));
    screen.tap("strip/dig-list");
    record_negative(screen);
    EXPECT_EQ(world.record(world.read(file), "T1-1")->crew, "B");
  }
  ScreenDriver again(world, {}, file);
  EXPECT_THAT(again.widget("strip/crew").label, testing::EndsWith("B")) << "who was at work last is remembered";
}

TEST_F(RecordChanges, ACrewNameIsTypedWhereThePlanNamesNone) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"strip/crew", "office/crew-name"});
  screen.type("Ngaio");
  screen.tap_all({"typing/done", "strip/dig-list"});
  EXPECT_THAT(screen.widget("strip/crew").label, testing::EndsWith("Ngaio"));
  record_negative(screen);
  EXPECT_EQ(world.record(world.read(file), "T1-1")->crew, "Ngaio");
}

}  // namespace
}  // namespace nearpit::ui
