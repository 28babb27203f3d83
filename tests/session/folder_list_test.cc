#include "session/folder_list.h"

#include <fcntl.h>
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <stdlib.h>
#include <sys/stat.h>
#include <unistd.h>

#include <filesystem>

#include "session/one_survey.h"

namespace nearpit {
namespace {

using ::testing::Contains;
using ::testing::ElementsAre;
using ::testing::HasSubstr;
using ::testing::IsEmpty;
using ::testing::SizeIs;

namespace fs = std::filesystem;

const std::vector<std::string> kSurveys{".gpkg"};

FolderList listed(const std::string& path, const std::vector<std::string>& suffixes = kSurveys) {
  return list_folder(path, suffixes, TimeZone::utc()).value();
}

std::vector<std::string> names(const FolderList& list) {
  std::vector<std::string> out;
  for (const FolderEntry& entry : list.entries)
    out.push_back(entry.name + (entry.folder ? "/" : ""));
  return out;
}

TEST(FolderList, FoldersFirstThenSurveysEachByNameIgnoringCase) {
  const TemporaryFolder folder;
  for (const char* name : {"b.gpkg", "A.GPKG", "c.Gpkg", "Яма.gpkg", "агат.gpkg", "note.txt", "gpkg", ".hidden.gpkg"})
    put_text(folder.path(name), "x");
  for (const char* name : {"zeta", "Alpha", "beta", ".git", "a.gpkg.d"})
    fs::create_directory(folder.path(name));
  const FolderList list = listed(folder.path());
  EXPECT_THAT(names(list), ElementsAre("a.gpkg.d/", "Alpha/", "beta/", "zeta/", "A.GPKG", "b.gpkg", "c.Gpkg",
                                       "агат.gpkg", "Яма.gpkg"));
  EXPECT_EQ(list.left_out, 0u);
  EXPECT_EQ(list.path, folder.path());
  EXPECT_EQ(list.parent, fs::path(folder.path()).parent_path());
  EXPECT_THAT(names(listed(folder.path(), {".json", ".txt"})),
              ElementsAre("a.gpkg.d/", "Alpha/", "beta/", "zeta/", "note.txt"));
}

TEST(FolderList, SaysHowLargeAndHowOld) {
  const TemporaryFolder folder;
  put_text(folder.path("a.gpkg"), "12345");
  const timespec times[2] = {{1'770'000'000, 0}, {1'770'000'000, 250'000'000}};
  ASSERT_EQ(::utimensat(AT_FDCWD, folder.path("a.gpkg").c_str(), times, 0), 0);
  const FolderList list = list_folder(folder.path(), kSurveys, TimeZone::named("Pacific/Auckland").value()).value();
  ASSERT_THAT(list.entries, SizeIs(1));
  EXPECT_EQ(list.entries[0].bytes, 5);
  EXPECT_EQ(format_time(list.entries[0].modified), "2026-02-02T15:40:00.250+13:00");
}

TEST(FolderList, LinksCountAsWhatTheyLeadTo) {
  const TemporaryFolder folder;
  fs::create_directory(folder.path("real"));
  put_text(folder.path("real/a.gpkg"), "123");
  fs::create_symlink("real", folder.path("folder"));
  fs::create_symlink("real/a.gpkg", folder.path("b.gpkg"));
  fs::create_symlink("nowhere", folder.path("broken.gpkg"));
  fs::create_symlink("loop.gpkg", folder.path("loop.gpkg"));
  ASSERT_EQ(::mkfifo(folder.path("pipe.gpkg").c_str(), 0600), 0);
  const FolderList list = listed(folder.path());
  EXPECT_THAT(names(list), ElementsAre("folder/", "real/", "b.gpkg"));
  EXPECT_EQ(list.left_out, 0u);
  EXPECT_EQ(list.entries[2].bytes, 3);
  const FolderList inside = listed(folder.path("folder/../folder/."));
  EXPECT_EQ(inside.path, folder.path("real"));
  EXPECT_EQ(inside.parent, folder.path());
}

TEST(FolderList, NamesThatCannotBeShownAreCounted) {
  const TemporaryFolder folder;
  put_text(folder.path("good.gpkg"), "");
  put_text(folder.path("bad\xff.gpkg"), "");
  put_text(folder.path("two\nlines.gpkg"), "");
  put_text(folder.path("bad\xff.txt"), "");
  fs::create_directory(folder.path("bell\a"));
  const FolderList list = listed(folder.path());
  EXPECT_THAT(names(list), ElementsAre("good.gpkg"));
  EXPECT_EQ(list.left_out, 3u);
}

TEST(FolderList, TwoThousandAtMost) {
  const TemporaryFolder folder;
  for (int i = 10'000; i < 12'010; ++i)
    put_text(folder.path(std::to_string(i) + ".gpkg"), "");
  fs::create_directory(folder.path("zz"));
  const FolderList list = listed(folder.path());
  EXPECT_THAT(list.entries, SizeIs(kMostEntries));
  EXPECT_EQ(list.left_out, 11u);
  EXPECT_EQ(list.entries.front().name, "zz");
  EXPECT_EQ(list.entries.back().name, "11998.gpkg");
}

TEST(FolderList, TheTopHasNoParent) {
  const FolderList list = listed("/");
  EXPECT_EQ(list.path, "/");
  EXPECT_EQ(list.parent, "");
  EXPECT_EQ(listed("/proc").parent, "/");
  EXPECT_EQ(listed(".").path, fs::current_path());
}

TEST(FolderList, SaysWhyAFolderCannotBeListed) {
  const TemporaryFolder folder;
  put_text(folder.path("file"), "");
  const auto error = [](const std::string& path) { return list_folder(path, kSurveys, TimeZone::utc()).error(); };
  EXPECT_EQ(error(folder.path("none")).kind, ErrorKind::kNotFound);
  EXPECT_EQ(error(folder.path("none")).one_line(), folder.path("none") + ": there is no such folder; choose another");
  EXPECT_EQ(error(folder.path("file")).kind, ErrorKind::kBadInput);
  EXPECT_EQ(error(folder.path("file")).one_line(), folder.path("file") + ": is not a folder; choose one");
  EXPECT_EQ(error(folder.path("file/x")).kind, ErrorKind::kBadInput);
  EXPECT_THAT(error("").one_line(), HasSubstr("no folder is named"));
  EXPECT_EQ(error(std::string("/\0x", 3)).lines.size(), 1u);
  EXPECT_EQ(error("/two\nlines").one_line().find('\n'), std::string::npos);
}

TEST(FolderList, AFolderThatMayNotBeReadSaysSo) {
  if (::geteuid() == 0) GTEST_SKIP() << "root may read everything";
  const TemporaryFolder folder;
  fs::create_directory(folder.path("closed"));
  ASSERT_EQ(::chmod(folder.path("closed").c_str(), 0), 0);
  const auto refused = list_folder(folder.path("closed"), kSurveys, TimeZone::utc());
  ASSERT_FALSE(refused);
  EXPECT_EQ(refused.error().kind, ErrorKind::kIo);
  EXPECT_THAT(refused.error().one_line(), HasSubstr("may not be read by this user"));
  // Names may be read, what they lead to may not.
  put_text(folder.path("a.gpkg"), "");
  fs::create_directory(folder.path("half"));
  put_text(folder.path("half/a.gpkg"), "");
  ASSERT_EQ(::chmod(folder.path("half").c_str(), 0400), 0);
  const FolderList half = listed(folder.path("half"));
  EXPECT_THAT(half.entries, IsEmpty());
  EXPECT_EQ(half.left_out, 1u);
  ::chmod(folder.path("half").c_str(), 0700);
  ::chmod(folder.path("closed").c_str(), 0700);
}

TEST(FolderList, CardsAndSticksAreWhatIsMountedInTheUsualFolders) {
  const auto places = mounted_places(
      "22 28 0:20 / / rw,relatime shared:1 - ext4 /dev/sda1 rw\n"
      "23 28 0:21 / /proc rw - proc proc rw\n"
      "30 22 8:17 / /media/digger/SURVEY\\040CARD rw,nosuid shared:9 - vfat /dev/sdb1 rw\n"
      "31 22 8:18 / /run/media/digger/\\320\\220 rw - vfat /dev/sdc1 rw\n"
      "32 22 8:19 / /media/usb0 rw - vfat /dev/sdd1 rw\n"
      "33 22 8:20 / /mnt/stick rw - vfat /dev/sde1 rw\n"
      "33 22 8:20 / /mnt/stick rw - vfat /dev/sde1 rw\n"
      "34 22 8:21 / /media/other/PRIVATE rw - vfat /dev/sdf1 rw\n"
      "35 22 8:22 / /media/digger rw - tmpfs none rw\n"
      "36 22 8:23 / /mnt/stick/inner rw - vfat /dev/sdg1 rw\n"
      "37 22 8:24 / /media/bell\\007 rw - vfat /dev/sdh1 rw\n"
      "38 22 8:25 / /mnt rw - vfat /dev/sdi1 rw\n"
      "half a line",
      "digger");
  EXPECT_THAT(places, ElementsAre(Place{"Card or stick: stick", "/mnt/stick"},
                                  Place{"Card or stick: SURVEY CARD", "/media/digger/SURVEY CARD"},
                                  Place{"Card or stick: usb0", "/media/usb0"},
                                  Place{"Card or stick: А", "/run/media/digger/А"}));
  EXPECT_THAT(mounted_places("", "digger"), IsEmpty());
}

TEST(FolderList, UsualPlacesAreThere) {
  const TemporaryFolder folder;
  ::setenv("HOME", folder.path().c_str(), 1);
  const std::vector<Place> places = usual_places();
  ASSERT_GE(places.size(), 2u);
  EXPECT_EQ(places[0], (Place{"Home", folder.path()}));
  EXPECT_EQ(places[1], (Place{"This folder", fs::current_path()}));
  for (const Place& place : places)
    EXPECT_TRUE(list_folder(place.path, kSurveys, TimeZone::utc())) << place.path;
  ::setenv("HOME", fs::current_path().c_str(), 1);
  EXPECT_EQ(usual_places()[0], (Place{"Home", fs::current_path()}));
  EXPECT_THAT(usual_places(), testing::Not(Contains(Place{"This folder", fs::current_path()})));
  ::setenv("HOME", folder.path("none").c_str(), 1);
  EXPECT_EQ(usual_places()[0].name, "This folder");
}

TEST(FolderList, ANewFileHasItsEnding) {
  const TemporaryFolder folder;
  const auto made = [&](const std::string& typed) { return new_file_path(folder.path(), typed).value(); };
  EXPECT_EQ(made("heron carr"), folder.path("heron carr.gpkg"));
  EXPECT_EQ(made("  heron.gpkg "), folder.path("heron.gpkg"));
  EXPECT_EQ(made("HERON.GPKG"), folder.path("HERON.gpkg"));
  EXPECT_EQ(made("v1.2"), folder.path("v1.2.gpkg"));
  EXPECT_EQ(made("鷺沼 Ключ 🪶"), folder.path("鷺沼 Ключ 🪶.gpkg"));
  EXPECT_EQ(new_file_path(folder.path() + "/.", "a").value(), folder.path("a.gpkg"));
  EXPECT_EQ(new_file_path("/", "no-such-survey").value(), "/no-such-survey.gpkg");
}

TEST(FolderList, ANameThatCannotBeAFilesIsRefused) {
  const TemporaryFolder folder;
  put_text(folder.path("taken.gpkg"), "x");
  fs::create_symlink("nowhere", folder.path("link.gpkg"));
  const auto refused = [&](const std::string& typed) {
    const auto path = new_file_path(folder.path(), typed);
    return path ? "made " + *path : path.error().one_line();
  };
  EXPECT_THAT(refused(""), HasSubstr("has no name"));
  EXPECT_THAT(refused("   "), HasSubstr("has no name"));
  EXPECT_THAT(refused(".gpkg"), HasSubstr("begins with '.'"));
  EXPECT_THAT(refused(" .."), HasSubstr("begins with '.'"));
  EXPECT_THAT(refused("a/b"), HasSubstr("holds '/'"));
  EXPECT_THAT(refused("a\tb"), HasSubstr("can't name a file"));
  EXPECT_THAT(refused("a\xff"), HasSubstr("can't name a file"));
  EXPECT_THAT(refused(std::string("a\0b", 3)), HasSubstr("can't name a file"));
  EXPECT_THAT(refused(std::string(101, 'a')), HasSubstr("too long"));
  EXPECT_THAT(refused(std::string(100, 'a')), HasSubstr("made "));
  std::string wide;
  for (int i = 0; i < 90; ++i)
    wide += "鷺";
  EXPECT_THAT(refused(wide), HasSubstr("too long for a file's name"));
  EXPECT_EQ(refused("taken"), folder.path("taken.gpkg") + ": exists already; choose another name");
  EXPECT_EQ(refused("link.gpkg"), folder.path("link.gpkg") + ": exists already; choose another name");
  EXPECT_EQ(new_file_path(folder.path("none"), "a").error().kind, ErrorKind::kNotFound);
  EXPECT_EQ(new_file_path(folder.path("taken.gpkg"), "a").error().kind, ErrorKind::kBadInput);
}

}  // namespace
}  // namespace nearpit
