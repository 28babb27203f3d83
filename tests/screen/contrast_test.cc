// Contrast as it is really drawn: the cards are rendered by OpenGL, and the pixels of each text are looked at.
#include <gtest/gtest.h>

#include <algorithm>
#include <cmath>
#include <set>
#include <tuple>

#include "base/numbers.h"
#include "screen/card_tour.h"
#include "support/offscreen_gl.h"
#include "support/picture_contrast.h"

namespace nearpit::ui {
namespace {

constexpr double kTextContrast = 7;  // WCAG 2.1, success criterion 1.4.6
constexpr double kMarkContrast = 3;  // WCAG 2.1, success criterion 1.4.11

Picture picture_of(std::vector<unsigned char> pixels, const Glass& glass) {
  return {std::move(pixels), static_cast<int>(glass.width_px), static_cast<int>(glass.height_px)};
}

// A pixel more on each side.
double contrast_in(const Picture& picture, const PixelBox& box) {
  return picture.contrast_in(static_cast<int>(std::floor(box.left)) - 1, static_cast<int>(std::floor(box.top)) - 1,
                             static_cast<int>(std::ceil(box.right)) + 1, static_cast<int>(std::ceil(box.bottom)) + 1);
}

class ContrastGuest : public TourGuest {
 public:
  void begins(ScreenDriver& screen) override { screen.start_gl(); }
  void ends(ScreenDriver& screen) override { screen.stop_gl(); }
  void sees(ScreenDriver& screen, const std::string& card) override {
    look(screen, card);
    std::vector<std::string> areas;
    for (const WidgetBox& one : screen.log().widgets) {
      if (one.kind == WidgetKind::kScroll) areas.push_back(one.path);
    }
    if (areas.empty()) return;
    for (const std::string& area : areas)
      screen.wheel(screen.middle_of(area), -1e6F);
    look(screen, card);
    for (const std::string& area : areas)
      screen.wheel(screen.middle_of(area), 1e6F);
  }

  int texts = 0;
  std::string complaints;

 private:
  void look(ScreenDriver& screen, const std::string& card) {
    screen.draw_anew();
    const Picture picture = picture_of(screen.pixels(), screen.glass());
    for (const TextBox& text : screen.log().texts) {
      // Of a text that is partly scrolled out the rest may be too little to see its ink.
      if (text.visible.height() < text.box.height() * 0.8F || text.visible.width() < text.box.width() * 0.8F) continue;
      ++texts;
      // The same text in the same place on the same ground was looked at on an earlier card.
      const Rgb ground = picture.at(static_cast<int>(text.visible.left), static_cast<int>(text.visible.top));
      if (!seen_.insert({text.path + text.text, text.visible.left, text.visible.top, ground}).second) continue;
      const double contrast = contrast_in(picture, text.visible);
      if (contrast >= kTextContrast) continue;
      complaints += card + " | " + text.path + " | '" + text.text + "' has " + format_fixed(contrast, 1) + ":1\n";
    }
  }

  std::set<std::tuple<std::string, float, float, Rgb>> seen_;
};

struct ContrastCase {
  TestGlass glass;
  bool dusk = false;
};

std::string case_name(const testing::TestParamInfo<ContrastCase>& info) {
  return (info.param.dusk ? "Dusk" : "Sun") + format_fixed(info.param.glass.width_px, 0);
}

class Contrast : public testing::TestWithParam<ContrastCase> {
 protected:
  Contrast() : gl(static_cast<int>(GetParam().glass.width_px), static_cast<int>(GetParam().glass.height_px)) {}
  OffscreenGl gl;
};

TEST_P(Contrast, EveryTextStandsOutSevenToOne) {
  ASSERT_TRUE(gl.ok()) << gl.problem();
  ContrastGuest guest;
  tour_of_cards(GetParam().glass, GetParam().dusk, guest);
  EXPECT_GT(guest.texts, 1000);
  EXPECT_EQ(guest.complaints, "") << guest.texts << " texts";
}

TEST_P(Contrast, EveryMarkStandsOutFromTheMap) {
  ASSERT_TRUE(gl.ok()) << gl.problem();
  const Theme& theme = GetParam().dusk ? dusk_theme() : sun_theme();
  const Glass glass{GetParam().glass.width_px, GetParam().glass.height_px, GetParam().glass.px_per_mm()};
  Frontend frontend;
  frontend.start_gl().value();
  InputQueue queue;
  // Each shape at the least and the most size of a map, on the map's ground.
  const auto place = [&](std::size_t shape, double size_mm) {
    const Pixel middle{glass.px(8) * static_cast<float>(shape + 1), size_mm < 3 ? glass.px(10) : glass.px(30)};
    const float half = glass.px(size_mm) / 2;
    return PixelBox{middle.x - half, middle.y - half, middle.x + half, middle.y + half};
  };
  frontend.frame(&queue, glass, theme, [&](Ui& ui) {
    ui.fill(ui.window(), theme.map.fill);
    for (std::size_t shape = 0; shape < kMarkShapes; ++shape) {
      for (const double size_mm : {1.6, 6.5})
        ui.mark(static_cast<MarkShape>(shape), place(shape, size_mm).middle(), ui.mm(size_mm));
    }
  });
  frontend.render();
  const Picture picture = picture_of(frontend.read_pixels(), glass);
  for (std::size_t shape = 0; shape < kMarkShapes; ++shape) {
    for (const double size_mm : {1.6, 6.5})
      EXPECT_GE(contrast_in(picture, place(shape, size_mm).inset(-2)), kMarkContrast) << shape << " at " << size_mm;
  }
  frontend.stop_gl();
}

// The picture is of the cards: known places hold known colours.
TEST_P(Contrast, PicturesShowWhatTheThemeSays) {
  ASSERT_TRUE(gl.ok()) << gl.problem();
  ScreenWorld world;
  world.measured(GetParam().glass.px_per_mm(), GetParam().dusk);
  ScreenDriver screen(world, GetParam().glass, world.make());
  screen.start_gl();
  screen.draw_anew();
  const Picture picture = picture_of(screen.pixels(), screen.glass());
  const Theme& theme = GetParam().dusk ? dusk_theme() : sun_theme();
  const auto rgb_of = [](const Colour& colour) { return Rgb{colour.red, colour.green, colour.blue}; };
  EXPECT_EQ(picture.at(1, 1), rgb_of(theme.ground.fill));
  const PixelBox primary = screen.widget("dig-list/record").box;
  EXPECT_EQ(picture.at(static_cast<int>(primary.left + screen.glass().px(3)), static_cast<int>(primary.middle().y)),
            rgb_of(theme.primary.fill));
  const PixelBox map = screen.map_box();
  EXPECT_EQ(picture.at(static_cast<int>(map.middle().x), static_cast<int>(map.top + screen.glass().px(1))),
            rgb_of(theme.map.fill));
  screen.stop_gl();
}

TEST(ContrastFormula, GivesThePublishedEnds) {
  EXPECT_NEAR(contrast_ratio({0, 0, 0}, {255, 255, 255}), 21, 1e-9);
  EXPECT_EQ(contrast_ratio({90, 90, 90}, {90, 90, 90}), 1);
  // The lightest grey on white that passes 4.5:1 is #767676 (WCAG 2.1, technique G18's commonly cited example).
  EXPECT_GE(contrast_ratio({0x76, 0x76, 0x76}, {255, 255, 255}), 4.5);
  EXPECT_LT(contrast_ratio({0x77, 0x77, 0x77}, {255, 255, 255}), 4.5);
}

INSTANTIATE_TEST_SUITE_P(Pixels, Contrast,
                         testing::Values(ContrastCase{{1280, 800, 1.5}, false}, ContrastCase{{1280, 800, 1.5}, true},
                                         ContrastCase{{1024, 600, 1}, false}, ContrastCase{{1024, 600, 1}, true}),
                         case_name);

}  // namespace
}  // namespace nearpit::ui
