#include "store/survey_file.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <sys/resource.h>
#include <sys/stat.h>
#include <sys/wait.h>
#include <unistd.h>

#include <csignal>

#include "store/survey_handle.h"
#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ForeignProgram;
using samples::ScratchFolder;
using testing::ElementsAre;
using testing::HasSubstr;
using testing::IsEmpty;

void expect_equal(const Revision& is, const Revision& should) {
  EXPECT_EQ(is.id, should.id);
  EXPECT_EQ(is.writer, should.writer);
  EXPECT_EQ(is.seq, should.seq);
  EXPECT_EQ(is.clock, should.clock);
  EXPECT_EQ(is.by, should.by);
  EXPECT_EQ(is.at, should.at);
  EXPECT_EQ(is.object, should.object);
  EXPECT_EQ(is.body, should.body);
  EXPECT_EQ(is.why, should.why);
  EXPECT_EQ(is.parents, should.parents);
  EXPECT_EQ(is.hash, should.hash);
}

std::vector<Revision> all_of(SurveyFile& file, std::int64_t after = 0) {
  std::vector<Revision> all;
  std::int64_t last = after;
  const Status read = file.each_revision(after, [&](std::int64_t rowid, Revision&& revision) {
    EXPECT_GT(rowid, last);
    last = rowid;
    all.push_back(std::move(revision));
    return ok_status();
  });
  EXPECT_TRUE(read.ok()) << read.error().one_line();
  return all;
}

TEST(SurveyFile, GivesBackWhatItWasMadeOf) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  const FileStart start = samples::utm_start();
  samples::make_survey(path, start, 0);
  auto file = SurveyFile::open(path, true);
  ASSERT_TRUE(file.ok()) << file.error().one_line();
  EXPECT_EQ(*file->survey_id(), start.survey_id);
  EXPECT_EQ(*file->plan(), start.plan);
  EXPECT_EQ(*file->drawn(3), start.drawn);
  EXPECT_EQ(file->drawn(2).error().kind, ErrorKind::kDamaged);  // a third area holds a unit
  EXPECT_EQ(file->path(), path);
  EXPECT_EQ(*file->last_rowid(), 0);
  EXPECT_FALSE(file->writer(samples::kWriter)->has_value());
  EXPECT_THAT(scratch.names(), ElementsAre("a.gpkg"));
  struct stat found {};
  ASSERT_EQ(::stat(path.c_str(), &found), 0);
  EXPECT_EQ(found.st_mode & 07777, 0600u);
}

TEST(SurveyFile, GivesBackRevisionsInTheOrderTaken) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::local_start(), 0);
  std::vector<Revision> chain = samples::chain_of(samples::kWriter, 5);
  chain[4].body = std::string("\0 bytes \xff as they are", 22);
  chain[4].hash = chain_hash(chain[3].hash, chain[4]);
  {
    auto file = SurveyFile::open(path, false);
    ASSERT_TRUE(file.ok());
    ASSERT_TRUE(samples::append_all(*file, samples::kWriter, chain).ok());
    ASSERT_TRUE(samples::append_all(*file, samples::kOtherWriter, samples::chain_of(samples::kOtherWriter, 2)).ok());
  }
  auto file = SurveyFile::open(path, true);
  ASSERT_TRUE(file.ok());
  const std::vector<Revision> all = all_of(*file);
  ASSERT_EQ(all.size(), 7u);
  for (std::size_t i = 0; i < 5; ++i)
    expect_equal(all[i], chain[i]);
  EXPECT_EQ(all[5].writer, samples::kOtherWriter);
  EXPECT_EQ(*file->last_rowid(), 7);
  EXPECT_EQ(all_of(*file, 5).size(), 2u);
  const auto writer = *file->writer(samples::kWriter);
  ASSERT_TRUE(writer.has_value());
  EXPECT_EQ(writer->device, "tablet one");
  EXPECT_EQ(writer->last_seq, 5);
  EXPECT_EQ(writer->last_hash, chain[4].hash);
}

TEST(SurveyFile, AWriterBeginsWhereTheChainDoes) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  const FileStart start = samples::utm_start();
  samples::make_survey(path, start, 0);
  auto file = SurveyFile::open(path, false);
  EXPECT_EQ(*file->chain_start(), start_hash(start.survey_id, start.plan, start.drawn));
  ASSERT_TRUE(samples::append_all(*file, samples::kWriter, {}).ok());
  const auto writer = *file->writer(samples::kWriter);
  ASSERT_TRUE(writer.has_value());
  EXPECT_EQ(writer->last_seq, 0);
  EXPECT_EQ(writer->last_hash, *file->chain_start());
}

TEST(SurveyFile, ReadsOneStateWhateverIsWrittenMeanwhile) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 2);
  auto reader = SurveyFile::open(path, true);
  const Status read = reader->read_as_one([&]() -> Status {
    EXPECT_EQ(*reader->last_rowid(), 2);
    // A reader holds off the other's commit; what the other wrote does not show.
    ForeignProgram other(path);
    EXPECT_EQ(other.run("BEGIN IMMEDIATE; INSERT INTO nearpit_writer VALUES (9, 'x', 'y', 0, 0);"), "");
    EXPECT_EQ(other.run("COMMIT"), "database is locked");
    EXPECT_FALSE(reader->writer("x")->has_value());
    return ok_status();
  });
  EXPECT_TRUE(read.ok()) << read.error().one_line();
  EXPECT_EQ(reader->read_as_one([] { return Status(Error(ErrorKind::kConflict, "no")); }).error().kind,
            ErrorKind::kConflict);
  EXPECT_EQ(ForeignProgram(path).run("INSERT INTO nearpit_writer VALUES (9, 'x', 'y', 0, 0)"), "");
  EXPECT_TRUE(reader->writer("x")->has_value());
}

TEST(SurveyFile, EachRevisionStopsAtTheFirstErrorOfTheTaker) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::local_start(), 3);
  auto file = SurveyFile::open(path, true);
  int taken = 0;
  const Status read = file->each_revision(0, [&](std::int64_t, Revision&&) -> Status {
    if (++taken == 2) return Error(ErrorKind::kConflict, "enough");
    return ok_status();
  });
  EXPECT_EQ(read.error().kind, ErrorKind::kConflict);
  EXPECT_EQ(taken, 2);
}

TEST(SurveyFile, CreateNeverTouchesWhatIsThere) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::put_bytes(path, "somebody's work");
  const FileStart start = samples::utm_start();
  const Status made = SurveyFile::create(path, start, samples::sample_layers(start));
  ASSERT_FALSE(made.ok());
  EXPECT_EQ(made.error().kind, ErrorKind::kExists);
  EXPECT_TRUE(samples::one_line_naming(made.error(), path)) << made.error().one_line();
  EXPECT_EQ(samples::bytes_of(path), "somebody's work");
  // A link to nowhere is there too.
  const std::string link = scratch.path("link.gpkg");
  ASSERT_EQ(::symlink("nowhere", link.c_str()), 0);
  EXPECT_EQ(SurveyFile::create(link, start, samples::sample_layers(start)).error().kind, ErrorKind::kExists);
  EXPECT_THAT(scratch.names(), ElementsAre("a.gpkg", "link.gpkg"));
}

TEST(SurveyFile, CreateSaysWhenTheFolderIsNotThere) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("no/such/a.gpkg");
  const FileStart start = samples::utm_start();
  const Status made = SurveyFile::create(path, start, samples::sample_layers(start));
  ASSERT_FALSE(made.ok());
  EXPECT_EQ(made.error().kind, ErrorKind::kIo);
  EXPECT_TRUE(samples::one_line_naming(made.error(), path));
  EXPECT_THAT(made.error().one_line(), HasSubstr("make the folder first"));
}

// Runs `work` in a process of its own that may be limited, lose rights or be killed; its exit status.
template <class Work>
int apart(Work work) {
  const pid_t child = ::fork();
  if (child == 0) ::_exit(work());
  int status = 0;
  ::waitpid(child, &status, 0);
  return WIFEXITED(status) ? WEXITSTATUS(status) : 100 + WTERMSIG(status);
}

TEST(SurveyFile, CreateLeavesNothingBehindWhenTheDiskRefuses) {
  const FileStart start = samples::utm_start();
  const LayerRows layers = samples::sample_layers(start);
  for (const rlim_t most : {0u, 4096u, 40000u, 80000u}) {
    const ScratchFolder scratch;
    const std::string path = scratch.path("a.gpkg");
    const int status = apart([&] {
      std::signal(SIGXFSZ, SIG_IGN);
      const rlimit limit{most, most};
      if (::setrlimit(RLIMIT_FSIZE, &limit) != 0) return 3;
      const Status made = SurveyFile::create(path, start, layers);
      if (made.ok()) return 4;
      return made.error().kind == ErrorKind::kIo && samples::one_line_naming(made.error(), path) ? 0 : 5;
    });
    EXPECT_EQ(status, 0) << "at most " << most << " bytes";
    EXPECT_THAT(scratch.names(), IsEmpty()) << "at most " << most << " bytes";
  }
}

TEST(SurveyFile, SaysThatAFileOrFolderCannotBeWritten) {
  if (::geteuid() != 0) GTEST_SKIP() << "needs to change the user";
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 1);
  ASSERT_EQ(::chmod(path.c_str(), 0644), 0);
  ASSERT_EQ(::chmod(scratch.folder().c_str(), 0755), 0);
  const auto refuses = [&](auto work) {
    return apart([&] {
      if (::setuid(65534) != 0) return 3;
      const Status done = work();
      if (done.ok()) return 4;
      return done.error().kind == ErrorKind::kIo && done.error().one_line().find("can't be") != std::string::npos ? 0
                                                                                                                  : 5;
    });
  };
  EXPECT_EQ(refuses([&]() -> Status {
              NEARPIT_ASSIGN(file, SurveyFile::open(path, false));
              return ok_status();
            }),
            0);
  const std::string other = scratch.path("b.gpkg");
  const FileStart start = samples::utm_start();
  EXPECT_EQ(refuses([&] { return SurveyFile::create(other, start, samples::sample_layers(start)); }), 0);
  // The file may be written, its folder not: no journal, no save.
  ASSERT_EQ(::chmod(path.c_str(), 0666), 0);
  EXPECT_EQ(refuses([&]() -> Status {
              NEARPIT_ASSIGN(file, SurveyFile::open(path, false));
              return samples::append_all(file, samples::kOtherWriter, samples::chain_of(samples::kOtherWriter, 1));
            }),
            0);
  // Reading works.
  EXPECT_EQ(apart([&] {
              if (::setuid(65534) != 0) return 3;
              auto file = SurveyFile::open(path, true);
              return file.ok() && *file->last_rowid() == 1 ? 0 : 4;
            }),
            0);
}

TEST(SurveyFile, NothingStaysOfASaveThatIsNotCommitted) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  const FileStart start = samples::utm_start();
  samples::make_survey(path, start, 2);
  auto file = SurveyFile::open(path, false);
  ASSERT_TRUE(file.ok());
  {
    auto save = file->begin();
    ASSERT_TRUE(save.ok());
    ASSERT_TRUE(save->add_writer(samples::kOtherWriter, "x", start.made_at).ok());
    ASSERT_TRUE(save->append(samples::chain_of(samples::kOtherWriter, 1)[0]).ok());
    ASSERT_TRUE(save->update_layers({{}, {"T1-1"}, {}, {}}, start.made_at).ok());
  }
  EXPECT_EQ(*file->last_rowid(), 2);
  EXPECT_FALSE(file->writer(samples::kOtherWriter)->has_value());
  EXPECT_THAT(check_layers(*file, samples::sample_layers(start)), IsEmpty());
  EXPECT_THAT(scratch.names(), ElementsAre("a.gpkg"));
  // The next save goes on as if nothing had been.
  EXPECT_TRUE(samples::append_all(*file, samples::kOtherWriter, samples::chain_of(samples::kOtherWriter, 1)).ok());
  EXPECT_EQ(*file->last_rowid(), 3);
}

TEST(SurveyFile, ASaveWithAFailedStepCannotBeCommitted) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 2);
  auto file = SurveyFile::open(path, false);
  const std::vector<Revision> chain = samples::chain_of(samples::kWriter, 4);
  {
    auto save = file->begin();
    ASSERT_TRUE(save->append(chain[2]).ok());
    EXPECT_FALSE(save->append(chain[0]).ok());  // the id is taken
    EXPECT_FALSE(save->append(chain[3]).ok());
    EXPECT_FALSE(save->commit().ok());
  }
  EXPECT_EQ(*file->last_rowid(), 2);
  {
    auto save = file->begin();
    ASSERT_TRUE(save->append(chain[2]).ok());
    ASSERT_TRUE(save->commit().ok());
    EXPECT_FALSE(save->append(chain[3]).ok());  // it is over
    EXPECT_FALSE(save->commit().ok());
  }
  EXPECT_EQ(*file->last_rowid(), 3);
  auto first = file->begin();
  ASSERT_TRUE(first.ok());
  EXPECT_EQ(file->begin().error().kind, ErrorKind::kInternal);
}

TEST(SurveyFile, AFullDiskIsSaidAndNothingIsSaved) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 2);
  const std::string before = samples::bytes_of(path);
  {
    auto file = SurveyFile::open(path, false);
    ASSERT_TRUE(file.ok());
    // SQLite's own limit answers just as a disk without room does.
    ASSERT_TRUE(file->handle().db.run("PRAGMA max_page_count = 1").ok());
    Revision big = samples::chain_of(samples::kWriter, 3)[2];
    big.body = std::string(1 << 20, 'x');
    auto save = file->begin();
    const Status appended = save->append(big);
    ASSERT_FALSE(appended.ok());
    EXPECT_EQ(appended.error().kind, ErrorKind::kIo);
    EXPECT_TRUE(samples::one_line_naming(appended.error(), path));
    EXPECT_THAT(appended.error().one_line(), HasSubstr("the disk is full; nothing was saved; make room"));
    EXPECT_FALSE(save->commit().ok());
  }
  EXPECT_EQ(samples::bytes_of(path), before);
}

TEST(SurveyFile, WaitsForAnotherProgramAndThenSaysSo) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 1);
  auto first = SurveyFile::open(path, false);
  auto second = SurveyFile::open(path, false);
  ASSERT_TRUE(first.ok() && second.ok());
  auto held = first->begin();
  ASSERT_TRUE(held.ok());
  const auto refused = second->begin();
  ASSERT_FALSE(refused.ok());
  EXPECT_EQ(refused.error().kind, ErrorKind::kIo);
  EXPECT_TRUE(samples::one_line_naming(refused.error(), path));
  EXPECT_THAT(refused.error().one_line(), HasSubstr("another program is using the file"));
  EXPECT_EQ(*second->last_rowid(), 1);  // reading goes on
  ASSERT_TRUE(held->append(samples::chain_of(samples::kWriter, 2)[1]).ok());
  ASSERT_TRUE(held->commit().ok());
  EXPECT_EQ(*second->last_rowid(), 2);
  EXPECT_TRUE(samples::append_all(*second, samples::kOtherWriter, samples::chain_of(samples::kOtherWriter, 1)).ok());
}

TEST(SurveyFile, WhatWasAcknowledgedSurvivesAKill) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 0);
  const std::vector<Revision> chain = samples::chain_of(samples::kWriter, 4000);
  std::size_t there = 0;
  for (int trial = 0; trial < 8; ++trial) {
    int pipe_ends[2] = {};
    ASSERT_EQ(::pipe(pipe_ends), 0);
    const pid_t child = ::fork();
    if (child == 0) {
      auto file = SurveyFile::open(path, false);
      if (!file.ok()) ::_exit(3);
      for (std::size_t i = there; i < chain.size(); ++i) {
        auto save = file->begin();
        if (!save.ok() || (i == 0 && !save->add_writer(samples::kWriter, "x", {}).ok()) ||
            !save->append(chain[i]).ok() ||
            !save->update_layers({{samples::pit_row("T9-" + std::to_string(i), 1, 1)}, {}, {}, {}}, {}).ok() ||
            !save->commit().ok() || ::write(pipe_ends[1], "x", 1) != 1) {
          ::_exit(4);
        }
      }
      ::_exit(0);
    }
    ::close(pipe_ends[1]);
    std::size_t acknowledged = there;
    char one = 0;
    // Killed after a few saves, wherever the next one has got to.
    const std::size_t until = there + 3 + static_cast<std::size_t>(trial);
    while (acknowledged < until && ::read(pipe_ends[0], &one, 1) == 1)
      ++acknowledged;
    ::usleep(static_cast<useconds_t>(700 * trial));
    ::kill(child, SIGKILL);
    while (::read(pipe_ends[0], &one, 1) == 1)
      ++acknowledged;
    ::close(pipe_ends[0]);
    ::waitpid(child, nullptr, 0);
    ASSERT_GE(acknowledged, until);
    // A reader comes first: it must be able to undo what was cut off.
    auto file = SurveyFile::open(path, true);
    ASSERT_TRUE(file.ok()) << file.error().one_line();
    const std::vector<Revision> all = all_of(*file);
    ASSERT_GE(all.size(), acknowledged);
    ASSERT_LE(all.size(), acknowledged + 1);
    for (std::size_t i = 0; i < all.size(); ++i)
      expect_equal(all[i], chain[i]);
    EXPECT_EQ(ForeignProgram(path).ask("SELECT count(*) FROM pits WHERE label LIKE 'T9-%'"),
              std::to_string(all.size()));
    EXPECT_EQ(samples::in_text(check_file(*file)), "");
    there = all.size();
  }
}

}  // namespace
}  // namespace nearpit
