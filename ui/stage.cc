#include "stage.h"

#include <vector>

namespace nearpit::ui {

IdleState Stage::now_waiting() const {
  IdleState state = idle_;
  state.changed = changed_;
  state.input_waits = !queue_.empty();
  return state;
}

IdleStep Stage::next() const { return next_step(now_waiting(), clock_()); }

bool Stage::frame(float width_px, float height_px, double guessed_px_per_mm) {
  const IdleState before = now_waiting();
  changed_ = false;
  if (width_px < 1 || height_px < 1) {
    idle_ = after_frame(before, false);
    return false;
  }
  desk_.look_at_the_clock();
  glass_ = {width_px, height_px, desk_.view().px_per_mm.value_or(guessed_px_per_mm)};
  frontend_.frame(&queue_, glass_, desk_.view().dusk ? dusk_theme() : sun_theme(),
                  [this](Ui& ui) { draw_screen(ui, desk_.view(), screen_, sink_); });
  const std::vector<Request> asked = sink_.take();
  for (const Request& request : asked)
    desk_.carry_out(request);
  idle_ = after_frame(before, frontend_.unsettled());
  changed_ = changed_ || !asked.empty();
  const std::string under = under_the_finger(desk_.view(), screen_);
  if (under != shown_) queue_.screen_changed(clock_(), glass_.px(kTarget_mm));
  shown_ = under;
  idle_.deadline = clock_() + desk_.ms_to_midnight();
  return queue_.empty();
}

}  // namespace nearpit::ui
