// Every sample of small populations, through the whole way from picture to row, against exact fractions: each row equals the oracle's, and
// the oracle's means over all samples are the true mean and the true variance.
#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <cmath>
#include <string>

#include "estimate/figures.h"
#include "support/picture_population.h"
#include "support/test_random.h"

namespace nearpit {
namespace {

using exact::Rational;

constexpr double kPitArea_m2 = 0.25;

const FigureSettings kSettings{
    .finds = {"flake", "sherd"}, .confidence = 0.95, .pit_area_m2 = kPitArea_m2, .listed = false};

// Pictures are 10 m apart.
double cell_m2(const LatticePicture& picture) {
  return picture.plan().kind == LatticeKind::kTriangular ? 100 * std::sqrt(3.0) / 2 : 100;
}

double as_double(const Rational& value) { return value.convert_to<double>(); }

// |v - v0| <= 1e-10 max(|v0|, 1e-6 est^2)
testing::AssertionResult close_variance(double variance, const Rational& exact, const Rational& mean) {
  const Rational floor = mean * mean / 1000000;
  const Rational size = abs(exact) > floor ? abs(exact) : floor;
  if (abs(Rational(variance) - exact) <= size / Rational(10000000000)) return testing::AssertionSuccess();
  return testing::AssertionFailure() << variance << " instead of " << as_double(exact) << ", off by "
                                     << as_double(Rational(variance) - exact);
}

exact::Figure exact_row(const exact::Oracle& oracle, Estimator estimator, const exact::Sample& sample,
                        const exact::Values& y) {
  if (estimator == Estimator::kHansenHurwitz) return oracle.hansen_hurwitz(sample, y);
  if (estimator == Estimator::kHorvitzThompson) return oracle.horvitz_thompson(sample, y);
  return oracle.first_sample(sample, y);
}

// v + S2/N over the pit's area, squared, with S2 = N/(N-1) [mean(y^2) - (mean^2 - v)], at least 0.
double ground_error(const exact::Figure& row, const Rational& mean_square, std::size_t nodes) {
  Rational s2 = 0;
  if (nodes > 1) s2 = Rational(nodes) / (nodes - 1) * (mean_square - (row.mean * row.mean - *row.variance));
  if (s2 < 0) s2 = 0;
  return std::sqrt(as_double(*row.variance + s2 / nodes)) / kPitArea_m2;
}

void check_row(const Estimate& row, const exact::Figure& exact, const Rational& mean_square, std::size_t nodes,
               double cell, bool on_ground) {
  const double mean = as_double(exact.mean);
  EXPECT_NEAR(row.mean_per_pit, mean, 1e-12 * std::abs(mean));
  EXPECT_EQ(row.status, FigureStatus::kFinal);
  EXPECT_EQ(row.per_m2.has_value(), on_ground);
  const double total =
      on_ground ? mean / kPitArea_m2 * static_cast<double>(nodes) * cell : mean * static_cast<double>(nodes);
  EXPECT_NEAR(row.total, total, 1e-12 * total);
  ASSERT_EQ(row.variance_of_mean.has_value(), exact.variance.has_value());
  if (!exact.variance) {
    EXPECT_FALSE(row.standard_error || row.range || row.ground.standard_error || row.ground.range);
    return;
  }
  EXPECT_TRUE(close_variance(*row.variance_of_mean, *exact.variance, exact.mean));
  const double exact_error = std::sqrt(as_double(*exact.variance));
  if (*exact.variance < 0) {
    EXPECT_FALSE(row.standard_error || row.range || row.ground.standard_error || row.ground.range);
  } else if (*exact.variance > exact.mean * exact.mean / 1000000000) {
    ASSERT_TRUE(row.standard_error);
    EXPECT_NEAR(*row.standard_error, exact_error, 1e-9 * exact_error);
    ASSERT_EQ(row.ground.standard_error.has_value(), on_ground);
    if (on_ground) {
      const double ground = ground_error(exact, mean_square, nodes);
      EXPECT_NEAR(*row.ground.standard_error, ground, 1e-9 * ground);
    }
  }
}

struct Variable {
  std::string name;
  exact::Values y;
  exact::Values squares;
  bool on_ground = true;
  std::array<exact::OverSamples, 3> mean;
  std::array<exact::OverSamples, 3> variance;
  bool estimable = true;
};

std::vector<Variable> variables_of(const LatticePicture& picture) {
  const exact::Values first = find_values(picture, 0);
  const exact::Values second = find_values(picture, 1);
  const exact::Values positive = positive_values(picture);
  return {{"target", first, squared(first), true, {}, {}, true},
          {"flake", first, squared(first), true, {}, {}, true},
          {"sherd", second, squared(second), true, {}, {}, true},
          {"positive pits", positive, squared(positive), false, {}, {}, true}};
}

void check_sample(const LatticePicture& picture, const exact::Oracle& oracle, const exact::Sample& sample,
                  std::vector<Variable>* variables) {
  const Survey survey = picture.dug_out(drawn_units(picture, oracle.population(), sample));
  const Figures figures = day_figures(survey, kSettings);
  ASSERT_EQ(figures.estimates.size(), 3 * variables->size());
  ASSERT_TRUE(figures.progress.complete);
  for (std::size_t row = 0; row < figures.estimates.size(); ++row) {
    const Estimate& estimate = figures.estimates[row];
    Variable& variable = (*variables)[row / 3];
    ASSERT_EQ(estimate.of, variable.name);
    ASSERT_EQ(estimate.estimator, static_cast<Estimator>(row % 3));
    SCOPED_TRACE(testing::Message() << estimate.of << " " << word(estimate.estimator));
    const exact::Figure exact = exact_row(oracle, estimate.estimator, sample, variable.y);
    const Rational mean_square = exact_row(oracle, estimate.estimator, sample, variable.squares).mean;
    check_row(estimate, exact, mean_square, oracle.nodes(), cell_m2(picture), variable.on_ground);
    variable.mean[row % 3].add(exact.mean);
    if (exact.variance) {
      variable.variance[row % 3].add(*exact.variance);
    } else {
      variable.estimable = false;
    }
  }
}

// How many samples there were.
int check_every_sample(const LatticePicture& picture, const std::vector<std::size_t>& count) {
  const exact::Oracle oracle(population_of(picture));
  std::vector<Variable> variables = variables_of(picture);
  int samples = 0;
  oracle.each_sample(count, [&](const exact::Sample& sample) {
    if (testing::Test::HasFatalFailure() || testing::Test::HasNonfatalFailure()) return;
    check_sample(picture, oracle, sample, &variables);
    ++samples;
  });
  if (testing::Test::HasFailure()) return samples;
  for (const Variable& variable : variables) {
    Rational truth = 0;
    for (const Rational& value : variable.y)
      truth += value / oracle.nodes();
    for (std::size_t estimator = 0; estimator < 3; ++estimator) {
      SCOPED_TRACE(testing::Message() << variable.name << " " << word(static_cast<Estimator>(estimator)));
      EXPECT_EQ(variable.mean[estimator].mean(), truth);
      if (!variable.estimable) continue;
      EXPECT_EQ(variable.variance[estimator].mean(), variable.mean[estimator].variance());
    }
  }
  return samples;
}

struct Lay {
  LatticeKind kind;
  NeighbourRule neighbours;
};

const std::vector<Lay> kLays = {{LatticeKind::kSquare, NeighbourRule::kEight},
                                {LatticeKind::kSquare, NeighbourRule::kFour},
                                {LatticeKind::kSquare, NeighbourRule::kFourByTwo},
                                {LatticeKind::kStaggered, NeighbourRule::kSix},
                                {LatticeKind::kTriangular, NeighbourRule::kSix}};

// Rows of unequal length with a gap; networks lie across the line between the areas and over several rows. Invented.
constexpr char kPicture[] = R"(
  .   2/1 3   _
  4/1 .   .   0/2
  .   .   5/3 2
  _   0/1 6   .
)";
constexpr char kTwoAreas[] = R"(
  a a b b
  a a b b
  a a b b
  a a b b
)";

class EveryLay : public testing::TestWithParam<int> {
 protected:
  PicturePlan plan(DrawKind draw, const std::string& areas) const {
    const Lay& lay = kLays[static_cast<std::size_t>(GetParam())];
    return {.kind = lay.kind, .neighbours = lay.neighbours, .draw = draw, .every = 2, .at_least = 2, .areas = areas};
  }
  static void confine(Confinement::Kind kind, PicturePlan* plan) {
    plan->confinement = {.kind = kind, .block_columns = 2, .block_rows = 3};
  }
};

TEST_P(EveryLay, OneArea) {
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kPits, "")}, {3}), 364);
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kTransects, "")}, {2}), 6);
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kTransects, "")}, {3}), 4);
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kSystematic, "")}, {2}), 6);
}

TEST_P(EveryLay, TwoAreas) {
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kPits, kTwoAreas)}, {2, 2}), 441);
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kTransects, kTwoAreas)}, {2, 3}), 24);
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kSystematic, kTwoAreas)}, {2, 2}), 36);
}

TEST_P(EveryLay, Confined) {
  for (const Confinement::Kind kind : {Confinement::Kind::kBlock, Confinement::Kind::kArea}) {
    for (const DrawKind draw : {DrawKind::kPits, DrawKind::kTransects, DrawKind::kSystematic}) {
      PicturePlan confined = plan(draw, kTwoAreas);
      confine(kind, &confined);
      EXPECT_GT(check_every_sample({kPicture, confined}, {2, 2}), 30);
    }
  }
}

// No variance in the area with one drawn unit of several, and so none at all; means stay unbiased.
TEST_P(EveryLay, LoneUnit) {
  for (const DrawKind draw : {DrawKind::kPits, DrawKind::kTransects, DrawKind::kSystematic}) {
    EXPECT_GT(check_every_sample({kPicture, plan(draw, kTwoAreas)}, {1, 2}), 20);
  }
}

TEST_P(EveryLay, AreasDrawnWhole) {
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kPits, kTwoAreas)}, {7, 2}), 21);
  EXPECT_EQ(check_every_sample({kPicture, plan(DrawKind::kTransects, kTwoAreas)}, {4, 4}), 1);
}

INSTANTIATE_TEST_SUITE_P(Lattices, EveryLay, testing::Range(0, 5));

// An area that is one unit is drawn whole and adds nothing to the variance; a network reaches into it.
TEST(FiguresEnumeration, AreaOfOneUnit) {
  PicturePlan plan{.areas = "a a a a a b"};
  EXPECT_EQ(check_every_sample({". 2 . . 3 4", plan}, {2, 1}), 10);
  plan.areas = "a a b\na a b\na a c";
  plan.draw = DrawKind::kTransects;
  EXPECT_EQ(check_every_sample({". 2 1\n. . 3\n 1 . 2", plan}, {2, 2, 1}), 3);
}

TEST(FiguresEnumeration, EverythingEmptyOrAlike) {
  const PicturePlan plan{.at_least = 2};
  EXPECT_EQ(check_every_sample({". . .\n. . .", plan}, {3}), 20);
  EXPECT_EQ(check_every_sample({"1 1 1\n1 1 1", plan}, {3}), 20);
  EXPECT_EQ(check_every_sample({"7 7 7\n7 7 7", plan}, {3}), 20);
}

// Every third node each way: nine starts, some of them empty and not drawn.
TEST(FiguresEnumeration, EmptySubLattices) {
  const PicturePlan plan{.draw = DrawKind::kSystematic, .every = 3};
  EXPECT_EQ(check_every_sample({". 2 _ . 1\n 3 . _ . .\n_ _ _ 1 .", plan}, {2}), 15);
}

TEST(FiguresEnumeration, LargeCounts) {
  const PicturePlan plan{.at_least = 5};
  EXPECT_EQ(check_every_sample({"1 . 2 10 4000000000 . 3 999983", plan}, {3}), 56);
}

std::string random_picture(TestRandom& random, int rows, int columns) {
  std::string picture;
  for (int row = 0; row < rows; ++row) {
    for (int column = 0; column < columns; ++column) {
      const bool gap = random.chance(0.15) && !(row == 0 && column == 0);
      const int count = random.chance(0.5) ? 0 : random.between(0, 9);
      picture += gap ? "_ " : std::to_string(count) + "/" + std::to_string(random.between(0, 2)) + " ";
    }
    picture += "\n";
  }
  return picture;
}

TEST(FiguresEnumeration, RandomPictures) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(40); ++round) {
    const Lay lay = random.one_of(kLays);
    const auto draw = static_cast<DrawKind>(random.between(0, 2));
    PicturePlan plan{.kind = lay.kind, .neighbours = lay.neighbours, .draw = draw, .every = 2};
    plan.at_least = static_cast<std::uint32_t>(random.between(1, 6));
    if (random.chance(0.3)) {
      plan.confinement = {
          .kind = Confinement::Kind::kBlock, .block_columns = random.between(1, 3), .block_rows = random.between(1, 3)};
    }
    const std::string text = random_picture(random, random.between(2, 3), random.between(2, 4));
    const LatticePicture picture(text, plan);
    const std::size_t units = population_of(picture).units[0].size();
    if (units < 2) continue;
    const std::size_t count = static_cast<std::size_t>(random.between(2, std::min(3, static_cast<int>(units))));
    SCOPED_TRACE(testing::Message() << text << "draw " << draw_kind_name(draw) << " " << count << ", neighbours "
                                    << neighbour_rule_name(lay.neighbours) << ", at least " << plan.at_least);
    EXPECT_GT(check_every_sample(picture, {count}), 0);
    if (HasFailure()) return;
  }
}

std::vector<std::size_t> some_of(TestRandom& random, std::size_t total, std::size_t count) {
  std::vector<std::size_t> drawn;
  for (std::size_t i = 0; i < total; ++i) {
    const double chance = static_cast<double>(count - drawn.size()) / static_cast<double>(total - i);
    if (drawn.size() < count && random.chance(chance)) drawn.push_back(i);
  }
  return drawn;
}

// Larger samples, one each: many networks of equal size by area, which the program puts together, and many sets of units.
TEST(FiguresEnumeration, RandomLargerSamples) {
  TestRandom random = TestRandom::of_this_run();
  for (int round = 0; round < rounds(30); ++round) {
    const Lay lay = random.one_of(kLays);
    const auto draw = static_cast<DrawKind>(random.between(0, 2));
    PicturePlan plan{.kind = lay.kind, .neighbours = lay.neighbours, .draw = draw, .every = random.between(2, 4)};
    plan.at_least = static_cast<std::uint32_t>(random.between(3, 8));
    for (int row = 0; row < 12; ++row)
      plan.areas += "a a a a b b b b b c c c\n";
    const std::string text = random_picture(random, 12, 12);
    const LatticePicture picture(text, plan);
    const exact::Oracle oracle(population_of(picture));
    exact::Sample sample;
    for (const auto& units : oracle.population().units) {
      const int all = static_cast<int>(units.size());
      sample.push_back(
          some_of(random, units.size(), static_cast<std::size_t>(random.between(2, std::max(2, all / 3)))));
    }
    SCOPED_TRACE(testing::Message() << text << "draw " << draw_kind_name(draw) << " every " << plan.every
                                    << ", neighbours " << neighbour_rule_name(lay.neighbours) << ", at least "
                                    << plan.at_least << ", drawn " << testing::PrintToString(sample));
    std::vector<Variable> variables = variables_of(picture);
    check_sample(picture, oracle, sample, &variables);
    if (HasFailure()) return;
  }
}

}  // namespace
}  // namespace nearpit
