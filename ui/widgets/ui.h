// What cards draw with, for one frame: controls, text, marks, scrolling, keys. Layout is in boxes of pixels cut from the window; sizes are asked
// for in millimetres. A control acts when the pointer is let go on it, and not when it slid off before; or by Enter or the space bar when the keyboard's
// ring is on it.
#ifndef NEARPIT_UI_WIDGETS_UI_H_
#define NEARPIT_UI_WIDGETS_UI_H_

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "glass.h"
#include "pixel_box.h"
#include "theme.h"
#include "widgets/fonts.h"
#include "widgets/input_queue.h"
#include "widgets/widget_log.h"

struct ImDrawList;

namespace nearpit::ui {

enum class Align { kLeft, kCentre, kRight };
enum class Tone { kPlain, kQuiet, kOnKey, kOnPrimary, kOnChosen, kOnWarning, kOnGood, kOnMap };

struct TextLook {
  TextSize size = TextSize::kBase;
  Align align = Align::kLeft;
  Tone tone = Tone::kPlain;
  int lines = 1;         // at most; words are wrapped
  bool shorten = false;  // text from outside (a name) may end in '…' where it does not fit
  bool top = false;      // at the top of the box, not in its middle
};

enum class ButtonKind { kPlain, kPrimary, kBare };
struct ButtonLook {
  ButtonKind kind = ButtonKind::kPlain;
  bool chosen = false;   // switched on, or being typed into
  bool warning = false;  // must be seen
  double least_mm = kTarget_mm;
  TextSize size = TextSize::kBase;
  Align align = Align::kCentre;
  std::string under = {};  // a second, smaller line
  bool shorten = false;
  int lines = 2;
};

// A scroll area's own state; the card keeps it.
struct ScrollState {
  float offset = 0;       // pixels of content above the area's top
  float content = 0;      // height of the content when last drawn
  bool held = false;      // the pointer went down in it
  bool dragging = false;  // and moved far enough to drag
  float held_at = 0;      // pointer's y when it went down
  float offset_at_hold = 0;
};

// What the pointer does on a surface that is no button (the map).
struct Touch {
  bool hovered = false;
  float drag_x = 0;  // since the last frame, while held and once it moved far enough
  float drag_y = 0;
  std::optional<Pixel> tapped;  // let go where it went down
  float wheel = 0;
  Pixel pointer;
};
struct TouchState {
  bool held = false;
  bool dragging = false;
  Pixel held_at;
  Pixel last;
};

// Which control the keyboard acts on; kept between frames.
struct FocusRing {
  std::string path;
  bool shown = false;
  bool moved = false;   // in the last frame: scroll areas bring it into view
  std::string act_on;   // in this frame
  bool typing = false;  // a line of text takes the keys
};

class Ui {
 public:
  Ui(const Glass& glass, const Theme& theme, Fonts* fonts, const FrameInput& input, FocusRing* ring, WidgetLog* log,
     ImDrawList* list);

  const Theme& theme() const { return theme_; }
  const Glass& glass() const { return glass_; }
  float mm(double millimetres) const { return glass_.px(millimetres); }
  PixelBox window() const { return glass_.whole(); }
  ImDrawList* list() const { return list_; }

  // Names of controls stand under those of the parts that they belong to: "record/save".
  class Part {
   public:
    Part(Ui* ui, std::string_view name);
    Part(const Part&) = delete;
    Part& operator=(const Part&) = delete;
    ~Part();

   private:
    Ui* ui_;
    std::size_t length_;
  };
  Part part(std::string_view name) { return Part(this, name); }

  // Whether it was acted on in this frame.
  bool button(std::string_view name, const PixelBox& box, const std::string& label, const ButtonLook& look = {});
  // A button's face is drawn by the caller, who gets the box.
  bool row(std::string_view name, const PixelBox& box, const std::string& label, bool chosen,
           double least_mm = kTarget_mm);
  void text(const PixelBox& box, const std::string& text, const TextLook& look = {});
  // A small label on the map, centred under a place; no part of the layout.
  void map_text(Pixel top_middle, const std::string& text);
  // The height that the text takes in `width` pixels, lines and all.
  float text_height(const std::string& text, float width, TextSize size) const;
  float text_width(const std::string& text, TextSize size) const;

  void fill(const PixelBox& box, const Colour& colour, double radius_mm = 0);
  void outline(const PixelBox& box, const Colour& colour, float thickness_px, double radius_mm = 0);
  void line(Pixel from, Pixel to, const Colour& colour, float thickness_px);
  void mark(MarkShape shape, Pixel middle, float size_px);

  // Content is laid out from the box that is returned, which may reach above and below `box`; end_scroll says where it ended.
  // Not `by_hand`: only its state moves it.
  PixelBox begin_scroll(std::string_view name, const PixelBox& box, ScrollState* state, bool by_hand = true);
  void end_scroll(float content_bottom);

  Touch touch(std::string_view name, const PixelBox& box, TouchState* state);

  // Each key or character is handed out once.
  bool take(Key key);
  bool take(char32_t character);
  std::optional<Key> take_key();
  std::optional<char32_t> take_character();
  // From here on keys belong to a line of text.
  void typing() { ring_->typing = true; }
  bool ring_shown() const { return ring_->shown; }

  // Letters that the texture lacks were asked for.
  bool wants_letters() const { return wants_letters_; }

 private:
  struct Scroll {
    PixelBox box;
    ScrollState* state;
    PixelBox outer_clip;
    std::size_t first_widget;
  };
  struct Skin {
    const Surface& surface;
    Tone tone;
  };
  struct Press {
    bool acted = false;
    bool held = false;
    bool focused = false;
  };

  std::string path_of(std::string_view name) const;
  std::string area_path() const;
  Press press(std::string_view name, const PixelBox& box, const std::string& label, bool chosen, double least_mm);
  void face(const PixelBox& box, const Surface& surface, const Press& press, bool outlined);
  Skin skin_of(const ButtonLook& look) const;
  Colour ink(Tone tone) const;
  void draw_lines(const PixelBox& box, const std::vector<std::string>& lines, TextSize size, const TextLook& look);
  std::vector<std::string> wrapped(const std::string& text, float width, TextSize size) const;
  std::string shortened(std::string text, float width, TextSize size) const;
  void move_by_hand(const PixelBox& box, ScrollState* state);
  void bring_focus_into_view(const Scroll& scroll, float content_bottom);

  const Glass& glass_;
  const Theme& theme_;
  Fonts* fonts_;
  FrameInput input_;
  FocusRing* ring_;
  WidgetLog* log_;
  ImDrawList* list_;
  std::string path_;
  PixelBox clip_;
  std::vector<Scroll> scrolls_;
  bool wants_letters_ = false;
};

// What a row leaves for its text.
inline PixelBox in_row(const Ui& ui, const PixelBox& row) {
  return {row.left + ui.mm(2), row.top + ui.mm(1), row.right - ui.mm(2), row.bottom - ui.mm(1)};
}

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_UI_H_
