// Each line of the list of keys does what it says, and no key is unlisted.
#include <gtest/gtest.h>

#include <cmath>
#include <functional>
#include <map>
#include <set>

#include "screen/ring.h"

namespace nearpit::ui {
namespace {

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

class EachKey : public testing::Test {
 protected:
  EachKey() {
    world.measured(TestGlass().px_per_mm());
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

  ScreenWorld world;
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

// '=' is '+' without Shift and ',' the point of many keyboards; a space acts on the ring alone.
TEST_F(EachKey, ThatIsNotListedDoesNothing) {
  const std::string everywhere = "?dcyo+-=fm";
  for (const bool record : {false, true}) {
    ScreenDriver screen(world, {}, file);
    if (record) screen.type("r");
    const std::string listed = everywhere + (record ? "0123456789.,nxst" : "rg");
    const std::string before = widget_lines(screen.log());
    const MapView view = screen.map_view();
    for (char letter = ' '; letter <= '~'; ++letter) {
      if (listed.find(letter) != std::string::npos) continue;
      screen.type(std::string(1, letter));
      EXPECT_EQ(widget_lines(screen.log()), before) << "'" << letter << "' does something";
      EXPECT_EQ(screen.map_view().px_per_m, view.px_per_m) << letter;
      EXPECT_EQ(screen.map_view().centre.x, view.centre.x) << letter;
    }
  }
}

}  // namespace
}  // namespace nearpit::ui
