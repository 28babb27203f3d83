#include "widgets/mark_shapes.h"

#include <algorithm>
#include <cmath>

namespace nearpit::ui {
namespace {

constexpr Colour kNothing{0, 0, 0, 0};
constexpr Colour kDark{0, 0, 0, 255};
constexpr int kSamples = 4;  // a pixel's side, for smooth edges
constexpr float kSquare = 0.72F;
constexpr float kOpenCircle = 0.74F;
constexpr float kFullCircle = 0.92F;

struct Brush {
  MarkShape shape;
  const Theme& theme;
  float stroke;  // width of a line

  bool bar(float along, float across, float length) const {
    return std::abs(along) < length && std::abs(across) < stroke / 2;
  }

  // A box of half width kSquare: its outline, its inside.
  Colour boxed(float reach, const Colour& inside) const {
    if (reach > kSquare) return kNothing;
    return reach > kSquare - stroke ? kDark : inside;
  }

  Colour due(float reach, float away) const { return away < 0.26F ? kDark : boxed(reach, theme.due); }

  Colour negative(float x, float y, float away) const {
    if (away > kOpenCircle) return kNothing;
    return away > kOpenCircle - stroke || bar(x, y, 0.4F) ? theme.line : theme.open_mark;
  }

  Colour positive(float x, float y, float away) const {
    if (away > kFullCircle) return kNothing;
    return away > kFullCircle - stroke || bar(x, y, 0.5F) || bar(y, x, 0.5F) ? kDark : theme.positive;
  }

  Colour halted(float x, float y, float reach) const {
    const bool bars = std::abs(std::abs(x) - 0.26F) < stroke * 0.6F && std::abs(y) < 0.42F;
    return bars && reach < kSquare ? kDark : boxed(reach, theme.halted);
  }

  Colour at(float x, float y) const {
    const float away = std::hypot(x, y);
    const float reach = std::max(std::abs(x), std::abs(y));
    switch (shape) {
      case MarkShape::kDot:
        return away < 0.34F ? theme.line : kNothing;
      case MarkShape::kDue:
        return due(reach, away);
      case MarkShape::kDueAsked:
        return due((std::abs(x) + std::abs(y)) * kSquare / 0.96F, away);
      case MarkShape::kHalted:
        return halted(x, y, reach);
      case MarkShape::kNegative:
        return negative(x, y, away);
      case MarkShape::kPositive:
        return positive(x, y, away);
      case MarkShape::kNotDug:
        return std::abs(std::abs(x) - std::abs(y)) < stroke * 0.7F && reach < kSquare ? theme.line : kNothing;
      case MarkShape::kUnderStroke:
        return std::abs(x) < 0.6F && y > 0.98F - stroke && y < 0.98F ? theme.line : kNothing;
      case MarkShape::kFlag: {
        // Right-angled at the upper right corner.
        const float in = std::min({1 - x, y + 1, (x - y) - 1.1F});
        if (in < 0) return kNothing;
        return in < stroke * 0.6F ? kDark : theme.warning.fill;
      }
    }
    return kNothing;
  }
};

Colour averaged(const Brush& brush, int column, int row, int size) {
  float red = 0;
  float green = 0;
  float blue = 0;
  float alpha = 0;
  const auto place = [&](int pixel, int sample) {
    return (static_cast<float>(pixel) + (static_cast<float>(sample) + 0.5F) / kSamples) / static_cast<float>(size) * 2 -
           1;
  };
  for (int i = 0; i < kSamples; ++i) {
    for (int j = 0; j < kSamples; ++j) {
      const Colour colour = brush.at(place(column, i), place(row, j));
      const float weight = static_cast<float>(colour.alpha) / 255;
      red += static_cast<float>(colour.red) * weight;
      green += static_cast<float>(colour.green) * weight;
      blue += static_cast<float>(colour.blue) * weight;
      alpha += weight;
    }
  }
  if (alpha <= 0) return kNothing;
  const auto channel = [&](float sum) { return static_cast<std::uint8_t>(std::lround(sum / alpha)); };
  return {channel(red), channel(green), channel(blue),
          static_cast<std::uint8_t>(std::lround(alpha * 255 / (kSamples * kSamples)))};
}

}  // namespace

std::vector<Colour> paint_mark(MarkShape shape, int size, const Theme& theme) {
  // A line is a tenth of the mark, and never thinner than 1.2 pixels.
  const Brush brush{shape, theme, std::max(0.2F, 2.4F / static_cast<float>(size))};
  std::vector<Colour> pixels;
  pixels.reserve(static_cast<std::size_t>(size) * static_cast<std::size_t>(size));
  for (int row = 0; row < size; ++row) {
    for (int column = 0; column < size; ++column)
      pixels.push_back(averaged(brush, column, row, size));
  }
  return pixels;
}

}  // namespace nearpit::ui
