// Everything by hardware keys alone: records, the ring that goes to every control, and each key of the list of keys.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <functional>
#include <map>
#include <set>

#include "screen/card_tour.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;

class Keyboard : public testing::Test {
 protected:
  Keyboard() { world.measured(TestGlass().px_per_mm()); }

  // Tab until the ring stands on the control.
  static void ring_to(ScreenDriver& screen, const std::string& path) {
    for (int i = 0; i < 200; ++i) {
      if (screen.focused() != nullptr && screen.focused()->path == path) return;
      screen.key(Key::kTab);
    }
    FAIL() << "Tab never comes to " << path;
  }
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

// ---- the list of keys ----

// "Pit record: +, -" to what it does, as the card says.
std::vector<std::string> keys_told(ScreenDriver& screen) {
  std::vector<std::string> told;
  std::string heading;
  bool keys = false;
  const std::set<std::string> headings = {"Everywhere", "Map", "Dig list", "Pit record"};
  const auto& texts = screen.log().texts;
  for (std::size_t i = 0; i < texts.size(); ++i) {
    if (!texts[i].path.starts_with("keys/")) continue;
    if (texts[i].text == "Everywhere") keys = true;
    if (!keys) continue;
    if (headings.contains(texts[i].text)) {
      heading = texts[i].text;
    } else if (i + 1 < texts.size()) {
      told.push_back(heading + ": " + texts[i].text);
      ++i;  // what it does
    }
  }
  return told;
}

class EachKey : public Keyboard {
 protected:
  EachKey() {
    PlanSays says;
    says.side = 12;
    says.first_sample.clear();
    for (int row = 1; row <= 12; ++row) {
      for (int column = 1; column <= 12; column += 3)
        says.first_sample.push_back("T" + std::to_string(row) + "-" + std::to_string(column));
    }
    file = world.make(says);
    // One for each line of the card.
    checks = {
        {"Everywhere: Tab, Shift Tab", [this] { tab(); }},
        {"Everywhere: arrows", [this] { arrows(); }},
        {"Everywhere: Enter, space", [this] { enter_and_space(); }},
        {"Everywhere: Esc", [this] { escape(); }},
        {"Everywhere: Page up, Page down", [this] { pages(); }},
        {"Everywhere: ?", [this] { opens("?", "keys/back"); }},
        {"Everywhere: d", [this] { dig_list(); }},
        {"Everywhere: c", [this] { opens("c", "strip/clusters", true); }},
        {"Everywhere: y", [this] { opens("y", "strip/day", true); }},
        {"Everywhere: o", [this] { opens("o", "office/close"); }},
        {"Map: +, -", [this] { zoom(); }},
        {"Map: f", [this] { fit(); }},
        {"Map: m", [this] { to_next(); }},
        {"Dig list: Enter or r", [this] { record(); }},
        {"Dig list: g", [this] { grid_pits(); }},
        {"Pit record: 0-9, point", [this] { digits(); }},
        {"Pit record: Down, Up", [this] { down_up(); }},
        {"Pit record: +, -", [this] { more_less(); }},
        {"Pit record: n", [this] { nothing_found(); }},
        {"Pit record: x", [this] { record_panel("x", "record/reasons/slope"); }},
        {"Pit record: s", [this] { record_panel("s", "record/stops/roots"); }},
        {"Pit record: t", [this] { record_panel("t", "typing/done"); }},
        {"Pit record: Enter", [this] { save(); }},
        {"Pit record: Esc", [this] { back_to_list(); }},
    };
  }

  void tab() {
    ScreenDriver screen(world, {}, file);
    screen.key(Key::kTab, 2);
    const std::string second = screen.focused()->path;
    screen.key(Key::kBackTab);
    EXPECT_NE(screen.focused()->path, second);
    screen.key(Key::kTab);
    EXPECT_EQ(screen.focused()->path, second);
  }
  void arrows() {
    ScreenDriver screen(world, {}, file);
    const MapView before = screen.map_view();
    screen.key(Key::kRight);
    screen.key(Key::kDown);
    EXPECT_GT(screen.map_view().centre.x, before.centre.x);
    EXPECT_LT(screen.map_view().centre.y, before.centre.y);
    screen.key(Key::kLeft);
    screen.key(Key::kUp);
    EXPECT_NEAR(screen.map_view().centre.x, before.centre.x, 1e-6);
    EXPECT_NEAR(screen.map_view().centre.y, before.centre.y, 1e-6);
    screen.key(Key::kTab);
    const std::string ring = screen.focused()->path;
    screen.key(Key::kDown);
    EXPECT_NE(screen.focused()->path, ring);
    EXPECT_NEAR(screen.map_view().centre.y, before.centre.y, 1e-6);
  }
  void enter_and_space() {
    for (const bool space : {false, true}) {
      ScreenDriver screen(world, {}, file);
      ring_to(screen, "strip/office");
      if (space) {
        screen.type(" ");
      } else {
        screen.key(Key::kEnter);
      }
      EXPECT_TRUE(screen.shows("office/close"));
    }
  }
  void escape() {
    ScreenDriver screen(world, {}, file);
    screen.type("o");
    screen.key(Key::kTab);
    screen.key(Key::kEscape, 2);
    EXPECT_EQ(screen.focused(), nullptr);
    EXPECT_TRUE(screen.shows("dig-list/record"));
  }
  void pages() {
    ScreenDriver screen(world, {}, file);
    const std::string before = screen.said("dig-list");
    screen.key(Key::kPageDown);
    EXPECT_NE(screen.said("dig-list"), before);
    screen.key(Key::kPageUp);
    EXPECT_EQ(screen.said("dig-list"), before);
  }
  void opens(const std::string& key, const std::string& path, bool chosen = false) {
    ScreenDriver screen(world, {}, file);
    screen.type(key);
    ASSERT_TRUE(screen.shows(path));
    EXPECT_EQ(screen.widget(path).chosen, chosen);
  }
  void dig_list() {
    ScreenDriver screen(world, {}, file);
    screen.type("o");
    EXPECT_FALSE(screen.shows("dig-list/record"));
    screen.type("d");
    EXPECT_TRUE(screen.shows("dig-list/record"));
  }
  void zoom() {
    ScreenDriver screen(world, {}, file);
    const double before = screen.map_view().px_per_m;
    screen.type("+");
    EXPECT_GT(screen.map_view().px_per_m, before * 1.2);
    screen.type("-");
    EXPECT_NEAR(screen.map_view().px_per_m, before, before * 1e-6);
  }
  void fit() {
    ScreenDriver screen(world, {}, file);
    const MapView before = screen.map_view();
    screen.type("++");
    screen.key(Key::kLeft);
    screen.type("f");
    EXPECT_NEAR(screen.map_view().px_per_m, before.px_per_m, 1e-9);
    EXPECT_NEAR(screen.map_view().centre.x, before.centre.x, 1e-6);
  }
  void to_next() {
    ScreenDriver screen(world, {}, file);
    screen.tap("dig-list/T6-7");
    screen.type("+++");
    screen.type("m");
    const Pixel next = to_screen(screen.map_view(), screen.map_box(), {65, 55});
    EXPECT_LT(std::abs(next.x - screen.map_box().middle().x), screen.glass().px(10));
    EXPECT_LT(std::abs(next.y - screen.map_box().middle().y), screen.glass().px(25));
  }
  void record() {
    for (const bool letter : {false, true}) {
      ScreenDriver screen(world, {}, file);
      if (letter) {
        screen.type("r");
      } else {
        screen.key(Key::kEnter);
      }
      EXPECT_TRUE(screen.shows("record/save"));
    }
  }
  void grid_pits() {
    ScreenDriver screen(world, {}, file);
    screen.type("g");
    EXPECT_TRUE(screen.widget("dig-list/grid-pits-first").chosen);
    screen.type("g");
    EXPECT_FALSE(screen.widget("dig-list/grid-pits-first").chosen);
  }
  void digits() {
    ScreenDriver screen(world, {}, file);
    screen.type("r1234567890");
    EXPECT_EQ(screen.view().survey->draft->counts[0], "123456");
    screen.key(Key::kUp);
    screen.type("4.5");
    EXPECT_EQ(screen.view().survey->draft->depth_cm, "4.5");
    screen.key(Key::kBackspace);
    EXPECT_EQ(screen.view().survey->draft->depth_cm, "4.");
    drop(screen);
  }
  void down_up() {
    ScreenDriver screen(world, {}, file);
    screen.type("r");
    screen.key(Key::kDown);
    EXPECT_TRUE(screen.widget("record/find-1/count").chosen);
    screen.key(Key::kUp);
    EXPECT_TRUE(screen.widget("record/find-0/count").chosen);
  }
  void more_less() {
    ScreenDriver screen(world, {}, file);
    screen.type("r++-");
    EXPECT_EQ(screen.view().survey->draft->counts[0], "1");
    drop(screen);
  }
  void nothing_found() {
    ScreenDriver screen(world, {}, file);
    screen.type("rn");
    EXPECT_TRUE(screen.widget("record/nothing-found").chosen);
    drop(screen);
  }
  void record_panel(const std::string& key, const std::string& path) {
    ScreenDriver screen(world, {}, file);
    screen.type("r" + key);
    EXPECT_TRUE(screen.shows(path)) << key;
  }
  void save() {
    ScreenDriver screen(world, {}, file);
    screen.type("rn");
    screen.key(Key::kEnter);
    EXPECT_EQ(world.read(file).revision(), 1);
  }
  void back_to_list() {
    {
      ScreenDriver screen(world, {}, file);
      screen.type("r7");
      screen.key(Key::kEscape);
      EXPECT_TRUE(screen.shows("dig-list/record"));
    }
    ScreenDriver again(world, {}, file);
    again.type("r");
    EXPECT_EQ(again.view().survey->draft->counts[0], "7");
  }
  static void drop(ScreenDriver& screen) { screen.tap_all({"record/more", "record/more/drop", "record/more/drop"}); }

  std::string file;
  std::map<std::string, std::function<void()>> checks;
};

TEST_F(EachKey, OfTheListDoesWhatItSaysAndNoneIsMissing) {
  std::vector<std::string> told;
  {
    ScreenDriver screen(world, {}, file);
    screen.type("?");
    told = keys_told(screen);
  }
  ASSERT_GE(told.size(), 20U);
  for (const std::string& line : told) {
    SCOPED_TRACE(line);
    const auto check = checks.find(line);
    if (check == checks.end()) {
      ADD_FAILURE() << "no check for this line of the card";
      continue;
    }
    check->second();
    checks.erase(check);
  }
  for (const auto& [line, check] : checks)
    ADD_FAILURE() << line << " is not on the card (any more)";
}

}  // namespace
}  // namespace nearpit::ui
