// The window without its window: input in, frames out. Each frame takes the queue's next input, lets the cards draw, and carries out what they asked for; then it is
// known what to do next. The window on the desktop and the tests run this same loop.
#ifndef NEARPIT_UI_STAGE_H_
#define NEARPIT_UI_STAGE_H_

#include <functional>
#include <string>

#include "desk/desk.h"
#include "idle_policy.h"
#include "screen.h"
#include "widgets/frontend.h"

namespace nearpit::ui {

class Stage {
 public:
  using Clock = std::function<Milliseconds()>;

  // `environment` must outlive the stage; `clock` never goes back.
  Stage(Environment& environment, Clock clock) : desk_(environment), clock_(std::move(clock)) {}

  void open(const std::string& file) { desk_.carry_out(OpenSurvey{file}); }
  void add(const InputEvent& event) { queue_.add(event, clock_()); }
  // The glass was resized or uncovered.
  void redraw() { changed_ = true; }

  IdleStep next() const;
  // One frame on a glass of that size, a millimetre being as calibrated, else as guessed. Whether it should be shown: not when more input waits, of which the
  // next frame will show more.
  bool frame(float width_px, float height_px, double guessed_px_per_mm);

  // A line of text takes the keys.
  bool typing() const { return screen_.typing.what != TypingFor::kNothing; }
  const Glass& glass() const { return glass_; }
  const DeskView& view() const { return desk_.view(); }
  const ScreenState& screen() const { return screen_; }
  Frontend& frontend() { return frontend_; }
  const Frontend& frontend() const { return frontend_; }

 private:
  IdleState now_waiting() const;

  Frontend frontend_;
  Desk desk_;
  Clock clock_;
  ScreenState screen_;
  Sink sink_;
  InputQueue queue_;
  Glass glass_;
  IdleState idle_;
  bool changed_ = true;  // nothing was drawn yet
  std::string shown_;    // what lies under the finger
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_STAGE_H_
