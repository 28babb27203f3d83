// Contrast in a picture's pixels, worked out apart from the window's own formula.
#ifndef NEARPIT_TESTS_SUPPORT_PICTURE_CONTRAST_H_
#define NEARPIT_TESTS_SUPPORT_PICTURE_CONTRAST_H_

#include <array>
#include <vector>

namespace nearpit {

using Rgb = std::array<unsigned char, 3>;

// WCAG 2.1, 'relative luminance' and 'contrast ratio' (1 .. 21), with the threshold of its erratum (0.04045).
double relative_luminance(const Rgb& pixel);
double contrast_ratio(const Rgb& a, const Rgb& b);

class Picture {
 public:
  // Rows from the top, three bytes a pixel.
  Picture(std::vector<unsigned char> pixels, int width, int height);

  Rgb at(int x, int y) const;
  // Of pixels with left <= x < right and top <= y < bottom inside the picture: the contrast of the one that stands farthest from the commonest. 1 when
  // there is none.
  double contrast_in(int left, int top, int right, int bottom) const;

 private:
  std::vector<unsigned char> pixels_;
  int width_;
  int height_;
};

}  // namespace nearpit

#endif  // NEARPIT_TESTS_SUPPORT_PICTURE_CONTRAST_H_
