// The whole screen with a desk behind it and no window around it, run frame by frame as ui/window/app_window.cc runs it. What goes in goes through the
// input queue: pointer and keys, nothing else. What comes out is read from the log of controls and texts, and from the disk.
#ifndef NEARPIT_TESTS_SCREEN_SCREEN_DRIVER_H_
#define NEARPIT_TESTS_SCREEN_SCREEN_DRIVER_H_

#include <string>
#include <vector>

#include "screen/screen_world.h"
#include "stage.h"

namespace nearpit::ui {

struct TestGlass {
  float width_px = 1280;
  float height_px = 800;
  double scale = 1.5;  // of 96 px an inch
  double px_per_mm() const { return 96 / 25.4 * scale; }
};

// What can't be done (no such control, nothing settles) is thrown as std::runtime_error and fails the test with what is on the screen.
class ScreenDriver {
 public:
  // The program started without a file, or with one.
  explicit ScreenDriver(const ScreenWorld& world, const TestGlass& glass = {}, const std::string& file = "");

  // Press and release in the middle of the control, brought into view by dragging its list where it is outside.
  void tap(const std::string& path);
  void tap_at(Pixel at);
  // A tap at each, in this order.
  void tap_all(const std::vector<std::string>& paths);
  // Where a pit of the grid lies on the map; a tap there, the map brought to the front on a narrow glass; its record opened from there.
  Pixel on_map(const std::string& pit) const;
  void tap_pit(const std::string& pit);
  void open_pit(const std::string& pit);
  void press(Pixel at);
  void move(Pixel to);
  void release(Pixel at);
  // A finger put down, drawn over the glass in steps, lifted.
  void drag(Pixel from, Pixel to);
  void wheel(Pixel at, float steps);
  void key(Key key, int times = 1);
  void type(const std::string& utf8);
  // Several events before any frame.
  void add(const InputEvent& event) { stage_.add(event); }
  // How long somebody takes before each touch.
  void set_pace(Milliseconds pace) { pace_ = pace; }
  // Draws as long as the idle policy says so.
  void settle();

  // Presses so far; drags to bring something into view are not counted.
  int touches() const { return touches_; }
  int frames() const { return frames_; }

  const WidgetLog& log() const { return stage_.frontend().log(); }
  bool shows(const std::string& path) const { return find_widget(log(), path) != nullptr; }
  const WidgetBox& widget(const std::string& path) const;
  Pixel middle_of(const std::string& path) const { return widget(path).visible.middle(); }
  // All texts whose path begins so, joined by spaces; "" for every text on the glass.
  std::string said(const std::string& path = "") const;
  const WidgetBox* focused() const;

  // For asserts alone.
  const DeskView& view() const { return stage_.view(); }
  const MapView& map_view() const { return *stage_.screen().map.view; }
  PixelBox map_box() const { return stage_.screen().map.box; }

  const Glass& glass() const { return stage_.glass(); }
  void set_glass(const TestGlass& glass);
  // With an OpenGL context that is current.
  void start_gl() { stage_.frontend().start_gl().value(); }
  void stop_gl() { stage_.frontend().stop_gl(); }
  // One frame more, as when the window was uncovered.
  void draw_anew() {
    stage_.redraw();
    settle();
  }
  std::vector<unsigned char> pixels();

 private:
  void draw();
  void bring_into_view(const std::string& path);
  bool look_for(const std::string& path);
  bool drag_area(const std::string& area, float by);
  bool move_whole(float towards_y);
  std::string on_the_glass() const;

  Environment environment_;
  Milliseconds now_ = 0;
  Milliseconds pace_ = 600;
  Stage stage_;
  TestGlass test_glass_;
  int touches_ = 0;
  int frames_ = 0;
};

}  // namespace nearpit::ui

#endif  // NEARPIT_TESTS_SCREEN_SCREEN_DRIVER_H_
