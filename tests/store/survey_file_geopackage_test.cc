// The file as GDAL sees it: its validator, ogrinfo and ogr2ogr (Debian's python3-gdal and gdal-bin).
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>
#include <nlohmann/json.hpp>

#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ScratchFolder;
using samples::shell;
using testing::HasSubstr;
using testing::Not;

void expect_valid(const std::string& path) {
  const auto said = shell("/usr/bin/python3 -m osgeo_utils.samples.validate_gpkg -k '" + path + "'");
  EXPECT_EQ(said.status, 0) << said.text;
  EXPECT_THAT(said.text, Not(HasSubstr("Error"))) << said.text;
  EXPECT_THAT(said.text, Not(HasSubstr("Req"))) << said.text;
}

nlohmann::json features(const std::string& path, const std::string& layer, const std::string& options) {
  const auto said =
      shell("ogr2ogr -f GeoJSON " + options + " -lco COORDINATE_PRECISION=12 /vsistdout/ '" + path + "' " + layer);
  EXPECT_EQ(said.status, 0) << said.text;
  const auto parsed = nlohmann::json::parse(said.text, nullptr, false);
  EXPECT_FALSE(parsed.is_discarded()) << said.text;
  return parsed.is_discarded() ? nlohmann::json::array() : parsed["features"];
}

// Twice the signed area of a closed ring: positive is counter-clockwise.
double winding(const nlohmann::json& ring) {
  double sum = 0;
  for (std::size_t i = 0; i + 1 < ring.size(); ++i) {
    sum += (ring[i][0].get<double>() - ring[0][0].get<double>()) *
               (ring[i + 1][1].get<double>() - ring[0][1].get<double>()) -
           (ring[i + 1][0].get<double>() - ring[0][0].get<double>()) *
               (ring[i][1].get<double>() - ring[0][1].get<double>());
  }
  return sum;
}

class SurveyFileGeopackage : public testing::Test {
 protected:
  const ScratchFolder scratch_;
  const std::string path_ = scratch_.path("a.gpkg");
};

TEST_F(SurveyFileGeopackage, TheValidatorCanFail) {
  samples::make_survey(path_, samples::utm_start(), 0);
  ASSERT_EQ(samples::ForeignProgram(path_).run(
                "UPDATE gpkg_contents SET last_change = '2026-05-04T10:40:30Z' WHERE table_name = 'pits'"),
            "");
  EXPECT_NE(shell("/usr/bin/python3 -m osgeo_utils.samples.validate_gpkg -k '" + path_ + "'").status, 0);
}

TEST_F(SurveyFileGeopackage, IsValidWhenMadeAndAfterEverySave) {
  const FileStart start = samples::utm_start();
  LayerRows rows = samples::sample_layers(start);
  samples::make_survey(path_, start, 0);
  expect_valid(path_);
  auto file = SurveyFile::open(path_, false);
  ASSERT_TRUE(file.ok());
  {
    auto save = file->begin();
    ASSERT_TRUE(save->add_writer(samples::kWriter, "tablet one", start.made_at).ok());
    for (const Revision& revision : samples::chain_of(samples::kWriter, 4))
      ASSERT_TRUE(save->append(revision).ok());
    rows.pits.push_back(samples::pit_row("T2-2", 500010, 4400010));
    rows.clusters.push_back({"T4-4", 2, 0, 200, true, {0, 1, 0, 0}, samples::square(500500, 4400500, 10)});
    rows.closed_areas[0].outline.clear();
    ASSERT_TRUE(save->update_layers({{rows.pits.back()}, {}, rows.clusters, rows.closed_areas}, start.made_at).ok());
    ASSERT_TRUE(save->commit().ok());
  }
  expect_valid(path_);
  EXPECT_EQ(features(path_, "pits", "").size(), 4u);
}

TEST_F(SurveyFileGeopackage, ALocalGridIsValidToo) {
  samples::make_survey(path_, samples::local_start(), 2);
  expect_valid(path_);
  EXPECT_EQ(features(path_, "pits", "").size(), 3u);
}

TEST_F(SurveyFileGeopackage, AnEmptySurveyIsValidToo) {
  const FileStart start = samples::local_start();
  LayerRows rows;
  rows.finds = start.finds;
  rows.survey = "Nothing yet";
  ASSERT_TRUE(SurveyFile::create(path_, start, rows).ok());
  expect_valid(path_);
}

TEST_F(SurveyFileGeopackage, EveryLayerIsListedAndNothingElse) {
  samples::make_survey(path_, samples::utm_start(), 2);
  const std::string before = samples::bytes_of(path_);
  const auto said = shell("ogrinfo -ro '" + path_ + "'");
  EXPECT_EQ(said.status, 0);
  EXPECT_THAT(said.text, HasSubstr(": pits (Point)"));
  for (const char* layer : {"clusters", "boundary", "strata", "closed_areas"}) {
    EXPECT_THAT(said.text, HasSubstr(": " + std::string(layer) + " (Multi Polygon)"));
  }
  EXPECT_THAT(said.text, HasSubstr(": column_notes (None)"));
  EXPECT_THAT(said.text, Not(HasSubstr("nearpit_")));
  EXPECT_THAT(said.text, Not(HasSubstr("Warning")));
  EXPECT_THAT(said.text, Not(HasSubstr("ERROR")));
  EXPECT_EQ(samples::bytes_of(path_), before);
}

TEST_F(SurveyFileGeopackage, EveryLayerReadsAsWritten) {
  samples::make_survey(path_, samples::utm_start(), 2);
  const auto pits = features(path_, "pits", "");
  ASSERT_EQ(pits.size(), 3u);
  EXPECT_EQ(pits[2]["properties"]["label"], "J1");
  EXPECT_EQ(pits[2]["geometry"]["coordinates"][0], 500003.25);
  EXPECT_EQ(pits[2]["geometry"]["coordinates"][1], 4400007.5);
  EXPECT_EQ(pits[1]["properties"]["find_flaked stone"], 3);
  EXPECT_EQ(pits[1]["properties"]["find_черепок"], 0);
  EXPECT_EQ(pits[1]["properties"][R"(find_x"y'); DROP TABLE pits;--)"], 1);
  EXPECT_EQ(pits[1]["properties"]["depth_cm"], 42.5);
  EXPECT_EQ(pits[0]["properties"]["first_sample"], true);
  EXPECT_TRUE(pits[0]["properties"]["find_pottery"].is_null());
  EXPECT_EQ(features(path_, "clusters", "").size(), 1u);
  EXPECT_EQ(features(path_, "strata", "").size(), 2u);
  EXPECT_EQ(features(path_, "closed_areas", "").size(), 1u);
  EXPECT_EQ(features(path_, "column_notes", "").size(), 33u + 2u * 4u);
  const auto boundary = features(path_, "boundary", "");
  ASSERT_EQ(boundary.size(), 1u);
  EXPECT_EQ(boundary[0]["geometry"]["type"], "MultiPolygon");
  const auto rings = boundary[0]["geometry"]["coordinates"][0];
  ASSERT_EQ(rings.size(), 2u);
  EXPECT_EQ(winding(rings[0]), 2 * 100.0 * 100.0);
  EXPECT_EQ(winding(rings[1]), -2 * 10.0 * 10.0);
}

// 500000, 4400000 in EPSG:32617 is 39.749907519 north, 81 west: PROJ's cs2cs and GeographicLib's GeoConvert agree.
TEST_F(SurveyFileGeopackage, StandsAtTheRightPlaceOnTheGlobe) {
  samples::make_survey(path_, samples::utm_start(), 0);
  const auto pits = features(path_, "pits", "-t_srs EPSG:4326");
  ASSERT_EQ(pits.size(), 3u);
  EXPECT_NEAR(pits[0]["geometry"]["coordinates"][0].get<double>(), -81, 1e-9);
  EXPECT_NEAR(pits[0]["geometry"]["coordinates"][1].get<double>(), 39.749907519, 1e-9);
  const auto copied = shell("ogr2ogr -f GPKG -t_srs EPSG:4326 '" + scratch_.path("b.gpkg") + "' '" + path_ + "'");
  EXPECT_EQ(copied.status, 0) << copied.text;
  const auto info = shell("ogrinfo -ro -al '" + scratch_.path("b.gpkg") + "' boundary");
  EXPECT_THAT(info.text, HasSubstr("EPSG\",4326"));
  EXPECT_THAT(info.text, HasSubstr("Feature Count: 1"));
}

}  // namespace
}  // namespace nearpit
