#include "store/durable_file.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ScratchFolder;
using store::NewFile;
using testing::ElementsAre;
using testing::IsEmpty;

TEST(DurableFile, PartsOfAPath) {
  EXPECT_EQ(store::parts_of("a.gpkg").folder, ".");
  EXPECT_EQ(store::parts_of("a.gpkg").name, "a.gpkg");
  EXPECT_EQ(store::parts_of("/a.gpkg").folder, "/");
  EXPECT_EQ(store::parts_of("x/y/a.gpkg").folder, "x/y");
  EXPECT_EQ(store::parts_of("x/").name, "");
}

TEST(DurableFile, IsGoneUnlessPlaced) {
  const ScratchFolder scratch;
  {
    auto file = NewFile::beside(scratch.path("a"));
    ASSERT_TRUE(file.ok() && file->write("half").ok());
    EXPECT_EQ(scratch.names().size(), 1u);
    EXPECT_EQ(samples::bytes_of(file->written()), "half");
    samples::put_bytes(file->written() + "-journal", "x");
  }
  EXPECT_THAT(scratch.names(), IsEmpty());
}

// Somebody else's file that came between the question and the move.
TEST(DurableFile, PlaceNewNeverReplaces) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a");
  {
    auto file = NewFile::beside(path);
    ASSERT_TRUE(file.ok() && file->write("ours").ok());
    samples::put_bytes(path, "theirs");
    EXPECT_EQ(file->place_new().error().kind, ErrorKind::kExists);
  }
  EXPECT_EQ(samples::bytes_of(path), "theirs");
  EXPECT_THAT(scratch.names(), ElementsAre("a"));
}

TEST(DurableFile, PlacesAndReplaces) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a");
  for (const std::string text : {"first", "second"}) {
    auto file = NewFile::beside(path);
    ASSERT_TRUE(file.ok() && file->write(text).ok());
    const Status placed = text == "first" ? file->place_new() : file->replace();
    ASSERT_TRUE(placed.ok()) << placed.error().one_line();
    EXPECT_EQ(samples::bytes_of(path), text);
    EXPECT_THAT(scratch.names(), ElementsAre("a"));
  }
}

TEST(DurableFile, APathWithoutAFileNameIsRefused) {
  const ScratchFolder scratch;
  EXPECT_EQ(NewFile::beside(scratch.folder() + "/").error().kind, ErrorKind::kBadInput);
  EXPECT_EQ(NewFile::beside(scratch.folder() + "/..").error().kind, ErrorKind::kBadInput);
}

}  // namespace
}  // namespace nearpit
