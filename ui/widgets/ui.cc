#include "widgets/ui.h"

#include <imgui.h>
#include <imgui_internal.h>

#include <algorithm>
#include <cmath>
#include <utility>

#include "base/text.h"
#include "widgets/packed_colour.h"

namespace nearpit::ui {
namespace {

constexpr double kCornerRadius_mm = 1.5;
constexpr double kOutline_mm = 0.3;
constexpr double kRing_mm = 0.8;
constexpr double kTextInset_mm = 1;
constexpr double kDragStart_mm = 3;

ImVec2 corner(const PixelBox& box) { return {box.left, box.top}; }
ImVec2 far_corner(const PixelBox& box) { return {box.right, box.bottom}; }

TextSize smaller(TextSize size) { return size == TextSize::kLarge ? TextSize::kBase : TextSize::kSmall; }

}  // namespace

Ui::Ui(const Glass& glass, const Theme& theme, Fonts* fonts, const FrameInput& input, FocusRing* ring, WidgetLog* log,
       ImDrawList* list)
    : glass_(glass),
      theme_(theme),
      fonts_(fonts),
      input_(input),
      ring_(ring),
      log_(log),
      list_(list),
      clip_(glass.whole()) {}

Ui::Part::Part(Ui* ui, std::string_view name) : ui_(ui), length_(ui->path_.size()) {
  ui_->path_ += name;
  ui_->path_ += '/';
}
Ui::Part::~Part() { ui_->path_.resize(length_); }

std::string Ui::path_of(std::string_view name) const { return path_ + std::string(name); }
std::string Ui::area_path() const {
  return scrolls_.empty() ? "" : log_->widgets[scrolls_.back().first_widget - 1].path;
}

Ui::Press Ui::press(std::string_view name, const PixelBox& box, const std::string& label, bool chosen,
                    double least_mm) {
  const std::string path = path_of(name);
  Press press;
  press.focused = ring_->shown && ring_->path == path;
  press.acted = ring_->act_on == path;
  const PixelBox visible = box.shared_with(clip_);
  if (!visible.empty()) {
    ImGui::SetCursorScreenPos(corner(box));
    const bool clicked = ImGui::InvisibleButton(path.c_str(), {box.width(), box.height()});
    press.held = ImGui::IsItemActive() && ImGui::IsItemHovered();
    press.acted = press.acted || clicked;
  }
  if (press.acted) ring_->act_on.clear();
  log_->widgets.push_back({path, WidgetKind::kButton, box, visible.empty() ? PixelBox{} : visible, least_mm, label,
                           chosen, press.focused, area_path()});
  return press;
}

void Ui::face(const PixelBox& box, const Surface& surface, const Press& press, bool outlined) {
  fill(box, surface.fill, kCornerRadius_mm);
  if (press.held) fill(box, theme_.pressed, kCornerRadius_mm);
  if (outlined) outline(box, theme_.line, std::max(1.0F, mm(kOutline_mm)), kCornerRadius_mm);
  if (press.focused)
    outline(box.inset(-mm(kRing_mm) / 2), theme_.focus, std::max(2.0F, mm(kRing_mm)), kCornerRadius_mm);
}

Ui::Skin Ui::skin_of(const ButtonLook& look) const {
  if (look.chosen) return {theme_.chosen, Tone::kOnChosen};
  if (look.warning) return {theme_.warning, Tone::kOnWarning};
  if (look.kind == ButtonKind::kPrimary) return {theme_.primary, Tone::kOnPrimary};
  if (look.kind == ButtonKind::kBare) return {theme_.ground, Tone::kPlain};
  return {theme_.key, Tone::kOnKey};
}

bool Ui::button(std::string_view name, const PixelBox& box, const std::string& label, const ButtonLook& look) {
  const Press pressed = press(name, box, label, look.chosen, look.least_mm);
  if (box.shared_with(clip_).empty()) return pressed.acted;
  const Skin skin = skin_of(look);
  face(box, skin.surface, pressed, look.kind != ButtonKind::kBare);
  const Part here(this, name);
  TextLook text_look{look.size, look.align, skin.tone, look.lines, look.shorten};
  PixelBox inside = box.inset(mm(kTextInset_mm) / 2);
  inside.left += mm(look.align == Align::kLeft ? 2 * kTextInset_mm : kTextInset_mm) / 2;
  inside.right -= mm(kTextInset_mm) / 2;
  if (!look.under.empty()) {
    const float label_height = mm(line_mm(look.size));
    const float small = mm(line_mm(TextSize::kSmall));
    TextLook under = text_look;
    under.size = TextSize::kSmall;
    under.lines = std::clamp(static_cast<int>((inside.height() - label_height) / small), 1, look.lines);
    text_look.lines = 1;
    const auto wanted = static_cast<int>(wrapped(look.under, inside.width(), TextSize::kSmall).size());
    const float under_height = small * static_cast<float>(std::min(wanted, under.lines));
    PixelBox lines = inside;
    lines.top += std::max(0.0F, (inside.height() - label_height - under_height) / 2);
    text(cut_top(&lines, label_height), label, text_look);
    text(cut_top(&lines, under_height), look.under, under);
  } else {
    text(inside, label, text_look);
  }
  return pressed.acted;
}

bool Ui::row(std::string_view name, const PixelBox& box, const std::string& label, bool chosen, double least_mm) {
  const Press pressed = press(name, box, label, chosen, least_mm);
  if (!box.shared_with(clip_).empty()) face(box, chosen ? theme_.chosen : theme_.key, pressed, true);
  return pressed.acted;
}

Colour Ui::ink(Tone tone) const {
  switch (tone) {
    case Tone::kPlain:
      return theme_.ground.text;
    case Tone::kQuiet:
      return theme_.quiet;
    case Tone::kOnKey:
      return theme_.key.text;
    case Tone::kOnPrimary:
      return theme_.primary.text;
    case Tone::kOnChosen:
      return theme_.chosen.text;
    case Tone::kOnWarning:
      return theme_.warning.text;
    case Tone::kOnGood:
      return theme_.good.text;
    case Tone::kOnMap:
      return theme_.map.text;
  }
  return theme_.ground.text;
}

float Ui::text_width(const std::string& text, TextSize size) const {
  const ImFont* font = fonts_->of(size);
  return font->CalcTextSizeA(font->FontSize, FLT_MAX, 0, text.c_str(), text.c_str() + text.size()).x;
}

std::vector<std::string> Ui::wrapped(const std::string& text, float width, TextSize size) const {
  std::vector<std::string> lines;
  std::string line;
  std::size_t at = 0;
  while (at <= text.size()) {
    const std::size_t end = std::min(text.find_first_of(" \n", at), text.size());
    const std::string word = text.substr(at, end - at);
    const std::string longer = line.empty() ? word : line + " " + word;
    if (!line.empty() && text_width(longer, size) > width) {
      lines.push_back(line);
      line = word;
    } else {
      line = longer;
    }
    if (end < text.size() && text[end] == '\n') {
      lines.push_back(line);
      line.clear();
    }
    at = end + 1;
  }
  lines.push_back(line);
  return lines;
}

std::string Ui::shortened(std::string text, float width, TextSize size) const {
  if (text_width(text, size) <= width) return text;
  const std::string dots = "\xE2\x80\xA6";
  while (!text.empty() && text_width(text + dots, size) > width)
    text.resize(character_before(text, text.size()));
  return text + dots;
}

float Ui::text_height(const std::string& text, float width, TextSize size) const {
  return static_cast<float>(wrapped(text, width, size).size()) * mm(line_mm(size));
}

void Ui::draw_lines(const PixelBox& box, const std::vector<std::string>& lines, TextSize size, const TextLook& look) {
  ImFont* font = fonts_->of(size);
  const float step = font->FontSize;
  const float height = step * static_cast<float>(lines.size());
  float top = look.top ? box.top : std::round((box.top + box.bottom - height) / 2);
  list_->PushClipRect(corner(clip_), far_corner(clip_), true);
  for (const std::string& line : lines) {
    const float width = text_width(line, size);
    float left = box.left;
    if (look.align == Align::kCentre) left = std::round((box.left + box.right - width) / 2);
    if (look.align == Align::kRight) left = std::round(box.right - width);
    list_->AddText(font, step, {left, top}, packed(ink(look.tone)), line.c_str(), line.c_str() + line.size());
    top += step;
  }
  list_->PopClipRect();
}

void Ui::text(const PixelBox& box, const std::string& text, const TextLook& look) {
  if (text.empty()) return;
  wants_letters_ = fonts_->want(text, look.size) || wants_letters_;
  const auto fits = [&](const std::vector<std::string>& lines, TextSize size) {
    const auto most = static_cast<std::size_t>(std::max(look.lines, 1));
    const float tall = static_cast<float>(lines.size()) * fonts_->of(size)->FontSize;
    return lines.size() <= most && tall <= box.height() + 1 &&
           std::all_of(lines.begin(), lines.end(),
                       [&](const std::string& line) { return text_width(line, size) <= box.width() + 0.5F; });
  };
  TextSize size = look.size;
  std::vector<std::string> lines = look.lines > 1 ? wrapped(text, box.width(), size) : std::vector<std::string>{text};
  while (!fits(lines, size) && size != TextSize::kSmall) {
    size = smaller(size);
    lines = look.lines > 1 ? wrapped(text, box.width(), size) : std::vector<std::string>{text};
  }
  bool cut = !fits(lines, size);
  bool dots = false;
  if (cut && look.shorten) {
    const auto room =
        std::max<std::size_t>(1, std::min(static_cast<std::size_t>(std::max(look.lines, 1)),
                                          static_cast<std::size_t>((box.height() + 1) / fonts_->of(size)->FontSize)));
    if (lines.size() > room) {
      lines.resize(room);
      lines.back() += "\xE2\x80\xA6";
    }
    for (std::string& line : lines)
      line = shortened(line, box.width(), size);
    dots = true;
    cut = false;
  }
  draw_lines(box, lines, size, look);
  float widest = 0;
  for (const std::string& line : lines)
    widest = std::max(widest, text_width(line, size));
  const float tall = static_cast<float>(lines.size()) * fonts_->of(size)->FontSize;
  PixelBox letters{box.left, look.top ? box.top : (box.top + box.bottom - tall) / 2, box.left + widest, 0};
  if (look.align == Align::kCentre) letters.left = (box.left + box.right - widest) / 2;
  if (look.align == Align::kRight) letters.left = box.right - widest;
  letters.right = letters.left + widest;
  letters.bottom = letters.top + tall;
  const PixelBox visible = letters.shared_with(clip_);
  log_->texts.push_back({path_, text, letters, visible.empty() ? PixelBox{} : visible, fonts_->of(size)->FontSize, cut,
                         dots, area_path()});
}

void Ui::map_text(Pixel top_middle, const std::string& text) {
  wants_letters_ = fonts_->want(text, TextSize::kSmall) || wants_letters_;
  ImFont* font = fonts_->of(TextSize::kSmall);
  const float width = text_width(text, TextSize::kSmall);
  const PixelBox box{std::round(top_middle.x - width / 2), std::round(top_middle.y),
                     std::round(top_middle.x + width / 2), std::round(top_middle.y + font->FontSize)};
  list_->AddRectFilled(corner(box), far_corner(box), packed(theme_.map.fill));
  list_->AddText(font, font->FontSize, corner(box), packed(theme_.map.text), text.c_str(), text.c_str() + text.size());
}

void Ui::fill(const PixelBox& box, const Colour& colour, double radius_mm) {
  list_->PushClipRect(corner(clip_), far_corner(clip_), true);
  list_->AddRectFilled(corner(box), far_corner(box), packed(colour), mm(radius_mm));
  list_->PopClipRect();
}

void Ui::outline(const PixelBox& box, const Colour& colour, float thickness_px, double radius_mm) {
  list_->PushClipRect(corner(clip_), far_corner(clip_), true);
  list_->AddRect(corner(box), far_corner(box), packed(colour), mm(radius_mm), 0, thickness_px);
  list_->PopClipRect();
}

void Ui::line(Pixel from, Pixel to, const Colour& colour, float thickness_px) {
  list_->PushClipRect(corner(clip_), far_corner(clip_), true);
  list_->AddLine({from.x, from.y}, {to.x, to.y}, packed(colour), thickness_px);
  list_->PopClipRect();
}

void Ui::mark(MarkShape shape, Pixel middle, float size_px) {
  const MarkImage& image = fonts_->mark(shape, size_px);
  const float half = size_px / 2;
  const PixelBox box{middle.x - half, middle.y - half, middle.x + half, middle.y + half};
  const bool whole = box.shared_with(clip_) == box;  // the map draws many thousands, none of them cut by a scroll area
  if (!whole) list_->PushClipRect(corner(clip_), far_corner(clip_), true);
  list_->AddImage(ImGui::GetIO().Fonts->TexID, corner(box), far_corner(box), {image.u0, image.v0},
                  {image.u1, image.v1});
  if (!whole) list_->PopClipRect();
}

void Ui::move_by_hand(const PixelBox& box, ScrollState* state) {
  const bool inside = box.shared_with(clip_).contains(input_.pointer);
  if (input_.pressed && inside) {
    *state = {state->offset, state->content, true, false, input_.pointer.y, state->offset};
  }
  if (state->held && input_.down && std::abs(input_.pointer.y - state->held_at) > mm(kDragStart_mm) &&
      state->content > box.height()) {
    state->dragging = true;
    ImGui::ClearActiveID();  // what was pressed is let go without acting
  }
  if (state->dragging) state->offset = state->offset_at_hold - (input_.pointer.y - state->held_at);
  if (!input_.down) state->held = state->dragging = false;
  if (inside) state->offset -= input_.wheel * mm(kPrimary_mm);
  if (take(Key::kPageDown)) state->offset += box.height() * 0.8F;
  if (take(Key::kPageUp)) state->offset -= box.height() * 0.8F;
}

PixelBox Ui::begin_scroll(std::string_view name, const PixelBox& box, ScrollState* state, bool by_hand) {
  if (by_hand) move_by_hand(box, state);
  state->offset = std::round(std::clamp(state->offset, 0.0F, std::max(0.0F, state->content - box.height())));
  log_->widgets.push_back(
      {path_of(name), WidgetKind::kScroll, box, box.shared_with(clip_), 0, "", false, false, area_path()});
  scrolls_.push_back({box, state, clip_, log_->widgets.size()});
  // A little more than the box, for outlines and the keyboard's ring.
  clip_ = box.inset(-mm(kRing_mm)).shared_with(clip_);
  ImGui::PushClipRect(corner(clip_), far_corner(clip_), true);
  return {box.left, box.top - state->offset, box.right, box.bottom};
}

void Ui::bring_focus_into_view(const Scroll& scroll, float content_bottom) {
  if (!ring_->shown || !ring_->moved) return;
  for (std::size_t i = scroll.first_widget; i < log_->widgets.size(); ++i) {
    const WidgetBox& widget = log_->widgets[i];
    if (widget.path != ring_->path) continue;
    const float room = mm(kRing_mm);
    if (widget.box.top - room < scroll.box.top) scroll.state->offset -= scroll.box.top - (widget.box.top - room);
    if (widget.box.bottom + room > scroll.box.bottom)
      scroll.state->offset += widget.box.bottom + room - scroll.box.bottom;
    const float most = std::max(0.0F, content_bottom - scroll.box.height());
    scroll.state->offset = std::round(std::clamp(scroll.state->offset, 0.0F, most));
  }
}

void Ui::end_scroll(float content_bottom) {
  const Scroll scroll = scrolls_.back();
  scrolls_.pop_back();
  scroll.state->content = content_bottom - (scroll.box.top - scroll.state->offset);
  bring_focus_into_view(scroll, scroll.state->content);
  ImGui::PopClipRect();
  clip_ = scroll.outer_clip;
  const float shown = scroll.box.height();
  if (scroll.state->content > shown + 1) {
    const float length = std::max(mm(kTarget_mm) / 2, shown * shown / scroll.state->content);
    const float top = scroll.box.top + (shown - length) * scroll.state->offset / (scroll.state->content - shown);
    fill({scroll.box.right - mm(1), top, scroll.box.right, top + length}, theme_.line, 0.5);
  }
}

Touch Ui::touch(std::string_view name, const PixelBox& box, TouchState* state) {
  const std::string path = path_of(name);
  Touch touch;
  touch.pointer = input_.pointer;
  if (box.empty()) return touch;
  ImGui::SetCursorScreenPos(corner(box));
  ImGui::InvisibleButton(path.c_str(), {box.width(), box.height()});
  touch.hovered = ImGui::IsItemHovered();
  if (ImGui::IsItemActive() && input_.pressed) *state = {true, false, input_.pointer, input_.pointer};
  if (state->held) {
    const float far =
        std::max(std::abs(input_.pointer.x - state->held_at.x), std::abs(input_.pointer.y - state->held_at.y));
    if (far > mm(kDragStart_mm)) state->dragging = true;
    if (state->dragging) {
      touch.drag_x = input_.pointer.x - state->last.x;
      touch.drag_y = input_.pointer.y - state->last.y;
      state->last = input_.pointer;
    }
    if (!input_.down) {
      if (!state->dragging && box.contains(input_.pointer)) touch.tapped = state->held_at;
      state->held = state->dragging = false;
    }
  }
  if (touch.hovered) touch.wheel = input_.wheel;
  log_->widgets.push_back({path, WidgetKind::kMap, box, box, 0, "", false, false, area_path()});
  return touch;
}

bool Ui::take(Key key) {
  if (input_.key != key) return false;
  input_.key.reset();
  return true;
}

bool Ui::take(char32_t character) {
  if (input_.character != character) return false;
  input_.character.reset();
  return true;
}

std::optional<Key> Ui::take_key() { return std::exchange(input_.key, std::nullopt); }
std::optional<char32_t> Ui::take_character() { return std::exchange(input_.character, std::nullopt); }

}  // namespace nearpit::ui
