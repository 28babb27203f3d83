#include "base/nearest_word.h"

#include <gtest/gtest.h>

#include <array>

namespace nearpit {
namespace {

constexpr std::array<std::string_view, 4> kWords = {"depth_cm", "dug_at", "status", "stop"};

TEST(NearestWord, FindsASlip) {
  EXPECT_EQ(nearest_word("statsu", kWords), "status");
  EXPECT_EQ(nearest_word("dugat", kWords), "dug_at");
}

TEST(NearestWord, IgnoresCase) { EXPECT_EQ(nearest_word("Status", kWords), "status"); }

TEST(NearestWord, TakesAWordThatWasBegun) {
  EXPECT_EQ(nearest_word("depth", kWords), "depth_cm");
  EXPECT_EQ(nearest_word("stopped because", kWords), "stop");
}

TEST(NearestWord, SaysNothingWhenNoneIsNear) {
  EXPECT_EQ(nearest_word("photograph", kWords), "");
  EXPECT_EQ(nearest_word("", kWords), "");
  EXPECT_EQ(nearest_word("status", {}), "");
  EXPECT_EQ(nearest_word(std::string(100, 's'), kWords), "");
}

}  // namespace
}  // namespace nearpit
