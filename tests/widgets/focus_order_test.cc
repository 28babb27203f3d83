#include "widgets/focus_order.h"

#include <gtest/gtest.h>

#include <set>

#include "support/test_random.h"

namespace nearpit::ui {
namespace {

WidgetLog log_of(const std::vector<std::pair<std::string, Pixel>>& places) {
  WidgetLog log;
  for (const auto& [path, at] : places)
    log.widgets.push_back({path, WidgetKind::kButton, {at.x, at.y, at.x + 10, at.y + 10}, {}, 12, path});
  return log;
}

// a b c
// d   e
WidgetLog two_rows() {
  return log_of({{"a", {0, 0}}, {"b", {20, 0}}, {"c", {40, 0}}, {"d", {0, 20}}, {"e", {40, 20}}});
}

TEST(FocusOrder, TabGoesRoundInTheOrderOfDrawing) {
  const WidgetLog log = two_rows();
  EXPECT_EQ(next_focus(log, "", Key::kTab), "a");
  EXPECT_EQ(next_focus(log, "a", Key::kTab), "b");
  EXPECT_EQ(next_focus(log, "e", Key::kTab), "a");
  EXPECT_EQ(next_focus(log, "", Key::kBackTab), "e");
  EXPECT_EQ(next_focus(log, "a", Key::kBackTab), "e");
  EXPECT_EQ(next_focus(log, "d", Key::kBackTab), "c");
}

TEST(FocusOrder, AControlThatIsGoneBeginsAnew) {
  EXPECT_EQ(next_focus(two_rows(), "gone", Key::kTab), "a");
  EXPECT_EQ(next_focus(two_rows(), "gone", Key::kBackTab), "e");
  EXPECT_EQ(next_focus(two_rows(), "gone", Key::kDown), "a");
}

TEST(FocusOrder, ArrowsGoToTheNextOneThatWayOrStay) {
  const WidgetLog log = two_rows();
  EXPECT_EQ(next_focus(log, "a", Key::kRight), "b");
  EXPECT_EQ(next_focus(log, "b", Key::kRight), "c");
  EXPECT_EQ(next_focus(log, "c", Key::kRight), "c");
  EXPECT_EQ(next_focus(log, "a", Key::kDown), "d");
  EXPECT_EQ(next_focus(log, "c", Key::kDown), "e");
  EXPECT_EQ(next_focus(log, "d", Key::kRight), "e");
  EXPECT_EQ(next_focus(log, "e", Key::kUp), "c");
  EXPECT_EQ(next_focus(log, "e", Key::kLeft), "d");
  EXPECT_EQ(next_focus(log, "a", Key::kUp), "a");
}

TEST(FocusOrder, OnlyButtonsAreStoppedAt) {
  WidgetLog log = two_rows();
  log.widgets[1].kind = WidgetKind::kMap;
  log.widgets[2].kind = WidgetKind::kScroll;
  EXPECT_EQ(next_focus(log, "a", Key::kTab), "d");
  EXPECT_EQ(next_focus(log, "a", Key::kRight), "e");
}

TEST(FocusOrder, WithNothingToStopAtItStays) {
  EXPECT_EQ(next_focus({}, "a", Key::kTab), "a");
  EXPECT_EQ(next_focus({}, "", Key::kDown), "");
}

TEST(FocusOrder, TabComesToEveryOneOnceAndBackTabIsItsOpposite) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(50); ++round) {
    std::vector<std::pair<std::string, Pixel>> places;
    for (int i = random.between(1, 30); i > 0; --i)
      places.push_back({std::to_string(i),
                        {static_cast<float>(random.between(0, 500)), static_cast<float>(random.between(0, 500))}});
    const WidgetLog log = log_of(places);
    std::set<std::string> seen;
    std::string at = next_focus(log, "", Key::kTab);
    while (seen.insert(at).second) {
      const std::string next = next_focus(log, at, Key::kTab);
      ASSERT_EQ(next_focus(log, next, Key::kBackTab), at);
      at = next;
    }
    ASSERT_EQ(seen.size(), places.size());
  }
}

}  // namespace
}  // namespace nearpit::ui
