#include "survey/progress.h"

#include <gtest/gtest.h>

#include "support/drawn_survey.h"

// Drawings keep their lines.
// clang-format off
namespace nearpit {
namespace {

PitRecord judged(PitRecord record) {
  record.chosen_by = ChosenBy::kJudgement;
  return record;
}

Progress progress(const Picture& picture, const DrawnRules& rules = {}) {
  return progress_of(drawn_survey(picture, rules));
}

TEST(Progress, AFreshSurvey) {
  const Progress p = progress({"o.o",
                               "..o"});
  EXPECT_EQ(p.first_sample, 3U);
  EXPECT_EQ(p.first_sample_dug, 0U);
  EXPECT_EQ(p.due, 3U);
  EXPECT_EQ(p.dug, 0U);
  EXPECT_EQ(p.first_sample_open, 3U);
  EXPECT_FALSE(p.complete);
  EXPECT_FALSE(p.truncated);
}

TEST(Progress, HalfWay) {
  const Progress p = progress({"@-...",
                               "-#..o",
                               ".-..G"});
  EXPECT_EQ(p.first_sample, 3U);
  EXPECT_EQ(p.first_sample_dug, 2U);
  EXPECT_EQ(p.dug, 5U);
  EXPECT_EQ(p.positive, 2U);
  EXPECT_EQ(p.not_dug, 1U);
  // One of the first sample; three beside (2, 2) in column 3 and one in column 1.
  EXPECT_EQ(p.due, 5U);
  EXPECT_EQ(p.judgement, 0U);
  EXPECT_EQ(p.access_refused, 0U);
  EXPECT_EQ(p.first_sample_open, 1U);
  EXPECT_FALSE(p.complete);
}

TEST(Progress, Complete) {
  const Progress p = progress({"@-.",
                               "--.",
                               "..="});
  EXPECT_EQ(p.due, 0U);
  EXPECT_EQ(p.first_sample_open, 0U);
  EXPECT_TRUE(p.complete);
}

TEST(Progress, GroundReasonsLeaveItCompleteAndAccessReasonsDoNot) {
  const Progress ground = progress({"@g",
                                    "G-"});
  EXPECT_EQ(ground.not_dug, 2U);
  EXPECT_EQ(ground.access_refused, 0U);
  EXPECT_TRUE(ground.complete);
  const Progress access = progress({"@a",
                                    "A-"});
  EXPECT_EQ(access.not_dug, 2U);
  EXPECT_EQ(access.access_refused, 2U);
  EXPECT_EQ(access.first_sample_dug, 2U);
  EXPECT_FALSE(access.complete);
}

// Recorded and not of the design, on the grid or off it.
TEST(Progress, JudgementPits) {
  Survey survey = drawn_survey({"=....#",
                                ".....a",
                                "...-.."});
  survey.set_pit(node_at(survey, 3, 4), {head_of(judged(dug_record(0)), 5)});
  survey.set_off_grid("J1", {head_of(judged(dug_record(2)))});
  survey.set_off_grid("J2", {head_of(judged(not_dug_record(NotDugReason::kPaved)))});
  const Progress p = progress_of(survey);
  EXPECT_EQ(p.judgement, 5U);
  // Nobody called these two judgement: (1, 6) and (2, 6).
  EXPECT_EQ(p.no_longer_required, 2U);
  EXPECT_EQ(p.dug, 4U);
  EXPECT_EQ(p.positive, 2U);
  EXPECT_EQ(p.not_dug, 2U);
  // An access reason off the design refuses the design nothing.
  EXPECT_EQ(p.access_refused, 0U);
  EXPECT_TRUE(p.complete);
}

TEST(Progress, NoLongerRequiredAfterAChangeOfMind) {
  Survey survey = drawn_survey({"-@-"});
  EXPECT_EQ(progress_of(survey).no_longer_required, 0U);
  survey.set_pit(1, {head_of(dug_record(0), 5)});
  const Progress p = progress_of(survey);
  EXPECT_EQ(p.no_longer_required, 2U);
  EXPECT_EQ(p.judgement, 2U);
  EXPECT_EQ(p.dug, 3U);
}

TEST(Progress, WithdrawnIsNoRecord) {
  Survey survey = drawn_survey({"W.w="});
  survey.set_off_grid("J1", {head_of(withdrawn_record())});
  const Progress p = progress_of(survey);
  EXPECT_EQ(p.withdrawn, 3U);
  EXPECT_EQ(p.first_sample_dug, 1U);
  EXPECT_EQ(p.due, 1U);
  EXPECT_EQ(p.dug, 1U);
  EXPECT_EQ(p.judgement, 0U);
  EXPECT_EQ(p.no_longer_required, 0U);
}

TEST(Progress, ClosedAreasCountAsNotDug) {
  Survey survey = drawn_survey({"oo@..",
                                "....."}, {.neighbours = NeighbourRule::kFour});
  ClosedArea area;
  area.reason = NotDugReason::kStandingWater;
  area.rows = {1};
  survey.set_closed_area("a", area);
  const Progress p = progress_of(survey);
  EXPECT_EQ(p.first_sample_dug, 3U);
  // (1, 1), (1, 2) and (1, 4); (1, 5) is not of the design.
  EXPECT_EQ(p.not_dug, 3U);
  EXPECT_EQ(p.due, 1U);
  EXPECT_EQ(p.access_refused, 0U);
  survey.set_pit(node_at(survey, 2, 3), {head_of(dug_record(0))});
  EXPECT_TRUE(progress_of(survey).complete);
  area.reason = NotDugReason::kNoPermission;
  survey.set_closed_area("a", area);
  EXPECT_EQ(progress_of(survey).access_refused, 3U);
  EXPECT_FALSE(progress_of(survey).complete);
}

TEST(Progress, HaltedPitsKeepItOpen) {
  Survey survey = drawn_survey({"o=."});
  survey.set_stop_work("s", {{0, 0}, 5, "bones", false});
  const Progress p = progress_of(survey);
  EXPECT_EQ(p.halted, 1U);
  EXPECT_EQ(p.due, 0U);
  EXPECT_EQ(p.first_sample_dug, 1U);
  EXPECT_EQ(p.first_sample_open, 1U);
  EXPECT_FALSE(p.complete);
}

TEST(Progress, Conflicts) {
  Survey survey = drawn_survey({"===."}, {.neighbours = NeighbourRule::kFour});
  EXPECT_TRUE(progress_of(survey).complete);
  PitRecord noted = dug_record(0);
  noted.note = "wet";
  survey.set_pit(0, {head_of(dug_record(0), 4, "a"), head_of(noted, 5, "b")});
  const Progress same = progress_of(survey);
  EXPECT_EQ(same.conflicts, 1U);
  EXPECT_EQ(same.outcome_conflicts, 0U);
  EXPECT_EQ(same.first_sample_open, 0U);
  EXPECT_FALSE(same.complete);
  survey.set_pit(1, {head_of(dug_record(1), 4, "a"), head_of(dug_record(0), 5, "b")});
  const Progress outcome = progress_of(survey);
  EXPECT_EQ(outcome.conflicts, 2U);
  EXPECT_EQ(outcome.outcome_conflicts, 1U);
  EXPECT_EQ(outcome.first_sample_open, 1U);
  EXPECT_EQ(outcome.positive, 1U);
}

TEST(Progress, Truncated) {
  DrawnRules rules{.neighbours = NeighbourRule::kFour};
  rules.ring_limit = 1;
  EXPECT_TRUE(progress({"@#..="}, rules).truncated);
  EXPECT_FALSE(progress({"@-..="}, rules).truncated);
  EXPECT_TRUE(progress({"@#..="}, rules).complete);
}

}  // namespace
}  // namespace nearpit
