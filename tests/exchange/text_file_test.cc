#include "exchange/text_file.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cstdlib>
#include <filesystem>
#include <fstream>

namespace nearpit {
namespace {

using testing::ElementsAre;

class TextFile : public testing::Test {
 protected:
  TextFile() {
    std::string pattern = (std::filesystem::temp_directory_path() / "nearpit-text-XXXXXX").string();
    if (mkdtemp(pattern.data()) == nullptr) throw std::runtime_error("no folder for the test");
    folder_ = pattern;
  }
  ~TextFile() override { std::filesystem::remove_all(folder_); }

  std::string path(const std::string& name) const { return (folder_ / name).string(); }
  std::string write(const std::string& name, const std::string& bytes) const {
    std::ofstream(path(name), std::ios::binary) << bytes;
    return path(name);
  }

 private:
  std::filesystem::path folder_;
};

TEST_F(TextFile, ReadsEveryByte) {
  std::string all;
  for (int i = 0; i < 256; ++i)
    all += static_cast<char>(i);
  const auto text = read_text_file(write("bytes", all));
  ASSERT_TRUE(text.ok());
  EXPECT_EQ(*text, all);
}

TEST_F(TextFile, ReadsMoreThanOnePieceAndNothing) {
  const std::string large(200'000, 'x');
  EXPECT_EQ(read_text_file(write("large", large)).value(), large);
  EXPECT_EQ(read_text_file(write("empty", "")).value(), "");
}

TEST_F(TextFile, FollowsALink) {
  write("there", "pit\n");
  std::filesystem::create_symlink(path("there"), path("link"));
  EXPECT_EQ(read_text_file(path("link")).value(), "pit\n");
}

TEST_F(TextFile, SaysWhatIsMissing) {
  const auto text = read_text_file(path("none.csv"));
  ASSERT_FALSE(text.ok());
  EXPECT_EQ(text.error().kind, ErrorKind::kNotFound);
  EXPECT_THAT(text.error().lines, ElementsAre(path("none.csv") + ": there is no such file"));
  std::filesystem::create_symlink(path("gone"), path("dangling"));
  EXPECT_EQ(read_text_file(path("dangling")).error().kind, ErrorKind::kNotFound);
}

TEST_F(TextFile, RefusesAFolder) {
  std::filesystem::create_directory(path("folder"));
  const auto text = read_text_file(path("folder"));
  ASSERT_FALSE(text.ok());
  EXPECT_THAT(text.error().lines, ElementsAre(path("folder") + ": is a folder; name a file"));
}

TEST_F(TextFile, DoesNotWaitForAPipe) {
  ASSERT_EQ(mkfifo(path("pipe").c_str(), 0600), 0);
  const auto text = read_text_file(path("pipe"));
  ASSERT_FALSE(text.ok());
  EXPECT_THAT(text.error().lines, ElementsAre(path("pipe") + ": is not a regular file; name a file"));
}

TEST_F(TextFile, RefusesADevice) { EXPECT_EQ(read_text_file("/dev/zero").error().kind, ErrorKind::kBadInput); }

TEST_F(TextFile, HoldsTheLimit) {
  const std::string file = write("table.csv", std::string(101, 'x'));
  EXPECT_EQ(read_text_file(file, 101).value().size(), 101u);
  const auto text = read_text_file(file, 100);
  ASSERT_FALSE(text.ok());
  EXPECT_THAT(text.error().lines,
              ElementsAre(file + ": 101 bytes, more than the 100 bytes that are read; make it smaller"));
}

TEST_F(TextFile, SaysMebibytesOfALargeFile) {
  const std::string file = write("large.csv", "");
  std::filesystem::resize_file(file, 80u << 20);
  EXPECT_THAT(read_text_file(file).error().lines,
              ElementsAre(file + ": 80 MiB, more than the 64 MiB that are read; make it smaller"));
  std::filesystem::resize_file(file, (64u << 20) + 1);
  EXPECT_THAT(read_text_file(file).error().lines,
              ElementsAre(file + ": 67108865 bytes, more than the 67108864 bytes that are read; make it smaller"));
}

TEST_F(TextFile, RefusesANameWithANul) {
  write("short", "x");
  EXPECT_EQ(read_text_file(path("short") + std::string("\0.csv", 5)).error().kind, ErrorKind::kNotFound);
  EXPECT_EQ(read_text_file("").error().kind, ErrorKind::kNotFound);
}

TEST_F(TextFile, SaysThatItMayNotRead) {
  if (geteuid() == 0) GTEST_SKIP() << "root may read everything";
  const std::string file = write("closed", "x");
  std::filesystem::permissions(file, std::filesystem::perms::none);
  EXPECT_EQ(read_text_file(file).error().kind, ErrorKind::kIo);
}

}  // namespace
}  // namespace nearpit
