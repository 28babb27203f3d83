#include "position/crs.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>

#include "support/test_random.h"

namespace nearpit {
namespace {

using testing::ElementsAre;
using testing::HasSubstr;
using testing::Not;
using testing::SizeIs;
using testing::StartsWith;

Point ground_of(const Point& lonlat, const std::string& crs) {
  const Point east{lonlat.x + 0.001, lonlat.y};
  const Point north{lonlat.x, lonlat.y + 0.001};
  const auto ground = lonlat_to_ground({{{lonlat, east, north}, {}}}, crs);
  EXPECT_TRUE(ground.ok()) << ground.error().one_line();
  return ground.ok() ? ground->front().outer.front() : Point{};
}

Point lonlat_of(const Point& ground, const std::string& crs) {
  const auto lonlat = ground_to_lonlat(ground, crs);
  EXPECT_TRUE(lonlat.ok()) << lonlat.error().one_line();
  return lonlat.ok() ? *lonlat : Point{};
}

void expect_refused(const std::string& crs, const std::string& words) {
  const auto facts = crs_facts(crs);
  ASSERT_FALSE(facts.ok()) << crs;
  EXPECT_EQ(facts.error().kind, ErrorKind::kBadInput);
  EXPECT_THAT(facts.error().lines, ElementsAre(HasSubstr(words)));
  EXPECT_THAT(facts.error().lines.front(), testing::AllOf(HasSubstr("crs: \"" + crs + "\""), Not(HasSubstr("\n"))));
}

TEST(Crs, FactsOfAProjectedSystem) {
  const auto facts = crs_facts("EPSG:32617");
  ASSERT_TRUE(facts.ok());
  EXPECT_EQ(facts->epsg, 32617);
  EXPECT_EQ(facts->name, "WGS 84 / UTM zone 17N");
  EXPECT_THAT(facts->wkt, StartsWith("PROJCS[\"WGS 84 / UTM zone 17N\",GEOGCS[\"WGS 84\","));
  EXPECT_THAT(facts->wkt, HasSubstr("PARAMETER[\"central_meridian\",-81]"));
  EXPECT_THAT(facts->wkt, HasSubstr("AUTHORITY[\"EPSG\",\"32617\"]"));
  EXPECT_THAT(facts->wkt, Not(HasSubstr("\n")));
}

TEST(Crs, FactsOfALocalGrid) {
  const auto facts = crs_facts("local");
  ASSERT_TRUE(facts.ok());
  EXPECT_EQ(facts->epsg, 0);
  EXPECT_EQ(facts->name, "local grid");
  EXPECT_EQ(facts->wkt, "undefined");
}

TEST(Crs, RefusesWhatIsNotMetresEastAndNorth) {
  expect_refused("EPSG:4326", "(WGS 84) is not projected");
  expect_refused("EPSG:4978", "is not projected");
  expect_refused("EPSG:5703", "is not projected");
  expect_refused("EPSG:2264", "(NAD83 / North Carolina (ftUS)) is in US survey foot");
  expect_refused("EPSG:2053", "axes that run west and south");
  expect_refused("EPSG:999999", "is not in PROJ's list");
}

TEST(Crs, RefusesWhatIsNoCode) {
  for (const std::string crs : {"", "EPSG:", "EPSG:32617x", "EPSG: 32617", "EPSG:-1", "EPSG:0", "EPSG:99999999999",
                                "epsg:32617", "32617", "Local", "+proj=utm +zone=17"}) {
    expect_refused(crs, "is no coordinate system; legal: \"EPSG:<code>\"");
  }
}

// Reference: cs2cs of PROJ 9.1.1 (cs2cs EPSG:4326 EPSG:32617); GeoConvert of GeographicLib gives the same to 0.1 mm.
TEST(Crs, LonLatToUtm) {
  const Point ground = ground_of({-81.4, 39.74}, "EPSG:32617");
  EXPECT_NEAR(ground.x, 465726.9243, 1e-4);
  EXPECT_NEAR(ground.y, 4398976.8951, 1e-4);
  const Point back = lonlat_of({465726.9243, 4398976.8951}, "EPSG:32617");
  EXPECT_NEAR(back.x, -81.4, 2e-9);
  EXPECT_NEAR(back.y, 39.74, 2e-9);
}

// Reference: the same program the other way, on the central meridian, where x is the false easting of 500 km.
TEST(Crs, UtmToLonLat) {
  const Point lonlat = lonlat_of({500000, 4400000}, "EPSG:32617");
  EXPECT_NEAR(lonlat.x, -81, 1e-9);
  EXPECT_NEAR(lonlat.y, 39.749907519, 1e-9);
}

// New Zealand Transverse Mercator 2000 names northing first. LINZS25002: origin 0 S, 173 E, false easting 1,600,000 m, false
// northing 10,000,000 m; so a place on 173 E has x = 1,600,000 and y below 10,000,000.
TEST(Crs, NorthingFirstComesOutEastFirst) {
  const Point ground = ground_of({173, -41}, "EPSG:2193");
  EXPECT_NEAR(ground.x, 1600000, 1e-3);
  EXPECT_GT(ground.y, 5e6);
  EXPECT_LT(ground.y, 6e6);
  const Point to_the_east = ground_of({173.1, -41}, "EPSG:2193");
  EXPECT_GT(to_the_east.x, ground.x + 8000);
  const Point back = lonlat_of(ground, "EPSG:2193");
  EXPECT_NEAR(back.x, 173, 1e-8);
  EXPECT_NEAR(back.y, -41, 1e-8);
}

TEST(Crs, HolesAndPartsKeepTheirPlaces) {
  const auto square = [](double lon, double size) {
    return Ring{{lon, 39.7}, {lon + size, 39.7}, {lon + size, 39.7 + size}, {lon, 39.7 + size}};
  };
  const auto ground =
      lonlat_to_ground({{square(-81, 0.02), {square(-80.999, 0.001)}}, {square(-80, 0.01), {}}}, "EPSG:32617");
  ASSERT_TRUE(ground.ok());
  ASSERT_THAT(*ground, SizeIs(2));
  ASSERT_THAT((*ground)[0].holes, SizeIs(1));
  EXPECT_THAT((*ground)[0].holes[0], SizeIs(4));
  EXPECT_NEAR((*ground)[0].outer[0].x, 500000, 1e-3);
  EXPECT_GT((*ground)[1].outer[0].x, 580000);
}

TEST(Crs, ThereAndBack) {
  TestRandom random = TestRandom::of_this_run();
  for (int i = 0; i < rounds(50); ++i) {
    const Point lonlat{random.real(-86.9, -75.1), random.real(0, 84)};
    const Point again = lonlat_of(ground_of(lonlat, "EPSG:32617"), "EPSG:32617");
    EXPECT_NEAR(again.x, lonlat.x, 1e-8) << lonlat.y;
    EXPECT_NEAR(again.y, lonlat.y, 1e-8) << lonlat.x;
  }
}

TEST(Crs, ALocalGridHasNoLongitude) {
  const auto ground = lonlat_to_ground({{{{-81, 39}, {-80, 39}, {-80, 40}}, {}}}, "local");
  ASSERT_FALSE(ground.ok());
  EXPECT_THAT(ground.error().lines, ElementsAre(HasSubstr("crs: \"local\" is a grid of your own")));
  EXPECT_FALSE(ground_to_lonlat({0, 0}, "local").ok());
}

TEST(Crs, RefusesPlacesThatTheSystemCannotHold) {
  const auto refusal = [](const Point& at, const std::string& crs) {
    const auto ground = lonlat_to_ground({{{at, {at.x + 1e-3, at.y}, {at.x, at.y + 1e-3}}, {}}}, crs);
    return ground.ok() ? std::vector<std::string>{} : ground.error().lines;
  };
  EXPECT_THAT(
      refusal({39.74, -81.4}, "EPSG:32617"),
      ElementsAre("crs: \"EPSG:32617\" does not hold longitude, latitude 39.74, -81.4; it is for longitude -84 to -78, "
                  "latitude 0 to 84"));
  EXPECT_THAT(refusal({0, 0}, "EPSG:32617"), SizeIs(1));
  EXPECT_THAT(refusal({-81, 95}, "EPSG:32617"), SizeIs(1));
  EXPECT_THAT(refusal({-86.9, 39}, "EPSG:32617"), testing::IsEmpty()) << "in the next zone, 2.9 degrees over the edge";
  EXPECT_THAT(refusal({-87.1, 39}, "EPSG:32617"), SizeIs(1));
  EXPECT_FALSE(ground_to_lonlat({1e8, 1e8}, "EPSG:32617").ok());
  EXPECT_FALSE(ground_to_lonlat({std::nan(""), 0}, "EPSG:32617").ok());
}

// UTM zone 1 begins at 180 W (NIMA TM 8358.2): a site just over the line is at +179.9.
TEST(Crs, AcrossTheAntimeridian) {
  const Point west = ground_of({179.99, 10}, "EPSG:32601");
  const Point east = ground_of({-179.99, 10}, "EPSG:32601");
  EXPECT_NEAR(east.x - west.x, 0.02 * 111320 * std::cos(10 * 3.14159265358979 / 180), 10);
}

}  // namespace
}  // namespace nearpit
