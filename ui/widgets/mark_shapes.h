// The shapes of the marks that theme.h describes, as colours over a square from -1 to 1.
#ifndef NEARPIT_UI_WIDGETS_MARK_SHAPES_H_
#define NEARPIT_UI_WIDGETS_MARK_SHAPES_H_

#include <cstddef>
#include <cstdint>
#include <vector>

#include "theme.h"

namespace nearpit::ui {

enum class MarkShape : std::uint8_t {
  kDot,
  kDue,
  kDueAsked,
  kHalted,
  kNegative,
  kPositive,
  kNotDug,
  kUnderStroke,  // laid over another: a judgement pit
  kFlag,         // laid over another: a conflict
};
constexpr std::size_t kMarkShapes = 9;

// The shape drawn `size` pixels wide and high, row by row from the top, edges smoothed.
std::vector<Colour> paint_mark(MarkShape shape, int size, const Theme& theme);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_WIDGETS_MARK_SHAPES_H_
