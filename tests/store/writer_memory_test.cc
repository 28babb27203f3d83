#include "store/writer_memory.h"

#include <gtest/gtest.h>
#include <stdlib.h>
#include <sys/stat.h>
#include <unistd.h>

#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ScratchFolder;

const std::string kSurvey = "018f4d2a-0000-7000-8000-0000000000aa";
const std::string kHash(64, 'a');

RememberedWriter writer(const std::string& last, const std::string& pending) {
  return {samples::kWriter, last, pending};
}

mode_t mode_of(const std::string& path) {
  struct stat found {};
  return ::stat(path.c_str(), &found) == 0 ? found.st_mode & 07777 : 0;
}

TEST(WriterMemory, RecallsWhatItRemembered) {
  const ScratchFolder scratch;
  const WriterMemory memory(scratch.path("config/nearpit"));
  EXPECT_FALSE(memory.recall(kSurvey).has_value());
  ASSERT_TRUE(memory.remember(kSurvey, writer("", kHash)).ok());
  ASSERT_TRUE(memory.remember(kSurvey, writer(kHash, "")).ok());
  const auto recalled = memory.recall(kSurvey);
  ASSERT_TRUE(recalled.has_value());
  EXPECT_EQ(recalled->id, samples::kWriter);
  EXPECT_EQ(recalled->last_hash, kHash);
  EXPECT_EQ(recalled->pending_hash, "");
  EXPECT_FALSE(memory.recall("018f4d2a-0000-7000-8000-0000000000ab").has_value());
  EXPECT_EQ(mode_of(scratch.path("config/nearpit")), 0700u);
  EXPECT_EQ(mode_of(scratch.path("config/nearpit/writer-" + kSurvey)), 0600u);
}

TEST(WriterMemory, ASurveyIdNeverBecomesAPath) {
  const ScratchFolder scratch;
  const WriterMemory memory(scratch.path("inner"));
  const std::string id = "../../../escaped";
  ASSERT_TRUE(memory.remember(id, writer(kHash, "")).ok());
  EXPECT_TRUE(memory.recall(id).has_value());
  EXPECT_EQ(scratch.names(), std::vector<std::string>{"inner"});
}

TEST(WriterMemory, WhatCannotBeReadIsNothing) {
  const ScratchFolder scratch;
  const WriterMemory memory(scratch.folder());
  const std::string path = scratch.path("writer-" + kSurvey);
  const std::string id = samples::kWriter;
  for (const std::string& text :
       {std::string(), std::string("nearpit writer 2\n") + id + "\n\n\n", std::string("nearpit writer 1\nme\n\n\n"),
        "nearpit writer 1\n" + id + "\n", "nearpit writer 1\n" + id + "\nshort\n\n"}) {
    samples::put_bytes(path, text);
    EXPECT_FALSE(memory.recall(kSurvey).has_value()) << text;
  }
  samples::put_bytes(path, "nearpit writer 1\n" + id + "\n\n\n");
  EXPECT_TRUE(memory.recall(kSurvey).has_value());
}

TEST(WriterMemory, SaysWhenItCannotBeWritten) {
  const ScratchFolder scratch;
  samples::put_bytes(scratch.path("file"), "x");
  const Status status = WriterMemory(scratch.path("file/nearpit")).remember(kSurvey, writer(kHash, ""));
  ASSERT_FALSE(status.ok());
  EXPECT_EQ(status.error().kind, ErrorKind::kIo);
}

TEST(WriterMemory, StandsInTheUsersConfiguration) {
  const ScratchFolder scratch;
  ::setenv("XDG_CONFIG_HOME", scratch.path("xdg").c_str(), 1);
  ASSERT_TRUE(WriterMemory::of_user().remember(kSurvey, writer(kHash, "")).ok());
  EXPECT_TRUE(WriterMemory(scratch.path("xdg/nearpit")).recall(kSurvey).has_value());
  // A relative folder is ignored (XDG Base Directory Specification 0.8).
  ::setenv("XDG_CONFIG_HOME", "relative", 1);
  ::setenv("HOME", scratch.path("me").c_str(), 1);
  ASSERT_TRUE(WriterMemory::of_user().remember(kSurvey, writer("", kHash)).ok());
  EXPECT_TRUE(WriterMemory(scratch.path("me/.config/nearpit")).recall(kSurvey).has_value());
}

TEST(WriterMemory, TheDeviceHasAName) { EXPECT_FALSE(device_name().empty()); }

}  // namespace
}  // namespace nearpit
