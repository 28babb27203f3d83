#include "survey/survey.h"

#include <gtest/gtest.h>

#include <algorithm>

#include "support/drawn_survey.h"

// Drawings keep their lines.
// clang-format off
namespace nearpit {
namespace {

bool told_of(const std::vector<NodeId>& changed, NodeId id) {
  return std::find(changed.begin(), changed.end(), id) != changed.end();
}

ClosedArea rows_closed(std::vector<std::int32_t> rows, NotDugReason reason) {
  ClosedArea area;
  area.name = "closed";
  area.reason = reason;
  area.rows = std::move(rows);
  return area;
}

ClosedArea box_closed(double x, double y, double width, double height, NotDugReason reason) {
  ClosedArea area;
  area.name = "closed";
  area.reason = reason;
  area.polygon = {{{{x, y}, {x + width, y}, {x + width, y + height}, {x, y + height}}, {}}};
  return area;
}

TEST(Survey, AFreshOneHasNoRecords) {
  const Survey survey = drawn_survey({"o.o"});
  EXPECT_TRUE(survey.pits().empty());
  EXPECT_TRUE(survey.off_grid_pits().empty());
  EXPECT_EQ(survey.pit(0), nullptr);
  EXPECT_EQ(survey.off_grid("J1"), nullptr);
  EXPECT_TRUE(survey.asked().empty());
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0.0"}));
}

TEST(Survey, ARecordChangesThePitAndWhatItOpens) {
  Survey survey = drawn_survey({"...",
                                ".o.",
                                "..."});
  const std::vector<NodeId> changed = survey.set_pit(4, {head_of(dug_record(1))});
  for (NodeId id = 0; id < 9; ++id) EXPECT_TRUE(told_of(changed, id)) << id;
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"111",
                                                     "1#1",
                                                     "111"}));
  ASSERT_NE(survey.pit(4), nullptr);
  EXPECT_EQ(survey.pit(4)->record(), dug_record(1));
}

TEST(Survey, LaterHeadsReplaceEarlierOnes) {
  Survey survey = drawn_survey({".@."});
  survey.set_pit(1, {head_of(dug_record(0), 7)});
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{".-."}));
  survey.set_pit(1, {head_of(withdrawn_record(), 8)});
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{".0."}));
  EXPECT_TRUE(survey.pit(1)->withdrawn());
  survey.set_pit(1, {head_of(not_dug_record(NotDugReason::kHazard), 9)});
  EXPECT_EQ(survey.dig_list().state(1), PitState::kNotDugAccess);
  survey.set_pit(1, {head_of(not_dug_record(NotDugReason::kSlope), 10)});
  EXPECT_EQ(survey.dig_list().state(1), PitState::kNotDugGround);
}

TEST(Survey, OfTwoHeadsThePositiveOpens) {
  Survey survey = drawn_survey({".o."});
  survey.set_pit(1, {head_of(dug_record(0), 9, "a"), head_of(dug_record(2), 3, "b")});
  EXPECT_EQ(survey.pit(1)->verdict.conflict, Conflict::kOutcome);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"1#1"}));
}

TEST(Survey, OffGridPitsOpenNothing) {
  Survey survey = drawn_survey({"o.."});
  PitRecord record = dug_record(5);
  record.place = Point{4, 4};
  record.chosen_by = ChosenBy::kJudgement;
  survey.set_off_grid("J1", {head_of(record)});
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0.."}));
  ASSERT_NE(survey.off_grid("J1"), nullptr);
  EXPECT_EQ(survey.off_grid("J1")->record(), record);
  EXPECT_EQ(survey.off_grid_pits().size(), 1U);
}

TEST(Survey, ClosedPolygonTakesItsPitsOffTheListUntilReopened) {
  Survey survey = drawn_survey({"oooo",
                                "oo=o"});
  // Nodes are 10 m apart: columns 2 and 3, the line of the polygon counts.
  ClosedArea area = box_closed(10, -1, 10, 20, NotDugReason::kSlope);
  EXPECT_EQ(survey.nodes_in(area), (std::vector<NodeId>{1, 2, 5, 6}));
  const std::vector<NodeId> changed = survey.set_closed_area("a", area);
  for (const NodeId id : {1, 2, 5}) EXPECT_TRUE(told_of(changed, id));
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0cc0",
                                                     "0c-0"}));
  area.open_again = true;
  const std::vector<NodeId> back = survey.set_closed_area("a", area);
  for (const NodeId id : {1, 2, 5}) EXPECT_TRUE(told_of(back, id));
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0000",
                                                     "00-0"}));
  area.open_again = false;
  survey.set_closed_area("a", area);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0cc0",
                                                     "0c-0"}));
}

TEST(Survey, ClosedRows) {
  Survey survey = drawn_survey({"o.o",
                                "o.o",
                                "o o"});
  const ClosedArea area = rows_closed({3, 1}, NotDugReason::kNoPermission);
  EXPECT_EQ(survey.nodes_in(area), (std::vector<NodeId>{0, 1, 2, 6, 7}));
  survey.set_closed_area("a", area);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"c.c",
                                                     "0.0",
                                                     "c c"}));
  EXPECT_TRUE(survey.dig_list().not_dug(0, ReasonClass::kAccess));
}

TEST(Survey, RowsNamedTwiceOrOutsideTheFrameDoNoHarm) {
  Survey survey = drawn_survey({"o",
                                "o"});
  ClosedArea area = rows_closed({2, 2, 99, -4}, NotDugReason::kPaved);
  survey.set_closed_area("a", area);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0",
                                                     "c"}));
  area.open_again = true;
  survey.set_closed_area("a", area);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0",
                                                     "0"}));
}

// A later version of an area takes the place of the earlier, whatever changed in it.
TEST(Survey, AChangedClosedAreaReplacesItself) {
  Survey survey = drawn_survey({"ooo"});
  survey.set_closed_area("a", box_closed(-1, -1, 2, 2, NotDugReason::kSlope));
  survey.set_closed_area("a", box_closed(19, -1, 2, 2, NotDugReason::kHazard));
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"00c"}));
  EXPECT_TRUE(survey.dig_list().not_dug(2, ReasonClass::kAccess));
  EXPECT_FALSE(survey.dig_list().not_dug(2, ReasonClass::kGround));
  EXPECT_EQ(survey.closed_areas().size(), 1U);
}

TEST(Survey, OverlappingClosedAreasBothHold) {
  Survey survey = drawn_survey({"ooo"});
  ClosedArea first = box_closed(-1, -1, 12, 2, NotDugReason::kSlope);
  survey.set_closed_area("a", first);
  survey.set_closed_area("b", box_closed(9, -1, 12, 2, NotDugReason::kSlope));
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"ccc"}));
  first.open_again = true;
  survey.set_closed_area("a", first);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0cc"}));
}

TEST(Survey, AStopWorkHaltsDuePitsWithinItsDistanceUntilLifted) {
  Survey survey = drawn_survey({"ooooo",
                                "o=ooo"});
  StopWork stop{{0, 0}, 20, "possible human remains", false};
  const std::vector<NodeId> changed = survey.set_stop_work("s", stop);
  // 20 m away is within 20 m; (2, 3) is 22.4 m away.
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"hhh00",
                                                     "h-000"}));
  for (const NodeId id : {0, 1, 2, 5}) EXPECT_TRUE(told_of(changed, id));
  stop.lifted = true;
  survey.set_stop_work("s", stop);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"00000",
                                                     "0-000"}));
}

TEST(Survey, PitsThatBecomeDueInsideAStopWorkAreHaltedToo) {
  Survey survey = drawn_survey({"...o"}, {.neighbours = NeighbourRule::kFour});
  survey.set_stop_work("s", {{0, 0}, 25, "struck line", false});
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"...0"}));
  survey.set_pit(3, {head_of(dug_record(1))});
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"..h#"}));
}

TEST(Survey, TwoStopWorksMustBothBeLifted) {
  Survey survey = drawn_survey({"oo"});
  StopWork first{{0, 0}, 30, "ordnance", false};
  StopWork second{{10, 0}, 1, "ordnance", false};
  survey.set_stop_work("a", first);
  survey.set_stop_work("b", second);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"hh"}));
  first.lifted = true;
  survey.set_stop_work("a", first);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0h"}));
  // Said once more, it changes nothing.
  survey.set_stop_work("a", first);
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0h"}));
}

PitRecord judgement_positive(bool opens) {
  PitRecord record = dug_record(1);
  record.chosen_by = ChosenBy::kJudgement;
  record.opens_neighbours = opens;
  return record;
}

TEST(Survey, AJudgementPositiveOpensItsRingOnlyWhenAsked) {
  Survey survey = drawn_survey({"o-...",
                                ".....",
                                "....."});
  const NodeId id = node_at(survey, 2, 3);
  survey.set_pit(id, {head_of(judgement_positive(false))});
  EXPECT_TRUE(survey.asked().empty());
  survey.set_pit(id, {head_of(judgement_positive(true), 2)});
  // (1, 2) has a record already. Never on the dig list.
  EXPECT_EQ(survey.asked(), (std::vector<NodeId>{2, 3, 6, 8, 11, 12, 13}));
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"0j...",
                                                     "..j..",
                                                     "....."}));
}

TEST(Survey, AskedPitsThatTheDesignReachesAreDueInstead) {
  Survey survey = drawn_survey({"o.-.."}, {.neighbours = NeighbourRule::kFour});
  survey.set_pit(2, {head_of(judgement_positive(true), 2)});
  EXPECT_EQ(survey.asked(), (std::vector<NodeId>{1, 3}));
  survey.set_pit(0, {head_of(dug_record(1))});
  EXPECT_EQ(survey.asked(), (std::vector<NodeId>{3}));
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"#1j.."}));
}

// An asked pit that is positive opens its own only when that is asked of it too.
TEST(Survey, AskedPitsOpenFurtherOnesOnlyWhenAsked) {
  Survey survey = drawn_survey({"o.-..."}, {.neighbours = NeighbourRule::kFour});
  survey.set_pit(2, {head_of(judgement_positive(true), 2)});
  survey.set_pit(3, {head_of(judgement_positive(false), 3)});
  EXPECT_EQ(survey.asked(), (std::vector<NodeId>{1}));
  survey.set_pit(3, {head_of(judgement_positive(true), 4)});
  EXPECT_EQ(survey.asked(), (std::vector<NodeId>{1, 4}));
}

TEST(Survey, WhatIsTakenBackLeavesNoTrace) {
  Survey survey = drawn_survey({".o.",
                                "o.."}, {.neighbours = NeighbourRule::kFour});
  const Picture before = standing_of(survey.dig_list());
  survey.set_pit(1, {head_of(dug_record(1))});
  survey.set_off_grid("J1", {head_of(dug_record(1))});
  survey.set_closed_area("a", rows_closed({2}, NotDugReason::kSlope));
  EXPECT_EQ(standing_of(survey.dig_list()), (Picture{"1#1",
                                                     "cc."}));
  const std::vector<NodeId> reopened = survey.forget_closed_area("a");
  EXPECT_TRUE(told_of(reopened, 3));
  EXPECT_TRUE(told_of(reopened, 4));
  EXPECT_TRUE(told_of(survey.set_pit(1, {}), 0));
  survey.set_off_grid("J1", {});
  EXPECT_EQ(standing_of(survey.dig_list()), before);
  EXPECT_EQ(survey.pit(1), nullptr);
  EXPECT_EQ(survey.off_grid("J1"), nullptr);
  EXPECT_TRUE(survey.pits().empty());
  EXPECT_TRUE(survey.off_grid_pits().empty());
  EXPECT_TRUE(survey.closed_areas().empty());
}

TEST(Survey, StaysWholeWhenMoved) {
  Survey first = drawn_survey({".@."});
  const Survey second = std::move(first);
  EXPECT_EQ(standing_of(second.dig_list()), (Picture{"1#1"}));
  EXPECT_EQ(&second.dig_list().ground(), &second.ground());
}

}  // namespace
}  // namespace nearpit
