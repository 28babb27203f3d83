#include "survey/dig_list.h"

#include <gtest/gtest.h>

#include <set>

#include "support/drawn_survey.h"

// Drawings keep their lines.
// clang-format off
namespace nearpit {
namespace {

Survey set(Survey survey, std::int32_t row, std::int32_t column, const PitRecord& record) {
  const NodeId id = node_at(survey, row, column);
  survey.set_pit(id, {head_of(record, 100)});
  return survey;
}

Picture standing(const Picture& picture, const DrawnRules& rules = {}) {
  return standing_of(drawn_survey(picture, rules).dig_list());
}

constexpr Confinement kBlocksOfThreeByTwo{Confinement::Kind::kBlock, 3, 2};

TEST(DigList, FirstSampleIsDueUntilRecorded) {
  EXPECT_EQ(standing({"o..o",
                      "....",
                      "=.Go"}),
            (Picture{"0..0",
                     "....",
                     "-.n0"}));
}

TEST(DigList, APositiveOpensItsRing) {
  EXPECT_EQ(standing({".....",
                      "..@..",
                      "..-..",
                      "....."}),
            (Picture{".111.",
                     ".1#1.",
                     ".1-1.",
                     "....."}));
}

TEST(DigList, NothingWrapsRoundTheEdge) {
  EXPECT_EQ(standing({"@...",
                      "....",
                      ".. @"}),
            (Picture{"#1..",
                     "1111",
                     ".. #"}));
}

TEST(DigList, RingsCountStepsThroughPositives) {
  EXPECT_EQ(standing({".......",
                      ".@##...",
                      ".-....."}),
            (Picture{"11123..",
                     "1###3..",
                     "1-123.."}));
}

TEST(DigList, TheNearerOfTwoGivesTheRing) {
  EXPECT_EQ(standing({".........",
                      ".@###.@..",
                      "........."}, {.neighbours = NeighbourRule::kFour}),
            (Picture{".1234.1..",
                     "1####1#1.",
                     ".1234.1.."}));
}

TEST(DigList, OnlyTheDesignsPositivesOpen) {
  const Survey before = drawn_survey({"@.#.."}, {.neighbours = NeighbourRule::kFour});
  EXPECT_EQ(standing_of(before.dig_list()), (Picture{"#1j.."}));
  EXPECT_EQ(standing_of(set(drawn_survey({"@.#.."}, {.neighbours = NeighbourRule::kFour}), 1, 2, dug_record(3)).dig_list()),
            (Picture{"###3."}));
}

TEST(DigList, WhatAPositiveOpenedIsNoLongerRequiredOnceItIsNone) {
  const Picture picture{".-...",
                        ".@#..",
                        "....-"};
  EXPECT_EQ(standing(picture), (Picture{"1-12.",
                                        "1##2.",
                                        "1112j"}));
  EXPECT_EQ(standing_of(set(drawn_survey(picture), 2, 2, dug_record(0)).dig_list()), (Picture{".j...",
                                                                                              ".-j..",
                                                                                              "....j"}));
}

// Positives in a circle do not hold one another up.
TEST(DigList, ACircleFallsWithWhatHeldIt) {
  const Picture picture{"@###",
                        "#..#",
                        "####"};
  const DrawnRules four{.neighbours = NeighbourRule::kFour};
  EXPECT_EQ(standing(picture, four), (Picture{"####",
                                              "#23#",
                                              "####"}));
  EXPECT_EQ(standing_of(set(drawn_survey(picture, four), 1, 1, withdrawn_record()).dig_list()), (Picture{"0jjj",
                                                                                                        "j..j",
                                                                                                        "jjjj"}));
}

TEST(DigList, ACutCircleIsReachedTheOtherWayRound) {
  const Picture picture{"@####",
                        "#   #",
                        "####."};
  const DrawnRules four{.neighbours = NeighbourRule::kFour};
  Survey survey = drawn_survey(picture, four);
  EXPECT_EQ(survey.dig_list().ring(node_at(survey, 2, 5)), 5);
  survey.set_pit(node_at(survey, 1, 3), {head_of(dug_record(0), 9)});
  EXPECT_EQ(survey.dig_list().ring(node_at(survey, 1, 3)), 2);
  EXPECT_FALSE(survey.dig_list().in_design(node_at(survey, 1, 4)));
  survey.set_pit(node_at(survey, 3, 5), {head_of(dug_record(1), 10)});
  EXPECT_EQ(survey.dig_list().ring(node_at(survey, 3, 5)), 6);
  EXPECT_EQ(survey.dig_list().ring(node_at(survey, 2, 5)), 7);
  EXPECT_EQ(survey.dig_list().ring(node_at(survey, 1, 4)), 9);
}

TEST(DigList, ALostSupportGivesWayToTheNextBest) {
  const Picture picture{"@.##@"};
  const DrawnRules four{.neighbours = NeighbourRule::kFour};
  EXPECT_EQ(standing(picture, four), (Picture{"#1###"}));
  Survey survey = drawn_survey(picture, four);
  EXPECT_EQ(survey.dig_list().ring(node_at(survey, 1, 2)), 1);
  survey.set_pit(node_at(survey, 1, 1), {head_of(dug_record(0), 9)});
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"-3###"}));
}

TEST(DigList, NotDugStopsTheRing) {
  EXPECT_EQ(standing({"@g.."}, {.neighbours = NeighbourRule::kFour}), (Picture{"#n.."}));
  EXPECT_EQ(standing({"@a.."}, {.neighbours = NeighbourRule::kFour}), (Picture{"#n.."}));
}

TEST(DigList, WithdrawnIsDueAgain) {
  EXPECT_EQ(standing({"W..@w"}, {.neighbours = NeighbourRule::kFour}), (Picture{"0.1#1"}));
}

TEST(DigList, TheRingLimitKeepsFartherRingsOff) {
  const Picture picture{"@##.."};
  DrawnRules rules{.neighbours = NeighbourRule::kFour};
  rules.ring_limit = 3;
  EXPECT_EQ(standing(picture, rules), (Picture{"###3."}));
  EXPECT_FALSE(drawn_survey(picture, rules).dig_list().truncated());
  rules.ring_limit = 2;
  EXPECT_EQ(standing(picture, rules), (Picture{"###.."}));
  EXPECT_TRUE(drawn_survey(picture, rules).dig_list().truncated());
  rules.ring_limit = 1;
  EXPECT_EQ(standing(picture, rules), (Picture{"##j.."}));
  EXPECT_TRUE(drawn_survey(picture, rules).dig_list().truncated());
}

// A limit that withholds nothing truncates nothing.
TEST(DigList, TruncatedOnlyWhenAPitIsKeptOff) {
  DrawnRules rules{.neighbours = NeighbourRule::kFour};
  rules.ring_limit = 1;
  EXPECT_FALSE(drawn_survey({"@-..@#"}, rules).dig_list().truncated());
  EXPECT_FALSE(drawn_survey({"@#"}, rules).dig_list().truncated());
  EXPECT_FALSE(drawn_survey({"o..##.."}, rules).dig_list().truncated());
}

TEST(DigList, BlocksConfineWhatAPositiveOpens) {
  EXPECT_EQ(standing({"......",
                      "..@...",
                      "......"}, {.confinement = kBlocksOfThreeByTwo}),
            (Picture{".11...",
                     ".1#...",
                     "......"}));
}

TEST(DigList, AreasConfineWhatAPositiveOpens) {
  EXPECT_EQ(standing({"....",
                      ".@..",
                      "...."}, {.confinement = {Confinement::Kind::kArea}, .areas = {"AAAA",
                                                                                     "AAAB",
                                                                                     "AABB"}}),
            (Picture{"111.",
                     "1#1.",
                     "11.."}));
}

TEST(DigList, TwoStepsOnEachArm) {
  EXPECT_EQ(standing({".....",
                      ".....",
                      "..@..",
                      ".....",
                      "....."}, {.neighbours = NeighbourRule::kFourByTwo}),
            (Picture{"..1..",
                     "..1..",
                     "11#11",
                     "..1..",
                     "..1.."}));
}

// Even rows lie half a spacing to the right.
TEST(DigList, SixNeighbours) {
  for (const LatticeKind kind : {LatticeKind::kStaggered, LatticeKind::kTriangular}) {
    EXPECT_EQ(standing({".....",
                        "..@..",
                        ".....",
                        "....."}, {.kind = kind, .neighbours = NeighbourRule::kSix}),
              (Picture{"..11.",
                       ".1#1.",
                       "..11.",
                       "....."}));
    EXPECT_EQ(standing({".....",
                        ".....",
                        "..@..",
                        "....."}, {.kind = kind, .neighbours = NeighbourRule::kSix}),
              (Picture{".....",
                       ".11..",
                       ".1#1.",
                       ".11.."}));
  }
}

TEST(DigList, ClosedAndHaltedAreNotDue) {
  const std::unique_ptr<const SurveyGround> ground = drawn_ground({"ooo"}, {});
  DigList list(*ground);
  std::vector<NodeId> changed;
  list.add_closed(0, ReasonClass::kGround, 1, &changed);
  list.add_halt(1, 1, &changed);
  EXPECT_EQ(standing_of(list), (Picture{"ch0"}));
  EXPECT_EQ(std::set<NodeId>(changed.begin(), changed.end()), (std::set<NodeId>{0, 1}));
  EXPECT_TRUE(list.not_dug(0, ReasonClass::kGround));
  EXPECT_FALSE(list.not_dug(0, ReasonClass::kAccess));
  list.add_closed(0, ReasonClass::kAccess, 1, &changed);
  EXPECT_FALSE(list.not_dug(0, ReasonClass::kGround));
  EXPECT_TRUE(list.not_dug(0, ReasonClass::kAccess));
  // Two closed areas hold it: reopening one is not enough.
  list.add_closed(0, ReasonClass::kGround, -1, &changed);
  EXPECT_EQ(standing_of(list), (Picture{"ch0"}));
  list.add_closed(0, ReasonClass::kAccess, -1, &changed);
  list.add_halt(1, -1, &changed);
  EXPECT_EQ(standing_of(list), (Picture{"000"}));
}

// A record in a closed area is a record.
TEST(DigList, AClosedAreaSaysNothingOfARecordedPit) {
  const std::unique_ptr<const SurveyGround> ground = drawn_ground({"ooo"}, {});
  DigList list(*ground);
  std::vector<NodeId> changed;
  list.add_closed(1, ReasonClass::kAccess, 1, &changed);
  list.set_state(1, PitState::kPositive, &changed);
  EXPECT_FALSE(list.not_dug(1, ReasonClass::kAccess));
  EXPECT_EQ(standing_of(list), (Picture{"0#0"}));
}

TEST(DigList, ClosedWinsOverHalted) {
  const std::unique_ptr<const SurveyGround> ground = drawn_ground({"o"}, {});
  DigList list(*ground);
  std::vector<NodeId> changed;
  list.add_halt(0, 1, &changed);
  list.add_closed(0, ReasonClass::kGround, 1, &changed);
  EXPECT_EQ(standing_of(list), (Picture{"c"}));
  EXPECT_FALSE(list.halted(0));
  EXPECT_TRUE(list.not_dug(0, ReasonClass::kGround));
  list.add_closed(0, ReasonClass::kGround, -1, &changed);
  EXPECT_EQ(standing_of(list), (Picture{"h"}));
}

TEST(DigList, ManyClosedAreasOverOnePitAreCounted) {
  const std::unique_ptr<const SurveyGround> ground = drawn_ground({"oo"}, {});
  DigList list(*ground);
  std::vector<NodeId> changed;
  for (int area = 0; area < 300; ++area) {
    list.add_closed(0, ReasonClass::kGround, 1, &changed);
    list.add_halt(1, 1, &changed);
    ASSERT_TRUE(list.closed(0)) << area;
    ASSERT_TRUE(list.halted(1)) << area;
  }
  for (int area = 0; area < 300; ++area) {
    ASSERT_FALSE(list.due(0) || list.due(1)) << area;
    list.add_closed(0, ReasonClass::kGround, -1, &changed);
    list.add_halt(1, -1, &changed);
  }
  EXPECT_TRUE(list.due(0) && list.due(1));
}

TEST(DigList, OpenedByNamesTheDesignsPositivesAscending) {
  const Survey survey = drawn_survey({"@.@.#",
                                      ".....",
                                      ".@..."});
  EXPECT_EQ(survey.dig_list().opened_by(node_at(survey, 2, 2)),
            (std::vector<NodeId>{node_at(survey, 1, 1), node_at(survey, 1, 3), node_at(survey, 3, 2)}));
  EXPECT_EQ(survey.dig_list().opened_by(node_at(survey, 2, 4)), (std::vector<NodeId>{node_at(survey, 1, 3)}));
  EXPECT_TRUE(survey.dig_list().opened_by(node_at(survey, 3, 5)).empty());
}

TEST(DigList, OneMorePitTellsOfItsNeighbourhoodOnly) {
  Picture picture(100, std::string(100, '.'));
  picture[50][50] = 'o';
  picture[10][10] = '@';
  const std::unique_ptr<const SurveyGround> ground = drawn_ground(picture, {});
  DigList list(*ground);
  const NodeId id = ground->frame.find({51, 51});
  for (const PitState state : {PitState::kPositive, PitState::kNegative, PitState::kPositive, PitState::kNoRecord}) {
    std::vector<NodeId> changed;
    list.set_state(id, state, &changed);
    const std::set<NodeId> told(changed.begin(), changed.end());
    EXPECT_EQ(told.count(id), 1U);
    EXPECT_LE(told.size(), 9U);
  }
}

}  // namespace
}  // namespace nearpit
