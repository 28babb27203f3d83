// Fingers: acting on release, sliding off, drawing lists, the map.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>

#include "screen/screen_driver.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;

class Touch : public testing::Test {
 protected:
  Touch() { world.measured(TestGlass().px_per_mm()); }

  // A list that is much longer than its card.
  PlanSays many() const {
    PlanSays says;
    says.first_sample.clear();
    for (int row = 1; row <= 5; ++row) {
      for (int column = 1; column <= 5; ++column)
        says.first_sample.push_back("T" + std::to_string(row) + "-" + std::to_string(column));
    }
    return says;
  }
  static Pixel on_map(const ScreenDriver& screen, const Point& ground) {
    return to_screen(screen.map_view(), screen.map_box(), ground);
  }
  static double far(Pixel a, Pixel b) { return std::hypot(a.x - b.x, a.y - b.y); }
  ScreenWorld world;
};

TEST_F(Touch, AButtonActsWhenTheFingerIsLiftedAndNotBefore) {
  ScreenDriver screen(world, {}, world.make());
  const Pixel button = screen.middle_of("dig-list/record");
  screen.press(button);
  EXPECT_TRUE(screen.shows("dig-list/record"));
  screen.release(button);
  EXPECT_TRUE(screen.shows("record/save"));
}

TEST_F(Touch, AFingerThatSlidOffDoesNothing) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found"});
  const Pixel save = screen.middle_of("record/save");
  const Pixel off = screen.middle_of("record/not-dug");
  screen.press(save);
  screen.move(off);
  screen.release(off);
  EXPECT_TRUE(screen.shows("record/save"));
  EXPECT_TRUE(screen.widget("record/nothing-found").chosen);
  EXPECT_EQ(world.read(file).revision(), 0);
}

TEST_F(Touch, AFingerThatSlidOffAndBackActs) {
  ScreenDriver screen(world, {}, world.make());
  const Pixel button = screen.middle_of("dig-list/record");
  screen.press(button);
  screen.move(screen.middle_of("strip/office"));
  screen.move(button);
  screen.release(button);
  EXPECT_TRUE(screen.shows("record/save"));
}

TEST_F(Touch, ATapShorterThanAFrameActs) {
  ScreenDriver screen(world, {}, world.make());
  const Pixel button = screen.middle_of("dig-list/record");
  screen.add(PointerPressed{button});
  screen.add(PointerReleased{button});
  screen.settle();
  EXPECT_TRUE(screen.shows("record/save"));
}

TEST_F(Touch, AnImpatientSecondTouchDoesNotActOnTheCardThatCameUnderIt) {
  const std::string file = world.make();
  std::string once;
  Pixel button;
  {
    ScreenDriver screen(world, {}, file);
    button = screen.middle_of("dig-list/record");
    screen.tap_at(button);
    once = widget_lines(screen.log());
  }
  ScreenDriver screen(world, {}, file);
  screen.set_pace(80);
  screen.tap_at(button);
  screen.tap_at(button);
  screen.tap_at({button.x + screen.glass().px(5), button.y});
  EXPECT_EQ(widget_lines(screen.log()), once);
  // Elsewhere at once, and there a little later, it acts.
  screen.tap("record/nothing-found");
  EXPECT_TRUE(screen.widget("record/nothing-found").chosen);
  screen.set_pace(600);
  screen.tap("record/save");
  EXPECT_EQ(world.read(file).revision(), 1);
}

TEST_F(Touch, SavingTwiceInAHurryRecordsOnce) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  screen.tap_all({"dig-list/record", "record/nothing-found"});
  const Pixel save = screen.middle_of("record/save");
  screen.add(PointerPressed{save});
  screen.add(PointerReleased{save});
  screen.add(PointerPressed{save});
  screen.add(PointerReleased{save});
  screen.settle();
  EXPECT_EQ(world.read(file).revision(), 1);
  EXPECT_TRUE(screen.shows("dig-list/record"));
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T3-3");
}

TEST_F(Touch, QuickTouchesOnTheSameCardAllCount) {
  ScreenDriver screen(world, {}, world.make());
  screen.tap_all({"dig-list/record", "record/find-0/more"});
  screen.set_pace(40);
  for (int i = 0; i < 6; ++i)
    screen.tap_at(screen.middle_of("record/find-0/more"));
  EXPECT_EQ(screen.view().survey->draft->counts[0], "7");
}

TEST_F(Touch, DrawingAListMovesItAndActsOnNoRow) {
  ScreenDriver screen(world, {}, world.make(many()));
  const float before = screen.widget("dig-list/T1-3").box.top;
  const Pixel row = screen.middle_of("dig-list/T1-3");
  screen.drag(row, {row.x, row.y - screen.glass().px(15)});
  EXPECT_NEAR(before - screen.widget("dig-list/T1-3").box.top, screen.glass().px(15), 1);
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T1-1");
}

TEST_F(Touch, AListStopsAtItsEnds) {
  ScreenDriver screen(world, {}, world.make(many()));
  const PixelBox area = screen.widget("dig-list/list").box;
  const float first = screen.widget("dig-list/T1-1").box.top;
  screen.drag(area.middle(), {area.middle().x, area.bottom + 300});
  EXPECT_EQ(screen.widget("dig-list/T1-1").box.top, first);
  for (int i = 0; i < 40; ++i)
    screen.drag(area.middle(), {area.middle().x, area.top});
  const std::string last = screen.view().survey->due.back().label;
  EXPECT_NEAR(screen.widget("dig-list/" + last).box.bottom, area.bottom, 1.5);
}

TEST_F(Touch, WheelAndPageButtonsMoveAList) {
  ScreenDriver screen(world, {}, world.make(many()));
  const PixelBox area = screen.widget("dig-list/list").box;
  const auto top = [&] { return screen.widget("dig-list/T1-1").box.top; };
  const float before = top();
  screen.wheel(area.middle(), -1);
  EXPECT_LT(top(), before);
  screen.wheel(area.middle(), 5);
  EXPECT_EQ(top(), before);
  screen.tap("dig-list/list/down");
  EXPECT_FALSE(screen.shows("dig-list/T1-1") && !screen.widget("dig-list/T1-1").visible.empty());
  screen.tap("dig-list/list/up");
  EXPECT_EQ(top(), before);
}

TEST_F(Touch, EveryRowOfALongListCanBeReachedAndTaken) {
  ScreenDriver screen(world, {}, world.make(many()));
  for (const std::string label : {"T5-5", "T1-2", "T3-3", "T5-1"}) {
    screen.tap("dig-list/" + label);
    EXPECT_EQ(screen.widget("dig-list/record").label, "Record " + label);
  }
}

// ---- the map ----

TEST_F(Touch, TheMapFollowsTheFinger) {
  ScreenDriver screen(world, {}, world.make());
  const Point place{25, 25};
  const Pixel from = on_map(screen, place);
  const Pixel to{from.x - 60, from.y + 45};
  screen.drag(from, to);
  EXPECT_LT(far(on_map(screen, place), to), 1.0);
  EXPECT_FALSE(screen.view().survey->chosen) << "a drag is no touch";
}

TEST_F(Touch, TheWheelZoomsAboutThePointer) {
  ScreenDriver screen(world, {}, world.make());
  const Pixel at = on_map(screen, {15, 35});
  const double before = screen.map_view().px_per_m;
  screen.wheel(at, 2);
  EXPECT_GT(screen.map_view().px_per_m, before * 1.2);
  EXPECT_LT(far(on_map(screen, {15, 35}), at), 1.0);
  screen.wheel(at, -2);
  EXPECT_NEAR(screen.map_view().px_per_m, before, 1e-6);
}

TEST_F(Touch, ButtonsZoomFitAndFindTheNextPit) {
  ScreenDriver screen(world, {}, world.make());
  const MapView first = screen.map_view();
  screen.tap("map/nearer");
  screen.tap("map/nearer");
  EXPECT_GT(screen.map_view().px_per_m, first.px_per_m * 1.5);
  screen.tap("map/to-next");
  EXPECT_LT(distance_m(screen.map_view().centre, {5, 5}), 12.0) << "kept within reach of the survey";
  screen.tap("map/farther");
  EXPECT_LT(screen.map_view().px_per_m, first.px_per_m * 2);
  screen.tap("map/whole");
  EXPECT_NEAR(screen.map_view().px_per_m, first.px_per_m, 1e-9);
  EXPECT_LT(distance_m(screen.map_view().centre, first.centre), 1e-6);
}

TEST_F(Touch, ATouchPicksTheNearestPitWithinTwelveMillimetres) {
  ScreenDriver screen(world, {}, world.make());
  // Zoomed in until neighbours lie more than 24 mm apart.
  while (screen.map_view().px_per_m * 10 < screen.glass().px(30)) {
    const double before = screen.map_view().px_per_m;
    screen.wheel(screen.map_box().middle(), 1);
    ASSERT_GT(screen.map_view().px_per_m, before);
  }
  const Pixel pit = on_map(screen, {25, 25});
  screen.tap_at({pit.x + screen.glass().px(11.5), pit.y});
  ASSERT_TRUE(screen.view().survey->chosen);
  EXPECT_EQ(screen.view().survey->chosen->name.label, "T3-3");
  EXPECT_THAT(screen.said("map"), HasSubstr("T3-3"));
  EXPECT_THAT(screen.said("map"), HasSubstr("grid pit"));
  screen.tap_at({pit.x + screen.glass().px(12.6), pit.y});
  EXPECT_FALSE(screen.view().survey->chosen);
  const Pixel other = on_map(screen, {35, 25});
  screen.tap_at({other.x - screen.glass().px(8), other.y});
  ASSERT_TRUE(screen.view().survey->chosen);
  EXPECT_EQ(screen.view().survey->chosen->name.label, "T3-4");
}

TEST_F(Touch, ATouchThatMovedALittleStillPicksWhereItWentDown) {
  ScreenDriver screen(world, {}, world.make());
  const Pixel pit = on_map(screen, {25, 25});
  const MapView before = screen.map_view();
  const Pixel near{pit.x + screen.glass().px(2), pit.y};
  screen.press(pit);
  screen.move(near);
  screen.release(near);
  ASSERT_TRUE(screen.view().survey->chosen);
  EXPECT_EQ(screen.view().survey->chosen->name.label, "T3-3");
  EXPECT_EQ(screen.map_view().centre.x, before.centre.x);
}

TEST_F(Touch, TheMapStaysWhereItWasWhenOtherCardsCome) {
  ScreenDriver screen(world, {}, world.make());
  screen.tap("map/nearer");
  screen.drag(on_map(screen, {25, 25}), on_map(screen, {20, 28}));
  const MapView before = screen.map_view();
  screen.tap_all({"strip/day", "strip/clusters", "strip/office", "strip/dig-list", "dig-list/record"});
  EXPECT_EQ(screen.map_view().px_per_m, before.px_per_m);
  EXPECT_EQ(screen.map_view().centre.x, before.centre.x);
  EXPECT_EQ(screen.map_view().centre.y, before.centre.y);
}

// ---- glasses that are too small ----

TEST_F(Touch, OnANarrowGlassMapAndCardTakeTurns) {
  const std::string file = world.make();
  ScreenDriver screen(world, {800, 1280, 1.5}, file);
  EXPECT_TRUE(screen.shows("dig-list/record"));
  EXPECT_FALSE(screen.shows("map/ground"));
  screen.tap("strip/map");
  EXPECT_TRUE(screen.shows("map/ground"));
  EXPECT_FALSE(screen.shows("dig-list/record"));
  screen.tap_at(on_map(screen, {25, 25}));
  screen.tap("map/record-chosen");
  EXPECT_TRUE(screen.shows("record/save")) << "the record comes in front of the map";
  screen.tap_all({"record/nothing-found", "record/save", "strip/map", "strip/map"});
  EXPECT_TRUE(screen.shows("dig-list/record"));
  EXPECT_NE(world.record(world.read(file), "T3-3"), nullptr);
}

TEST_F(Touch, OnAGlassThatIsTooLowEverythingIsReachedByItsButtons) {
  const std::string file = world.make();
  world.measured(TestGlass{1920, 1080, 2.5}.px_per_mm());
  ScreenDriver screen(world, {1920, 1080, 2.5}, file);
  ASSERT_TRUE(screen.shows("whole/down"));
  screen.tap_all({"dig-list/record", "record/nothing-found", "record/save", "strip/day", "strip/dig-list"});
  EXPECT_NE(world.record(world.read(file), "T1-1"), nullptr);
  EXPECT_EQ(screen.widget("dig-list/record").label, "Record T3-3");
}

TEST_F(Touch, NoFrameIsDrawnWhenNothingComesIn) {
  ScreenDriver screen(world, {}, world.make());
  const int before = screen.frames();
  screen.settle();
  EXPECT_EQ(screen.frames(), before);
  // A pointer that passes over, not pressed, changes nothing.
  screen.move({100, 100});
  EXPECT_EQ(screen.frames(), before);
  screen.tap("strip/day");
  EXPECT_LE(screen.frames() - before, 14);
}

}  // namespace
}  // namespace nearpit::ui
