// Every card on every glass that the layouts are made for: nothing cut, nothing on top of another, everything as large as a finger needs.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <set>

#include "base/numbers.h"
#include "screen/card_tour.h"
#include "screen/layout_look.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;

class LayoutGuest : public TourGuest {
 public:
  void sees(ScreenDriver& screen, const std::string& card) override {
    ++cards;
    std::vector<std::string> said = layout_faults(screen.log(), screen.glass());
    std::vector<std::string> areas;
    for (const WidgetBox& one : screen.log().widgets) {
      if (one.kind == WidgetKind::kScroll) areas.push_back(one.path);
    }
    for (const std::string& area : areas)
      page_through(screen, area, &said);
    for (const std::string& line : said) {
      // Ten keys of 12 mm and what lies between them take 147 mm.
      const bool narrow = screen.glass().mm(screen.glass().width_px) < 150;
      if (narrow && line.starts_with("typing/letters/") && line.find("only 11.") != std::string::npos) continue;
      if (told_.insert(card + line).second) complaints += card + " | " + line + "\n";
    }
  }

  int cards = 0;
  std::string complaints;

 private:
  static void add(const std::vector<std::string>& more, std::vector<std::string>* said) {
    said->insert(said->end(), more.begin(), more.end());
  }
  // Down page by page, and back to the top.
  static void page_through(ScreenDriver& screen, const std::string& area, std::vector<std::string>* said) {
    const PixelBox box = screen.widget(area).visible;
    const float page = std::max(1.0F, static_cast<float>(std::floor(screen.glass().mm(box.height()) / kPrimary_mm)));
    std::string before;
    for (std::string now = widget_lines(screen.log()); now != before; now = widget_lines(screen.log())) {
      before = now;
      if (area == "whole") {
        screen.tap("whole/down");
      } else {
        screen.wheel(box.middle(), -page);
      }
      add(layout_faults(screen.log(), screen.glass()), said);
    }
    add(layout_faults(screen.log(), screen.glass(), area), said);
    screen.wheel(box.middle(), 1e6F);
    for (int i = 0; i < 4 && area == "whole"; ++i)
      screen.tap("whole/up");
  }

  std::set<std::string> told_;
};

struct LayoutCase {
  TestGlass glass;
  bool dusk = false;
};

std::string case_name(const testing::TestParamInfo<LayoutCase>& info) {
  const TestGlass& glass = info.param.glass;
  return "At" + format_fixed(glass.width_px, 0) + "x" + format_fixed(glass.height_px, 0) + "Scale" +
         format_fixed(glass.scale * 100, 0) + (info.param.dusk ? "Dusk" : "Sun");
}

std::vector<LayoutCase> cases() {
  std::vector<LayoutCase> all;
  for (const bool dusk : {false, true}) {
    for (const TestGlass glass : {TestGlass{1280, 800, 1}, TestGlass{1280, 800, 1.5}, TestGlass{1024, 600, 1},
                                  TestGlass{1024, 600, 1.25}, TestGlass{1920, 1080, 1}, TestGlass{1920, 1080, 2}})
      all.push_back({glass, dusk});
  }
  // Upright; as low as a card may be; too low for a card.
  for (const TestGlass glass : {TestGlass{800, 1280, 1.5}, TestGlass{800, 480, 1}, TestGlass{1920, 1080, 2.5}})
    all.push_back({glass, false});
  return all;
}

class Layout : public testing::TestWithParam<LayoutCase> {};

TEST_P(Layout, HoldsOnEveryCard) {
  LayoutGuest guest;
  tour_of_cards(GetParam().glass, GetParam().dusk, guest);
  EXPECT_GE(guest.cards, 50);
  EXPECT_EQ(guest.complaints, "") << guest.cards << " cards";
}

INSTANTIATE_TEST_SUITE_P(Cards, Layout, testing::ValuesIn(cases()), case_name);

// ---- the look itself sees each kind of fault ----

class LayoutLook : public testing::Test {
 protected:
  // Two good controls side by side, with a text in the first one.
  LayoutLook() {
    log.widgets.push_back({"a", WidgetKind::kButton, {10, 10, 110, 110}, {10, 10, 110, 110}, 12, "a"});
    log.widgets.push_back({"b", WidgetKind::kButton, {150, 10, 250, 110}, {150, 10, 250, 110}, 12, "b"});
    log.texts.push_back({"a/", "a", {20, 40, 60, 60}, {20, 40, 60, 60}, 20});
  }
  std::string faults(const std::string& at_end = "") const {
    std::string all;
    for (const std::string& one : layout_faults(log, {400, 300, 5}, at_end))
      all += one + "\n";
    return all;
  }
  // Into a scroll area 100 px high.
  void scroll() {
    log.widgets.insert(log.widgets.begin(), {"s", WidgetKind::kScroll, {0, 0, 400, 120}, {0, 0, 400, 120}, 0, ""});
    log.widgets[1].area = log.widgets[2].area = log.texts[0].area = "s";
  }
  WidgetBox& a() {
    return *std::find_if(log.widgets.begin(), log.widgets.end(), [](auto& w) { return w.path == "a"; });
  }
  WidgetLog log;
};

TEST_F(LayoutLook, GoodLayoutHasNone) {
  EXPECT_EQ(faults("s"), "");
  scroll();
  EXPECT_EQ(faults("s"), "");
}
TEST_F(LayoutLook, BeyondTheGlass) {
  a().box.left = -3;
  EXPECT_THAT(faults(), HasSubstr("a: beyond the glass"));
}
TEST_F(LayoutLook, WiderThanItsScrollArea) {
  scroll();
  log.widgets[0].box.left = 15;
  EXPECT_THAT(faults(), HasSubstr("a: wider than its scroll area"));
}
TEST_F(LayoutLook, OutOfReach) {
  scroll();
  a().box.bottom = 125;
  EXPECT_EQ(faults(), "");
  EXPECT_THAT(faults("s"), HasSubstr("a: can't be scrolled to"));
}
TEST_F(LayoutLook, TooSmall) {
  a().box.bottom = 68;
  EXPECT_THAT(faults(), HasSubstr("a: only 11.6 mm, of 12"));
}
TEST_F(LayoutLook, SmallerThanPromised) {
  a().least_mm = 20.5;
  EXPECT_THAT(faults(), HasSubstr("of 20"));
}
TEST_F(LayoutLook, OverlappingAndTooNear) {
  a().box.right = 160;
  EXPECT_THAT(faults(), HasSubstr("a: overlaps b"));
  a().box.right = 140;
  EXPECT_THAT(faults(), HasSubstr("a: only 2.0 mm from b"));
  a().box.right = 136;
  EXPECT_EQ(faults(), "");
}
TEST_F(LayoutLook, TooNearToWhatIsScrolled) {
  scroll();
  a().area = "";
  log.texts[0].area = "";
  a().box.right = 145;
  EXPECT_THAT(faults(), HasSubstr("only 1.0 mm from"));
}
TEST_F(LayoutLook, DrawnTwice) {
  log.widgets[1].path = "a";
  EXPECT_THAT(faults(), HasSubstr("a: drawn twice"));
}
TEST_F(LayoutLook, CutAndShortenedText) {
  log.texts[0].cut = true;
  EXPECT_THAT(faults(), HasSubstr("text is cut"));
  log.texts[0].cut = false;
  log.texts[0].shortened = true;
  EXPECT_THAT(faults(), HasSubstr("words of ours are shortened"));
  log.texts[0].text = "window glass, aqua";
  EXPECT_EQ(faults(), "") << "a find's name comes from outside";
}
TEST_F(LayoutLook, TextThatSticksOut) {
  log.texts[0].box.bottom = 113;
  EXPECT_THAT(faults(), HasSubstr("a: text sticks out"));
}
TEST_F(LayoutLook, TextUnderAControl) {
  log.texts[0].path = "elsewhere/";
  EXPECT_THAT(faults(), HasSubstr("text lies under a"));
}
TEST_F(LayoutLook, TextOnText) {
  log.texts.push_back({"a/", "more", {50, 50, 90, 70}, {50, 50, 90, 70}, 20});
  EXPECT_THAT(faults(), HasSubstr("texts overlap"));
}

}  // namespace
}  // namespace nearpit::ui
