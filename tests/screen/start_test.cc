// The first start, opening and making surveys.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <filesystem>

#include "screen/screen_driver.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;

class Start : public testing::Test {
 protected:
  void measure() { world.measured(TestGlass().px_per_mm()); }
  // To the folder with the plans: the home folder is the first place.
  static void browse_home(ScreenDriver& screen) { screen.tap("start/place-0"); }
  ScreenWorld world;
};

TEST_F(Start, TheFirstStartAsksForSizesAndTheNextDoesNot) {
  {
    ScreenDriver screen(world);
    EXPECT_TRUE(screen.shows("sizes/fits"));
    EXPECT_FALSE(screen.shows("start/keys"));
    screen.tap("sizes/fits");
    EXPECT_TRUE(screen.shows("start/keys"));
  }
  ScreenDriver again(world);
  EXPECT_FALSE(again.shows("sizes/fits"));
  EXPECT_TRUE(again.shows("start/keys"));
}

TEST_F(Start, SizesAreWhatTheCardWasFittedTo) {
  {
    ScreenDriver screen(world);
    const double before = screen.glass().px_per_mm;
    screen.tap_all({"sizes/much-larger", "sizes/much-larger", "sizes/larger", "sizes/smaller", "sizes/much-smaller",
                    "sizes/fits"});
    EXPECT_NEAR(screen.glass().px_per_mm, before * 1.03, before * 0.002);
  }
  ScreenDriver again(world);
  EXPECT_NEAR(again.glass().px_per_mm, TestGlass().px_per_mm() * 1.03, 0.02);
  EXPECT_NEAR(again.widget("start/keys").box.height(), 12 * again.glass().px_per_mm, 1);
}

TEST_F(Start, SizesCanWait) {
  {
    ScreenDriver screen(world);
    screen.tap_all({"sizes/much-larger", "sizes/later"});
    EXPECT_TRUE(screen.shows("start/keys"));
    EXPECT_NEAR(screen.glass().px_per_mm, TestGlass().px_per_mm(), 1e-9);
  }
  ScreenDriver again(world);
  EXPECT_TRUE(again.shows("sizes/fits")) << "they are asked for again";
}

TEST_F(Start, AFileGivenOnTheFirstStartIsShownAfterTheSizes) {
  const std::string file = world.make();
  ScreenDriver screen(world, {}, file);
  EXPECT_TRUE(screen.shows("sizes/fits"));
  screen.tap("sizes/fits");
  EXPECT_TRUE(screen.shows("dig-list/record"));
}

TEST_F(Start, ASurveyIsMadeFromAPlan) {
  measure();
  world.put("terrace.json", plan_text({}));
  {
    ScreenDriver screen(world);
    browse_home(screen);
    screen.tap("start/file-terrace.json");
    EXPECT_THAT(screen.widget("start/name").label, HasSubstr("terrace.gpkg"));
    screen.tap("start/name");
    screen.type("-2");
    screen.tap_all({"typing/done", "start/make"});
    EXPECT_THAT(screen.said("notice"), HasSubstr("only 3 of 25 pits drawn"));
    screen.tap("notice/understood");
    EXPECT_TRUE(screen.shows("dig-list/record")) << screen.said();
  }
  Session session = world.read(world.path("terrace-2.gpkg"));
  EXPECT_EQ(session.model().plan().survey, "five by five (invented)");
  EXPECT_EQ(session.model().survey().dig_list().due().size(), 3U);
}

TEST_F(Start, EveryFaultOfABadPlanIsShownAndTheNameTypedStays) {
  measure();
  std::string plan = plan_text({});
  plan.replace(plan.find("\"square\""), 8, "\"cube\"");
  plan.replace(plan.find("\"size_m\": 0.5"), 13, "\"size_m\": -3");
  plan.replace(plan.find("\"survey\""), 8, "\"sruvey\"");
  world.put("bad.json", plan);
  ScreenDriver screen(world);
  browse_home(screen);
  screen.tap_all({"start/file-bad.json", "start/name"});
  screen.type(" of mine");
  screen.tap_all({"typing/done", "start/make"});
  for (const std::string word : {"cube", "-3", "sruvey", "No survey was made"})
    EXPECT_THAT(screen.said("notice"), HasSubstr(word));
  EXPECT_FALSE(std::filesystem::exists(world.path("bad of mine.gpkg")));
  screen.tap("notice/understood");
  EXPECT_THAT(screen.widget("start/name").label, HasSubstr("bad of mine.gpkg"));
  // Mended outside, it is made with what was typed.
  world.put("bad.json", plan_text({}));
  screen.tap("start/make");
  EXPECT_TRUE(std::filesystem::exists(world.path("bad of mine.gpkg"))) << screen.said();
}

TEST_F(Start, ANameThatIsTakenIsSaidAndNothingIsOverwritten) {
  measure();
  const std::string file = world.make();
  world.write_elsewhere(file, "T1-1", 3);
  ScreenDriver screen(world);
  browse_home(screen);
  screen.tap_all({"start/file-survey.json", "start/make"});
  EXPECT_THAT(screen.said("notice"), HasSubstr("survey.gpkg"));
  EXPECT_EQ(world.read(file).revision(), 1);
  screen.tap("notice/understood");
  EXPECT_TRUE(screen.shows("start/make"));
  screen.tap("start/name");
  screen.type("2");
  screen.tap_all({"typing/done", "start/make"});
  EXPECT_EQ(world.read(world.path("survey2.gpkg")).revision(), 0);
}

TEST_F(Start, SurveysOpenedLatelyAreOneTouchAway) {
  measure();
  const std::string first = world.make({}, "first");
  const std::string second = world.make({.survey = "the second (invented)"}, "second");
  for (const std::string& file : {first, second})
    ScreenDriver opened(world, {}, file);
  ScreenDriver screen(world);
  EXPECT_EQ(screen.widget("start/recent-0").label, "second.gpkg");
  EXPECT_EQ(screen.widget("start/recent-1").label, "first.gpkg");
  screen.tap("start/recent-1");
  EXPECT_EQ(screen.view().survey->file, first);
  screen.tap_all({"strip/office", "office/close"});
  EXPECT_EQ(screen.widget("start/recent-0").label, "first.gpkg");
}

TEST_F(Start, ASurveyThatIsGoneIsSaidInPlace) {
  measure();
  const std::string file = world.make();
  { ScreenDriver opened(world, {}, file); }
  std::filesystem::remove(file);
  ScreenDriver screen(world);
  screen.tap("start/recent-0");
  EXPECT_THAT(screen.said("notice"), HasSubstr("survey.gpkg"));
  screen.tap("notice/understood");
  EXPECT_TRUE(screen.shows("start/keys"));
}

TEST_F(Start, AFileThatIsNoSurveyIsSaidInPlace) {
  measure();
  world.put("letter.gpkg", "Dear all, this is no database.");
  ScreenDriver screen(world);
  browse_home(screen);
  screen.tap("start/file-letter.gpkg");
  EXPECT_THAT(screen.said("notice"), HasSubstr("letter.gpkg"));
  screen.tap("notice/understood");
  EXPECT_TRUE(screen.shows("start/file-letter.gpkg"));
}

TEST_F(Start, FoldersAreWalkedIntoAndOutOf) {
  measure();
  std::filesystem::create_directory(world.path("north"));
  world.put("north/plan.json", plan_text({}));
  ScreenDriver screen(world);
  browse_home(screen);
  EXPECT_FALSE(screen.shows("start/file-plan.json"));
  screen.tap("start/file-north");
  EXPECT_TRUE(screen.shows("start/file-plan.json"));
  screen.tap("start/up");
  EXPECT_TRUE(screen.shows("start/file-north"));
  screen.tap("start/places");
  EXPECT_TRUE(screen.shows("start/place-0"));
  browse_home(screen);
  screen.tap_all({"start/file-north", "start/file-plan.json", "start/back"});
  EXPECT_TRUE(screen.shows("start/file-plan.json"));
}

TEST_F(Start, AThemeIsKeptForTheNextStart) {
  measure();
  {
    ScreenDriver screen(world);
    EXPECT_FALSE(screen.view().dusk);
    screen.tap("start/theme");
  }
  ScreenDriver again(world);
  EXPECT_TRUE(again.view().dusk);
  EXPECT_THAT(again.widget("start/theme").label, HasSubstr("Sun"));
}

}  // namespace
}  // namespace nearpit::ui
