#include "session/preferences.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>
#include <filesystem>

#include "session/one_survey.h"

namespace nearpit {
namespace {

using ::testing::ElementsAre;
using ::testing::Pair;
using ::testing::SizeIs;

const std::string kSurvey = "018f4d2a-0000-7000-8000-0000000000aa";

Preferences read_from(const std::string& text) {
  const TemporaryFolder folder;
  put_text(folder.path("window.json"), text);
  return PreferenceFile(folder.path()).read();
}

TEST(Preferences, ComeBackAsTheyWereWritten) {
  const TemporaryFolder folder;
  const PreferenceFile file(folder.path("config/nearpit"));
  Preferences written;
  written.dusk = true;
  written.px_per_mm = 5.905511811023622;
  for (const char* name : {"/a/鷺沼.gpkg", "/a/Ключ у берёзы.gpkg", "/a/\"old\" \\ carr 🪶.gpkg", "/a/Άνω.gpkg"})
    opened(&written, name);
  written.crew_of[kSurvey] = "작업조 👷🏽‍♀️";
  ASSERT_TRUE(file.write(written));
  EXPECT_EQ(file.read(), written);
  EXPECT_EQ(mode_of(folder.path("config/nearpit/window.json")), 0600u);
  EXPECT_EQ(mode_of(folder.path("config/nearpit")), 0700u);
  ASSERT_TRUE(file.write(Preferences()));
  EXPECT_EQ(file.read(), Preferences());
}

TEST(Preferences, TheNewestFileIsFirstAndTheOldestGoes) {
  Preferences preferences;
  for (int i = 0; i < 15; ++i)
    opened(&preferences, "/f/" + std::to_string(i));
  EXPECT_THAT(preferences.recent, SizeIs(kMostRecent));
  EXPECT_EQ(preferences.recent.front(), "/f/14");
  EXPECT_EQ(preferences.recent.back(), "/f/3");
  opened(&preferences, "/f/3");
  EXPECT_THAT(preferences.recent, SizeIs(kMostRecent));
  EXPECT_EQ(preferences.recent.front(), "/f/3");
  EXPECT_EQ(preferences.recent.back(), "/f/4");
  const Preferences before = preferences;
  for (const std::string& bad : {std::string("relative"), std::string(), std::string("/a\nb"), std::string("/\xff")})
    opened(&preferences, bad);
  EXPECT_EQ(preferences, before);
}

TEST(Preferences, WhatIsWrongIsLeftAtItsDefaultAndTheRestIsRead) {
  const Preferences read = read_from(R"({"dusk": "yes", "px_per_mm": 41, "later": [1],
    "recent": ["/a", 7, "b", "/a", null, "/c\u0000d", "/e"], "crew_of": {"s": "A", "t": 3, "": "B", "u": " ", "v": "Ж"}})");
  EXPECT_FALSE(read.dusk);
  EXPECT_FALSE(read.px_per_mm);
  EXPECT_THAT(read.recent, ElementsAre("/a", "/e"));
  EXPECT_THAT(read.crew_of, ElementsAre(Pair("s", "A"), Pair("v", "Ж")));
  EXPECT_EQ(read_from(R"({"px_per_mm": 1, "recent": "x", "crew_of": []})").px_per_mm, 1);
  EXPECT_EQ(read_from(R"({"px_per_mm": 40})").px_per_mm, 40);
  EXPECT_FALSE(read_from(R"({"px_per_mm": 0.99})").px_per_mm);
  EXPECT_FALSE(read_from(R"({"px_per_mm": "5"})").px_per_mm);
  EXPECT_TRUE(read_from("\xEF\xBB\xBF{\"dusk\": true}").dusk);
}

TEST(Preferences, AFileThatCannotBeReadIsNoError) {
  const std::string large = "{\"dusk\": true, \"recent\": [" + std::string(10 << 20, ' ') + "]}";
  for (const std::string& text :
       {std::string(), std::string("{\"dusk\": true"), std::string("[true]"), std::string("7"),
        std::string("{\"dusk\": true, \"dusk\": true}"), std::string("{\"dusk\": true}\xff"),
        "{\"dusk\": true, \"recent\": " + std::string(100'000, '[') + std::string(100'000, ']') + "}", large}) {
    EXPECT_EQ(read_from(text), Preferences()) << text.substr(0, 60);
  }
  const TemporaryFolder folder;
  EXPECT_EQ(PreferenceFile(folder.path("none")).read(), Preferences());
  EXPECT_EQ(PreferenceFile("").read(), Preferences());
  std::filesystem::create_directory(folder.path("window.json"));
  EXPECT_EQ(PreferenceFile(folder.path()).read(), Preferences());
}

TEST(Preferences, WhatCannotBeReadBackIsNotWritten) {
  const TemporaryFolder folder;
  const PreferenceFile file(folder.path());
  Preferences odd;
  odd.dusk = true;
  odd.px_per_mm = std::nan("");
  odd.recent = {"/a", "b", "/\xff", "/a", "/c"};
  odd.crew_of = {{"s", "A"}, {"t", "\xff"}, {"u", ""}};
  ASSERT_TRUE(file.write(odd));
  const Preferences read = file.read();
  EXPECT_TRUE(read.dusk);
  EXPECT_FALSE(read.px_per_mm);
  EXPECT_THAT(read.recent, ElementsAre("/a", "/c"));
  EXPECT_THAT(read.crew_of, ElementsAre(Pair("s", "A")));
}

TEST(Preferences, StayShortHoweverManySurveysThereWere) {
  const TemporaryFolder folder;
  const PreferenceFile file(folder.path());
  Preferences many;
  for (int i = 1000; i < 3000; ++i)
    many.crew_of["survey " + std::to_string(i)] = std::string(190, 'x');
  ASSERT_TRUE(file.write(many));
  const Preferences read = file.read();
  EXPECT_THAT(read.crew_of, SizeIs(500));
  EXPECT_EQ(read.crew_of.rbegin()->first, "survey 2999");
  EXPECT_EQ(read.crew_of.begin()->first, "survey 2500");
}

TEST(Preferences, TheDiskMayRefuse) {
  const TemporaryFolder folder;
  put_text(folder.path("file"), "x");
  const Status status = PreferenceFile(folder.path("file")).write(Preferences());
  ASSERT_FALSE(status);
  EXPECT_EQ(status.error().kind, ErrorKind::kIo);
  EXPECT_THAT(status.error().lines, SizeIs(1));
  EXPECT_FALSE(PreferenceFile("").write(Preferences()));
}

}  // namespace
}  // namespace nearpit
