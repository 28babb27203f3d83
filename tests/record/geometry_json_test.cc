#include "record/geometry_json.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <string>
#include <vector>

namespace nearpit {
namespace {

std::vector<std::string> faults_of(const char* text) {
  std::vector<JsonFault> faults;
  const MultiPolygon polygons = polygons_of(Json::parse(text), &faults);
  EXPECT_EQ(faults.empty(), !polygons.empty()) << text;
  std::vector<std::string> lines;
  for (const JsonFault& fault : faults)
    lines.push_back(fault.field + ": " + fault.what);
  return lines;
}

MultiPolygon read(const char* text) {
  std::vector<JsonFault> faults;
  MultiPolygon polygons = polygons_of(Json::parse(text), &faults);
  EXPECT_TRUE(faults.empty()) << faults.front().field << faults.front().what;
  return polygons;
}

constexpr const char* kHoled =
    R"({"type":"Polygon","coordinates":[[[0.0,0.0],[9.5,0.0],[9.5,9.0],[0.0,0.0]],[[5.0,1.0],[6.0,1.0],[6.0,2.0],[5.0,1.0]]]})";
constexpr const char* kTwo =
    R"({"type":"MultiPolygon","coordinates":[[[[0.0,0.0],[1.0,0.0],[1.0,1.0],[0.0,0.0]]],[[[5.0,0.0],[6.0,0.0],[6.0,1.0],[5.0,0.0]]]]})";

TEST(GeometryJson, ReadsRingsWithoutTheirClosingPoint) {
  const MultiPolygon polygons = read(kHoled);
  ASSERT_EQ(polygons.size(), 1u);
  EXPECT_EQ(polygons[0].outer, (Ring{{0, 0}, {9.5, 0}, {9.5, 9}}));
  ASSERT_EQ(polygons[0].holes.size(), 1u);
  EXPECT_EQ(polygons[0].holes[0], (Ring{{5, 1}, {6, 1}, {6, 2}}));
}

TEST(GeometryJson, WritesWhatItReads) {
  EXPECT_EQ(geometry_json(read(kHoled)).dump(), kHoled);
  EXPECT_EQ(geometry_json(read(kTwo)).dump(), kTwo);
}

TEST(GeometryJson, OnePolygonIsWrittenAsPolygon) {
  const MultiPolygon polygons = read(R"({"type":"MultiPolygon","coordinates":[[[[0,0],[1,0],[1,1],[0,0]]]]})");
  EXPECT_EQ(geometry_json(polygons)["type"], "Polygon");
}

// RFC 7946 section 3.1.1: a third element is a height, more are not taken.
TEST(GeometryJson, PassesOverHeightsAndOtherMembers) {
  const MultiPolygon polygons =
      read(R"({"type":"Polygon","bbox":[0,0,1,1],"coordinates":[[[0,0,7],[1,0,"high"],[1,1],[0,0,9]]]})");
  EXPECT_EQ(polygons[0].outer.size(), 3u);
}

TEST(GeometryJson, SaysWhereAFaultIs) {
  using testing::ElementsAre;
  const std::string ring = "a list of at least four positions, the last equal to the first";
  EXPECT_THAT(faults_of("[]"), ElementsAre(": [] is not a geometry; legal: {\"type\": \"Polygon\" or \"MultiPolygon\", "
                                           "\"coordinates\": […]}"));
  EXPECT_THAT(faults_of(R"({"type":"Feature","coordinates":[]})"),
              ElementsAre("/type: \"Feature\" is no kind of polygon; legal: \"Polygon\", \"MultiPolygon\""));
  EXPECT_THAT(faults_of(R"({"type":7})"),
              ElementsAre("/type: 7 is no kind of polygon; legal: \"Polygon\", \"MultiPolygon\"",
                          "/coordinates: missing; legal: a list of rings"));
  EXPECT_THAT(faults_of(R"({"type":"Polygon","coordinates":[[[0,0],[1,0],[1,"1"],[0,null]]]})"),
              ElementsAre("/coordinates/0/2/1: \"1\" is not a number; legal: a number from -100000000 to 100000000",
                          "/coordinates/0/3/1: null is not a number; legal: a number from -100000000 to 100000000"));
  EXPECT_THAT(
      faults_of(R"({"type":"Polygon","coordinates":[[[0,0],[1,0],[1,2e8],[0,0]]]})"),
      ElementsAre("/coordinates/0/2/1: 200000000.0 is too large; legal: a number from -100000000 to 100000000"));
  EXPECT_THAT(faults_of(R"({"type":"Polygon","coordinates":[[[0,0],[1,0],[1,1,1,1],[0,0]]]})"),
              ElementsAre("/coordinates/0/2: […] is not a position; legal: [x, y]"));
  EXPECT_THAT(faults_of(R"({"type":"Polygon","coordinates":[[[0,0],[1,0],[1,1],[0,0.5]]]})"),
              ElementsAre("/coordinates/0/3: is not the ring's first position; close the ring with [0,0]"));
  EXPECT_THAT(faults_of(R"({"type":"Polygon","coordinates":[[[0,0],[1,0],[0,0]]]})"),
              ElementsAre("/coordinates/0: […] is not a ring; legal: " + ring));
  EXPECT_THAT(faults_of(R"({"type":"MultiPolygon","coordinates":[[[[0,0],[1,0],[1,1],[0,0]]],[7]]})"),
              ElementsAre("/coordinates/1/0: 7 is not a ring; legal: " + ring));
  EXPECT_THAT(faults_of(R"({"type":"MultiPolygon","coordinates":[]})"),
              ElementsAre("/coordinates: [] is not a list of polygons; legal: at least one polygon's list of rings"));
}

TEST(GeometryJson, PutsPolygonsThroughTheirCheck) {
  const auto crossed = faults_of(R"({"type":"Polygon","coordinates":[[[0,0],[4,4],[4,0],[0,4],[0,0]]]})");
  ASSERT_EQ(crossed.size(), 1u);
  EXPECT_THAT(crossed[0],
              testing::AllOf(testing::StartsWith(": "), testing::HasSubstr("legal: rings that don't cross")));
  EXPECT_EQ(faults_of(R"({"type":"Polygon","coordinates":[[[0,0],[4,0],[8,0],[0,0]]]})").size(), 1u);
}

TEST(GeometryJson, StopsAtAHundredFaults) {
  std::string text = R"({"type":"Polygon","coordinates":[[)";
  for (int i = 0; i < 1000; ++i)
    text += "7,";
  EXPECT_EQ(faults_of((text + "7]]}").c_str()).size(), 100u);
}

}  // namespace
}  // namespace nearpit
