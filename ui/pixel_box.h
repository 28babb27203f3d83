// Boxes and points on the screen, in pixels, y downwards; only the window speaks them. Cutting a box is how every layout is made.
#ifndef NEARPIT_UI_PIXEL_BOX_H_
#define NEARPIT_UI_PIXEL_BOX_H_

#include <algorithm>

namespace nearpit::ui {

struct Pixel {
  float x = 0;
  float y = 0;
  friend bool operator==(const Pixel&, const Pixel&) = default;
};

struct PixelBox {
  float left = 0;
  float top = 0;
  float right = 0;
  float bottom = 0;

  float width() const { return right - left; }
  float height() const { return bottom - top; }
  Pixel middle() const { return {(left + right) / 2, (top + bottom) / 2}; }
  bool empty() const { return right <= left || bottom <= top; }
  bool contains(Pixel at) const { return at.x >= left && at.x < right && at.y >= top && at.y < bottom; }
  PixelBox shared_with(const PixelBox& other) const {
    return {std::max(left, other.left), std::max(top, other.top), std::min(right, other.right),
            std::min(bottom, other.bottom)};
  }
  PixelBox inset(float by) const { return {left + by, top + by, right - by, bottom - by}; }
  friend bool operator==(const PixelBox&, const PixelBox&) = default;
};

// Cuts a piece off one side of *box; *box keeps the rest, less `gap`.
inline PixelBox cut_top(PixelBox* box, float height, float gap = 0) {
  const PixelBox piece{box->left, box->top, box->right, box->top + height};
  box->top += height + gap;
  return piece;
}
inline PixelBox cut_bottom(PixelBox* box, float height, float gap = 0) {
  const PixelBox piece{box->left, box->bottom - height, box->right, box->bottom};
  box->bottom -= height + gap;
  return piece;
}
inline PixelBox cut_left(PixelBox* box, float width, float gap = 0) {
  const PixelBox piece{box->left, box->top, box->left + width, box->bottom};
  box->left += width + gap;
  return piece;
}
inline PixelBox cut_right(PixelBox* box, float width, float gap = 0) {
  const PixelBox piece{box->right - width, box->top, box->right, box->bottom};
  box->right -= width + gap;
  return piece;
}
// Cell (column, row) of a grid that fills the box.
inline PixelBox grid_cell(const PixelBox& box, int columns, int rows, int column, int row, float gap) {
  const float width = (box.width() - gap * static_cast<float>(columns - 1)) / static_cast<float>(columns);
  const float height = (box.height() - gap * static_cast<float>(rows - 1)) / static_cast<float>(rows);
  const float left = box.left + static_cast<float>(column) * (width + gap);
  const float top = box.top + static_cast<float>(row) * (height + gap);
  return {left, top, left + width, top + height};
}

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_PIXEL_BOX_H_
