// Worked examples, through the whole way from picture to row. Where no source is named the figures were derived in exact fractions.
#include <gtest/gtest.h>

#include <map>
#include <string>

#include "estimate/figures.h"
#include "estimate/hansen_hurwitz.h"
#include "estimate/horvitz_thompson.h"
#include "estimate/met_networks.h"
#include "support/picture_population.h"

namespace nearpit {
namespace {

const FigureSettings kSettings{.finds = {"flake", "sherd"}, .confidence = 0.95, .pit_area_m2 = 0.25, .listed = false};

const Estimate& row_of(const Figures& figures, const std::string& of, Estimator estimator) {
  for (const Estimate& row : figures.estimates) {
    if (row.of == of && row.estimator == estimator) return row;
  }
  throw std::out_of_range(of);
}

const Estimate& target(const Figures& figures, Estimator estimator) { return row_of(figures, "target", estimator); }

constexpr Estimator kHH = Estimator::kHansenHurwitz;
constexpr Estimator kHT = Estimator::kHorvitzThompson;
constexpr Estimator kFirst = Estimator::kFirstSampleOnly;

PicturePlan line(std::uint32_t at_least) { return {.at_least = at_least}; }

// Nodes of one area, counted from 1.
Figures drawn_pits(const LatticePicture& picture, const std::vector<UnitId>& from_one) {
  std::vector<UnitId> units;
  for (const UnitId unit : from_one)
    units.push_back(unit - 1);
  return day_figures(picture.dug_out({units}), kSettings);
}

struct Spread {
  double mean = 0;
  double variance = 0;
  double mean_of_v = 0;
};

struct AllSamples {
  std::map<std::pair<std::string, Estimator>, Spread> of;
  double final_size = 0;
  const Spread& at(const std::string& name, Estimator estimator) const { return of.at({name, estimator}); }
};

// Mean and variance of every row over all samples, by the program's own figures.
AllSamples all_samples(const LatticePicture& picture, const std::vector<std::size_t>& count) {
  const exact::Oracle oracle(population_of(picture));
  AllSamples all;
  double samples = 0;
  oracle.each_sample(count, [&](const exact::Sample& sample) {
    const Survey survey = picture.dug_out(drawn_units(picture, oracle.population(), sample));
    const Figures figures = day_figures(survey, kSettings);
    ++samples;
    all.final_size += static_cast<double>(figures.progress.dug);
    for (const Estimate& row : figures.estimates) {
      Spread& spread = all.of[{row.of, row.estimator}];
      spread.mean += row.mean_per_pit;
      spread.variance += row.mean_per_pit * row.mean_per_pit;
      spread.mean_of_v += row.variance_of_mean.value_or(0);
    }
  });
  all.final_size /= samples;
  for (auto& [name, spread] : all.of) {
    spread.mean /= samples;
    spread.variance = spread.variance / samples - spread.mean * spread.mean;
    spread.mean_of_v /= samples;
  }
  return all;
}

void expect_spread(const Spread& spread, double mean, double variance, double tolerance) {
  EXPECT_NEAR(spread.mean, mean, 1e-12 * mean);
  EXPECT_NEAR(spread.variance, variance, tolerance);
  EXPECT_NEAR(spread.mean_of_v, variance, tolerance);
}

// Thompson SK 1990, JASA 85:1050-1059 (input and the published row of variances from memory; the rest derived).
constexpr char kFive[] = "1 0 2 10 1000";

TEST(WorkedExamples, FiveUnitsEachSample) {
  struct Sample {
    std::vector<UnitId> drawn;
    std::size_t dug;
    double hh, ht, v_hh, v_ht;
  };
  const std::vector<Sample> samples = {
      {{1, 2}, 2, 0.5, 0.5, 0.15, 0.15},
      {{1, 3}, 2, 1.5, 1.5, 0.15, 0.15},
      {{2, 3}, 2, 1, 1, 0.6, 0.6},
      {{1, 4}, 4, 253, 289.071429, 38102.4, 24866.762245},
      {{1, 5}, 4, 253, 289.071429, 38102.4, 24866.762245},
      {{2, 4}, 4, 252.5, 288.571429, 38253.75, 24982.040816},
      {{2, 5}, 4, 252.5, 288.571429, 38253.75, 24982.040816},
      {{3, 4}, 3, 253.5, 289.571429, 37951.35, 24751.783673},
      {{3, 5}, 3, 253.5, 289.571429, 37951.35, 24751.783673},
      {{4, 5}, 3, 505, 288.571429, 0, 24982.040816},
  };
  const LatticePicture picture(kFive, line(5));
  for (const Sample& sample : samples) {
    SCOPED_TRACE(testing::PrintToString(sample.drawn));
    const Figures figures = drawn_pits(picture, sample.drawn);
    EXPECT_EQ(figures.progress.dug, sample.dug);
    EXPECT_NEAR(target(figures, kHH).mean_per_pit, sample.hh, 1e-9);
    EXPECT_NEAR(target(figures, kHT).mean_per_pit, sample.ht, 5e-7);
    EXPECT_NEAR(*target(figures, kHH).variance_of_mean, sample.v_hh, 1e-9);
    EXPECT_NEAR(*target(figures, kHT).variance_of_mean, sample.v_ht, 5e-7);
  }
}

TEST(WorkedExamples, FiveUnitsOverAllSamples) {
  const AllSamples all = all_samples({kFive, line(5)}, {2});
  expect_spread(all.at("target", kFirst), 202.6, 59615.34, 5e-3);
  expect_spread(all.at("target", kHH), 202.6, 22861.59, 5e-3);
  expect_spread(all.at("target", kHT), 202.6, 17418.4114, 5e-5);
  EXPECT_NEAR(all.final_size, 3.1, 1e-12);
}

TEST(WorkedExamples, StrataWithANetworkAcrossTheLine) {
  PicturePlan plan = line(5);
  plan.areas = "a a a a b b b b b";
  const AllSamples all = all_samples({"0 1 0 6 8 0 2 0 5", plan}, {2, 2});
  expect_spread(all.at("target", kHH), 22.0 / 9, 1.4578189300, 5e-11);
  expect_spread(all.at("target", kHT), 22.0 / 9, 32.0 / 27, 1e-12);
}

TEST(WorkedExamples, Strips) {
  PicturePlan plan = line(5);
  plan.draw = DrawKind::kTransects;
  const AllSamples all = all_samples({". . 3 .\n . 6 5 .\n 1 . 9 .\n . . . 2\n 7 . . .", plan}, {2});
  expect_spread(all.at("target", kHH), 33.0 / 20, 0.305625, 1e-12);
  expect_spread(all.at("target", kHT), 33.0 / 20, 0.2654464286, 5e-11);
  EXPECT_NEAR(all.final_size, 119.0 / 10, 1e-12);
}

constexpr char kUnequalRows[] = R"(
  .  .  _  _
  .  6  5  .
  1  .  9  .
  _  .  .  2
  7  .  .  .
)";
constexpr char kWestEast[] = R"(
  a a b b
  a a b b
  a a b b
  a a b b
  a a b b
)";

TEST(WorkedExamples, UnequalRowsInTwoAreas) {
  PicturePlan plan = line(5);
  plan.draw = DrawKind::kTransects;
  plan.areas = kWestEast;
  const LatticePicture picture(kUnequalRows, plan);
  const AllSamples all = all_samples(picture, {2, 2});
  expect_spread(all.at("target", kHH), 30.0 / 17, 15325.0 / 31212, 1e-12);
  expect_spread(all.at("target", kHT), 30.0 / 17, 1205.0 / 3468, 1e-12);

  // West rows 2 and 5; east rows 2 and 3, which are the area's first and second.
  const Survey survey = picture.dug_out({{1, 4}, {0, 1}});
  const Figures figures = day_figures(survey, kSettings);
  EXPECT_NEAR(target(figures, kHH).mean_per_pit, 365.0 / 102, 1e-12);
  EXPECT_NEAR(*target(figures, kHH).variance_of_mean, 5.0 / 3468, 1e-14);
  EXPECT_NEAR(target(figures, kHT).mean_per_pit, 715.0 / 306, 1e-12);
  EXPECT_NEAR(*target(figures, kHT).variance_of_mean, 68335.0 / 93636, 1e-12);

  const MetNetworks met = met_networks(survey, find_networks(survey.dig_list()), 2);
  ASSERT_EQ(met.totals[0].sum[0], 20);
  ASSERT_EQ(met.totals[0].sum[1], 7);
  EXPECT_NEAR(inclusion_chance(met.design, met.networks[0]), 0.9, 1e-15);
  EXPECT_NEAR(inclusion_chance(met.design, met.networks[1]), 0.4, 1e-15);
  // Only the west holds both: units 1 of 5 (the first network's row 2) and 1 of 5, none in common; q of the east is 1/6.
  EXPECT_NEAR(0.9 * 0.4 + joint_excess(5, 2, 1, 1, 0) / 6, 7.0 / 20, 1e-15);
}

TEST(WorkedExamples, NegativeVariance) {
  PicturePlan plan = line(3);
  plan.draw = DrawKind::kTransects;
  const Figures figures = day_figures(LatticePicture("1 3\n . 3\n 3 .\n . .", plan).dug_out({{0, 2}}), kSettings);
  EXPECT_NEAR(target(figures, kHT).mean_per_pit, 19.0 / 10, 1e-14);
  EXPECT_NEAR(*target(figures, kHT).variance_of_mean, -1.0 / 400, 1e-15);
  EXPECT_NEAR(target(figures, kHH).mean_per_pit, 7.0 / 4, 1e-14);
  EXPECT_NEAR(*target(figures, kHH).variance_of_mean, 1.0 / 32, 1e-15);
}

// Per pit that can be dug: R = T_y/T_d, v(R) from the residuals y* - R d*.
TEST(WorkedExamples, NotDugForGroundReasons) {
  const LatticePicture picture("0 4 6 x 0 0 x 3 0 0", line(3));
  const Survey survey = picture.dug_out({{1, 3, 4, 8}});
  const Figures figures = day_figures(survey, kSettings);
  EXPECT_NEAR(target(figures, kHH).mean_per_pit, 5.0 / 4, 1e-14);
  EXPECT_NEAR(target(figures, kHT).mean_per_pit, 3.0 / 2, 1e-14);
  EXPECT_EQ(target(figures, kHH).status, FigureStatus::kFinal);

  const MetNetworks met = met_networks(survey, find_networks(survey.dig_list()), 2);
  const std::vector<double> diggable{2, 0, 0, 1,
                                     1};  // the cluster; drawn nodes 2, 4 (not dug), 5, 9 without the cluster's
  ASSERT_EQ(met.networks.size(), diggable.size());
  for (const auto estimate : {&hansen_hurwitz, &horvitz_thompson}) {
    const bool hh = estimate == &hansen_hurwitz;
    const double share = estimate(met.design, met.networks, diggable).mean;
    EXPECT_NEAR(share, hh ? 3.0 / 4 : 4.0 / 5, 1e-14);
    const double ratio = estimate(met.design, met.networks, met.totals[0].sum).mean / share;
    EXPECT_NEAR(ratio, hh ? 5.0 / 3 : 15.0 / 8, 1e-14);
    std::vector<double> residuals;
    for (std::size_t k = 0; k < diggable.size(); ++k)
      residuals.push_back(met.totals[0].sum[k] - ratio * diggable[k]);
    const double v = *estimate(met.design, met.networks, residuals).variance / (share * share);
    EXPECT_NEAR(v, hh ? 40.0 / 27 : 16125.0 / 14336, 1e-12);
  }
}

TEST(WorkedExamples, ProvisionalAndFinished) {
  const LatticePicture picture("0 9 1 1 1 0 0 0 0 0", line(1));
  Survey started = picture.undug({{1, 7}});
  for (const NodeId id : {1, 7})
    started.set_pit(id, head_of(picture.record(id)));
  const Figures day = day_figures(started, kSettings);
  for (const Estimator estimator : {kHH, kHT}) {
    EXPECT_NEAR(target(day, estimator).mean_per_pit, 9.0 / 2, 1e-14);
    EXPECT_EQ(target(day, estimator).status, FigureStatus::kProvisional);
    EXPECT_FALSE(target(day, estimator).variance_of_mean);
  }
  const Figures finished = drawn_pits(picture, {2, 8});
  EXPECT_NEAR(target(finished, kHH).mean_per_pit, 3.0 / 2, 1e-14);
  EXPECT_NEAR(target(finished, kHT).mean_per_pit, 9.0 / 5, 1e-14);
}

TEST(WorkedExamples, SevenOnALine) {
  const LatticePicture picture("0 3 7 6 1 0 2", line(5));
  const AllSamples two = all_samples(picture, {2});
  expect_spread(two.at("target", kHH), 19.0 / 7, 2.793367, 5e-7);
  expect_spread(two.at("target", kHT), 19.0 / 7, 2.504947, 5e-7);
  const AllSamples three = all_samples(picture, {3});
  expect_spread(three.at("target", kHH), 19.0 / 7, 1.489796, 5e-7);
  expect_spread(three.at("target", kHT), 19.0 / 7, 1.151383, 5e-7);
}

// Networks come from the first find, the figures from the second.
TEST(WorkedExamples, AnotherFindClass) {
  const LatticePicture picture("0/1 0/3 5/0 6/2 0/4 0/0 0/2 7/0 0/6", line(5));
  const AllSamples all = all_samples(picture, {3});
  expect_spread(all.at("sherd", kHH), 2, 8.0 / 9, 1e-12);
  expect_spread(all.at("sherd", kHT), 2, 809.0 / 882, 1e-12);
  const Figures figures = drawn_pits(picture, {2, 3, 8});
  EXPECT_NEAR(row_of(figures, "sherd", kHH).mean_per_pit, 4.0 / 3, 1e-14);
  EXPECT_NEAR(*row_of(figures, "sherd", kHH).variance_of_mean, 14.0 / 27, 1e-14);
}

// Su Z & Quinn TJ 2003, Environ. Ecol. Stat. 10:17-41, on the bias of a ring limit; the figures are derived.
TEST(WorkedExamples, RingLimit) {
  struct Limit {
    int rings;
    double hh_percent, ht_percent;
  };
  for (const Limit& limit : {Limit{0, 0, -7.25}, Limit{1, 0.956, -5.94}, Limit{2, 0.717, -1.45}, Limit{3, 0, 0}}) {
    SCOPED_TRACE(limit.rings);
    PicturePlan plan = line(5);
    plan.ring_limit = limit.rings;
    const AllSamples all = all_samples({"0 0 5 9 6 8 1 0 0 2", plan}, {2});
    EXPECT_NEAR(100 * (all.at("target", kHH).mean / 3.1 - 1), limit.hh_percent, 5e-4);
    EXPECT_NEAR(100 * (all.at("target", kHT).mean / 3.1 - 1), limit.ht_percent, 5e-3);
    EXPECT_NEAR(all.at("target", kFirst).mean, 3.1, 1e-12);
  }
}

// If a variable is 0 or 1 by the positive rule and units are single pits, Hansen-Hurwitz is the first sample's own mean.
TEST(WorkedExamples, PositivePitsAreTheFirstSamplesShare) {
  const LatticePicture picture(". 2 3 . . 1 . .\n 4 . . . 2 2 . .", line(1));
  const exact::Oracle oracle(population_of(picture));
  oracle.each_sample({3}, [&](const exact::Sample& sample) {
    const Figures figures = day_figures(picture.dug_out(drawn_units(picture, oracle.population(), sample)), kSettings);
    EXPECT_NEAR(row_of(figures, "positive pits", kHH).mean_per_pit,
                row_of(figures, "positive pits", kFirst).mean_per_pit, 1e-15);
  });
}

}  // namespace
}  // namespace nearpit
