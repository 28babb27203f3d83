#include "widgets/input_queue.h"

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

void InputQueue::add(const InputEvent& event) {
  if (std::holds_alternative<PointerPressed>(event)) will_be_down_ = true;
  if (std::holds_alternative<PointerReleased>(event)) will_be_down_ = false;
  if (std::holds_alternative<PointerMoved>(event) && !will_be_down_) return;
  waiting_.push_back(event);
}

FrameInput InputQueue::next_frame() {
  FrameInput frame;
  frame.pointer = pointer_;
  frame.down = down_;
  bool full = false;
  while (!full && !waiting_.empty()) {
    full = std::visit(Taker{&frame}, waiting_.front());
    waiting_.pop_front();
  }
  pointer_ = frame.pointer;
  down_ = frame.down;
  return frame;
}

}  // namespace nearpit::ui
