// What came from pointer and keys, in order. The real window and the tests fill the same queue; nothing else reaches the widgets.
//
// A frame takes at most one press, release, key or character, so that a tap shorter than a frame is never lost and keys act in the order
// in which they were struck. Movements before it are taken with it.
#ifndef NEARPIT_UI_WIDGETS_INPUT_QUEUE_H_
#define NEARPIT_UI_WIDGETS_INPUT_QUEUE_H_

#include <deque>
#include <optional>
#include <variant>

#include "pixel_box.h"

namespace nearpit::ui {

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
  void add(const InputEvent& event);
  bool empty() const { return waiting_.empty(); }
  FrameInput next_frame();

 private:
  std::deque<InputEvent> waiting_;
  Pixel pointer_{-1, -1};
  bool down_ = false;          // after the last frame
  bool will_be_down_ = false;  // after what waits
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_INPUT_QUEUE_H_
