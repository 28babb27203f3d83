// What a frame drew: the path and place of every control and text. It is how the keyboard finds its way from control to control, how tests find
// what to touch, and how they see that nothing overlaps or is cut. It only tells; nothing can be set through it.
#ifndef NEARPIT_UI_WIDGETS_WIDGET_LOG_H_
#define NEARPIT_UI_WIDGETS_WIDGET_LOG_H_

#include <string>
#include <vector>

#include "pixel_box.h"

namespace nearpit::ui {

enum class WidgetKind { kButton, kMap, kScroll };

struct WidgetBox {
  std::string path;  // "record/save"
  WidgetKind kind = WidgetKind::kButton;
  PixelBox box;
  PixelBox visible;     // what the scroll area around it leaves to be seen; may be empty
  double least_mm = 0;  // the size that its layout promised, both ways
  std::string label;
  bool chosen = false;
  bool focused = false;
  std::string area = {};  // path of the scroll area that it was drawn in; "" for none
};

struct TextBox {
  std::string path;  // of the control or part that it stands in
  std::string text;  // as meant, even where it is shortened
  PixelBox box;      // of the letters
  PixelBox visible;
  float size_px = 0;
  bool cut = false;        // the letters don't fit where they should stand
  bool shortened = false;  // a name from outside ends in '…'
  std::string area = {};
};

struct WidgetLog {
  std::vector<WidgetBox> widgets;
  std::vector<TextBox> texts;
};

// Nothing when no such control was drawn.
const WidgetBox* find_widget(const WidgetLog& log, const std::string& path);
// One line a control and text, for a test outside the program: kind, path, box, visible box, least mm, flags, label; tab separated.
std::string widget_lines(const WidgetLog& log);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_WIDGET_LOG_H_
