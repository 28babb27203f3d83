#include "widgets/input_queue.h"

#include <gtest/gtest.h>

#include <string>

#include "support/test_random.h"

namespace nearpit::ui {
namespace {

TEST(InputQueue, EmptyFrameIsWhereThePointerWas) {
  InputQueue queue;
  queue.add(PointerPressed{{5, 6}});
  queue.next_frame();
  const FrameInput frame = queue.next_frame();
  EXPECT_EQ(frame.pointer, (Pixel{5, 6}));
  EXPECT_TRUE(frame.down);
  EXPECT_FALSE(frame.pressed);
  EXPECT_FALSE(frame.released);
}

TEST(InputQueue, TapShorterThanAFrameIsAPressAndThenARelease) {
  InputQueue queue;
  queue.add(PointerPressed{{1, 2}});
  queue.add(PointerReleased{{1, 2}});
  const FrameInput first = queue.next_frame();
  EXPECT_TRUE(first.pressed && first.down && !first.released);
  EXPECT_FALSE(queue.empty());
  const FrameInput second = queue.next_frame();
  EXPECT_TRUE(second.released && !second.down && !second.pressed);
  EXPECT_TRUE(queue.empty());
}

TEST(InputQueue, AFrameTakesOneKeyOrCharacter) {
  InputQueue queue;
  queue.add(CharacterTyped{U'a'});
  queue.add(CharacterTyped{U'b'});
  queue.add(KeyStruck{Key::kEnter});
  EXPECT_EQ(queue.next_frame().character, U'a');
  EXPECT_EQ(queue.next_frame().character, U'b');
  const FrameInput last = queue.next_frame();
  EXPECT_EQ(last.key, Key::kEnter);
  EXPECT_FALSE(last.character);
}

TEST(InputQueue, MovementsOfAPointerThatIsDownComeTogetherWithWhatFollows) {
  InputQueue queue;
  queue.add(PointerPressed{{0, 0}});
  queue.add(PointerMoved{{10, 0}});
  queue.add(PointerMoved{{20, 5}});
  queue.add(PointerReleased{{21, 5}});
  EXPECT_TRUE(queue.next_frame().pressed);
  const FrameInput last = queue.next_frame();
  EXPECT_TRUE(last.released);
  EXPECT_EQ(last.pointer, (Pixel{21, 5}));
}

TEST(InputQueue, MovementOfAPointerThatIsUpWaitsForNoFrame) {
  InputQueue queue;
  queue.add(PointerMoved{{10, 10}});
  EXPECT_TRUE(queue.empty());
  queue.add(PointerPressed{{1, 1}});
  queue.add(PointerReleased{{1, 1}});
  queue.add(PointerMoved{{10, 10}});
  queue.next_frame();
  queue.next_frame();
  EXPECT_TRUE(queue.empty());
}

TEST(InputQueue, WheelStepsAddUpWithinAFrame) {
  InputQueue queue;
  queue.add(WheelTurned{{3, 4}, 1});
  queue.add(WheelTurned{{3, 4}, 2});
  const FrameInput frame = queue.next_frame();
  EXPECT_EQ(frame.wheel, 3);
  EXPECT_EQ(frame.pointer, (Pixel{3, 4}));
  EXPECT_EQ(queue.next_frame().wheel, 0);
}

TEST(InputQueue, ASecondPressOrReleaseWithoutTheOtherIsNone) {
  InputQueue queue;
  queue.add(PointerReleased{{1, 1}});
  EXPECT_FALSE(queue.next_frame().released);
  queue.add(PointerPressed{{1, 1}});
  queue.add(PointerPressed{{2, 2}});
  EXPECT_TRUE(queue.next_frame().pressed);
  const FrameInput again = queue.next_frame();
  EXPECT_FALSE(again.pressed);
  EXPECT_TRUE(again.down);
}

void tap(InputQueue* queue, Pixel at, Milliseconds when) {
  queue->add(PointerPressed{at}, when);
  queue->add(PointerReleased{at}, when + 1);
}

int presses(InputQueue* queue) {
  int count = 0;
  while (!queue->empty()) {
    const FrameInput frame = queue->next_frame();
    count += frame.pressed ? 1 : 0;
  }
  return count;
}

TEST(InputQueue, ASecondTouchOnACardThatJustCameIsDropped) {
  InputQueue queue;
  tap(&queue, {100, 100}, 1000);
  EXPECT_EQ(presses(&queue), 1);
  // The bounce had come already when the first touch's card was drawn, late.
  tap(&queue, {104, 98}, 1100);
  queue.screen_changed(1900, 50);
  EXPECT_EQ(presses(&queue), 0);
  EXPECT_FALSE(queue.next_frame().down);
  tap(&queue, {104, 98}, 1900 + kSecondTouch_ms - 1);
  EXPECT_EQ(presses(&queue), 0);
  tap(&queue, {104, 98}, 1900 + kSecondTouch_ms);
  EXPECT_EQ(presses(&queue), 1);
}

TEST(InputQueue, ATouchElsewhereOnACardThatJustCameIsMeant) {
  InputQueue queue;
  tap(&queue, {100, 100}, 1000);
  EXPECT_EQ(presses(&queue), 1);
  queue.screen_changed(1010, 50);
  tap(&queue, {100, 151}, 1020);
  EXPECT_EQ(presses(&queue), 1);
  queue.add(CharacterTyped{U'7'}, 1021);
  EXPECT_EQ(queue.next_frame().character, U'7');
}

// ---- a second touch on what has just come ----

TEST(InputQueue, APressNearTheLastOneIsDroppedWithItsReleaseWhenTheScreenChangedUnderIt) {
  InputQueue queue;
  queue.add(PointerPressed{{100, 100}}, 1000);
  queue.add(PointerReleased{{100, 100}}, 1050);
  queue.next_frame();
  queue.next_frame();
  queue.screen_changed(1060, 50);
  queue.add(PointerPressed{{110, 95}}, 1200);
  queue.add(PointerMoved{{111, 95}}, 1210);
  queue.add(PointerReleased{{111, 95}}, 1250);
  while (!queue.empty()) {
    const FrameInput frame = queue.next_frame();
    EXPECT_FALSE(frame.pressed || frame.released || frame.down);
  }
}

TEST(InputQueue, ATouchThatCameBeforeTheChangeIsDroppedToo) {
  InputQueue queue;
  for (const Milliseconds at : {1000, 1080}) {
    queue.add(PointerPressed{{100, 100}}, at);
    queue.add(PointerReleased{{100, 100}}, at + 40);
  }
  EXPECT_TRUE(queue.next_frame().pressed);
  EXPECT_TRUE(queue.next_frame().released);
  queue.screen_changed(1100, 50);
  const FrameInput frame = queue.next_frame();
  EXPECT_FALSE(frame.pressed || frame.released);
  EXPECT_TRUE(queue.empty());
}

TEST(InputQueue, ATouchElsewhereOrLaterActs) {
  for (const bool later : {false, true}) {
    InputQueue queue;
    queue.add(PointerPressed{{100, 100}}, 1000);
    queue.add(PointerReleased{{100, 100}}, 1050);
    queue.next_frame();
    queue.next_frame();
    queue.screen_changed(1060, 50);
    queue.add(PointerPressed{later ? Pixel{100, 100} : Pixel{100, 160}}, later ? 1060 + kSecondTouch_ms : 1100);
    EXPECT_TRUE(queue.next_frame().pressed) << later;
  }
}

TEST(InputQueue, KeysAreNeverDropped) {
  InputQueue queue;
  queue.add(PointerPressed{{100, 100}}, 1000);
  queue.next_frame();
  queue.add(PointerReleased{{100, 100}}, 1010);
  queue.next_frame();
  queue.screen_changed(1020, 50);
  queue.add(PointerPressed{{100, 100}}, 1030);
  queue.add(KeyStruck{Key::kEnter}, 1040);
  queue.add(PointerReleased{{100, 100}}, 1050);
  EXPECT_EQ(queue.next_frame().key, Key::kEnter);
}

// Whatever comes, in whatever order: nothing is lost but movement while up, and nothing changes places.
TEST(InputQueue, KeepsTheOrderOfWhatComesIn) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(200); ++round) {
    InputQueue queue;
    std::string sent;
    bool down = false;
    for (int i = random.between(1, 40); i > 0; --i) {
      const char letter = static_cast<char>('a' + random.between(0, 25));
      switch (random.between(0, 3)) {
        case 0:
          queue.add(CharacterTyped{static_cast<char32_t>(letter)});
          sent += letter;
          break;
        case 1:
          down = !down;
          queue.add(down ? InputEvent(PointerPressed{}) : InputEvent(PointerReleased{}));
          sent += down ? '[' : ']';
          break;
        case 2:
          queue.add(KeyStruck{Key::kTab});
          sent += '\t';
          break;
        default:
          queue.add(PointerMoved{{1, 1}});
      }
    }
    std::string taken;
    while (!queue.empty()) {
      const FrameInput frame = queue.next_frame();
      const int things =
          (frame.pressed ? 1 : 0) + (frame.released ? 1 : 0) + (frame.key ? 1 : 0) + (frame.character ? 1 : 0);
      ASSERT_LE(things, 1);
      if (frame.pressed) taken += '[';
      if (frame.released) taken += ']';
      if (frame.key) taken += '\t';
      if (frame.character) taken += static_cast<char>(*frame.character);
    }
    ASSERT_EQ(taken, sent);
  }
}

}  // namespace
}  // namespace nearpit::ui
