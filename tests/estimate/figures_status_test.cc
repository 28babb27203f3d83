// What each row says of itself: status, nulls, and why, in small drawn cases.
#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include <cmath>
#include <string>

#include "estimate/figures.h"
#include "estimate/missed_cluster.h"
#include "support/lattice_picture.h"

namespace nearpit {
namespace {

using testing::Contains;
using testing::ElementsAre;
using testing::HasSubstr;
using testing::Not;

const FigureSettings kSettings{.finds = {"flake", "sherd"}, .confidence = 0.95, .pit_area_m2 = 0.25, .listed = false};

constexpr Estimator kHH = Estimator::kHansenHurwitz;
constexpr Estimator kHT = Estimator::kHorvitzThompson;
constexpr Estimator kFirst = Estimator::kFirstSampleOnly;

constexpr char kLattice[] =
    "per m2 and total hold for the ground if the lattice was laid without regard to what lies below";

const Estimate& row_of(const Figures& figures, const std::string& of, Estimator estimator) {
  for (const Estimate& row : figures.estimates) {
    if (row.of == of && row.estimator == estimator) return row;
  }
  throw std::out_of_range(of);
}
const Estimate& target(const Figures& figures, Estimator estimator) { return row_of(figures, "target", estimator); }

Figures figures_of(const std::string& picture, PicturePlan plan = {}) {
  return day_figures(LatticePicture(picture, std::move(plan)).survey(), kSettings);
}

bool has_no_spread(const Estimate& row) {
  return !row.variance_of_mean && !row.standard_error && !row.range && !row.ground.standard_error && !row.ground.range;
}

TEST(FiguresStatus, FinalRowHoldsEverything) {
  const Figures figures = figures_of("o3 1 . o. . o. . .");
  EXPECT_TRUE(figures.progress.complete);
  const Estimate& row = target(figures, kHH);
  EXPECT_EQ(row.status, FigureStatus::kFinal);
  EXPECT_THAT(row.why, ElementsAre(kLattice));
  EXPECT_DOUBLE_EQ(row.mean_per_pit, 2.0 / 3);
  EXPECT_DOUBLE_EQ(*row.per_m2, 2.0 / 3 / 0.25);
  EXPECT_DOUBLE_EQ(row.total, 2.0 / 3 / 0.25 * 800);
  const double variance = (1 - 3.0 / 8) * (4.0 / 3) / 3;
  EXPECT_DOUBLE_EQ(*row.variance_of_mean, variance);
  EXPECT_DOUBLE_EQ(*row.standard_error, std::sqrt(variance));
  ASSERT_TRUE(row.range);
  EXPECT_EQ(row.range->level, 0.95);
  EXPECT_EQ(row.range->method, "plain t");
  EXPECT_EQ(row.range->lower, 4.0 / 8);  // four finds were dug up among 8 pits
  EXPECT_NEAR(row.range->upper, 2.0 / 3 + t_factor(0.95, 2) * std::sqrt(variance), 1e-12);

  // S2 = N/(N-1) [mean(y^2) - (mean^2 - v)], mean(y^2) = (9 + 1)/2/3
  const double s2 = 8.0 / 7 * (5.0 / 3 - (4.0 / 9 - variance));
  const double ground = std::sqrt(variance + s2 / 8) / 0.25;
  EXPECT_NEAR(*row.ground.standard_error, ground, 1e-12);
  ASSERT_TRUE(row.ground.range);
  EXPECT_NEAR(row.ground.range->upper, *row.per_m2 + t_factor(0.95, 2) * ground, 1e-12);
  EXPECT_EQ(row.ground.range->lower, 4.0 / 800);
}

TEST(FiguresStatus, RowsInOrder) {
  const Figures figures = figures_of("o3/1 1 . o. . o. . .");
  std::vector<std::string> names;
  for (const Estimate& row : figures.estimates)
    names.push_back(row.of + " " + std::string(word(row.estimator)));
  EXPECT_THAT(names, ElementsAre("target hansen_hurwitz", "target horvitz_thompson", "target first_sample_only",
                                 "flake hansen_hurwitz", "flake horvitz_thompson", "flake first_sample_only",
                                 "sherd hansen_hurwitz", "sherd horvitz_thompson", "sherd first_sample_only",
                                 "positive pits hansen_hurwitz", "positive pits horvitz_thompson",
                                 "positive pits first_sample_only"));
}

TEST(FiguresStatus, PositivePitsHaveNoFigurePerSquareMetre) {
  const Estimate row = row_of(figures_of("o3 1 . o. . o. . ."), "positive pits", kHH);
  EXPECT_FALSE(row.per_m2 || row.ground.standard_error || row.ground.range);
  EXPECT_DOUBLE_EQ(row.total, 8.0 / 3);
  EXPECT_TRUE(row.why.empty());
}

TEST(FiguresStatus, DuePitsLeaveTheFirstSamplesRowAlone) {
  const Figures figures = figures_of("o3 ? . o. . o. . .");
  for (const Estimator estimator : {kHH, kHT}) {
    const Estimate& row = target(figures, estimator);
    EXPECT_EQ(row.status, FigureStatus::kProvisional);
    EXPECT_DOUBLE_EQ(row.mean_per_pit, 1);
    EXPECT_TRUE(has_no_spread(row));
    EXPECT_THAT(row.why, ElementsAre("1 pit is still to dig: figures count it as empty",
                                     "no likely range until all pits are dug and settled", kLattice));
  }
  const Estimate& first = target(figures, kFirst);
  EXPECT_EQ(first.status, FigureStatus::kProvisional);
  EXPECT_TRUE(first.variance_of_mean && first.range && first.ground.range);
  EXPECT_THAT(first.why, ElementsAre("what is open lies outside the grid pits and does not change this row", kLattice));
  EXPECT_TRUE(figures.missed_cluster_pits);
}

TEST(FiguresStatus, UnfinishedFirstSampleTakesEveryRange) {
  const Figures figures = figures_of("o3 1 . o? . o? . .");
  for (const Estimator estimator : {kHH, kHT, kFirst}) {
    EXPECT_EQ(target(figures, estimator).status, FigureStatus::kProvisional);
    EXPECT_TRUE(has_no_spread(target(figures, estimator)));
    const std::string pits = estimator == kFirst ? "2 grid pits" : "2 pits";
    EXPECT_THAT(target(figures, estimator).why, Contains(pits + " are still to dig: figures count them as empty"));
  }
  EXPECT_THAT(target(figures, kFirst).why, Contains("no likely range until the grid pits are dug and settled"));
  EXPECT_FALSE(figures.missed_cluster_pits);
}

TEST(FiguresStatus, HaltedPitsCountAsOpen) {
  Survey survey = LatticePicture("o3 ? . o. . o. . .", {}).survey();
  survey.set_stop_work("stop/1",
                       {.place = survey.ground().frame.ground(1), .distance_m = 3, .reason = "", .lifted = false});
  const Figures figures = day_figures(survey, kSettings);
  ASSERT_EQ(figures.progress.halted, 1u);
  EXPECT_TRUE(has_no_spread(target(figures, kHH)));
  EXPECT_THAT(target(figures, kHT).why, Contains("1 pit is halted: figures count it as empty"));
  EXPECT_TRUE(target(figures, kFirst).range);
}

std::vector<Head> two_heads(const LatticePicture& picture, NodeId id, std::uint32_t other_count) {
  std::vector<Head> heads = head_of(picture.record(id));
  heads.push_back(heads.front());
  heads[1].revision = "r2";
  heads[1].clock = 2;
  heads[1].writer = "w2";
  heads[1].record.counts[0] = other_count;
  return heads;
}

TEST(FiguresStatus, AConflictOverTheOutcomeTakesTheVariance) {
  const LatticePicture picture("o3 . . o. . o. . .", {});
  Survey beside = picture.survey();
  beside.set_pit(1, two_heads(picture, 1, 2));
  beside.set_pit(2, head_of(picture.record(2)));
  const Figures figures = day_figures(beside, kSettings);
  EXPECT_EQ(target(figures, kHH).status, FigureStatus::kProvisional);
  EXPECT_TRUE(has_no_spread(target(figures, kHH)));
  EXPECT_DOUBLE_EQ(target(figures, kHH).mean_per_pit, 2.5 / 3);  // the positive record counts
  EXPECT_THAT(target(figures, kHH).why, Contains("1 pit has records that disagree on being positive: settle it"));
  EXPECT_TRUE(target(figures, kFirst).range);

  Survey within = picture.survey();
  within.set_pit(3, two_heads(picture, 3, 2));
  EXPECT_TRUE(has_no_spread(target(day_figures(within, kSettings), kFirst)));
}

TEST(FiguresStatus, AConflictOverCountsAloneKeepsTheVariance) {
  const LatticePicture picture("o3 . . o. . o. . .", {});
  Survey survey = picture.survey();
  survey.set_pit(0, two_heads(picture, 0, 5));
  const Figures figures = day_figures(survey, kSettings);
  for (const Estimator estimator : {kHH, kHT, kFirst}) {
    EXPECT_EQ(target(figures, estimator).status, FigureStatus::kProvisional);
    EXPECT_TRUE(target(figures, estimator).range);
    const std::string pit = estimator == kFirst ? "1 grid pit" : "1 pit";
    EXPECT_THAT(target(figures, estimator).why, Contains(pit + " has more than one record: settle it"));
  }
  EXPECT_DOUBLE_EQ(target(figures, kHH).mean_per_pit, 5.0 / 3);  // the later of two positive records
}

TEST(FiguresStatus, RefusedPitsKeepTheRangeWithAWarning) {
  const Figures figures = figures_of("o3 r . o. . or . .");
  EXPECT_EQ(figures.progress.access_refused, 2u);
  EXPECT_FALSE(figures.progress.complete);
  EXPECT_EQ(target(figures, kHH).status, FigureStatus::kProvisional);
  EXPECT_TRUE(target(figures, kHH).range && target(figures, kFirst).range);
  EXPECT_THAT(target(figures, kHH).why,
              ElementsAre("2 pits were refused: holds for that ground only if it is like the rest", kLattice));
  EXPECT_THAT(target(figures, kFirst).why,
              ElementsAre("1 grid pit was refused: holds for that ground only if it is like the rest", kLattice));
}

TEST(FiguresStatus, ClosedAreasCountLikeRecords) {
  Survey survey = LatticePicture("o3 ? . o. . o? . .", {}).survey();
  survey.set_closed_area("area/1", {.name = "gate",
                                    .reason = NotDugReason::kNoPermission,
                                    .polygon = {},
                                    .rows = {1},
                                    .by = "",
                                    .open_again = false});
  const Figures figures = day_figures(survey, kSettings);
  EXPECT_TRUE(target(figures, kHH).range);
  EXPECT_EQ(figures.missed_cluster_pits, missed_cluster_pits(std::vector<StratumSize>{{8, 2}}, 0.95));
}

TEST(FiguresStatus, UndiggableGroundStaysFinal) {
  const Figures figures = figures_of("o3 x . o. . ox . .");
  EXPECT_TRUE(figures.progress.complete);
  EXPECT_EQ(target(figures, kHH).status, FigureStatus::kFinal);
  EXPECT_THAT(target(figures, kHH).why, ElementsAre(kLattice));
  EXPECT_EQ(figures.missed_cluster_pits, missed_cluster_pits(std::vector<StratumSize>{{8, 2}}, 0.95));
}

TEST(FiguresStatus, WithdrawnPitsAreToDigAgain) {
  const LatticePicture picture("o3 1 . o. . o. . .", {});
  Survey survey = picture.survey();
  PitRecord withdrawn = picture.record(1);
  withdrawn.status = PitStatus::kWithdrawn;
  survey.set_pit(1, head_of(withdrawn));
  const Figures figures = day_figures(survey, kSettings);
  EXPECT_DOUBLE_EQ(target(figures, kHH).mean_per_pit, 1);
  EXPECT_THAT(target(figures, kHH).why, Contains("1 pit is still to dig: figures count it as empty"));
}

TEST(FiguresStatus, TruncatedOnlyWhenAPitWasKeptOff) {
  PicturePlan plan;
  plan.ring_limit = 1;
  const Figures cut = figures_of("o3 1 ? o. . o. . .", plan);
  for (const Estimator estimator : {kHH, kHT}) {
    EXPECT_EQ(target(cut, estimator).status, FigureStatus::kTruncated);
    EXPECT_THAT(target(cut, estimator).why, Contains("the ring limit kept pits off: the estimate is biased"));
    EXPECT_TRUE(target(cut, estimator).range);
  }
  EXPECT_EQ(target(cut, kFirst).status, FigureStatus::kFinal);
  EXPECT_THAT(target(cut, kFirst).why, ElementsAre(kLattice));
  EXPECT_EQ(target(figures_of("o3 . ? o. . o. . .", plan), kHH).status, FigureStatus::kFinal);

  const Figures both = figures_of("o3 1 ? o. . o? . .", plan);
  EXPECT_EQ(target(both, kHH).status, FigureStatus::kProvisional);
  EXPECT_THAT(target(both, kHH).why, Contains("the ring limit kept pits off: the estimate is biased"));
}

TEST(FiguresStatus, ALoneUnitGivesNoSpread) {
  PicturePlan plan;
  plan.areas = "a a a a b b b b";
  const Figures two = figures_of("o3 1 . o. . o. . .", plan);
  for (const Estimator estimator : {kHH, kHT, kFirst}) {
    EXPECT_EQ(target(two, estimator).status, FigureStatus::kFinal);
    EXPECT_TRUE(has_no_spread(target(two, estimator)));
    EXPECT_THAT(target(two, estimator).why,
                ElementsAre("area b has one drawn pit only: no spread can be given", kLattice));
  }
  plan.areas = "";
  plan.draw = DrawKind::kTransects;
  EXPECT_THAT(target(figures_of("o. o.\n? ?", plan), kHH).why,
              Contains("one drawn transect only: no spread can be given"));
}

TEST(FiguresStatus, NegativeVarianceIsShownAsItIs) {
  PicturePlan plan;
  plan.at_least = 3;
  plan.draw = DrawKind::kTransects;
  const Figures figures = figures_of("o1 o3\n . 3\n o3 o.\n . .", plan);
  const Estimate& row = target(figures, kHT);
  EXPECT_NEAR(*row.variance_of_mean, -1.0 / 400, 1e-15);
  EXPECT_FALSE(row.standard_error || row.range || row.ground.standard_error || row.ground.range);
  EXPECT_EQ(row.status, FigureStatus::kFinal);
  EXPECT_THAT(row.why, ElementsAre("the variance estimate came out negative; use Hansen-Hurwitz", kLattice));
  EXPECT_TRUE(target(figures, kHH).range);
}

TEST(FiguresStatus, ListedSamplesSayWhatTheyAssume) {
  FigureSettings settings = kSettings;
  settings.listed = true;
  const Figures figures = day_figures(LatticePicture("o3 1 . o. . o. . .", {}).survey(), settings);
  for (const Estimate& row : figures.estimates) {
    EXPECT_THAT(row.why, Contains("holds if the listed pits were drawn at random"));
  }
}

TEST(FiguresStatus, NothingFound) {
  const Figures figures = figures_of("o. . . o. . o. . .");
  const Estimate& row = target(figures, kHH);
  EXPECT_EQ(row.mean_per_pit, 0);
  EXPECT_FALSE(row.standard_error || row.ground.standard_error || row.range || row.ground.range);
  EXPECT_THAT(row.why, ElementsAre("nothing found by the sample: no range of this kind can be given", kLattice));
}

TEST(FiguresStatus, EveryUnitAlike) {
  const Figures figures = figures_of("o1 o1 o1 1 .");
  const Estimate& first = target(figures, kFirst);
  EXPECT_EQ(first.mean_per_pit, 1);
  EXPECT_FALSE(first.standard_error || first.ground.standard_error || first.range || first.ground.range);
  EXPECT_THAT(first.why, Contains("every drawn unit carries the same value: the spread can't be judged"));
}

TEST(FiguresStatus, EveryPitDrawn) {
  const Estimate row = target(figures_of("o3 o1 o. o. o4 o."), kHH);
  EXPECT_DOUBLE_EQ(row.mean_per_pit, 8.0 / 6);
  EXPECT_EQ(row.variance_of_mean, 0);
  ASSERT_TRUE(row.range);
  EXPECT_EQ(row.range->lower, row.range->upper);
  EXPECT_EQ(row.range->method, "every unit drawn");
  // The ground between the pits is still unseen: S2/N with N - 1 degrees of freedom.
  const double s2 = 6.0 / 5 * (26.0 / 6 - 64.0 / 36);
  EXPECT_NEAR(*row.ground.standard_error, std::sqrt(s2 / 6) / 0.25, 1e-12);
  ASSERT_TRUE(row.ground.range);
  EXPECT_NEAR(row.ground.range->upper, 8.0 / 6 / 0.25 + t_factor(0.95, 5) * *row.ground.standard_error, 1e-12);
}

TEST(FiguresStatus, OnePossiblePit) {
  const Estimate row = target(figures_of("o3"), kHH);
  EXPECT_EQ(row.mean_per_pit, 3);
  EXPECT_TRUE(row.range);
  EXPECT_EQ(row.ground.standard_error, 0);
  EXPECT_FALSE(row.ground.range);
}

// A judgement pit (node 6, which the design does not reach) counts in no estimate, but what it held was found.
TEST(FiguresStatus, JudgementPitsOnlyRaiseTheFloor) {
  const Figures figures = figures_of("o1 . . o. . 60/8 . o. ? ?");
  EXPECT_EQ(figures.progress.judgement, 4u);  // three empty ones that nobody asked for, too
  const Estimate& row = target(figures, kHH);
  EXPECT_DOUBLE_EQ(row.mean_per_pit, 1.0 / 3);
  EXPECT_EQ(row.status, FigureStatus::kFinal);
  ASSERT_TRUE(row.range);
  EXPECT_DOUBLE_EQ(row.range->lower, 6.1);
  EXPECT_DOUBLE_EQ(row.range->upper, 6.1);
  EXPECT_THAT(row.why, Contains("more was dug up than this figure says: no likely range lies below what was found"));
  EXPECT_EQ(row_of(figures, "sherd", kHH).mean_per_pit, 0);
}

TEST(FiguresStatus, PitsFoundEmptyCapTheShareOfPositives) {
  const Estimate row = row_of(figures_of("o3 . . o. . o2 . ."), "positive pits", kFirst);
  ASSERT_TRUE(row.range);
  EXPECT_DOUBLE_EQ(row.range->lower, 2.0 / 8);
  EXPECT_DOUBLE_EQ(row.range->upper, 1 - 6.0 / 8);
}

TEST(FiguresStatus, MissedClusterIsForPitsOnly) {
  PicturePlan plan;
  EXPECT_EQ(figures_of("o3 1 . o. . o. . .", plan).missed_cluster_pits,
            missed_cluster_pits(std::vector<StratumSize>{{8, 3}}, 0.95));
  plan.draw = DrawKind::kTransects;
  EXPECT_FALSE(figures_of("o. o.\n. .\no. o.", plan).missed_cluster_pits);
}

TEST(FiguresStatus, Clusters) {
  const LatticePicture picture("o3/1 1/2 . o2 ? o. . .", {});
  Survey survey = picture.survey();
  PitRecord early = picture.record(1);
  early.dug_at = "2026-05-03T23:30:00-04:00";
  PitRecord late = picture.record(0);
  late.dug_at = "2026-05-04T05:00:00+00:00";
  survey.set_pit(1, head_of(early));
  survey.set_pit(0, head_of(late));
  const Figures figures = day_figures(survey, kSettings);
  ASSERT_EQ(figures.clusters.size(), 2u);
  const Cluster& first = figures.clusters[0];
  EXPECT_THAT(first.network.nodes, ElementsAre(0, 1));
  EXPECT_EQ(first.label, 1);  // 03:30 UTC, before 05:00
  EXPECT_THAT(first.finds, ElementsAre(4u, 3u));
  EXPECT_EQ(first.in_first_sample, 1u);
  EXPECT_EQ(first.area_m2, 200);
  EXPECT_TRUE(first.closed());
  EXPECT_FALSE(figures.clusters[1].closed());
  EXPECT_THAT(figures.clusters[1].network.open, ElementsAre(4));
}

TEST(FiguresStatus, Words) {
  EXPECT_EQ(word(FigureStatus::kFinal), "final");
  EXPECT_EQ(word(FigureStatus::kProvisional), "provisional");
  EXPECT_EQ(word(FigureStatus::kTruncated), "truncated");
}

}  // namespace
}  // namespace nearpit
