#include "store/user_folder.h"

#include <gtest/gtest.h>
#include <stdlib.h>
#include <sys/stat.h>

#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ScratchFolder;

TEST(UserFolder, PutsAFileInPlaceAndTakesItAway) {
  const ScratchFolder scratch;
  const std::string folder = scratch.path("config/nearpit");
  ASSERT_TRUE(replace_user_file(folder, "a.json", "first"));
  ASSERT_TRUE(replace_user_file(folder, "a.json", "second"));
  EXPECT_EQ(samples::bytes_of(folder + "/a.json"), "second");
  struct stat found {};
  ASSERT_EQ(::stat((folder + "/a.json").c_str(), &found), 0);
  EXPECT_EQ(found.st_mode & 07777, 0600u);
  ASSERT_TRUE(remove_user_file(folder, "a.json"));
  EXPECT_NE(::stat((folder + "/a.json").c_str(), &found), 0);
  EXPECT_TRUE(remove_user_file(folder, "a.json"));
  EXPECT_TRUE(remove_user_file(scratch.path("never/made"), "a.json"));
}

TEST(UserFolder, SaysWhatItCannotDo) {
  const ScratchFolder scratch;
  samples::put_bytes(scratch.path("file"), "x");
  const Status status = replace_user_file(scratch.path("file/nearpit"), "a.json", "x");
  ASSERT_FALSE(status);
  EXPECT_EQ(status.error().kind, ErrorKind::kIo);
  EXPECT_TRUE(samples::one_line_naming(status.error(), scratch.path("file/nearpit")));
  EXPECT_FALSE(replace_user_file("", "a.json", "x"));
  ASSERT_EQ(::mkdir(scratch.path("a.json").c_str(), 0700), 0);
  EXPECT_FALSE(replace_user_file(scratch.folder(), "a.json", "x"));
  EXPECT_FALSE(remove_user_file(scratch.folder(), "a.json"));
}

TEST(UserFolder, ASurveyIdNeverBecomesAPath) {
  const std::string id = "018f4d2a-0000-7000-8000-0000000000aa";
  EXPECT_EQ(name_for_survey("drafts", id), "drafts-" + id);
  for (const std::string& bad : {std::string("../x"), std::string(), std::string("a/b"), std::string("A\0b", 3)}) {
    const std::string name = name_for_survey("drafts", bad);
    EXPECT_EQ(name.size(), 7u + 64u);
    EXPECT_EQ(name.find_first_not_of("drafts-0123456789bce"), std::string::npos) << name;
  }
}

TEST(UserFolder, StandsWhereTheUserSays) {
  ::setenv("XDG_CONFIG_HOME", "/somewhere", 1);
  EXPECT_EQ(user_folder(), "/somewhere/nearpit");
  ::setenv("XDG_CONFIG_HOME", "relative", 1);
  ::setenv("HOME", "/me", 1);
  EXPECT_EQ(user_folder(), "/me/.config/nearpit");
  ::unsetenv("XDG_CONFIG_HOME");
  EXPECT_EQ(user_folder(), "/me/.config/nearpit");
  EXPECT_EQ(home_folder(), "/me");
}

}  // namespace
}  // namespace nearpit
