#include "store/file_check.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <algorithm>

#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ForeignProgram;
using samples::ScratchFolder;
using testing::HasSubstr;
using testing::SizeIs;
using testing::StartsWith;

class FileCheck : public testing::Test {
 protected:
  FileCheck() : start_(samples::utm_start()), rows_(samples::sample_layers(start_)) {
    samples::make_survey(path_, start_, 6);
  }

  void meddle(const std::string& sql) { ASSERT_EQ(ForeignProgram(path_).run(sql), ""); }
  std::vector<FileProblem> file_problems() {
    auto file = SurveyFile::open(path_, true);
    EXPECT_TRUE(file.ok()) << file.error().one_line();
    return check_file(*file);
  }
  std::string file_text() { return samples::in_text(file_problems()); }
  std::vector<FileProblem> layer_problems() {
    auto file = SurveyFile::open(path_, true);
    EXPECT_TRUE(file.ok()) << file.error().one_line();
    return check_layers(*file, rows_);
  }
  std::string layer_text() { return samples::in_text(layer_problems()); }

  const ScratchFolder scratch_;
  const std::string path_ = scratch_.path("a.gpkg");
  const FileStart start_;
  LayerRows rows_;
};

TEST_F(FileCheck, AWholeFileHasNoProblem) {
  EXPECT_EQ(file_text(), "");
  EXPECT_EQ(layer_text(), "");
}

TEST_F(FileCheck, ALocalGridHasNoProblemEither) {
  const std::string path = scratch_.path("local.gpkg");
  samples::make_survey(path, samples::local_start(), 2);
  auto file = SurveyFile::open(path, true);
  EXPECT_EQ(samples::in_text(check_file(*file)), "");
  EXPECT_EQ(samples::in_text(check_layers(*file, samples::sample_layers(samples::local_start()))), "");
}

// Every field of a revision, and its hash, stand under the chain.
TEST_F(FileCheck, FindsAChangedRevisionByItsHash) {
  const char* changes[] = {"id = replace(id, '018f', '018e')",
                           "clock = clock + 1",
                           "\"by\" = 'Crew B'",
                           "at_ms = at_ms + 1",
                           "at_offset_min = 0",
                           "object = 'pit/T9-9'",
                           "why = why || ' '",
                           "parents = ''",
                           "body = replace(body, 'dug', 'dUg')"};
  const std::string trigger =
      ForeignProgram(path_).ask("SELECT sql FROM sqlite_schema WHERE name = 'nearpit_revision_no_update'");
  const std::string whole = samples::bytes_of(path_);
  for (const char* change : changes) {
    samples::put_bytes(path_, whole);
    meddle("DROP TRIGGER nearpit_revision_no_update; UPDATE nearpit_revision SET " + std::string(change) +
           " WHERE seq = 3; " + trigger);
    const auto problems = file_problems();
    const auto chain = std::count_if(problems.begin(), problems.end(), [](const auto& p) { return p.kind == "chain"; });
    EXPECT_EQ(chain, 1) << change << "\n" << samples::in_text(problems);
    EXPECT_THAT(samples::in_text(problems), HasSubstr("revision 3 of writer \"" + std::string(samples::kWriter)))
        << change;
  }
  samples::put_bytes(path_, whole);
  meddle(
      "DROP TRIGGER nearpit_revision_no_update; UPDATE nearpit_revision SET hash = replace(hash, substr(hash, 1, 1), "
      "'g') WHERE seq = 3; " +
      trigger);
  EXPECT_THAT(file_text(), HasSubstr("chain | revision 3 of writer"));
}

// The plan and the first sample stand under every chain.
TEST_F(FileCheck, FindsAnotherPlanOrFirstSample) {
  const std::string whole = samples::bytes_of(path_);
  for (const auto& [table, change] :
       {std::pair<std::string, std::string>{"survey", "plan = replace(plan, 'Invented', 'Other')"},
        {"survey", "survey_id = replace(survey_id, '018f', '018e')"},
        {"drawn", "unit = 5 WHERE unit = 4"}}) {
    const std::string trigger = "nearpit_" + table + "_no_update";
    const std::string sql = ForeignProgram(path_).ask("SELECT sql FROM sqlite_schema WHERE name = '" + trigger + "'");
    meddle("DROP TRIGGER " + trigger + "; UPDATE nearpit_" + table + " SET " + change + "; " + sql);
    const auto problems = file_problems();
    ASSERT_THAT(problems, SizeIs(1)) << change << "\n" << samples::in_text(problems);
    EXPECT_EQ(problems[0].kind, "chain");
    EXPECT_THAT(problems[0].where, StartsWith("revision 1 of writer"));
    samples::put_bytes(path_, whole);
  }
}

// One byte on the disk, behind SQLite's back.
TEST_F(FileCheck, FindsOneByteChangedOnTheDisk) {
  std::string bytes = samples::bytes_of(path_);
  const std::size_t at = bytes.find("n\xc3\xa9 4");
  ASSERT_NE(at, std::string::npos);
  bytes[at + 4] = '5';
  samples::put_bytes(path_, bytes);
  const auto problems = file_problems();
  ASSERT_THAT(problems, SizeIs(1)) << samples::in_text(problems);
  EXPECT_EQ(problems[0].kind, "chain");
  EXPECT_THAT(problems[0].where, StartsWith("revision 4 of writer"));
}

TEST_F(FileCheck, FindsARevisionTakenOut) {
  const std::string trigger =
      ForeignProgram(path_).ask("SELECT sql FROM sqlite_schema WHERE name = 'nearpit_revision_no_delete'");
  meddle("DROP TRIGGER nearpit_revision_no_delete; DELETE FROM nearpit_revision WHERE seq = 2; " + trigger);
  const auto problems = file_problems();
  ASSERT_THAT(problems, SizeIs(2)) << samples::in_text(problems);
  EXPECT_EQ(problems[0].kind, "gap");
  EXPECT_THAT(problems[0].where, StartsWith("revision 3 of writer"));
  EXPECT_EQ(problems[1].kind, "orphan");  // the third names the second as a parent
}

TEST_F(FileCheck, FindsTriggersThatAreGoneChangedOrNew) {
  meddle(
      "DROP TRIGGER nearpit_survey_no_delete; DROP TRIGGER nearpit_writer_no_update;"
      "CREATE TRIGGER nearpit_writer_no_update BEFORE UPDATE ON nearpit_writer WHEN 0 BEGIN SELECT RAISE(ABORT, 'x'); "
      "END;"
      "CREATE TRIGGER more AFTER INSERT ON pits BEGIN SELECT 1; END; CREATE INDEX other ON pits (outcome);"
      "CREATE TABLE theirs (x); CREATE INDEX theirs_x ON theirs (x);");
  const std::string text = file_text();
  EXPECT_THAT(text, HasSubstr("schema | trigger nearpit_survey_no_delete | is missing"));
  EXPECT_THAT(text, HasSubstr("schema | trigger nearpit_writer_no_update | is not as this program made it"));
  EXPECT_THAT(text, HasSubstr("schema | trigger \"more\" | was added to table pits"));
  EXPECT_THAT(text, HasSubstr("schema | index \"other\" | was added to table pits"));
  EXPECT_EQ(std::count(text.begin(), text.end(), '\n'), 4) << text;
}

TEST_F(FileCheck, FindsChangedTablesAndNotices) {
  meddle(
      "ALTER TABLE pits ADD COLUMN mine TEXT; UPDATE gpkg_geometry_columns SET geometry_type_name = 'GEOMETRY' WHERE "
      "table_name = 'pits';"
      "DELETE FROM gpkg_extensions WHERE table_name = 'nearpit_drawn'; UPDATE column_notes SET meaning = 'x' WHERE "
      "column_name = 'crew';"
      "UPDATE gpkg_contents SET srs_id = 4326 WHERE table_name = 'strata'");
  const std::string text = file_text();
  EXPECT_THAT(text, HasSubstr("schema | table pits | is not as this program made it"));
  EXPECT_THAT(text, HasSubstr("geometry of pits"));
  EXPECT_THAT(text, HasSubstr("extension nearpit_log of nearpit_drawn | is missing"));
  EXPECT_THAT(text, HasSubstr("note on pits.crew | says \"x\""));
  EXPECT_THAT(text, HasSubstr("layer strata | says"));
  EXPECT_EQ(std::count(text.begin(), text.end(), '\n'), 5) << text;
}

TEST_F(FileCheck, FindsAnotherIdentityAndBrokenReferences) {
  meddle(
      "PRAGMA user_version = 10400; PRAGMA foreign_keys = OFF; DELETE FROM gpkg_contents WHERE table_name = 'strata'");
  const std::string text = file_text();
  EXPECT_THAT(text, HasSubstr("identity | PRAGMA user_version | is 10400, a GeoPackage 1.3 has 10300"));
  EXPECT_THAT(text, HasSubstr("pages | table \"gpkg_geometry_columns\""));
}

TEST_F(FileCheck, FindsEveryForeignEditOfTheLayers) {
  meddle(
      "UPDATE pits SET outcome = 'positive' WHERE label = 'T1-1'; UPDATE pits SET find_pottery = 9 WHERE label = "
      "'T1-2';"
      "DELETE FROM pits WHERE label = 'J1'; INSERT INTO pits (label, outcome, first_sample) VALUES ('T8-8', 'due', 1);"
      "UPDATE clusters SET geom = (SELECT geom FROM boundary); UPDATE strata SET drawn = 4 WHERE name = 'slope';"
      "UPDATE boundary SET survey = 'Mine'; UPDATE closed_areas SET open_again = 1");
  const std::string text = layer_text();
  EXPECT_THAT(text, HasSubstr("layer | layer pits, \"T1-1\" | \"outcome\" is \"positive\", the record says \"due\" |"));
  EXPECT_THAT(text, HasSubstr("layer pits, \"T1-2\" | \"find_pottery\" is 9, the record says 0 |"));
  EXPECT_THAT(text, HasSubstr("layer pits, \"J1\" | is missing"));
  EXPECT_THAT(text, HasSubstr("layer pits, \"T8-8\" | stands there, the record knows none"));
  EXPECT_THAT(text, HasSubstr("layer clusters, \"T1-2\" | \"geom\" is another geometry"));
  EXPECT_THAT(text, HasSubstr("layer strata, \"slope\" | \"drawn\" is 4, the record says 1"));
  EXPECT_THAT(text, HasSubstr("layer boundary, \"Mine\" | stands there"));
  EXPECT_THAT(text, HasSubstr("layer boundary, \"Invented ground\" | is missing"));
  EXPECT_THAT(text, HasSubstr("layer closed_areas"));
  EXPECT_EQ(std::count(text.begin(), text.end(), '\n'), 9) << text;
  EXPECT_EQ(file_text(), "");  // the record is not touched
}

// A point moved by a hair, the type of a value, NULL for a text: nothing is too small.
TEST_F(FileCheck, FindsTheSmallestEdit) {
  for (const char* change : {"geom = substr(geom, 1, 21) || x'01' || substr(geom, 23)", "depth_cm = depth_cm + 1e-12",
                             "crew = NULL", "note = note || ' '", "find_pottery = NULL", "bag = CAST(bag AS BLOB)"}) {
    const std::string whole = samples::bytes_of(path_);
    meddle("UPDATE pits SET " + std::string(change) + " WHERE label = 'T1-2'");
    EXPECT_THAT(layer_problems(), SizeIs(1)) << change;
    samples::put_bytes(path_, whole);
  }
  EXPECT_EQ(layer_text(), "");
}

TEST_F(FileCheck, NamesAHundredRowsAndCountsTheRest) {
  for (int i = 0; i < 130; ++i)
    rows_.pits.push_back(samples::pit_row("T3-" + std::to_string(i + 1), i, 0));
  const auto problems = layer_problems();
  ASSERT_THAT(problems, SizeIs(101));
  EXPECT_EQ(problems.back().what, "and 30 more");
}

TEST_F(FileCheck, FindsALayerThatIsGone) {
  meddle("DROP TABLE clusters");
  EXPECT_THAT(layer_text(), HasSubstr("layer | layer clusters |"));
  EXPECT_THAT(file_text(), HasSubstr("schema | table clusters | is missing"));
}

TEST_F(FileCheck, FindsDamagedPages) {
  std::string bytes = samples::bytes_of(path_);
  bytes[bytes.size() - 4096] = 0x55;
  samples::put_bytes(path_, bytes);
  EXPECT_THAT(file_text(), HasSubstr("pages | "));
}

TEST_F(FileCheck, FindsOtherFindsThanThePlans) {
  rows_.finds.pop_back();
  EXPECT_THAT(layer_text(), HasSubstr("not those of the plan"));
}

}  // namespace
}  // namespace nearpit
