// Everything by hardware keys alone: records, and the ring that goes to every control.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <set>

#include "screen/card_tour.h"
#include "screen/ring.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;

class Keyboard : public testing::Test {
 protected:
  Keyboard() { world.measured(TestGlass().px_per_mm()); }

  static void act_on(ScreenDriver& screen, const std::string& path) {
    ring_to(screen, path);
    screen.key(Key::kEnter);
  }
  ScreenWorld world;
};

TEST_F(Keyboard, ANegativePitTakesThreeKeys) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.type("rn");
  screen.key(Key::kEnter);
  EXPECT_EQ(screen.touches(), 0);
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr);
  EXPECT_EQ(world.record(session, "T1-1")->counts, (std::vector<std::uint32_t>{0, 0, 0}));
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T3-3");
}

TEST_F(Keyboard, APositivePitWithDepthStopAndNote) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.key(Key::kEnter);
  screen.type("12");
  screen.key(Key::kDown);
  screen.type("34");
  screen.key(Key::kDown, 2);
  screen.type("45,5");
  screen.key(Key::kUp, 3);
  screen.type("+");
  screen.type("t");
  screen.type("by the old t-shaped fence, nothing below");
  screen.key(Key::kEnter);
  screen.type("s");
  act_on(screen, "record/stops/roots");
  screen.key(Key::kEnter);
  EXPECT_EQ(screen.touches(), 0);
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr) << screen.said();
  const PitRecord& record = *world.record(session, "T1-1");
  EXPECT_EQ(record.counts, (std::vector<std::uint32_t>{13, 34, 0}));
  EXPECT_EQ(record.depth_cm, 45.5);
  EXPECT_EQ(record.stop, StopReason::kRoots);
  EXPECT_EQ(record.note, "by the old t-shaped fence, nothing below");
}

TEST_F(Keyboard, ANotDugPit) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.type("rx");
  act_on(screen, "record/reasons/standing_water");
  screen.key(Key::kEnter);
  Session session = world.read(file);
  ASSERT_NE(world.record(session, "T1-1"), nullptr) << screen.said();
  EXPECT_EQ(world.record(session, "T1-1")->reason, NotDugReason::kStandingWater);
}

TEST_F(Keyboard, ASurveyIsMadeAndAnotherPitTakenByTheRing) {
  world.put("terrace.json", plan_text({}));
  ScreenDriver screen(world);
  act_on(screen, "start/place-0");
  act_on(screen, "start/file-terrace.json");
  act_on(screen, "start/make");
  act_on(screen, "notice/understood");
  act_on(screen, "dig-list/T5-5");
  screen.key(Key::kEscape);
  screen.type("rn");
  screen.key(Key::kEnter);
  EXPECT_EQ(screen.touches(), 0);
  Session session = world.read(world.path("terrace.gpkg"));
  EXPECT_NE(world.record(session, "T5-5"), nullptr) << screen.said();
}

TEST_F(Keyboard, SpaceActsLikeEnterOnTheRingAndTypesIntoATextOtherwise) {
  ScreenDriver screen(world, {}, world.make());
  ring_to(screen, "dig-list/record");
  screen.type(" ");
  ASSERT_TRUE(screen.shows("record/save"));
  screen.type("t");
  screen.type("a b");
  EXPECT_EQ(screen.view().survey->draft->note, "a b");
}

TEST_F(Keyboard, EnterOnTheRingDoesWhatItStandsOnAndNothingElse) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.type("rn");
  act_on(screen, "record/find-1/more");
  EXPECT_EQ(world.read(file).revision(), 0) << "Enter saved though the ring stood elsewhere";
  EXPECT_EQ(screen.view().survey->draft->counts[1], "1");
}

TEST_F(Keyboard, ArrowsMoveTheRingThatWay) {
  ScreenDriver screen(world, {}, world.make());
  screen.type("r");
  ring_to(screen, "record/digits/5");
  screen.key(Key::kLeft);
  EXPECT_EQ(screen.focused()->path, "record/digits/4");
  screen.key(Key::kUp);
  EXPECT_EQ(screen.focused()->path, "record/digits/1");
  screen.key(Key::kRight, 2);
  EXPECT_EQ(screen.focused()->path, "record/digits/3");
  screen.key(Key::kDown);
  EXPECT_EQ(screen.focused()->path, "record/digits/6");
}

TEST_F(Keyboard, ATouchHidesTheRing) {
  ScreenDriver screen(world, {}, world.make());
  screen.key(Key::kTab);
  ASSERT_NE(screen.focused(), nullptr);
  screen.tap("strip/day");
  EXPECT_EQ(screen.focused(), nullptr);
}

TEST_F(Keyboard, TheRingStaysOnARowThatItScrolledTo) {
  PlanSays says;
  says.first_sample.clear();
  for (int column = 1; column <= 5; ++column) {
    for (int row = 1; row <= 5; ++row)
      says.first_sample.push_back("T" + std::to_string(row) + "-" + std::to_string(column));
  }
  ScreenDriver screen(world, {}, world.make(says));
  std::set<std::string> rows;
  for (int i = 0; i < 60; ++i) {
    screen.key(Key::kTab);
    ASSERT_NE(screen.focused(), nullptr);
    const WidgetBox ring = *screen.focused();
    EXPECT_GE(ring.visible.height(), ring.box.height() - 1) << ring.path << " has the ring and can't be seen";
    if (ring.path.starts_with("dig-list/T")) rows.insert(ring.path);
  }
  EXPECT_EQ(rows.size(), 25U);
}

// Tab comes to every control of every card, and the ring is seen there.
class TabGuest : public TourGuest {
 public:
  void sees(ScreenDriver& screen, const std::string& card) override {
    if (!looked_at_.insert(card).second) return;
    std::set<std::string> wanted;
    for (const WidgetBox& one : screen.log().widgets) {
      if (one.kind == WidgetKind::kButton) wanted.insert(one.path);
    }
    std::string first;
    for (int i = 0; i < 400; ++i) {
      screen.key(Key::kTab);
      const WidgetBox* ring = screen.focused();
      if (ring == nullptr) {
        complaints += card + ": the ring is gone after Tab\n";
        break;
      }
      if (ring->visible.height() < ring->box.height() - 1)
        complaints += card + ": " + ring->path + " has the ring and can't be seen\n";
      wanted.erase(ring->path);
      if (first.empty()) {
        first = ring->path;
      } else if (first == ring->path) {
        break;
      }
    }
    for (const std::string& path : wanted)
      complaints += card + ": Tab never comes to " + path + "\n";
    // As it was: no ring, lists at their tops.
    screen.press({screen.glass().width_px - 1, screen.glass().height_px - 1});
    screen.release({screen.glass().width_px - 1, screen.glass().height_px - 1});
    std::vector<Pixel> areas;
    for (const WidgetBox& one : screen.log().widgets) {
      if (one.kind == WidgetKind::kScroll) areas.push_back(one.visible.middle());
    }
    for (const Pixel at : areas)
      screen.wheel(at, 1e6F);
  }
  std::string complaints;

 private:
  std::set<std::string> looked_at_;
};

TEST_F(Keyboard, TabComesToEveryControlOfEveryCard) {
  TabGuest guest;
  tour_of_cards(TestGlass{}, false, guest);
  EXPECT_EQ(guest.complaints, "");
}

}  // namespace
}  // namespace nearpit::ui
