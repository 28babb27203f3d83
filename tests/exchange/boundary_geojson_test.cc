// Shapes only: the places are invented.
#include "exchange/boundary_geojson.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

namespace nearpit {
namespace {

using testing::ElementsAre;
using testing::HasSubstr;
using testing::SizeIs;
using testing::StartsWith;

// A square as coordinates of a Polygon, `size` degrees wide.
std::string square(double lon, double lat, double size) {
  const auto position = [](double x, double y) { return "[" + std::to_string(x) + "," + std::to_string(y) + "]"; };
  return "[[" + position(lon, lat) + "," + position(lon + size, lat) + "," + position(lon + size, lat + size) + "," +
         position(lon, lat + size) + "," + position(lon, lat) + "]]";
}

std::string polygon(const std::string& coordinates, const std::string& more = "") {
  return R"({"type": "Polygon", )" + more + R"("coordinates": )" + coordinates + "}";
}

std::string feature(const std::string& geometry) {
  return R"({"type": "Feature", "properties": {"name": "x"}, "geometry": )" + geometry + "}";
}

std::string collection(const std::vector<std::string>& geometries) {
  std::string all;
  for (const std::string& geometry : geometries)
    all += (all.empty() ? "" : ",\n") + feature(geometry);
  return R"({"type": "FeatureCollection", "features": [)" + all + "]}";
}

MultiPolygon boundary_of(const std::string& text) {
  const auto boundary = read_boundary_geojson(text, "B.geojson");
  EXPECT_TRUE(boundary.ok()) << (boundary.ok() ? "" : boundary.error().one_line());
  return boundary.ok() ? *boundary : MultiPolygon{};
}

std::vector<std::string> errors_of(const std::string& text) {
  const auto boundary = read_boundary_geojson(text, "B.geojson");
  return boundary.ok() ? std::vector<std::string>{} : boundary.error().lines;
}

TEST(BoundaryGeojson, APolygonBareOrInAFeature) {
  const std::string bare = polygon("[[[-81,39],[-80.5,39],[-80.5,39.25,212.5],[-81,39]]]");
  const Ring expected = {{-81, 39}, {-80.5, 39}, {-80.5, 39.25}};
  for (const std::string& text : {bare, feature(bare), collection({bare})}) {
    const MultiPolygon boundary = boundary_of(text);
    ASSERT_THAT(boundary, SizeIs(1)) << text;
    EXPECT_EQ(boundary[0].outer, expected) << text;
    EXPECT_THAT(boundary[0].holes, SizeIs(0));
  }
}

TEST(BoundaryGeojson, AMultiPolygonWithAHole) {
  const MultiPolygon boundary = boundary_of(R"({"type": "MultiPolygon", "coordinates": [
        [[[0,0],[4,0],[4,4],[0,4],[0,0]], [[1,1],[1,2],[2,2],[2,1],[1,1]]],
        [[[10,0],[11,0],[11,1],[10,0]]]]})");
  ASSERT_THAT(boundary, SizeIs(2));
  EXPECT_THAT(boundary[0].holes, SizeIs(1));
  EXPECT_DOUBLE_EQ(area_m2(boundary), 16 - 1 + 0.5) << "in square degrees here";
}

TEST(BoundaryGeojson, FeaturesApartStayApart) {
  EXPECT_THAT(boundary_of(collection({polygon(square(0, 0, 1)), polygon(square(5, 0, 1))})), SizeIs(2));
}

TEST(BoundaryGeojson, FeaturesThatTouchOrOverlapAreUnited) {
  const auto touching = boundary_of(collection({polygon(square(0, 0, 1)), polygon(square(1, 0, 1))}));
  ASSERT_THAT(touching, SizeIs(1));
  EXPECT_NEAR(area_m2(touching), 2, 1e-12);
  const auto overlapping =
      boundary_of(collection({polygon(square(0, 0, 2)), polygon(square(1, 1, 2)), polygon(square(0.5, 0.5, 1))}));
  ASSERT_THAT(overlapping, SizeIs(1));
  EXPECT_NEAR(area_m2(overlapping), 4 + 4 - 1, 1e-12);
}

TEST(BoundaryGeojson, FourFeaturesRoundAYardLeaveAHole) {
  const auto ring = boundary_of(
      collection({polygon("[[[0,0],[3,0],[3,1],[0,1],[0,0]]]"), polygon("[[[0,2],[3,2],[3,3],[0,3],[0,2]]]"),
                  polygon("[[[0,1],[1,1],[1,2],[0,2],[0,1]]]"), polygon("[[[2,1],[3,1],[3,2],[2,2],[2,1]]]")}));
  ASSERT_THAT(ring, SizeIs(1));
  EXPECT_THAT(ring[0].holes, SizeIs(1));
  EXPECT_NEAR(area_m2(ring), 8, 1e-12);
}

TEST(BoundaryGeojson, ManyFeaturesAreUnited) {
  std::vector<std::string> cells;
  for (int x = 0; x < 12; ++x) {
    for (int y = 0; y < 7; ++y)
      cells.push_back(polygon(square(x, y, 1)));
  }
  EXPECT_NEAR(area_m2(boundary_of(collection(cells))), 84, 1e-9);
}

TEST(BoundaryGeojson, DegreesAtTheirEnds) {
  EXPECT_THAT(boundary_of(polygon("[[[-180,-90],[180,-90],[180,90],[-180,90],[-180,-90]]]")), SizeIs(1));
  EXPECT_THAT(
      errors_of(polygon("[[[-180.001,0],[0,0],[0,1],[-180.001,0]]]")),
      ElementsAre(HasSubstr("[-180.001,0.0] is out of range; legal: longitude -180 to 180, latitude -90 to 90")));
  EXPECT_THAT(errors_of(polygon("[[[0,0],[1,0],[1,90.001],[0,0]]]")), SizeIs(1));
}

TEST(BoundaryGeojson, MetresAreRefusedOnceWithAHint) {
  const auto errors = errors_of(
      "{\"type\": \"Polygon\", \"coordinates\": [[\n[465000,4398000],\n[466000,4398000],\n"
      "[466000,4399000],\n[465000,4398000]]]}");
  EXPECT_THAT(errors, ElementsAre(StartsWith("B.geojson:2: coordinates.0.0: [465000.0,4398000.0] is out of range")));
  EXPECT_THAT(errors.front(), HasSubstr("GeoJSON is longitude, latitude by RFC 7946, these look like metres"));
}

TEST(BoundaryGeojson, LatitudeFirstIsRefusedWithAHint) {
  EXPECT_THAT(errors_of(polygon("[[[39,-101],[39,-101.5],[39.5,-101],[39,-101]]]")),
              ElementsAre(HasSubstr("these look like latitude, longitude")));
}

TEST(BoundaryGeojson, ACrsIsRefusedUnlessItSaysTheSame) {
  const auto named = [](const std::string& name) {
    return polygon(square(0, 0, 1), R"("crs": {"type": "name", "properties": {"name": ")" + name + R"("}}, )");
  };
  EXPECT_THAT(errors_of(named("urn:ogc:def:crs:OGC:1.3:CRS84")), SizeIs(0));
  EXPECT_THAT(errors_of(named("urn:ogc:def:crs:EPSG::32617")),
              ElementsAre(StartsWith("B.geojson:1: crs: \"urn:ogc:def:crs:EPSG::32617\" is refused; legal: no crs")));
  EXPECT_THAT(errors_of(named("urn:ogc:def:crs:EPSG::4326")), SizeIs(1));
  EXPECT_THAT(errors_of(polygon(square(0, 0, 1), R"("crs": null, )")), ElementsAre(HasSubstr("crs: null is refused")));
  EXPECT_THAT(
      errors_of(R"({"type": "FeatureCollection", "crs": {}, "features": [)" + feature(polygon(square(0, 0, 1))) + "]}"),
      ElementsAre(HasSubstr("crs: {} is refused")));
}

TEST(BoundaryGeojson, OtherThingsAreNoBoundary) {
  EXPECT_THAT(errors_of(R"({"type": "Point", "coordinates": [1, 2]})"),
              ElementsAre("B.geojson:1: type: \"Point\" is no boundary; legal: Polygon, MultiPolygon, or a Feature or "
                          "FeatureCollection of them"));
  EXPECT_THAT(errors_of(feature(R"({"type": "LineString", "coordinates": [[1, 2], [3, 4]]})")),
              ElementsAre("B.geojson:1: geometry.type: \"LineString\" is no boundary; legal: Polygon, MultiPolygon"));
  EXPECT_THAT(errors_of(feature("null")), ElementsAre(HasSubstr("geometry: null is no GeoJSON object")));
  EXPECT_THAT(errors_of("[]"), ElementsAre(HasSubstr("B.geojson:1: [] is no GeoJSON object")));
  EXPECT_THAT(errors_of("{}"), ElementsAre(HasSubstr("type: missing")));
  EXPECT_THAT(errors_of(R"({"type": 7})"), ElementsAre(HasSubstr("type: 7 is no boundary")));
  EXPECT_THAT(errors_of(R"({"type": "Polygon"})"), ElementsAre(HasSubstr("coordinates: missing")));
  EXPECT_THAT(errors_of(R"({"type": "Feature"})"), ElementsAre(HasSubstr("geometry: missing")));
  EXPECT_THAT(errors_of(R"({"type": "FeatureCollection", "features": []})"),
              ElementsAre(HasSubstr("features: [] holds no feature")));
  EXPECT_THAT(errors_of(R"({"type": "FeatureCollection", "features": [)" + polygon(square(0, 0, 1)) + "]}"),
              ElementsAre(HasSubstr("features.0.type: \"Polygon\" is no feature")));
  EXPECT_THAT(errors_of("pit,status\n"), ElementsAre(StartsWith("B.geojson:1: not JSON")));
}

TEST(BoundaryGeojson, EveryBadFeatureIsNamedOnItsLine) {
  EXPECT_THAT(errors_of(collection({polygon("[[[0,0],[2,2],[2,0],[0,1],[0,0]]]"), polygon(square(5, 5, 1)),
                                    polygon("[[[0,0],[1,0],[1,1]]]")})),
              ElementsAre(StartsWith("B.geojson:1: features.0.geometry: crosses or touches itself"),
                          StartsWith("B.geojson:3: features.2.geometry.coordinates.0: ")));
}

TEST(BoundaryGeojson, TooManyFeatures) {
  const std::vector<std::string> many(1'001, polygon(square(0, 0, 1)));
  EXPECT_THAT(errors_of(collection(many)), ElementsAre(HasSubstr("features: 1001 features; legal: up to 1000")));
}

}  // namespace
}  // namespace nearpit
