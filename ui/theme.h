// How the window looks, in one place: the two themes' colours and the marks of pits.
//
// Colours. Text stands at 7:1 or more against what is under it (WCAG 2.1, success criterion 1.4.6). Fills are Okabe and Ito's palette (2008) or,
// under white text, three of its hues darkened until they pass; none is ever the only sign of a state.
//
// Marks, each told by shape and by what is inside it, so that colour is only a third sign:
//   grid pit, nothing known   a small dot
//   due                       an open square with a dot in it (yellow); on request of a judgement positive: the square stands on a corner
//   halted                    a square with two bars in it (reddish purple)
//   negative                  an open circle with a bar across, as in 'minus'
//   positive                  a filled circle (vermillion), larger, with a cross in it, as in 'plus'
//   not dug                   two crossed strokes, no outline
//   judgement                 the same marks with a short stroke under them
//   conflict                  the same marks with a triangle at the upper right
//   chosen                    four corner ticks around it
// Filled for positive and open for negative is common practice on maps of shovel tests.
#ifndef NEARPIT_UI_THEME_H_
#define NEARPIT_UI_THEME_H_

#include <cstdint>

namespace nearpit::ui {

struct Colour {
  std::uint8_t red = 0;
  std::uint8_t green = 0;
  std::uint8_t blue = 0;
  std::uint8_t alpha = 255;
  friend bool operator==(const Colour&, const Colour&) = default;
};

constexpr Colour rgb(std::uint32_t hex, std::uint8_t alpha = 255) {
  return {static_cast<std::uint8_t>(hex >> 16), static_cast<std::uint8_t>(hex >> 8 & 0xFF),
          static_cast<std::uint8_t>(hex & 0xFF), alpha};
}

// A filled surface and the text on it.
struct Surface {
  Colour fill;
  Colour text;
};

struct Theme {
  Surface ground;   // the window itself
  Surface map;      // under the map
  Surface key;      // an ordinary control
  Surface primary;  // the one control that the crew most likely wants
  Surface chosen;   // switched on, or being typed into
  Surface warning;  // 'NOT saved', what is blank
  Surface good;     // 'Saved'
  Colour quiet;     // text that matters less; still 7:1 on ground and map
  Colour line;      // outlines of controls and marks
  Colour focus;     // the ring around what the keyboard acts on
  Colour pressed;   // laid over a control that is held down

  // marks and map
  Colour due;
  Colour halted;
  Colour positive;
  Colour open_mark;  // inside of open marks
  Colour cluster;    // clusters' ground, see-through
  Colour outline;    // the boundary
  Colour area_line;  // areas' boundaries
  Colour hatch;      // closed areas
};

const Theme& sun_theme();
const Theme& dusk_theme();

// WCAG 2.1 relative luminance and contrast ratio (1 .. 21) of two opaque colours.
double luminance(const Colour& colour);
double contrast(const Colour& one, const Colour& other);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_THEME_H_
