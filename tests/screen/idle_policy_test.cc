#include "idle_policy.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <vector>

namespace nearpit::ui {
namespace {

// A window's loop with a clock of its own: events come at given times, frames take 16 ms, waiting takes as long as it is told or until the next event.
struct FakeLoop {
  std::vector<Milliseconds> events;  // ascending
  int unsettled_frames = 0;          // how many frames after each event say that the next will differ
  std::optional<Milliseconds> deadline;
  std::vector<Milliseconds> frames;  // when each was drawn

  void run(Milliseconds until) {
    IdleState state;
    Milliseconds now = 0;
    std::size_t next = 0;
    int left = 0;
    while (now < until) {
      for (; next < events.size() && events[next] <= now; ++next)
        state.input_waits = true, left = unsettled_frames;
      state.deadline = deadline;
      const IdleStep step = next_step(state, now);
      if (step.next == Next::kDraw) {
        frames.push_back(now);
        if (deadline && *deadline <= now) deadline.reset();
        state = after_frame(state, left-- > 0);
        now += 16;
        continue;
      }
      Milliseconds wake = until;
      if (next < events.size()) wake = std::min(wake, events[next]);
      if (step.wait_at_most) wake = std::min(wake, now + *step.wait_at_most);
      ASSERT_GT(wake, now) << "a wait of nothing would spin";
      now = wake;
    }
  }
};

TEST(IdlePolicy, NothingComesNothingIsDrawn) {
  FakeLoop loop;
  loop.run(1'000'000);
  EXPECT_TRUE(loop.frames.empty());
  EXPECT_FALSE(next_step({}, 5).wait_at_most) << "it waits until an event, however long";
}

TEST(IdlePolicy, OneEventIsDrawnAtOnceAndSettlesInAFixedNumber) {
  FakeLoop loop;
  loop.events = {5000};
  loop.run(100'000);
  ASSERT_EQ(loop.frames.size(), static_cast<std::size_t>(1 + kSettlingFrames));
  EXPECT_EQ(loop.frames.front(), 5000);
}

TEST(IdlePolicy, EveryEventBeginsTheSettlingAnew) {
  FakeLoop loop;
  loop.events = {1000, 1010, 50'000};
  loop.run(100'000);
  EXPECT_EQ(loop.frames.size(), static_cast<std::size_t>(1 + (1 + kSettlingFrames) + (1 + kSettlingFrames)));
}

TEST(IdlePolicy, AFrameThatSaysTheNextWillDifferIsFollowedByOne) {
  FakeLoop loop;
  loop.events = {1000};
  loop.unsettled_frames = 10;
  loop.run(100'000);
  EXPECT_EQ(loop.frames.size(), 11U);
}

TEST(IdlePolicy, ADeadlineIsWaitedForAndDrawnOnce) {
  FakeLoop loop;
  loop.deadline = 60'000;
  loop.run(200'000);
  ASSERT_EQ(loop.frames.size(), 1U);
  EXPECT_EQ(loop.frames.front(), 60'000);
  IdleState state;
  state.deadline = 700;
  EXPECT_EQ(next_step(state, 200).wait_at_most, 500);
  EXPECT_EQ(next_step(state, 700).next, Next::kDraw);
  EXPECT_EQ(next_step(state, 900).next, Next::kDraw);
}

TEST(IdlePolicy, WhatTheWindowOrTheDeskChangedIsDrawn) {
  IdleState state;
  state.changed = true;
  EXPECT_EQ(next_step(state, 0).next, Next::kDraw);
  EXPECT_EQ(after_frame(state, false).settling, kSettlingFrames);
  EXPECT_FALSE(after_frame(state, false).changed);
}

TEST(IdlePolicy, SettlingNeverFallsBelowNothing) {
  EXPECT_EQ(after_frame({}, false).settling, 0);
  EXPECT_EQ(next_step(after_frame({}, false), 0).next, Next::kWait);
}

}  // namespace
}  // namespace nearpit::ui
