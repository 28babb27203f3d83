// When a frame is drawn and when the window sleeps. Nothing moves when nothing changes: after something came in, frames are drawn until they have
// settled (a button needs one after its release, a scroll that follows the keyboard's ring two); then the window waits for events.
#ifndef NEARPIT_UI_IDLE_POLICY_H_
#define NEARPIT_UI_IDLE_POLICY_H_

#include <optional>

#include "widgets/input_queue.h"

namespace nearpit::ui {

struct IdleState {
  bool input_waits = false;              // events that no frame has taken yet
  bool changed = false;                  // the desk or the window's size changed since the last frame
  bool unsettled = false;                // the last frame said that the next will differ
  int settling = 0;                      // frames still to be drawn after the last event
  std::optional<Milliseconds> deadline;  // when something on the screen changes by itself
};

enum class Next { kDraw, kWait };
struct IdleStep {
  Next next = Next::kWait;
  std::optional<Milliseconds> wait_at_most;  // nothing: until an event comes
};

constexpr int kSettlingFrames = 3;

// What to do now. Draw when anything came in, changed or has not settled, or when the deadline is reached; else wait, until the deadline where
// there is one.
IdleStep next_step(const IdleState& state, Milliseconds now);
// The state after a frame was drawn: what came in is taken, settling goes down by one, or begins where something had come in.
IdleState after_frame(const IdleState& state, bool unsettled);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_IDLE_POLICY_H_
