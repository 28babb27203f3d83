// When the disk refuses, the window says NOT saved, loses nothing that was typed, and saves when it can again.
#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <signal.h>
#include <sys/resource.h>
#include <sys/stat.h>
#include <sys/wait.h>
#include <unistd.h>

#include <cstdio>
#include <filesystem>
#include <fstream>
#include <functional>

#include "screen/screen_driver.h"

namespace nearpit::ui {
namespace {

using testing::HasSubstr;
using testing::Not;

constexpr uid_t kNobody = 65534;

class NotSaved : public testing::Test {
 protected:
  NotSaved() {
    world.measured(TestGlass().px_per_mm());
    std::filesystem::create_directory(world.path("card"));
    file = world.make({}, "card/survey");
  }

  // What changes a process for good is done in another one.
  void in_a_child(const std::function<void()>& work) {
    const pid_t child = fork();
    if (child == 0) {
      work();
      std::fflush(stdout);
      _exit(HasFailure() ? 1 : 0);
    }
    int status = 0;
    waitpid(child, &status, 0);
    EXPECT_TRUE(WIFEXITED(status) && WEXITSTATUS(status) == 0) << "see above";
  }

  // A positive pit is typed, `refuse` makes saving fail, `allow` makes it work again.
  void save_fails_and_then_works(const std::function<void()>& refuse, const std::function<void()>& allow) {
    ScreenDriver screen(world, {}, file);
    screen.tap_all({"dig-list/record", "record/digits/4", "record/digits/2", "record/note"});
    screen.type("near the oak");
    screen.tap("typing/done");
    refuse();
    screen.tap("record/save");
    EXPECT_THAT(screen.said("strip"), HasSubstr("NOT saved"));
    EXPECT_THAT(screen.said("notice"), HasSubstr("T1-1"));
    EXPECT_THAT(screen.said(), Not(HasSubstr("Saved")));
    screen.tap("notice/understood");
    EXPECT_EQ(screen.said("record/find-0/count"), "42 flake");
    EXPECT_THAT(screen.said("record/note"), HasSubstr("near the oak"));
    EXPECT_THAT(screen.said("strip"), HasSubstr("NOT saved")) << "until it is";
    allow();
    EXPECT_EQ(world.read(file).revision(), 0);
    screen.tap("record/save");
    EXPECT_THAT(screen.said("strip"), HasSubstr("Saved T1-1")) << screen.said();
    Session session = world.read(file);
    ASSERT_NE(world.record(session, "T1-1"), nullptr);
    EXPECT_EQ(world.record(session, "T1-1")->counts[0], 42U);
    EXPECT_EQ(world.record(session, "T1-1")->note, "near the oak");
  }

  ScreenWorld world;
  std::string file;
};

TEST_F(NotSaved, WhenTheDiskIsFull) {
  in_a_child([&] {
    signal(SIGXFSZ, SIG_IGN);
    // No file may grow beyond what a draft needs, as on a disk that is full.
    const rlimit little{16 * 1024, RLIM_INFINITY};
    const rlimit all{RLIM_INFINITY, RLIM_INFINITY};
    save_fails_and_then_works([&] { setrlimit(RLIMIT_FSIZE, &little); }, [&] { setrlimit(RLIMIT_FSIZE, &all); });
  });
}

TEST_F(NotSaved, WhenTheFolderMayNotBeWritten) {
  const std::string card = world.path("card");
  in_a_child([&] {
    const bool root = geteuid() == 0;
    save_fails_and_then_works(
        [&] {
          chmod(card.c_str(), 0555);
          if (!root) return;
          // Nothing is forbidden to the superuser: go on as nobody, who owns the person's own folder.
          ASSERT_EQ(chown(world.user_folder().c_str(), kNobody, kNobody), 0);
          ASSERT_EQ(seteuid(kNobody), 0);
        },
        [&] {
          if (root) {
            ASSERT_EQ(seteuid(0), 0);
          }
          chmod(card.c_str(), 0755);
        });
  });
}

TEST_F(NotSaved, WhenAnotherProgramHoldsTheFile) {
  FILE* other = nullptr;
  save_fails_and_then_works(
      [&] {
        other = popen(("sqlite3 '" + file + "' > /dev/null").c_str(), "w");
        ASSERT_NE(other, nullptr);
        std::fprintf(other, "BEGIN EXCLUSIVE;\n.shell touch '%s'\n", world.path("held").c_str());
        std::fflush(other);
        for (int i = 0; i < 500 && !std::filesystem::exists(world.path("held")); ++i)
          usleep(10'000);
        ASSERT_TRUE(std::filesystem::exists(world.path("held")));
      },
      [&] {
        std::fputs("ROLLBACK;\n", other);
        pclose(other);
      });
}

TEST_F(NotSaved, WhenTheFileIsTakenAway) {
  const std::string away = world.path("away.gpkg");
  save_fails_and_then_works(
      [&] {
        std::filesystem::rename(file, away);
        std::filesystem::create_directory(file);
      },
      [&] {
        std::filesystem::remove(file);
        std::filesystem::rename(away, file);
      });
}

TEST_F(NotSaved, WhatIsTypedSurvivesAlsoWhenTheProgramEndsThen) {
  in_a_child([&] {
    signal(SIGXFSZ, SIG_IGN);
    const rlimit little{16 * 1024, RLIM_INFINITY};
    ScreenDriver screen(world, {}, file);
    screen.tap_all({"dig-list/record", "record/digits/4", "record/digits/2"});
    setrlimit(RLIMIT_FSIZE, &little);
    screen.tap("record/save");
    EXPECT_THAT(screen.said("strip"), HasSubstr("NOT saved"));
  });
  ScreenDriver screen(world, {}, file);
  EXPECT_EQ(screen.widget("dig-list/record").label, "Go on with T1-1");
  screen.tap("dig-list/record");
  EXPECT_EQ(screen.said("record/find-0/count"), "42 flake");
}

TEST_F(NotSaved, WhenHalfTypedRecordsCanNotBeKeptThatIsSaid) {
  std::filesystem::remove_all(world.user_folder());
  world.measured(TestGlass().px_per_mm());
  ScreenDriver screen(world, {}, file);
  screen.tap("dig-list/record");
  // Somebody put a file where the person's own folder was.
  std::filesystem::remove_all(world.user_folder());
  { std::ofstream in_the_way(world.user_folder()); }
  screen.tap("record/digits/4");
  EXPECT_THAT(screen.said("notice"), HasSubstr("half typed can't be kept"));
  screen.tap("notice/understood");
  EXPECT_EQ(screen.said("record/find-0/count"), "4 flake");
}

}  // namespace
}  // namespace nearpit::ui
