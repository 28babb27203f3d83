// Frames: takes the queue's input, lets the cards draw, and hands the result to OpenGL where there is a window. Without one it draws all the same,
// so that tests see what every frame holds. One at a time.
#ifndef NEARPIT_UI_WIDGETS_FRONTEND_H_
#define NEARPIT_UI_WIDGETS_FRONTEND_H_

#include <functional>

#include "base/status.h"
#include "widgets/ui.h"

struct ImGuiContext;

namespace nearpit::ui {

class Frontend {
 public:
  Frontend();
  Frontend(const Frontend&) = delete;
  Frontend& operator=(const Frontend&) = delete;
  ~Frontend();

  // An OpenGL context must be current, here and in render() and stop_gl(). Error: this machine's OpenGL can't do it.
  Status start_gl();
  void stop_gl();

  // One frame of the queue's next input.
  void frame(InputQueue* queue, const Glass& glass, const Theme& theme, const std::function<void(Ui&)>& draw);
  // Draws the last frame on the current OpenGL context.
  void render();
  // The pixels of the last render: rows from the top, red, green, blue; 3 x width x height bytes.
  std::vector<unsigned char> read_pixels() const;

  const WidgetLog& log() const { return log_; }
  // The next frame will differ although nothing comes in: letters were wanted.
  bool unsettled() const { return rebuild_; }
  // Triangles of the last frame, for benchmarks.
  int triangles() const;
  const Fonts& fonts() const { return fonts_; }

 private:
  void begin(const FrameInput& input);
  void move_ring(const FrameInput& input);

  ImGuiContext* context_;
  Fonts fonts_;
  Glass glass_;
  Theme theme_{};
  bool gl_ = false;
  bool rebuild_ = true;
  FocusRing ring_;
  WidgetLog log_;
  std::string draw_begins_;
};

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_FRONTEND_H_
