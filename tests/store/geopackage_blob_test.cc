#include "store/geopackage_blob.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <string_view>

namespace nearpit {
namespace {

using store::multipolygon_blob;
using store::point_blob;

std::string hex(std::string_view bytes) {
  std::string out;
  for (const char c : bytes) {
    const auto value = static_cast<unsigned char>(c);
    out += "0123456789abcdef"[value >> 4];
    out += "0123456789abcdef"[value & 15];
  }
  return out;
}

// Derived by hand from OGC 12-128r17 table 5 (header) and OGC 06-103r4 clause 8 (WKB); doubles by IEEE 754: 1 = 3ff0…, 2 = 4000…, -4 = c010….
TEST(GeopackageBlob, PointByTheStandard) {
  EXPECT_EQ(hex(point_blob({1, 2}, 32617)),
            "4750"
            "00"
            "01"
            "697f0000"
            "01"
            "01000000"
            "000000000000f03f"
            "0000000000000040");
  EXPECT_EQ(hex(point_blob({-4, 0}, -1)),
            "4750"
            "00"
            "01"
            "ffffffff"
            "01"
            "01000000"
            "00000000000010c0"
            "0000000000000000");
}

TEST(GeopackageBlob, PolygonByTheStandard) {
  const std::string one = "000000000000f03f";
  const std::string two = "0000000000000040";
  const std::string zero = "0000000000000000";
  // A triangle given clockwise: (0,0), (0,2), (1,0).
  const std::string expected =
      "4750"
      "00"
      "03"
      "ffffffff" +
      zero + one + zero + two +  // minx maxx miny maxy
      "01"
      "06000000"
      "01000000"
      "01"
      "03000000"
      "01000000"
      "04000000" +  // one polygon, one ring, four points
      zero +
      zero + one + zero + zero + two + zero + zero;  // counter-clockwise from the lowest
  EXPECT_EQ(hex(multipolygon_blob({{{{0, 0}, {0, 2}, {1, 0}}, {}}}, -1)), expected);
}

TEST(GeopackageBlob, TheSameGroundGivesTheSameBytes) {
  const Ring outer{{500000, 4400000}, {500100, 4400000}, {500100, 4400050}, {500000, 4400050}};
  const Ring first_hole{{500010, 4400010}, {500020, 4400010}, {500020, 4400020}, {500010, 4400020}};
  const Ring second_hole{{500030, 4400010}, {500040, 4400010}, {500035, 4400020}};
  const Polygon island{{{500200, 4400000}, {500201, 4400000}, {500200, 4400001}}, {}};
  const std::string bytes = multipolygon_blob({{outer, {first_hole, second_hole}}, island}, 32617);
  for (std::size_t turn = 0; turn < outer.size(); ++turn) {
    for (const bool reversed : {false, true}) {
      Ring ring = outer;
      std::rotate(ring.begin(), ring.begin() + static_cast<std::ptrdiff_t>(turn), ring.end());
      Ring hole = second_hole;
      if (reversed) std::reverse(ring.begin(), ring.end());
      if (reversed) std::reverse(hole.begin(), hole.end());
      EXPECT_EQ(multipolygon_blob({island, {ring, {hole, first_hole}}}, 32617), bytes);
    }
  }
  EXPECT_NE(multipolygon_blob({{outer, {first_hole}}, island}, 32617), bytes);
}

}  // namespace
}  // namespace nearpit
