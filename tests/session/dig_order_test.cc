// Where a crew dug last, and the pit to walk to next.
#include "session/dig_order.h"

#include <gtest/gtest.h>

#include "session/two_devices.h"

namespace nearpit {
namespace {

class DigOrderTest : public testing::Test {
 protected:
  DigOrderTest() : session(devices.a.open()) {}

  void dig(const std::string& pit, std::uint32_t flakes, const std::string& crew, const std::string& dug_at) {
    Action action = dug(pit, flakes);
    auto& record = std::get<RecordPit>(action.what);
    record.crew.emplace(crew);
    record.dug_at.emplace(dug_at);
    if (!session.model().survey().dig_list().due(session.model().name_of(pit).value().node))
      record.chosen_by.emplace(ChosenBy::kJudgement);
    session.apply({action}).value();
  }
  NodeId node(const std::string& label) const { return session.model().name_of(label).value().node; }
  std::string next(const std::string& after, bool first_sample_first = false) const {
    const NodeId stop =
        next_stop(session.model(), dig_order(session.model(), "", std::nullopt), node(after), first_sample_first);
    return stop == kNoNode ? "" : session.model().label(stop);
  }
  std::string last(const std::string& crew) const {
    const auto found = last_dug(session.model(), crew);
    return found ? found->label : "";
  }

  TwoDevices devices;
  Session session;
};

TEST_F(DigOrderTest, NobodyDugYet) { EXPECT_EQ(last(""), ""); }

TEST_F(DigOrderTest, LastDugIsByTheTimeDugAndNotByTheTimeWritten) {
  dig("T3-3", 0, "A", "2026-02-01T11:00Z");
  dig("T1-1", 0, "A", "2026-02-01T10:00Z");
  EXPECT_EQ(last(""), "T3-3");
  const auto found = last_dug(session.model(), "");
  EXPECT_EQ(found->place.x, 25);
  EXPECT_EQ(found->place.y, 25);
}

TEST_F(DigOrderTest, OfPitsDugAtTheSameTimeTheLastWrittenIsTheLast) {
  dig("T3-3", 0, "A", "2026-02-01T10:00Z");
  dig("T1-1", 0, "A", "2026-02-01T10:00Z");
  EXPECT_EQ(last(""), "T1-1");
}

TEST_F(DigOrderTest, EachCrewHasItsOwnLast) {
  dig("T1-1", 0, "A", "2026-02-01T10:00Z");
  dig("T3-3", 0, "B", "2026-02-01T11:00Z");
  EXPECT_EQ(last("A"), "T1-1");
  EXPECT_EQ(last("B"), "T3-3");
  EXPECT_EQ(last(""), "T3-3");
  EXPECT_EQ(last("C"), "");
}

TEST_F(DigOrderTest, NotDugAndWithdrawnAreNoPlaceWhereACrewDug) {
  dig("T1-1", 0, "A", "2026-02-01T10:00Z");
  dig("T5-5", 0, "A", "2026-02-01T12:00Z");
  Action not_dug{RecordPit{}, "A", "", {}};
  std::get<RecordPit>(not_dug.what).pit = "T3-3";
  std::get<RecordPit>(not_dug.what).status.emplace(PitStatus::kNotDug);
  std::get<RecordPit>(not_dug.what).reason.emplace(NotDugReason::kSlope);
  session.apply({not_dug, {WithdrawPit{"T5-5"}, "A", "never dug", {}}}).value();
  EXPECT_EQ(last("A"), "T1-1");
}

TEST_F(DigOrderTest, APitOffTheGridCountsWhereItWasDug) {
  Action free = dug("J1", 1);
  auto& record = std::get<RecordPit>(free.what);
  record.chosen_by.emplace(ChosenBy::kJudgement);
  record.x.emplace(12.5);
  record.y.emplace(3.5);
  session.apply({free}).value();
  const auto found = last_dug(session.model(), "");
  ASSERT_TRUE(found);
  EXPECT_EQ(found->label, "J1");
  EXPECT_EQ(found->place.x, 12.5);
}

TEST_F(DigOrderTest, TheNextStopFollowsTheWalkAndBeginsAnewAtItsEnd) {
  EXPECT_EQ(next("T1-1"), "T3-3");
  EXPECT_EQ(next("T3-3"), "T5-5");
  EXPECT_EQ(next("T5-5"), "T1-1");
  // From a pit that is not on the list, where it would stand in it.
  EXPECT_EQ(next("T2-2"), "T3-3");
}

TEST_F(DigOrderTest, APositivesRingIsOnTheWayUnlessGridPitsComeFirst) {
  dig("T1-1", 2, "A", "2026-02-01T10:00Z");
  const NodeId stop = node(next("T1-1"));
  EXPECT_EQ(session.model().survey().dig_list().ring(stop), 1);
  EXPECT_EQ(next("T1-1", true), "T3-3");
  dig("T3-3", 0, "A", "2026-02-01T11:00Z");
  dig("T5-5", 0, "A", "2026-02-01T12:00Z");
  // No grid pits are left: then the others are meant.
  EXPECT_NE(next("T5-5", true), "");
}

TEST_F(DigOrderTest, NothingDueHasNoNextStop) {
  for (const std::string pit : {"T1-1", "T3-3", "T5-5"})
    dig(pit, 0, "A", "2026-02-01T10:00Z");
  EXPECT_EQ(next("T5-5"), "");
}

}  // namespace
}  // namespace nearpit
