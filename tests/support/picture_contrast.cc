#include "support/picture_contrast.h"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <utility>

namespace nearpit {
namespace {

std::uint32_t packed(const Rgb& pixel) {
  return static_cast<std::uint32_t>(pixel[0]) << 16 | static_cast<std::uint32_t>(pixel[1]) << 8 | pixel[2];
}
Rgb unpacked(std::uint32_t pixel) {
  return {static_cast<unsigned char>(pixel >> 16), static_cast<unsigned char>(pixel >> 8 & 0xFF),
          static_cast<unsigned char>(pixel & 0xFF)};
}

}  // namespace

double relative_luminance(const Rgb& pixel) {
  std::array<double, 3> linear{};
  for (std::size_t i = 0; i < 3; ++i) {
    const double share = pixel[i] / 255.0;
    linear[i] = share <= 0.04045 ? share / 12.92 : std::pow((share + 0.055) / 1.055, 2.4);
  }
  return 0.2126 * linear[0] + 0.7152 * linear[1] + 0.0722 * linear[2];
}

double contrast_ratio(const Rgb& a, const Rgb& b) {
  const double one = relative_luminance(a) + 0.05;
  const double other = relative_luminance(b) + 0.05;
  return std::max(one, other) / std::min(one, other);
}

Picture::Picture(std::vector<unsigned char> pixels, int width, int height)
    : pixels_(std::move(pixels)), width_(width), height_(height) {}

Rgb Picture::at(int x, int y) const {
  const auto first = 3 * (static_cast<std::size_t>(y) * static_cast<std::size_t>(width_) + static_cast<std::size_t>(x));
  return {pixels_[first], pixels_[first + 1], pixels_[first + 2]};
}

double Picture::contrast_in(int left, int top, int right, int bottom) const {
  std::vector<std::uint32_t> all;
  for (int y = std::max(0, top); y < std::min(height_, bottom); ++y) {
    for (int x = std::max(0, left); x < std::min(width_, right); ++x)
      all.push_back(packed(at(x, y)));
  }
  std::sort(all.begin(), all.end());
  std::vector<std::pair<std::ptrdiff_t, std::uint32_t>> counts;
  for (auto from = all.begin(); from != all.end();) {
    const auto to = std::upper_bound(from, all.end(), *from);
    counts.emplace_back(to - from, *from);
    from = to;
  }
  if (counts.empty()) return 1;
  const Rgb ground = unpacked(std::max_element(counts.begin(), counts.end())->second);
  double most = 1;
  for (const auto& [count, ink] : counts)
    most = std::max(most, contrast_ratio(unpacked(ink), ground));
  return most;
}

}  // namespace nearpit
