#include "estimate/figures.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <utility>

#include "estimate/figure_reasons.h"
#include "estimate/hansen_hurwitz.h"
#include "estimate/horvitz_thompson.h"
#include "estimate/met_networks.h"
#include "estimate/missed_cluster.h"

namespace nearpit {
namespace {

constexpr std::array kEstimators = {Estimator::kHansenHurwitz, Estimator::kHorvitzThompson,
                                    Estimator::kFirstSampleOnly};

// What one estimator says of one variable, before anything open takes its variance away.
struct Measured {
  Moments moments;
  std::optional<double> nu;
  double mean_square = 0;  // the same estimator's mean of y^2 per node
};

Measured measure(const MetNetworks& met, std::size_t variable, Estimator estimator) {
  const NetworkTotals& totals = met.totals[variable];
  Measured measured;
  switch (estimator) {
    case Estimator::kHansenHurwitz:
      measured.moments = hansen_hurwitz(met.design, met.networks, totals.sum);
      measured.nu = degrees_of_freedom(measured.moments.parts);
      measured.mean_square = hansen_hurwitz(met.design, met.networks, totals.squares).mean;
      break;
    case Estimator::kHorvitzThompson:
      measured.moments = horvitz_thompson(met.design, met.networks, totals.sum);
      measured.nu = degrees_of_freedom(hansen_hurwitz(met.design, met.networks, totals.sum).parts);
      measured.mean_square = horvitz_thompson_mean(met.design, met.networks, totals.squares);
      break;
    case Estimator::kFirstSampleOnly: {
      const NetworkTotals& own = met.own_totals[variable];
      measured.moments = hansen_hurwitz(met.design, met.own_units, own.sum);
      measured.nu = degrees_of_freedom(measured.moments.parts);
      measured.mean_square = hansen_hurwitz(met.design, met.own_units, own.squares).mean;
      break;
    }
  }
  return measured;
}

// The spread between possible pits: S2 = N/(N-1) [mean(y^2) - (mean^2 - v)], never below 0.
double spread_of_pits(const Measured& measured, double variance, double nodes) {
  if (nodes < 2) return 0;
  const double mean = measured.moments.mean;
  return std::max(0.0, nodes / (nodes - 1) * (measured.mean_square - (mean * mean - variance)));
}

void add_reason(std::vector<std::string>* why, const std::string& reason) {
  if (!reason.empty() && std::find(why->begin(), why->end(), reason) == why->end()) why->push_back(reason);
}

// All rows of one survey.
class Rows {
 public:
  Rows(const Survey& survey, const FigureSettings& settings, const Progress& progress, const MetNetworks& met)
      : survey_(&survey),
        settings_(&settings),
        progress_(&progress),
        met_(&met),
        everywhere_(open_work(progress)),
        first_sample_(open_in_first_sample(survey)) {}

  // `on_ground`: a count, which has a figure per m2; positive pits have none.
  Estimate row(const std::string& of, std::size_t variable, Estimator estimator, bool on_ground) const {
    Measured measured = measure(*met_, variable, estimator);
    const bool first = estimator == Estimator::kFirstSampleOnly;
    if ((first ? first_sample_ : everywhere_).hides_variance()) measured.moments.variance.reset();
    Estimate row;
    row.of = of;
    row.estimator = estimator;
    row.status = figure_status(*progress_, estimator);
    row.why = open_reasons(everywhere_, first_sample_, estimator);
    fill_size(measured, on_ground, &row);
    fill_spread(measured, variable, &row);
    if (on_ground && row.standard_error) fill_ground(measured, variable, &row);
    add_assumptions(first, on_ground, &row);
    return row;
  }

 private:
  double nodes() const { return static_cast<double>(met_->design.nodes); }
  double cell_area() const { return survey_->ground().frame.lattice().cell_area_m2(); }
  double found_per_node(std::size_t variable) const { return met_->found[variable] / nodes(); }

  // Positive pits: each dug pit that is not positive is one that can't be.
  double most_positive_per_node() const {
    const double positive = met_->found.back();
    return 1 - (met_->dug - positive) / nodes();
  }

  void fill_size(const Measured& measured, bool on_ground, Estimate* row) const {
    row->mean_per_pit = measured.moments.mean;
    row->total = row->mean_per_pit * nodes();
    if (!on_ground) return;
    row->per_m2 = row->mean_per_pit / settings_->pit_area_m2;
    row->total = *row->per_m2 * (nodes() * cell_area());
  }

  void fill_spread(const Measured& measured, std::size_t variable, Estimate* row) const {
    const std::optional<double>& variance = measured.moments.variance;
    if (met_->design.lone_unit()) add_reason(&row->why, lone_unit_reason(survey_->ground()));
    if (row->mean_per_pit < found_per_node(variable) * (1 - 1e-12)) {
      add_reason(&row->why, "more was dug up than this figure says: no likely range lies below what was found");
    }
    row->variance_of_mean = variance;
    if (!variance) return;
    if (*variance >= 0 && !spread_is_unjudged(row->mean_per_pit, *variance, met_->design.census())) {
      row->standard_error = std::sqrt(*variance);
    }
    std::string reason;
    row->range = plain_t_range({.mean = row->mean_per_pit,
                                .variance = variance,
                                .nu = measured.nu,
                                .level = settings_->confidence,
                                .found_per_node = found_per_node(variable),
                                .most_per_node = row->per_m2 ? std::nullopt : std::optional(most_positive_per_node()),
                                .census = met_->design.census()},
                               &reason);
    add_reason(&row->why, reason);
  }

  // Per m2. The whole ground holds at least what was found in it.
  void fill_ground(const Measured& measured, std::size_t variable, Estimate* row) const {
    const double variance = *measured.moments.variance;
    const double area = settings_->pit_area_m2;
    const double of_ground = variance + spread_of_pits(measured, variance, nodes()) / nodes();
    row->ground.standard_error = std::sqrt(of_ground) / area;
    const bool census = met_->design.census();
    if (!census && !row->range) return;  // for the same reason
    std::string reason;
    row->ground.range = plain_t_range({.mean = *row->per_m2,
                                       .variance = of_ground / (area * area),
                                       .nu = census ? std::optional(nodes() - 1) : measured.nu,
                                       .level = settings_->confidence,
                                       .found_per_node = found_per_node(variable) / cell_area(),
                                       .most_per_node = std::nullopt,
                                       .census = false},
                                      &reason);
    add_reason(&row->why, reason);
  }

  void add_assumptions(bool first, bool on_ground, Estimate* row) const {
    if (progress_->truncated && !first) {
      add_reason(&row->why, "the ring limit kept pits off: the estimate is biased");
    }
    if (settings_->listed) add_reason(&row->why, "holds if the listed pits were drawn at random");
    if (on_ground) {
      add_reason(&row->why, std::string(kGroundReason));
    }
  }

  const Survey* survey_;
  const FigureSettings* settings_;
  const Progress* progress_;
  const MetNetworks* met_;
  OpenWork everywhere_;
  OpenWork first_sample_;
};

std::vector<Estimate> all_rows(const Rows& rows, const std::vector<std::string>& finds) {
  std::vector<Estimate> estimates;
  const auto add = [&](const std::string& of, std::size_t variable, bool on_ground) {
    for (const Estimator estimator : kEstimators)
      estimates.push_back(rows.row(of, variable, estimator, on_ground));
  };
  add("target", 0, true);
  for (std::size_t find = 0; find < finds.size(); ++find)
    add(finds[find], find + 1, true);
  add("positive pits", finds.size() + 1, false);
  return estimates;
}

std::optional<std::uint64_t> missed_pits(const Survey& survey, double level) {
  const SurveyGround& ground = survey.ground();
  const DigList& list = survey.dig_list();
  if (ground.units.kind != DrawKind::kPits) return std::nullopt;
  std::vector<StratumSize> strata;
  for (std::size_t area = 0; area < ground.sample.drawn.size(); ++area) {
    strata.push_back({ground.units.count[area], static_cast<std::uint32_t>(ground.sample.drawn[area].size())});
  }
  for (NodeId id = 0; id < ground.frame.size(); ++id) {
    if (!ground.sample.holds[static_cast<std::size_t>(id)]) continue;
    if (list.due(id) || list.halted(id)) return std::nullopt;
    const bool not_dug = list.not_dug(id, ReasonClass::kGround) || list.not_dug(id, ReasonClass::kAccess);
    if (not_dug) --strata[ground.areas.of_node[static_cast<std::size_t>(id)]].drawn;
  }
  return missed_cluster_pits(strata, level);
}

}  // namespace

std::string_view word(Estimator estimator) {
  switch (estimator) {
    case Estimator::kHansenHurwitz:
      return "hansen_hurwitz";
    case Estimator::kHorvitzThompson:
      return "horvitz_thompson";
    case Estimator::kFirstSampleOnly:
      break;
  }
  return "first_sample_only";
}

std::string_view word(FigureStatus status) {
  switch (status) {
    case FigureStatus::kFinal:
      return "final";
    case FigureStatus::kProvisional:
      return "provisional";
    case FigureStatus::kTruncated:
      break;
  }
  return "truncated";
}

Figures day_figures(const Survey& survey, const FigureSettings& settings) {
  const std::size_t finds = settings.finds.size();
  Figures figures;
  figures.progress = progress_of(survey);
  std::vector<Network> networks = find_networks(survey.dig_list());
  const MetNetworks met = met_networks(survey, networks, finds);
  figures.estimates = all_rows(Rows(survey, settings, figures.progress, met), settings.finds);
  figures.missed_cluster_pits = missed_pits(survey, settings.confidence);
  figures.clusters = as_clusters(survey, std::move(networks), finds);
  return figures;
}

}  // namespace nearpit
