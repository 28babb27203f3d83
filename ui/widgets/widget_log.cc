#include "widgets/widget_log.h"

#include <algorithm>

#include "base/numbers.h"

namespace nearpit::ui {
namespace {

std::string box_text(const PixelBox& box) {
  return format_fixed(box.left, 1) + "," + format_fixed(box.top, 1) + "," + format_fixed(box.right, 1) + "," +
         format_fixed(box.bottom, 1);
}

std::string one_line(std::string text) {
  std::replace_if(
      text.begin(), text.end(), [](char letter) { return letter == '\n' || letter == '\t'; }, ' ');
  return text;
}

const char* kind_word(WidgetKind kind) {
  switch (kind) {
    case WidgetKind::kButton:
      return "button";
    case WidgetKind::kMap:
      return "map";
    case WidgetKind::kScroll:
      return "scroll";
  }
  return "";
}

}  // namespace

const WidgetBox* find_widget(const WidgetLog& log, const std::string& path) {
  const auto found = std::find_if(log.widgets.begin(), log.widgets.end(),
                                  [&](const WidgetBox& widget) { return widget.path == path; });
  return found == log.widgets.end() ? nullptr : &*found;
}

std::string widget_lines(const WidgetLog& log) {
  std::string lines;
  for (const WidgetBox& widget : log.widgets) {
    lines += std::string(kind_word(widget.kind)) + "\t" + one_line(widget.path) + "\t" + box_text(widget.box) + "\t" +
             box_text(widget.visible) + "\t" + format_trimmed(widget.least_mm, 1) + "\t" +
             (widget.chosen    ? "chosen"
              : widget.focused ? "focused"
                               : "-") +
             "\t" + one_line(widget.label) + "\n";
  }
  for (const TextBox& text : log.texts) {
    lines += "text\t" + one_line(text.path) + "\t" + box_text(text.box) + "\t" + box_text(text.visible) + "\t" +
             format_fixed(text.size_px, 1) + "\t" +
             (text.cut         ? "cut"
              : text.shortened ? "shortened"
                               : "-") +
             "\t" + one_line(text.text) + "\n";
  }
  return lines;
}

}  // namespace nearpit::ui
