#include "screen/layout_look.h"

#include <algorithm>

#include "base/numbers.h"
#include "screen/card_tour.h"

namespace nearpit::ui {
namespace {

constexpr float kPixel = 1;
constexpr double kSlack_mm = 0.25;

std::string shown(const PixelBox& box) {
  return "[" + format_fixed(box.left, 0) + " " + format_fixed(box.top, 0) + " " + format_fixed(box.right, 0) + " " +
         format_fixed(box.bottom, 0) + "]";
}

bool within(const PixelBox& inner, const PixelBox& outer, float slack) {
  return inner.left >= outer.left - slack && inner.right <= outer.right + slack && inner.top >= outer.top - slack &&
         inner.bottom <= outer.bottom + slack;
}

// Which gap lies between two boxes, in pixels; negative where they overlap both ways.
float gap_between(const PixelBox& a, const PixelBox& b) {
  const float aside = std::max(a.left - b.right, b.left - a.right);
  const float above = std::max(a.top - b.bottom, b.top - a.bottom);
  return std::max(aside, above);
}

// One look at what a frame drew.
class Look {
 public:
  Look(const WidgetLog& log, const Glass& glass, const std::string& at_end, std::vector<std::string>* said)
      : log_(log), glass_(glass), at_end_(at_end), said_(said) {}

  void all() {
    for (const WidgetBox& one : log_.widgets)
      widgets_seen_.push_back(seen(one));
    for (const TextBox& one : log_.texts)
      texts_seen_.push_back(seen(one));
    for (const WidgetBox& one : log_.widgets)
      place(one);
    for (std::size_t i = 0; i < log_.widgets.size(); ++i) {
      for (std::size_t k = i + 1; k < log_.widgets.size(); ++k)
        apart(i, k);
    }
    for (std::size_t i = 0; i < log_.texts.size(); ++i)
      text(log_.texts[i], texts_seen_[i]);
    for (std::size_t i = 0; i < log_.texts.size(); ++i) {
      for (std::size_t k = i + 1; k < log_.texts.size(); ++k)
        texts_apart(i, k);
    }
  }

 private:
  void say(const std::string& path, const std::string& what) { said_->push_back(path + ": " + what); }

  // What is to be seen of it; rows that are scrolled out have nothing.
  template <class Box>
  PixelBox seen(const Box& one) const {
    const WidgetBox* area = one.area.empty() ? nullptr : find_widget(log_, one.area);
    const PixelBox room = area == nullptr ? glass_.whole() : area->box.shared_with(glass_.whole());
    return one.box.shared_with(room);
  }

  void place(const WidgetBox& one) {
    const WidgetBox* area = one.area.empty() ? nullptr : find_widget(log_, one.area);
    if (area == nullptr) {
      if (!within(one.box, glass_.whole(), 0.5F)) say(one.path, "beyond the glass, " + shown(one.box));
    } else {
      PixelBox column = area->box;
      column.top = -1e9F, column.bottom = 1e9F;
      if (!within(one.box, column, kPixel)) say(one.path, "wider than its scroll area, " + shown(one.box));
      if (one.area == at_end_ && one.box.bottom > area->box.bottom + kPixel && last_of(one))
        say(one.path, "can't be scrolled to, " + shown(one.box) + " of " + shown(area->box));
    }
    if (one.kind != WidgetKind::kButton) return;
    const double least = std::max(one.least_mm, kTarget_mm);
    for (const float side : {one.box.width(), one.box.height()}) {
      if (glass_.mm(side) < least - 0.1)
        say(one.path, "only " + format_fixed(glass_.mm(side), 1) + " mm, of " + format_fixed(least, 0));
    }
  }

  bool last_of(const WidgetBox& one) const {
    return std::none_of(log_.widgets.begin(), log_.widgets.end(), [&](const WidgetBox& other) {
      return other.area == one.area && other.box.bottom > one.box.bottom;
    });
  }

  void apart(std::size_t first, std::size_t second) {
    const WidgetBox& a = log_.widgets[first];
    const WidgetBox& b = log_.widgets[second];
    if (a.kind != WidgetKind::kButton || b.kind != WidgetKind::kButton) return;
    if (a.path == b.path) say(a.path, "drawn twice");
    const bool same = a.area == b.area;
    const PixelBox one = same ? a.box : widgets_seen_[first];
    const PixelBox other = same ? b.box : widgets_seen_[second];
    if (one.empty() || other.empty()) return;
    const float gap = gap_between(one, other);
    if (gap < 0) {
      say(a.path, "overlaps " + b.path + ", " + shown(one) + " and " + shown(other));
    } else if (glass_.mm(gap) < kGap_mm - kSlack_mm) {
      say(a.path, "only " + format_fixed(glass_.mm(gap), 1) + " mm from " + b.path);
    }
  }

  void text(const TextBox& one, const PixelBox& seen_of_it) {
    if (one.cut) say(one.path, "text is cut: " + one.text);
    if (one.shortened && !holds_outside_name(one.text)) say(one.path, "words of ours are shortened: " + one.text);
    const std::string path = one.path.substr(0, one.path.size() - (one.path.ends_with('/') ? 1 : 0));
    const WidgetBox* button = find_widget(log_, path);
    if (button != nullptr && !within(one.box, button->box, kPixel))
      say(path, "text sticks out: " + one.text + ", " + shown(one.box) + " of " + shown(button->box));
    if (one.area.empty() && !within(one.box, glass_.whole(), kPixel))
      say(path, "text is beyond the glass: " + one.text + ", " + shown(one.box));
    for (std::size_t i = 0; i < log_.widgets.size(); ++i) {
      const PixelBox both = seen_of_it.shared_with(widgets_seen_[i]);
      const WidgetBox& other = log_.widgets[i];
      if (both.width() <= kPixel || both.height() <= kPixel || other.kind != WidgetKind::kButton) continue;
      if (!one.path.starts_with(other.path + "/"))
        say(path, "text lies under " + other.path + ": " + one.text + ", " + shown(one.box));
    }
  }

  void texts_apart(std::size_t first, std::size_t second) {
    const PixelBox both = texts_seen_[first].shared_with(texts_seen_[second]);
    const TextBox& a = log_.texts[first];
    const TextBox& b = log_.texts[second];
    // The lines of a font's box are a little taller than its letters.
    if (both.width() > kPixel && both.height() > std::max(2 * kPixel, 0.12F * std::min(a.size_px, b.size_px)))
      say(a.path, "texts overlap: '" + a.text + "' " + shown(a.box) + " and '" + b.text + "' " + shown(b.box));
  }

  const WidgetLog& log_;
  const Glass& glass_;
  const std::string& at_end_;
  std::vector<std::string>* said_;
  std::vector<PixelBox> widgets_seen_;
  std::vector<PixelBox> texts_seen_;
};

}  // namespace

std::vector<std::string> layout_faults(const WidgetLog& log, const Glass& glass, const std::string& at_end) {
  std::vector<std::string> said;
  Look(log, glass, at_end, &said).all();
  return said;
}

}  // namespace nearpit::ui
