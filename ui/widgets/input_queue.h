// What came from pointer and keys, in order. The real window and the tests fill the same queue; nothing else reaches the widgets.
//
// A frame takes at most one press, release, key or character, so that a tap shorter than a frame is never lost and keys act in the order
// in which they were struck. Movements before it are taken with it.
//
// A second touch on the same place just after another card came there was meant for what is gone (a bounce, an impatient finger): it is dropped, whole, where
// screen_changed() says so.
#ifndef NEARPIT_UI_WIDGETS_INPUT_QUEUE_H_
#define NEARPIT_UI_WIDGETS_INPUT_QUEUE_H_

#include <cstdint>
#include <deque>
#include <optional>
#include <variant>

#include "pixel_box.h"

namespace nearpit::ui {

// Milliseconds of a clock that never goes back.
using Milliseconds = std::int64_t;

constexpr Milliseconds kSecondTouch_ms = 400;

enum class Key {
  kTab,
  kBackTab,  // Shift and Tab
  kEnter,
  kEscape,
  kBackspace,
  kDelete,
  kLeft,
  kRight,
  kUp,
  kDown,
  kHome,
  kEnd,
  kPageUp,
  kPageDown,
};

struct PointerMoved {
  Pixel to;
};
struct PointerPressed {
  Pixel at;
};
struct PointerReleased {
  Pixel at;
};
struct WheelTurned {
  Pixel at;
  float steps = 0;  // up, or away from the hand, is positive
};
struct KeyStruck {
  Key key = Key::kEnter;
};
struct CharacterTyped {
  char32_t character = 0;
};
using InputEvent = std::variant<PointerMoved, PointerPressed, PointerReleased, WheelTurned, KeyStruck, CharacterTyped>;

// The input of one frame.
struct FrameInput {
  Pixel pointer;
  bool down = false;      // at the end of the frame's events
  bool pressed = false;   // went down in this frame
  bool released = false;  // went up in this frame
  float wheel = 0;
  std::optional<Key> key;
  std::optional<char32_t> character;
};

class InputQueue {
 public:
  // Movement of a pointer that is up changes nothing on the screen and waits for no frame.
  // `at` is when it came.
  void add(const InputEvent& event, Milliseconds at = 0);
  // What the last press acted on has gone from the screen at `now`: presses within `reach_px` of it that came, or come, before kSecondTouch_ms have passed are dropped.
  void screen_changed(Milliseconds now, float reach_px);
  bool empty() const { return waiting_.empty(); }
  FrameInput next_frame();

 private:
  struct Waiting {
    InputEvent event;
    Milliseconds at = 0;
  };
  bool drop(const Waiting& waiting);

  std::deque<Waiting> waiting_;
  Pixel last_press_{-1, -1};
  std::optional<Milliseconds> guarded_until_;
  Pixel guarded_;
  float guard_px_ = 0;
  bool dropping_ = false;  // the press was dropped, so is what follows until its release
  Pixel pointer_{-1, -1};
  bool down_ = false;          // after the last frame
  bool will_be_down_ = false;  // after what waits
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_INPUT_QUEUE_H_
