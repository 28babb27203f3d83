#include "screen/screen_driver.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "base/text.h"

namespace nearpit::ui {
namespace {

constexpr Milliseconds kFrame_ms = 17;
constexpr int kMostFrames = 400;
constexpr int kMostDrags = 80;
constexpr int kDragSteps = 5;

bool whole(const WidgetBox& widget) {
  return !widget.visible.empty() && widget.visible.height() > widget.box.height() - 1 &&
         widget.visible.width() > widget.box.width() - 1;
}

}  // namespace

ScreenDriver::ScreenDriver(const ScreenWorld& world, const TestGlass& glass, const std::string& file)
    : environment_(world.environment()), stage_(environment_, [this] { return now_; }), test_glass_(glass) {
  if (!file.empty()) stage_.open(file);
  settle();
}

void ScreenDriver::draw() {
  now_ += kFrame_ms;
  stage_.frame(test_glass_.width_px, test_glass_.height_px, test_glass_.px_per_mm());
  ++frames_;
}

void ScreenDriver::settle() {
  for (int i = 0; stage_.next().next == Next::kDraw; ++i) {
    if (i > kMostFrames) throw std::runtime_error("the screen never comes to rest\n" + on_the_glass());
    draw();
  }
}

void ScreenDriver::set_glass(const TestGlass& glass) {
  test_glass_ = glass;
  stage_.redraw();
  settle();
}

std::vector<unsigned char> ScreenDriver::pixels() {
  stage_.frontend().render();
  return stage_.frontend().read_pixels();
}

Pixel ScreenDriver::on_map(const std::string& pit) const {
  const SurveyModel& model = *view().survey->model;
  return to_screen(map_view(), map_box(), model.survey().ground().frame.ground(model.name_of(pit)->node));
}

void ScreenDriver::tap_pit(const std::string& pit) {
  if (shows("strip/map") && !widget("strip/map").chosen) tap("strip/map");
  tap_at(on_map(pit));
}

void ScreenDriver::open_pit(const std::string& pit) {
  tap_pit(pit);
  tap("map/record-chosen");
}

void ScreenDriver::press(Pixel at) {
  ++touches_;
  now_ += pace_;
  add(PointerPressed{at});
  settle();
}

void ScreenDriver::move(Pixel to) {
  add(PointerMoved{to});
  settle();
}

void ScreenDriver::release(Pixel at) {
  add(PointerReleased{at});
  settle();
}

void ScreenDriver::tap_at(Pixel at) {
  press(at);
  release(at);
}

void ScreenDriver::tap(const std::string& path) {
  bring_into_view(path);
  tap_at(middle_of(path));
}

void ScreenDriver::tap_all(const std::vector<std::string>& paths) {
  for (const std::string& path : paths)
    tap(path);
}

void ScreenDriver::drag(Pixel from, Pixel to) {
  now_ += pace_;
  add(PointerPressed{from});
  settle();
  for (int step = 1; step <= kDragSteps; ++step) {
    const float part = static_cast<float>(step) / kDragSteps;
    move({from.x + (to.x - from.x) * part, from.y + (to.y - from.y) * part});
  }
  release(to);
}

void ScreenDriver::wheel(Pixel at, float steps) {
  add(WheelTurned{at, steps});
  settle();
}

void ScreenDriver::key(Key key, int times) {
  for (int i = 0; i < times; ++i) {
    add(KeyStruck{key});
    settle();
  }
}

void ScreenDriver::type(const std::string& utf8) {
  for (const char32_t character : characters(utf8)) {
    add(CharacterTyped{character});
    settle();
  }
}

// ---- looking ----

const WidgetBox& ScreenDriver::widget(const std::string& path) const {
  const WidgetBox* found = find_widget(log(), path);
  if (found == nullptr) throw std::runtime_error("no control '" + path + "' is drawn\n" + on_the_glass());
  return *found;
}

std::string ScreenDriver::said(const std::string& path) const {
  std::string all;
  for (const TextBox& text : log().texts) {
    if (text.path.starts_with(path)) all += (all.empty() ? "" : " ") + text.text;
  }
  return all;
}

const WidgetBox* ScreenDriver::focused() const {
  const auto& widgets = log().widgets;
  const auto found = std::find_if(widgets.begin(), widgets.end(), [](const WidgetBox& one) { return one.focused; });
  return found == widgets.end() ? nullptr : &*found;
}

std::string ScreenDriver::on_the_glass() const { return "on the glass:\n" + widget_lines(log()); }

// ---- bringing into view ----

// Moves the area's content by `by` pixels, upwards when negative; whether anything moved.
bool ScreenDriver::drag_area(const std::string& area, float by) {
  const std::string before = widget_lines(log());
  const PixelBox box = widget(area).visible;
  const float most = box.height() * 0.45F;
  // A finger goes a little before the content follows.
  const float sure = by < 0 ? std::min(by, -glass().px(3) - 2) : std::max(by, glass().px(3) + 2);
  const Pixel from = box.middle();
  drag(from, {from.x, from.y + std::clamp(sure, -most, most)});
  return widget_lines(log()) != before;
}

// Pages every list there is for a control that is not drawn.
bool ScreenDriver::look_for(const std::string& path) {
  std::vector<std::string> areas;
  for (const WidgetBox& one : log().widgets) {
    if (one.kind == WidgetKind::kScroll) areas.push_back(one.path);
  }
  for (const std::string& area : areas) {
    for (const float way : {-1.0F, 1.0F}) {
      for (int i = 0; i < kMostDrags && !shows(path); ++i) {
        if (!drag_area(area, way * widget(area).visible.height())) break;
      }
      if (shows(path)) return true;
    }
  }
  return false;
}

// Moves the whole of a glass that is too low by its own buttons.
bool ScreenDriver::move_whole(float towards_y) {
  if (!shows("whole/up")) return false;
  const std::string before = widget_lines(log());
  tap_at(middle_of(towards_y < glass().height_px / 2 ? "whole/up" : "whole/down"));
  return widget_lines(log()) != before;
}

void ScreenDriver::bring_into_view(const std::string& path) {
  if (!shows(path) && !look_for(path)) widget(path);
  for (int i = 0; i < kMostDrags; ++i) {
    const WidgetBox one = widget(path);
    if (whole(one) || one.area.empty()) return;
    const WidgetBox area = widget(one.area);
    bool moved = false;
    if (one.area != "whole" && !area.visible.empty()) {
      const PixelBox& room = area.visible;
      const float by = one.box.top < room.top ? room.top - one.box.top : room.bottom - one.box.bottom;
      moved = drag_area(one.area, by);
    }
    if (!moved && !move_whole(one.box.middle().y)) return;
  }
}

}  // namespace nearpit::ui
