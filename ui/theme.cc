#include "theme.h"

#include <algorithm>
#include <cmath>

namespace nearpit::ui {
namespace {

// Okabe and Ito (2008), 'Color universal design'.
constexpr std::uint32_t kOrange = 0xE69F00;
constexpr std::uint32_t kSkyBlue = 0x56B4E9;
constexpr std::uint32_t kYellow = 0xF0E442;
constexpr std::uint32_t kBlue = 0x0072B2;
constexpr std::uint32_t kVermillion = 0xD55E00;
constexpr std::uint32_t kReddishPurple = 0xCC79A7;
// Blue and bluish green, darkened until white text on them passes 7:1.
constexpr std::uint32_t kDarkBlue = 0x005A8C;
constexpr std::uint32_t kDarkGreen = 0x00573F;

constexpr std::uint32_t kWhite = 0xFFFFFF;
constexpr std::uint32_t kBlack = 0x000000;
constexpr std::uint32_t kPaper = 0xF6F3EA;
constexpr std::uint32_t kSand = 0xE4DFD0;
constexpr std::uint32_t kNight = 0x101315;
constexpr std::uint32_t kSlate = 0x2B3136;
constexpr std::uint32_t kLamp = 0xF5F0E1;

constexpr std::uint8_t kSeeThrough = 90;

// What stands out alike on light and dark.
Theme shared() {
  Theme theme;
  theme.chosen = {rgb(kYellow), rgb(kBlack)};
  theme.warning = {rgb(kOrange), rgb(kBlack)};
  theme.good = {rgb(kDarkGreen), rgb(kWhite)};
  theme.due = rgb(kYellow);
  theme.halted = rgb(kReddishPurple);
  theme.positive = rgb(kVermillion);
  theme.cluster = rgb(kSkyBlue, kSeeThrough);
  return theme;
}

Theme make_sun() {
  Theme theme = shared();
  theme.ground = {rgb(kPaper), rgb(kBlack)};
  theme.map = {rgb(kWhite), rgb(kBlack)};
  theme.key = {rgb(kSand), rgb(kBlack)};
  theme.primary = {rgb(kDarkBlue), rgb(kWhite)};
  theme.quiet = rgb(0x3A3A3A);
  theme.line = rgb(0x1A1A1A);
  theme.focus = rgb(kBlue);
  theme.pressed = rgb(kBlack, 60);
  theme.open_mark = rgb(kWhite);
  theme.outline = rgb(kBlack);
  theme.area_line = rgb(0x4A4A4A);
  theme.hatch = rgb(0x7A7468);
  return theme;
}

Theme make_dusk() {
  Theme theme = shared();
  theme.ground = {rgb(kNight), rgb(kLamp)};
  theme.map = {rgb(0x000000), rgb(kLamp)};
  theme.key = {rgb(kSlate), rgb(kLamp)};
  theme.primary = {rgb(kSkyBlue), rgb(kBlack)};
  theme.quiet = rgb(0xC9C4B6);
  theme.line = rgb(0xD9D4C6);
  theme.focus = rgb(kSkyBlue);
  theme.pressed = rgb(kWhite, 60);
  theme.open_mark = rgb(0x000000);
  theme.outline = rgb(kLamp);
  theme.area_line = rgb(0xA8A393);
  theme.hatch = rgb(0x8A8474);
  return theme;
}

double linear(std::uint8_t channel) {
  const double value = channel / 255.0;
  return value <= 0.04045 ? value / 12.92 : std::pow((value + 0.055) / 1.055, 2.4);
}

}  // namespace

const Theme& sun_theme() {
  static const Theme theme = make_sun();
  return theme;
}

const Theme& dusk_theme() {
  static const Theme theme = make_dusk();
  return theme;
}

double luminance(const Colour& colour) {
  return 0.2126 * linear(colour.red) + 0.7152 * linear(colour.green) + 0.0722 * linear(colour.blue);
}

double contrast(const Colour& one, const Colour& other) {
  const auto [darker, lighter] = std::minmax({luminance(one), luminance(other)});
  return (lighter + 0.05) / (darker + 0.05);
}

}  // namespace nearpit::ui
