#include "record/plan.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <numbers>
#include <string>

#include "record/schema_check.h"

namespace nearpit {
namespace {

// Puts members between the required ones and "initial".
std::string plan_text(const std::string& options, const std::string& initial,
                      const std::string& lattice = R"({"kind":"square","spacing_m":10})") {
  return R"({"survey":"Cinder Brook terrace","crs":"local",
"boundary":{"type":"Polygon","coordinates":[[[0,0],[200,0],[200,150],[0,150],[0,0]]]},
"lattice":)" +
         lattice + R"(,"pit":{"shape":"square","size_m":0.5},"finds":["flaked stone","pottery","modern"],
"positive":{"finds":["pottery","flaked stone"],"at_least":2},)" +
         options + "\"initial\":" + initial + "}";
}

constexpr const char* kPits = R"({"draw":"pits","count":{"all":40},"seed":7})";

// Reads a plan that must be good, by the schema too.
Plan read(const std::string& text) {
  auto plan = read_plan(text, "plan.json");
  EXPECT_TRUE(plan.ok()) << plan.error().lines[0];
  SchemaCheck schema(file_json("schema/plan.schema.json"));
  EXPECT_TRUE(schema.accepts(nlohmann::json::parse(text))) << text;
  return plan ? std::move(plan).value() : Plan{};
}

TEST(Plan, WhatIsLeftOutHasItsDefault) {
  const Plan plan = read(plan_text("", kPits));
  EXPECT_EQ(plan.survey, "Cinder Brook terrace");
  EXPECT_EQ(plan.crs, "local");
  EXPECT_EQ(plan.boundary.size(), 1u);
  EXPECT_EQ(plan.lattice, LatticeKind::kSquare);
  EXPECT_EQ(plan.spacing_m, 10);
  EXPECT_EQ(plan.bearing_deg, 90);
  EXPECT_FALSE(plan.origin);
  EXPECT_FALSE(plan.random_origin);
  EXPECT_EQ(plan.neighbours, NeighbourRule::kEight);
  EXPECT_EQ(plan.finds, (std::vector<std::string>{"flaked stone", "pottery", "modern"}));
  EXPECT_EQ(plan.positive.finds, (std::vector<std::size_t>{1, 0}));
  EXPECT_EQ(plan.positive.at_least, 2u);
  EXPECT_TRUE(plan.areas.empty());
  EXPECT_FALSE(plan.ring_limit);
  EXPECT_EQ(plan.confinement.kind, Confinement::Kind::kNone);
  EXPECT_FALSE(plan.nearest_order);
  EXPECT_EQ(plan.labels, LabelKind::kTransect);
  EXPECT_EQ(plan.confidence, 0.95);
  EXPECT_EQ(plan.max_move_m, 2);
  EXPECT_EQ(plan.depth_limit_m, 1.2);
  EXPECT_EQ(plan.stop_distance_m, 30);
  EXPECT_EQ(plan.declination_deg, 0);
  EXPECT_EQ(plan.time_zone, "UTC");
}

TEST(Plan, ReadsEveryOption) {
  const Plan plan = read(plan_text(
      R"("neighbours":"4x2","ring_limit":3,"order":"nearest","labels":{"kind":"grid","datum":[100,-200.5]},
"confidence":0.9,"max_move_m":0,"depth_limit_m":1.5,"stop_distance_m":50,"declination_deg":-7.5,
"time_zone":"America/New_York","crews":["A","B"],"contacts":["the office",{"name":"county","phone":"0"}],"permits":[],
"record":{"ask":["bag"],"require":["depth_cm","stop"]},
"tie":[{"at":[0,0],"lonlat":[-81.5,32.1]},{"at":[100,0],"lonlat":[-81.4,32.1]}],
"expect":{"site":{"shape":"ellipse","length_m":30,"width_m":30,"bearing_deg":null},"finds_per_m2":2,
"clustering":{"model":"negative_binomial","k":0.5},"sites_per_km2":1,"recovery":1,"minutes_per_pit":20,
"walk_m_per_min":40,"diggers":4,"days":2.5,"hours_per_day":6},)",
      kPits, R"({"kind":"square","spacing_m":0.5,"origin":"random","transect_bearing_deg":359.9})"));
  EXPECT_EQ(plan.neighbours, NeighbourRule::kFourByTwo);
  EXPECT_EQ(plan.ring_limit, 3);
  EXPECT_TRUE(plan.nearest_order);
  EXPECT_EQ(plan.labels, LabelKind::kGrid);
  EXPECT_EQ(plan.label_datum, (Point{100, -200.5}));
  EXPECT_EQ(plan.confidence, 0.9);
  EXPECT_EQ(plan.max_move_m, 0);
  EXPECT_EQ(plan.depth_limit_m, 1.5);
  EXPECT_EQ(plan.stop_distance_m, 50);
  EXPECT_EQ(plan.declination_deg, -7.5);
  EXPECT_EQ(plan.time_zone, "America/New_York");
  EXPECT_EQ(plan.crews, (std::vector<std::string>{"A", "B"}));
  EXPECT_EQ(plan.require, (std::vector<std::string>{"depth_cm", "stop"}));
  EXPECT_TRUE(plan.random_origin);
  EXPECT_EQ(plan.bearing_deg, 359.9);
}

TEST(Plan, ReadsEveryKindOfFirstSample) {
  Plan plan = read(plan_text("", kPits));
  EXPECT_EQ(plan.initial.draw, DrawKind::kPits);
  EXPECT_EQ(plan.initial.count.at("all"), 40u);
  EXPECT_EQ(plan.initial.seed, 7u);
  plan = read(plan_text("", R"({"draw":"transects","count":{"all":5},"seed":9223372036854775807})"));
  EXPECT_EQ(plan.initial.draw, DrawKind::kTransects);
  EXPECT_EQ(plan.initial.seed, 9223372036854775807u);
  plan = read(plan_text("", R"({"draw":"systematic","every":3,"count":{"all":2},"seed":0})"));
  EXPECT_EQ(plan.initial.draw, DrawKind::kSystematic);
  EXPECT_EQ(plan.initial.every, 3);
  plan = read(plan_text("", R"({"draw":"listed","as":"pits","pits":["T1-3","N0 E10"],"how":"dice\nand a map"})"));
  EXPECT_TRUE(plan.initial.listed);
  EXPECT_EQ(plan.initial.draw, DrawKind::kPits);
  EXPECT_EQ(plan.initial.pits, (std::vector<std::string>{"T1-3", "N0 E10"}));
  EXPECT_EQ(plan.initial.how, "dice\nand a map");
  plan = read(plan_text("", R"({"draw":"listed","as":"systematic","every":4,"pits":["T1-3"],"how":"dice"})"));
  EXPECT_EQ(plan.initial.every, 4);
  EXPECT_EQ(plan.initial.draw, DrawKind::kSystematic);
}

TEST(Plan, IntervalAndBetweenSaySpacingAndEvery) {
  const auto initial = [](const char* interval, const char* between) {
    return R"({"draw":"systematic","interval_m":)" + std::string(interval) + R"(,"between":)" + between +
           R"(,"count":{"all":2},"seed":7})";
  };
  Plan plan = read(plan_text("", initial("30", "15"), R"({"kind":"square"})"));
  EXPECT_EQ(plan.spacing_m, 15);
  EXPECT_EQ(plan.initial.every, 2);
  // 2.1 / 0.7 and 2.4 / 0.8 are not 3 in binary.
  plan = read(plan_text("", initial("2.1", "0.7"), R"({"kind":"triangular"})"));
  EXPECT_EQ(plan.initial.every, 3);
  plan = read(plan_text("", initial("2.4", "0.8"), R"({"kind":"triangular"})"));
  EXPECT_EQ(plan.initial.every, 3);
}

TEST(Plan, NeighboursGoWithTheLattice) {
  const auto rule = [](const char* kind, const std::string& neighbours) {
    return read(plan_text(neighbours, kPits, R"({"kind":")" + std::string(kind) + R"(","spacing_m":10})")).neighbours;
  };
  EXPECT_EQ(rule("square", ""), NeighbourRule::kEight);
  EXPECT_EQ(rule("square", R"("neighbours":8,)"), NeighbourRule::kEight);
  EXPECT_EQ(rule("square", R"("neighbours":4,)"), NeighbourRule::kFour);
  EXPECT_EQ(rule("staggered", ""), NeighbourRule::kSix);
  EXPECT_EQ(rule("triangular", R"("neighbours":6,)"), NeighbourRule::kSix);
}

TEST(Plan, ReadsConfinement) {
  Plan plan = read(plan_text(R"("confine":"stratum",)", kPits));
  EXPECT_EQ(plan.confinement.kind, Confinement::Kind::kArea);
  plan = read(plan_text(R"("confine":{"block":[4,3]},)", kPits));
  EXPECT_EQ(plan.confinement.kind, Confinement::Kind::kBlock);
  EXPECT_EQ(plan.confinement.block_columns, 4);
  EXPECT_EQ(plan.confinement.block_rows, 3);
}

TEST(Plan, ReadsAreas) {
  const Plan plan = read(plan_text(
      R"("strata":[{"name":"terrace","boundary":{"type":"Polygon","coordinates":[[[0,0],[100,0],[100,150],[0,150],[0,0]]]}},
{"name":"slope","boundary":{"type":"Polygon","coordinates":[[[100,0],[200,0],[200,150],[100,150],[100,0]]]}}],)",
      R"({"draw":"pits","count":{"slope":3,"terrace":5},"seed":7})"));
  ASSERT_EQ(plan.areas.size(), 2u);
  EXPECT_EQ(plan.areas[1].name, "slope");
  EXPECT_EQ(plan.areas[1].boundary.size(), 1u);
  EXPECT_EQ(plan.initial.count.at("terrace"), 5u);
}

TEST(Plan, PitAreaFollowsItsShape) {
  Plan plan;
  plan.pit_size_m = 0.4;
  EXPECT_DOUBLE_EQ(plan.pit_area_m2(), 0.16);
  plan.pit_shape = PitShape::kRound;
  EXPECT_DOUBLE_EQ(plan.pit_area_m2(), std::numbers::pi * 0.04);
}

TEST(Plan, ABoundaryFileIsNamedAndPutInItsPlace) {
  std::string text = plan_text("", kPits);
  text.replace(text.find("\"local\""), 7, "\"EPSG:32617\"");
  const std::string polygon = text.substr(text.find("{\"type\""), text.find(",\n\"lattice\"") - text.find("{\"type\""));
  text.replace(text.find(polygon), polygon.size(), R"({"file":"edge.geojson"})");
  const Plan named = read(text);
  EXPECT_EQ(named.boundary_file, "edge.geojson");
  EXPECT_TRUE(named.boundary.empty());
  const MultiPolygon square{{{{0, 0}, {50, 0}, {50, 50}}, {}}};
  const std::string whole = with_boundary(text, square);
  const Plan plan = read(whole);
  EXPECT_EQ(plan.boundary_file, "");
  ASSERT_EQ(plan.boundary.size(), 1u);
  EXPECT_EQ(plan.boundary[0].outer, square[0].outer);
  EXPECT_EQ(plan.survey, named.survey);
  EXPECT_LT(whole.find("\"boundary\""), whole.find("\"lattice\"")) << "keys keep their order";
}

TEST(Plan, TakesAByteOrderMark) { EXPECT_TRUE(read_plan("\xEF\xBB\xBF" + plan_text("", kPits), "plan.json").ok()); }

}  // namespace
}  // namespace nearpit
