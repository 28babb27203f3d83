#include "widgets/input_queue.h"

#include <algorithm>
#include <cmath>

namespace nearpit::ui {
namespace {

// Takes one event into the frame; whether the frame is full then.
struct Taker {
  FrameInput* frame;

  bool operator()(const PointerMoved& event) const {
    frame->pointer = event.to;
    return false;
  }
  bool operator()(const PointerPressed& event) const {
    frame->pointer = event.at;
    frame->pressed = !frame->down;
    frame->down = true;
    return true;
  }
  bool operator()(const PointerReleased& event) const {
    frame->pointer = event.at;
    frame->released = frame->down;
    frame->down = false;
    return true;
  }
  bool operator()(const WheelTurned& event) const {
    frame->pointer = event.at;
    frame->wheel += event.steps;
    return false;
  }
  bool operator()(const KeyStruck& event) const {
    frame->key = event.key;
    return true;
  }
  bool operator()(const CharacterTyped& event) const {
    frame->character = event.character;
    return true;
  }
};

}  // namespace

void InputQueue::add(const InputEvent& event, Milliseconds at) {
  if (std::holds_alternative<PointerPressed>(event)) will_be_down_ = true;
  if (std::holds_alternative<PointerReleased>(event)) will_be_down_ = false;
  if (std::holds_alternative<PointerMoved>(event) && !will_be_down_) return;
  waiting_.push_back({event, at});
}

void InputQueue::screen_changed(Milliseconds now, float reach_px) {
  guarded_until_ = now + kSecondTouch_ms;
  guarded_ = last_press_;
  guard_px_ = reach_px;
}

bool InputQueue::drop(const Waiting& waiting) {
  if (const auto* press = std::get_if<PointerPressed>(&waiting.event)) {
    const float far = std::max(std::abs(press->at.x - guarded_.x), std::abs(press->at.y - guarded_.y));
    dropping_ = guarded_until_ && waiting.at < *guarded_until_ && far < guard_px_;
    if (!dropping_) last_press_ = press->at;
    return dropping_;
  }
  if (!dropping_) return false;
  const bool released = std::holds_alternative<PointerReleased>(waiting.event);
  if (released) dropping_ = false;
  return released || std::holds_alternative<PointerMoved>(waiting.event);
}

FrameInput InputQueue::next_frame() {
  FrameInput frame;
  frame.pointer = pointer_;
  frame.down = down_;
  bool full = false;
  while (!full && !waiting_.empty()) {
    const Waiting next = waiting_.front();
    waiting_.pop_front();
    if (!drop(next)) full = std::visit(Taker{&frame}, next.event);
  }
  pointer_ = frame.pointer;
  down_ = frame.down;
  return frame;
}

}  // namespace nearpit::ui
