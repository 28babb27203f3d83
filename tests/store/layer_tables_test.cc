#include "store/layer_tables.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ScratchFolder;
using testing::ElementsAre;

TEST(LayerTables, FindColumnsAreNamedAfterTheFinds) {
  EXPECT_THAT(store::find_columns({"flaked stone", "pottery"}), ElementsAre("find_flaked stone", "find_pottery"));
}

// SQLite compares column names without regard to the case of A to Z, and of no other letters.
TEST(LayerTables, FindColumnsNeverCollide) {
  EXPECT_THAT(store::find_columns({"Pottery", "pottery", "POTTERY", "pottery_2", "Ä", "ä"}),
              ElementsAre("find_Pottery", "find_pottery_2", "find_POTTERY_3", "find_pottery_2_2", "find_Ä", "find_ä"));
}

TEST(LayerTables, AnyFindNameMakesAFileThatIsWhole) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  FileStart start = samples::local_start();
  start.finds = {
      "a", "A", "\"", "'", "]", "`", "a,b", "(", "--", ";", "черепок", "🏺", "label", "fid", std::string(200, 'x')};
  LayerRows rows;
  rows.finds = start.finds;
  rows.survey = "Invented ground";
  rows.pits = {samples::pit_row("T1-1", 0, 0)};
  rows.pits[0].finds.clear();
  for (std::size_t i = 0; i < start.finds.size(); ++i)
    rows.pits[0].finds.emplace_back(static_cast<std::int64_t>(i) * 7);
  const Status made = SurveyFile::create(path, start, rows);
  ASSERT_TRUE(made.ok()) << made.error().one_line();
  auto file = SurveyFile::open(path, true);
  ASSERT_TRUE(file.ok()) << file.error().one_line();
  EXPECT_EQ(samples::in_text(check_file(*file)), "");
  EXPECT_EQ(samples::in_text(check_layers(*file, rows)), "");
  samples::ForeignProgram program(path);
  EXPECT_EQ(program.ask("SELECT \"find_\"\"\" FROM pits"), "14");
  EXPECT_EQ(program.ask("SELECT \"find_🏺\" FROM pits"), "77");
}

TEST(LayerTables, SayWhatIsThereAndNothingWhereNothingIsSaid) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 0);
  samples::ForeignProgram program(path);
  EXPECT_EQ(program.ask("SELECT group_concat(label || ':' || outcome, ' ') FROM (SELECT * FROM pits ORDER BY fid)"),
            "T1-1:due T1-2:positive J1:not dug");
  EXPECT_EQ(program.ask("SELECT depth_cm || ' ' || stop || ' ' || \"find_flaked stone\" || ' ' || find_pottery FROM "
                        "pits WHERE label = 'T1-2'"),
            "42.5 sterile_subsoil 3 0");
  EXPECT_EQ(program.ask("SELECT count(*) FROM pits WHERE label = 'J1' AND area IS NULL AND ring IS NULL AND crew IS "
                        "NULL AND find_pottery IS "
                        "NULL AND first_sample = 0"),
            "1");
  EXPECT_EQ(program.ask("SELECT pits || ' ' || area_m2 || ' ' || closed FROM clusters"), "1 100.0 0");
  EXPECT_EQ(program.ask("SELECT survey FROM boundary"), "Invented ground");
  EXPECT_EQ(program.ask("SELECT nodes || ' ' || primary_units || ' ' || drawn FROM strata WHERE name = 'slope'"),
            "40 40 1");
  EXPECT_EQ(program.ask("SELECT reason || ' ' || closed_by || ' ' || open_again FROM closed_areas"),
            "standing_water Crew A 0");
}

TEST(LayerTables, EveryColumnIsExplained) {
  const ScratchFolder scratch;
  const std::string path = scratch.path("a.gpkg");
  samples::make_survey(path, samples::utm_start(), 0);
  samples::ForeignProgram program(path);
  EXPECT_EQ(program.ask("SELECT group_concat(l.table_name || '.' || c.name) FROM gpkg_geometry_columns l, "
                        "pragma_table_info(l.table_name) c "
                        "WHERE c.name <> 'fid' AND NOT EXISTS (SELECT 1 FROM column_notes n WHERE n.layer_name = "
                        "l.table_name AND n.column_name "
                        "= c.name)"),
            "NULL");
  EXPECT_EQ(program.ask("SELECT count(*) FROM column_notes n WHERE NOT EXISTS (SELECT 1 FROM "
                        "pragma_table_info(n.layer_name) c WHERE c.name = "
                        "n.column_name)"),
            "0");
}

}  // namespace
}  // namespace nearpit
