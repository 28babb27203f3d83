#include "store/schema_files.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ForeignProgram;
using samples::ScratchFolder;
using testing::HasSubstr;

TEST(SchemaFiles, AreNumberedWithoutGaps) {
  ASSERT_GE(store::kSchemaFileCount, 1);
  for (int i = 0; i < store::kSchemaFileCount; ++i)
    EXPECT_EQ(store::kSchemaFiles[i].number, i + 1);
  EXPECT_STREQ(store::kSchemaFiles[0].name, "0001_first.sql");
}

// Another program that has not switched the triggers off.
TEST(SchemaFiles, TheirTriggersRefuseEveryChangeOfWhatIsTrue) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 3);
  const std::string before = samples::bytes_of(path);
  const std::pair<const char*, const char*> tables[] = {
      {"nearpit_revision", "body"}, {"nearpit_writer", "device"}, {"nearpit_survey", "plan"},
      {"nearpit_drawn", "unit"},    {"nearpit_find", "name"},     {"nearpit_schema", "name"},
  };
  {
    ForeignProgram program(path);
    for (const auto& [table, column] : tables) {
      const std::string name = table;
      EXPECT_NE(program.ask("SELECT count(*) FROM " + name), "0") << name;
      EXPECT_THAT(program.run("UPDATE " + name + " SET " + column + " = 5"), HasSubstr("nearpit: ")) << name;
      EXPECT_THAT(program.run("DELETE FROM " + name), HasSubstr("nearpit: ")) << name;
      EXPECT_THAT(program.run("INSERT OR REPLACE INTO " + name + " SELECT * FROM " + name), HasSubstr("nearpit: "))
          << name;
    }
    EXPECT_THAT(program.run("INSERT OR REPLACE INTO nearpit_revision SELECT 99, id, writer, 99, clock, \"by\", at_ms, "
                            "at_offset_min, object, "
                            "'{}', why, parents, hash FROM nearpit_revision WHERE seq = 1"),
                HasSubstr("never changed"));
    EXPECT_THAT(program.run("INSERT OR REPLACE INTO nearpit_revision SELECT 99, 'new', writer, seq, clock, \"by\", "
                            "at_ms, at_offset_min, "
                            "object, '{}', why, parents, hash FROM nearpit_revision WHERE seq = 1"),
                HasSubstr("never changed"));
    EXPECT_THAT(program.run("INSERT INTO nearpit_drawn (area, unit) VALUES (1, 1)"), HasSubstr("fixed"));
    EXPECT_THAT(program.run("INSERT INTO nearpit_find VALUES (9, 'more', 'find_more')"), HasSubstr("fixed"));
  }
  EXPECT_EQ(samples::bytes_of(path), before);
}

TEST(SchemaFiles, OldReadersCanOpenWhatTheyMake) {
  for (int i = 0; i < store::kSchemaFileCount; ++i) {
    std::string code;
    std::istringstream lines(store::kSchemaFiles[i].sql);
    for (std::string line; std::getline(lines, line);)
      code += line.substr(0, line.find("--")) + "\n";
    EXPECT_EQ(code.find("STRICT"), std::string::npos);
    EXPECT_EQ(code.find("WITHOUT ROWID"), std::string::npos);
    EXPECT_EQ(code.find("rtree"), std::string::npos);
    EXPECT_EQ(code.find("COMMIT"), std::string::npos);
  }
}

}  // namespace
}  // namespace nearpit
