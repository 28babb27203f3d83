// Letters as they are really drawn, by OpenGL.
#include "widgets/fonts.h"

#include <gtest/gtest.h>

#include <set>

#include "support/offscreen_gl.h"
#include "widgets/frontend.h"

namespace nearpit::ui {
namespace {

constexpr int kWidth = 900;
constexpr int kHeight = 200;
constexpr float kCell = 30;
const Glass kGlass{kWidth, kHeight, 96 / 25.4 * 1.5};
const char kNoLetter[] = "\xEE\x80\x80";  // U+E000, private use: no font of text has it

class FontsDrawn : public testing::Test {
 protected:
  FontsDrawn() : gl(kWidth, kHeight) {
    if (gl.ok()) frontend.start_gl().value();
  }
  ~FontsDrawn() override {
    if (gl.ok()) frontend.stop_gl();
  }

  // Draws until nothing more is wanted; how many frames that took.
  int draw(const std::vector<std::string>& letters) {
    int frames = 0;
    InputQueue queue;
    do {
      frontend.frame(&queue, kGlass, sun_theme(), [&](Ui& ui) {
        for (std::size_t i = 0; i < letters.size(); ++i)
          ui.text(cell(i), letters[i]);
      });
      ++frames;
    } while (frontend.unsettled() && frames < 10);
    frontend.render();
    pixels = frontend.read_pixels();
    return frames;
  }

  static PixelBox cell(std::size_t i) {
    const auto column = static_cast<float>(i % (kWidth / static_cast<int>(kCell)));
    const auto row = static_cast<float>(i / (kWidth / static_cast<std::size_t>(kCell)));
    return {column * kCell, row * kCell, (column + 1) * kCell, (row + 1) * kCell};
  }
  // The pixels of a cell.
  std::vector<unsigned char> picture(std::size_t i) const {
    std::vector<unsigned char> out;
    const PixelBox box = cell(i);
    for (auto y = static_cast<std::size_t>(box.top); y < static_cast<std::size_t>(box.bottom); ++y) {
      const auto* row = pixels.data() + 3 * (y * kWidth + static_cast<std::size_t>(box.left));
      out.insert(out.end(), row, row + 3 * static_cast<std::size_t>(kCell));
    }
    return out;
  }

  OffscreenGl gl;
  Frontend frontend;
  std::vector<unsigned char> pixels;
};

TEST_F(FontsDrawn, LettersOfManyScriptsAreDrawnAndNoTwoAlike) {
  ASSERT_TRUE(gl.ok()) << gl.problem();
  ASSERT_EQ(frontend.fonts().complaint(), "");
  // What has no picture comes first, then letters of which no two look the same, then an empty cell.
  const std::vector<std::string> letters = {
      kNoLetter,
      "a",
      "W",
      "\xC3\xA9",
      "\xC5\x82",
      "\xC4\x9F",
      "\xC3\x9F",  // Latin
      "\xCE\xB1",
      "\xCE\xA9",
      "\xCE\xBE",
      "\xCF\x88",  // Greek
      "\xD0\x96",
      "\xD1\x8F",
      "\xD1\x89",
      "\xD0\xAE",  // Cyrillic
      "\xC4\x91",
      "\xC6\xB0",
      "\xE1\xBA\xA5",
      "\xE1\xBB\x87",
      "\xE1\xBB\x93",  // Vietnamese
      "\xE2\x80\x93",
      "\xE2\x80\xA6",
      "\xC2\xB0",
      "\xC3\x97",
      "\xE2\x86\x91",
      "\xE2\x88\x92"  // signs that the cards use
  };
  draw(letters);
  std::set<std::vector<unsigned char>> pictures;
  pictures.insert(picture(letters.size()));
  for (std::size_t i = 0; i < letters.size(); ++i)
    EXPECT_TRUE(pictures.insert(picture(i)).second) << letters[i] << " is drawn like another, or not at all";
}

TEST_F(FontsDrawn, ALetterThatIsLackingIsLookedForOnceAndThenDrawn) {
  ASSERT_TRUE(gl.ok()) << gl.problem();
  // 'For all', a sign of logic beyond what is loaded at first; fonts-dejavu-core has it.
  const std::string rare = "\xE2\x88\x80";
  draw({"a"});
  EXPECT_EQ(draw({rare, kNoLetter}), 2);
  EXPECT_NE(picture(0), picture(1));
  EXPECT_EQ(draw({rare, kNoLetter}), 1) << "asked for again";
}

TEST_F(FontsDrawn, ALetterThatNoFontHasIsAskedForOnceAndKeepsNothingBusy) {
  ASSERT_TRUE(gl.ok()) << gl.problem();
  draw({"a"});
  EXPECT_EQ(draw({kNoLetter}), 1);
  Fonts fonts;
  EXPECT_FALSE(fonts.want(kNoLetter, TextSize::kBase));
  EXPECT_FALSE(fonts.want(kNoLetter, TextSize::kBase));
  EXPECT_TRUE(fonts.want("\xE2\x88\x80", TextSize::kBase));
  EXPECT_FALSE(fonts.want("\xE2\x88\x80", TextSize::kBase));
}

TEST_F(FontsDrawn, StrayBytesOfTextAreSurvived) {
  ASSERT_TRUE(gl.ok()) << gl.problem();
  draw({"\xFF", "\xE2\x88", "a\x80z", "\xF0\x9F\x8F"});
  Fonts fonts;
  fonts.want("\xFF\xE2", TextSize::kBase);
  EXPECT_FALSE(fonts.want("\xFF\xE2", TextSize::kBase));
}

}  // namespace
}  // namespace nearpit::ui
