// What was written of a pit, when the last record was written, and looking before a write at what others wrote.
#include "session/session.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "session/two_devices.h"

namespace nearpit {
namespace {

using testing::ElementsAre;

class SessionHistory : public testing::Test {
 protected:
  static std::vector<std::uint32_t> flakes(const std::vector<Session::PastRecord>& past) {
    std::vector<std::uint32_t> counts;
    for (const Session::PastRecord& one : past)
      counts.push_back(one.record.counts.empty() ? 0 : one.record.counts[0]);
    return counts;
  }
  static Action by(Action action, const std::string& who, const std::string& why) {
    action.by = who;
    action.why = why;
    return action;
  }
  TwoDevices devices;
};

TEST_F(SessionHistory, APitThatNobodyWroteOfHasNone) {
  Session session = devices.a.open();
  EXPECT_TRUE(session.history(session.model().name_of("T1-1").value()).value().empty());
  EXPECT_FALSE(session.last_written());
}

TEST_F(SessionHistory, IsOldestFirstWithWhoWhyAndWhenAndKeepsWhatWasWithdrawn) {
  Session session = devices.a.open();
  devices.a.minute = 1;
  session.apply({by(dug("T1-1", 4), "A", "")}).value();
  devices.a.minute = 2;
  session.apply({by(dug("T1-1", 6), "B", "miscounted")}).value();
  devices.a.minute = 3;
  session.apply({by(dug("T3-3", 1), "B", "")}).value();
  devices.a.minute = 4;
  session.apply({{WithdrawPit{"T1-1"}, "A", "never dug", {}}}).value();
  const auto past = session.history(session.model().name_of("T1-1").value()).value();
  ASSERT_EQ(past.size(), 3U);
  EXPECT_THAT(std::vector<std::string>({past[0].by, past[1].by, past[2].by}), ElementsAre("A", "B", "A"));
  EXPECT_THAT(std::vector<std::string>({past[0].why, past[1].why, past[2].why}),
              ElementsAre("", "miscounted", "never dug"));
  EXPECT_EQ(past[0].record.counts[0], 4U);
  EXPECT_EQ(past[1].record.counts[0], 6U);
  EXPECT_EQ(past[2].record.status, PitStatus::kWithdrawn);
  EXPECT_EQ(past[1].at.utc_ms - past[0].at.utc_ms, 60'000);
  EXPECT_EQ(past[2].at.utc_ms - past[1].at.utc_ms, 120'000);
}

TEST_F(SessionHistory, TellsWhatAnotherDeviceWrote) {
  Session a = devices.a.open();
  a.apply({dug("T1-1", 2)}).value();
  {
    Session b = devices.b.open();
    b.apply({dug("T1-1", 5)}).value();
  }
  take_in(devices.b.file, devices.a.file);
  Session both = devices.a.open();
  EXPECT_THAT(flakes(both.history(both.model().name_of("T1-1").value()).value()), ElementsAre(2, 5));
}

TEST_F(SessionHistory, LastWrittenIsOfTheLastRevisionAndIsReadAgainWhenTheFileIsOpened) {
  Session session = devices.a.open();
  devices.a.minute = 7;
  session.apply({dug("T1-1", 2)}).value();
  devices.a.minute = 9;
  session.apply({dug("T3-3", 0)}).value();
  const std::int64_t written = session.last_written().value().utc_ms;
  EXPECT_EQ(written, devices.a.environment.clock->now().utc_ms);
  devices.a.minute = 20;
  EXPECT_EQ(devices.a.open().last_written().value().utc_ms, written);
}

TEST_F(SessionHistory, ARefusedWriteLeavesTheLastOneAsItWas) {
  Session session = devices.a.open();
  session.apply({dug("T1-1", 2)}).value();
  const std::int64_t written = session.last_written().value().utc_ms;
  devices.a.minute = 9;
  EXPECT_FALSE(session.apply({dug("T99-1", 2)}).ok());
  EXPECT_EQ(session.last_written().value().utc_ms, written);
}

TEST_F(SessionHistory, StillHoldsSeesWhatOthersWroteAndItsErrorRefusesEverything) {
  Session session = devices.a.open();
  {
    Session other = devices.a.open();
    other.apply({dug("T3-3", 8)}).value();
  }
  bool seen = false;
  const auto refused = session.apply({dug("T1-1", 1)}, [&](const SurveyModel& model) -> Status {
    seen = model.entry(model.name_of("T3-3").value()) != nullptr;
    return Error(ErrorKind::kConflict, "look first");
  });
  EXPECT_TRUE(seen);
  ASSERT_FALSE(refused.ok());
  EXPECT_EQ(refused.error().lines.front(), "look first");
  EXPECT_EQ(devices.a.open().revision(), 1);
  // The session holds theirs now, and can go on.
  EXPECT_EQ(session.revision(), 1);
  EXPECT_TRUE(session.apply({dug("T1-1", 1)}, [](const SurveyModel&) { return ok_status(); }).ok());
  EXPECT_EQ(devices.a.open().revision(), 2);
}

}  // namespace
}  // namespace nearpit
