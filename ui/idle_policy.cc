#include "idle_policy.h"

#include <algorithm>

namespace nearpit::ui {

IdleStep next_step(const IdleState& state, Milliseconds now) {
  const bool due = state.deadline && *state.deadline <= now;
  if (state.input_waits || state.changed || state.unsettled || state.settling > 0 || due) return {Next::kDraw, {}};
  IdleStep step;
  if (state.deadline) step.wait_at_most = *state.deadline - now;
  return step;
}

IdleState after_frame(const IdleState& state, bool unsettled) {
  IdleState next;
  const bool came = state.input_waits || state.changed;
  next.settling = came ? kSettlingFrames : std::max(0, state.settling - 1);
  next.unsettled = unsettled;
  return next;
}

}  // namespace nearpit::ui
