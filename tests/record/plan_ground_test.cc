#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <memory>
#include <string>

#include "record/plan.h"

namespace nearpit {
namespace {

MultiPolygon box(double left, double low, double right, double high) {
  return {{{{left, low}, {right, low}, {right, high}, {left, high}}, {}}};
}

// A frame of 20 columns and 15 rows.
Plan example() {
  Plan plan;
  plan.survey = "Cinder Brook terrace";
  plan.crs = "local";
  plan.boundary = box(0, 0, 200, 150);
  plan.spacing_m = 10;
  plan.origin = Point{5, 5};
  plan.pit_size_m = 0.5;
  plan.finds = {"flaked stone"};
  plan.positive = {{0}, 2};
  plan.initial.count["all"] = 40;
  plan.initial.seed = 7;
  return plan;
}

Plan listed(std::vector<std::string> pits) {
  Plan plan = example();
  plan.initial = {};
  plan.initial.listed = true;
  plan.initial.pits = std::move(pits);
  return plan;
}

std::unique_ptr<SurveyGround> made(const Plan& plan) {
  auto ground = make_ground(plan, "plan.json", nullptr);
  EXPECT_TRUE(ground.ok()) << ground.error().one_line();
  return ground ? std::move(ground).value() : nullptr;
}

std::vector<std::string> refusal(const Plan& plan, const std::vector<std::vector<UnitId>>* drawn = nullptr) {
  const auto ground = make_ground(plan, "plan.json", drawn);
  return ground ? std::vector<std::string>() : ground.error().lines;
}

TEST(PlanGround, HoldsWhatThePlanSays) {
  Plan plan = example();
  plan.neighbours = NeighbourRule::kFour;
  plan.ring_limit = 3;
  const auto ground = made(plan);
  ASSERT_TRUE(ground);
  EXPECT_EQ(ground->frame.size(), 300);
  EXPECT_EQ(ground->areas.list.size(), 1u);
  EXPECT_EQ(ground->areas.list[0].name, "all");
  EXPECT_EQ(ground->sample.nodes, 40);
  EXPECT_EQ(ground->neighbours, NeighbourRule::kFour);
  EXPECT_EQ(ground->ring_limit, 3);
  EXPECT_EQ(ground->positive.at_least, 2u);
}

TEST(PlanGround, TheSameSeedGivesTheSameSample) {
  Plan plan = example();
  const auto first = made(plan);
  EXPECT_EQ(made(plan)->sample.drawn, first->sample.drawn);
  plan.initial.seed = 8;
  EXPECT_NE(made(plan)->sample.drawn, first->sample.drawn);
}

TEST(PlanGround, AreasCountByName) {
  Plan plan = example();
  plan.areas = {{"west", box(0, 0, 100, 150)}, {"east", box(100, 0, 200, 150)}};
  plan.initial.count = {{"east", 3}, {"west", 5}};
  const auto ground = made(plan);
  ASSERT_TRUE(ground);
  EXPECT_EQ(ground->sample.drawn[0].size(), 5u);
  EXPECT_EQ(ground->sample.drawn[1].size(), 3u);
}

TEST(PlanGround, OriginLeftOpenIsTheLowerLeftCorner) {
  Plan plan = example();
  plan.origin.reset();
  const auto ground = made(plan);
  ASSERT_TRUE(ground);
  EXPECT_EQ(ground->frame.lattice().origin, (Point{0, 0}));
  EXPECT_EQ(ground->frame.size(), 21 * 16);
}

TEST(PlanGround, RandomOriginMovesInsideOneCellAndComesFromTheSeed) {
  Plan plan = example();
  plan.origin.reset();
  plan.random_origin = true;
  plan.initial.count["all"] = 5;
  std::vector<Point> origins;
  for (plan.initial.seed = 0; plan.initial.seed < 20; ++plan.initial.seed) {
    const auto ground = made(plan);
    ASSERT_TRUE(ground);
    const Point origin = ground->frame.lattice().origin;
    EXPECT_TRUE(origin.x > -10 && origin.x < 10 && origin.y > -10 && origin.y < 10) << origin.x << " " << origin.y;
    EXPECT_EQ(made(plan)->frame.lattice().origin, origin);
    for (const Point& other : origins)
      EXPECT_NE(other, origin);
    origins.push_back(origin);
  }
}

TEST(PlanGround, ListedPitsStandForTheirUnits) {
  Plan plan = listed({"T1-3", "t2-1", "N140 E190"});
  const auto pits = made(plan);
  ASSERT_TRUE(pits);
  EXPECT_EQ(pits->sample.nodes, 3);
  EXPECT_TRUE(pits->sample.holds[static_cast<std::size_t>(pits->frame.find({15, 20}))]);
  plan.initial.draw = DrawKind::kTransects;
  EXPECT_EQ(made(plan)->sample.nodes, 60);
}

TEST(PlanGround, ListedLabelsThatAreWrongAreNamed) {
  EXPECT_THAT(
      refusal(listed({"T1-3", "T99-1", "J1", "T1-3", "n0 e20"})),
      testing::ElementsAre(
          "plan.json: initial.pits.1: \"T99-1\" lies outside the boundary; legal: labels of pits inside the boundary, "
          "such as \"T1-1\"",
          "plan.json: initial.pits.2: \"J1\" is no label of this lattice; legal: labels of pits inside the boundary, "
          "such as \"T1-1\"",
          "plan.json: initial.pits.3: \"T1-3\" is the same pit as \"T1-3\"; legal: each pit once",
          "plan.json: initial.pits.4: \"n0 e20\" is the same pit as \"T1-3\"; legal: each pit once"));
}

TEST(PlanGround, WhatTheGroundRefusesBeginsWithFileAndField) {
  Plan plan = example();
  plan.initial.count["all"] = 301;
  EXPECT_THAT(refusal(plan), testing::ElementsAre(testing::StartsWith("plan.json: initial.count")));
  plan = example();
  plan.boundary = box(1, 1, 4, 4);
  EXPECT_THAT(refusal(plan), testing::ElementsAre(testing::StartsWith("plan.json: boundary: ")));
  plan = example();
  plan.origin = Point{25, 5};
  EXPECT_THAT(refusal(plan), testing::ElementsAre(testing::StartsWith("plan.json: lattice.origin: ")));
  plan = example();
  plan.areas = {{"west", box(0, 0, 100, 150)}, {"east", box(120, 0, 200, 150)}};
  plan.initial.count = {{"east", 3}, {"west", 5}};
  EXPECT_THAT(refusal(plan), testing::ElementsAre(testing::StartsWith("plan.json: strata: ")));
}

TEST(PlanGround, TheStoredSampleIsTheAuthority) {
  Plan plan = example();
  plan.initial.count["all"] = 3;
  const std::vector<std::vector<UnitId>> drawn{{5, 6, 299}};
  const auto ground = make_ground(plan, "survey.gpkg", &drawn);
  ASSERT_TRUE(ground.ok());
  EXPECT_EQ((*ground)->sample.drawn, drawn);
  EXPECT_EQ((*ground)->sample.nodes, 3);
}

TEST(PlanGround, ADamagedStoredSampleIsRefused) {
  Plan plan = example();
  plan.initial.count["all"] = 2;
  using Drawn = std::vector<std::vector<UnitId>>;
  for (const Drawn& drawn :
       {Drawn{}, Drawn{{1, 2}, {3}}, Drawn{{}}, Drawn{{1}}, Drawn{{2, 1}}, Drawn{{1, 1}}, Drawn{{1, 300}}}) {
    const auto ground = make_ground(plan, "survey.gpkg", &drawn);
    ASSERT_FALSE(ground.ok()) << testing::PrintToString(drawn);
    EXPECT_EQ(ground.error().kind, ErrorKind::kDamaged);
    EXPECT_THAT(ground.error().one_line(), testing::StartsWith("survey.gpkg: the stored first sample "));
  }
}

TEST(PlanGround, LabelsCountFromTheDatumOrElseFromTheFirstPit) {
  Plan plan = example();
  plan.labels = LabelKind::kGrid;
  const auto ground = made(plan);
  EXPECT_EQ(labels_of(plan, ground->frame.lattice()).write({1, 1}), "N0 E0");
  plan.label_datum = Point{0, 10};
  EXPECT_EQ(labels_of(plan, ground->frame.lattice()).write({1, 1}), "S5 E5");
}

}  // namespace
}  // namespace nearpit
