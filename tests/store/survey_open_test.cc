#include "store/survey_open.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>
#include <sys/stat.h>
#include <sys/wait.h>
#include <unistd.h>

#include "store/sqlite_handle.h"
#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ForeignProgram;
using samples::ScratchFolder;
using testing::ElementsAre;
using testing::HasSubstr;

Error refusal(const std::string& path, bool read_only) {
  const auto file = SurveyFile::open(path, read_only);
  if (file.ok()) return {ErrorKind::kInternal, "it opened"};
  EXPECT_TRUE(samples::one_line_naming(file.error(), path)) << file.error().one_line();
  return file.error();
}

std::string ask(SurveyFile& file, const std::string& sql) {
  store::Statement statement(file.handle().db, sql);
  const auto row = statement.next();
  return row.ok() && *row ? statement.text(0) : "nothing";
}

class SurveyOpen : public testing::Test {
 protected:
  void make(int count = 2) { samples::make_survey(path_, samples::utm_start(), count); }
  const ScratchFolder scratch_;
  const std::string path_ = scratch_.path("a.gpkg");
};

TEST_F(SurveyOpen, SetsWhatMakesASaveSafe) {
  make();
  auto file = SurveyFile::open(path_, false);
  ASSERT_TRUE(file.ok());
  EXPECT_EQ(ask(*file, "PRAGMA journal_mode"), "delete");
  EXPECT_EQ(ask(*file, "PRAGMA synchronous"), "3");  // EXTRA
  EXPECT_EQ(ask(*file, "PRAGMA foreign_keys"), "1");
  EXPECT_EQ(ask(*file, "PRAGMA trusted_schema"), "0");
  EXPECT_EQ(ask(*file, "PRAGMA cell_size_check"), "1");
  EXPECT_EQ(ask(*file, "PRAGMA busy_timeout"), "5000");
  const std::string mapped = ask(*file, "PRAGMA mmap_size");
  EXPECT_TRUE(mapped == "0" || mapped == "nothing") << mapped;
  const std::pair<int, int> settings[] = {
      {SQLITE_DBCONFIG_ENABLE_LOAD_EXTENSION, 0},
      {SQLITE_DBCONFIG_DEFENSIVE, 1},
      {SQLITE_DBCONFIG_DQS_DML, 0},
      {SQLITE_DBCONFIG_DQS_DDL, 0},
      {SQLITE_DBCONFIG_ENABLE_VIEW, 0},
      {SQLITE_DBCONFIG_ENABLE_TRIGGER, 0},
  };
  for (const auto& [setting, should] : settings) {
    int is = -1;
    EXPECT_EQ(sqlite3_db_config(file->handle().db.raw(), setting, -1, &is), SQLITE_OK);
    EXPECT_EQ(is, should) << setting;
  }
  EXPECT_EQ(ask(*file, "SELECT \"no such column\""), "nothing");
  EXPECT_FALSE(file->handle().db.run("PRAGMA writable_schema = ON; UPDATE sqlite_schema SET sql = ''").ok());
}

TEST_F(SurveyOpen, RefusesWhatIsNoOrdinaryFile) {
  make();
  EXPECT_EQ(refusal(scratch_.path("none.gpkg"), false).kind, ErrorKind::kNotFound);
  EXPECT_THAT(refusal(scratch_.folder(), false).one_line(), HasSubstr("is a folder"));
  const std::string link = scratch_.path("link.gpkg");
  ASSERT_EQ(::symlink(path_.c_str(), link.c_str()), 0);
  for (const bool read_only : {false, true}) {
    EXPECT_THAT(refusal(link, read_only).one_line(), HasSubstr("symbolic link; give the file itself"));
  }
  const std::string fifo = scratch_.path("fifo.gpkg");
  ASSERT_EQ(::mkfifo(fifo.c_str(), 0600), 0);
  EXPECT_THAT(refusal(fifo, true).one_line(), HasSubstr("no ordinary file"));
}

TEST_F(SurveyOpen, FollowsALinkedFolder) {
  make();
  const std::string folder = scratch_.path("folder");
  ASSERT_EQ(::symlink(scratch_.folder().c_str(), folder.c_str()), 0);
  EXPECT_TRUE(SurveyFile::open(folder + "/a.gpkg", false).ok());
  const FileStart start = samples::utm_start();
  EXPECT_TRUE(SurveyFile::create(folder + "/b.gpkg", start, samples::sample_layers(start)).ok());
}

TEST_F(SurveyOpen, RefusesWhatIsNotASurvey) {
  const std::string not_ours = ": not a survey file of Nearpit";
  samples::put_bytes(path_, "");
  EXPECT_EQ(refusal(path_, false).one_line(), path_ + not_ours);
  samples::put_bytes(path_, std::string(5000, 'x'));
  EXPECT_EQ(refusal(path_, false).one_line(), path_ + not_ours);
  EXPECT_EQ(refusal(path_, true).one_line(), path_ + not_ours);
  const std::string plain = scratch_.path("plain.gpkg");
  samples::put_bytes(plain, "");
  EXPECT_EQ(ForeignProgram(plain).run("CREATE TABLE t (x); PRAGMA application_id = 1196444487;"), "");
  const std::string before = samples::bytes_of(plain);
  EXPECT_EQ(refusal(plain, false).one_line(), plain + not_ours);
  EXPECT_EQ(samples::bytes_of(plain), before);
}

TEST_F(SurveyOpen, TellsATruncatedFile) {
  make(50);
  const std::string whole = samples::bytes_of(path_);
  for (const std::size_t size : {std::size_t{600}, std::size_t{4096}, whole.size() / 2, whole.size() - 4096}) {
    samples::put_bytes(path_, whole.substr(0, size));
    for (const bool read_only : {false, true}) {
      const Error error = refusal(path_, read_only);
      EXPECT_EQ(error.kind, ErrorKind::kDamaged) << size << " of " << whole.size() << ": " << error.one_line();
      EXPECT_THAT(error.one_line(), HasSubstr("last good copy"));
    }
    EXPECT_EQ(samples::bytes_of(path_), whole.substr(0, size));
  }
}

TEST_F(SurveyOpen, RefusesToWriteADamagedFile) {
  make(200);
  std::string bytes = samples::bytes_of(path_);
  // The head of the last page: its kind of b-tree page.
  bytes[bytes.size() - 4096] = 0x55;
  samples::put_bytes(path_, bytes);
  EXPECT_EQ(refusal(path_, false).kind, ErrorKind::kDamaged);
}

TEST_F(SurveyOpen, ALaterSchemaCanOnlyBeRead) {
  make();
  EXPECT_EQ(ForeignProgram(path_).run("INSERT INTO nearpit_schema VALUES (9, '0009_later.sql', 'x')"), "");
  const Error error = refusal(path_, false);
  EXPECT_EQ(error.kind, ErrorKind::kTooNew);
  EXPECT_THAT(error.one_line(), HasSubstr("schema 9"));
  auto file = SurveyFile::open(path_, true);
  ASSERT_TRUE(file.ok());
  EXPECT_EQ(*file->last_rowid(), 2);
  EXPECT_EQ(file->begin().error().kind, ErrorKind::kIo);
  EXPECT_THAT(samples::in_text(check_file(*file)), HasSubstr("made by a later Nearpit"));
}

TEST_F(SurveyOpen, PutsTheJournalModeBack) {
  make();
  EXPECT_EQ(ForeignProgram(path_).ask("PRAGMA journal_mode = WAL"), "wal");
  EXPECT_EQ(samples::bytes_of(path_).substr(18, 2), "\x02\x02");
  {
    auto reader = SurveyFile::open(path_, true);
    ASSERT_TRUE(reader.ok()) << reader.error().one_line();
    EXPECT_EQ(*reader->last_rowid(), 2);
  }
  {
    auto file = SurveyFile::open(path_, false);
    ASSERT_TRUE(file.ok()) << file.error().one_line();
    ASSERT_TRUE(samples::append_all(*file, samples::kOtherWriter, samples::chain_of(samples::kOtherWriter, 1)).ok());
    EXPECT_THAT(scratch_.names(), ElementsAre("a.gpkg"));
  }
  EXPECT_EQ(samples::bytes_of(path_).substr(18, 2), "\x01\x01");
}

TEST_F(SurveyOpen, AReaderUndoesASaveThatWasCutOff) {
  make(300);
  const std::string before = ForeignProgram(path_).ask("SELECT sum(length(body)) FROM nearpit_revision");
  const pid_t child = ::fork();
  if (child == 0) {
    // A cache of two pages forces half a transaction into the file before it is committed.
    ForeignProgram program(path_);
    program.run("DROP TRIGGER nearpit_revision_no_update");
    program.run("PRAGMA cache_size = 2; BEGIN; UPDATE nearpit_revision SET body = body || 'half';");
    ::_exit(0);
  }
  ::waitpid(child, nullptr, 0);
  ASSERT_THAT(scratch_.names(), ElementsAre("a.gpkg", "a.gpkg-journal"));
  auto file = SurveyFile::open(path_, true);
  ASSERT_TRUE(file.ok()) << file.error().one_line();
  EXPECT_EQ(ask(*file, "SELECT sum(length(body)) FROM nearpit_revision"), before);
  EXPECT_THAT(scratch_.names(), ElementsAre("a.gpkg"));
}

TEST_F(SurveyOpen, RunsNothingThatAnotherProgramPutIn) {
  make(1);
  EXPECT_EQ(ForeignProgram(path_).run(
                "CREATE TABLE stolen (x);"
                "CREATE TRIGGER spy AFTER INSERT ON nearpit_revision BEGIN INSERT INTO stolen VALUES (NEW.body); END;"
                "CREATE TRIGGER block BEFORE INSERT ON pits BEGIN SELECT no_such_function(NEW.geom); END;"),
            "");
  auto file = SurveyFile::open(path_, false);
  ASSERT_TRUE(file.ok());
  auto save = file->begin();
  ASSERT_TRUE(save->append(samples::chain_of(samples::kWriter, 2)[1]).ok());
  const Status put = save->update_layers({{samples::pit_row("T5-5", 1, 2)}, {}, {}, {}}, {});
  EXPECT_TRUE(put.ok()) << put.error().one_line();
  ASSERT_TRUE(save->commit().ok());
  EXPECT_EQ(ask(*file, "SELECT count(*) FROM stolen"), "0");
  EXPECT_THAT(samples::in_text(check_file(*file)), HasSubstr("trigger \"spy\""));
}

}  // namespace
}  // namespace nearpit
