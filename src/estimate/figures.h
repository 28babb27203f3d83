// The day's figures: every row that `tally` gives, from the records of a survey. Three estimators for the target, each find and positive
// pits; each row says how sure it is, or why it can't be given.
#ifndef NEARPIT_ESTIMATE_FIGURES_H_
#define NEARPIT_ESTIMATE_FIGURES_H_

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "estimate/likely_range.h"
#include "estimate/sample_design.h"
#include "survey/clusters.h"
#include "survey/progress.h"
#include "survey/survey.h"

namespace nearpit {

enum class Estimator { kHansenHurwitz, kHorvitzThompson, kFirstSampleOnly };
enum class FigureStatus { kFinal, kProvisional, kTruncated };
std::string_view word(Estimator estimator);  // hansen_hurwitz, horvitz_thompson, first_sample_only
std::string_view word(FigureStatus status);  // final, provisional, truncated

// About the ground: pits are a sample of the ground they stand for (per m2).
struct GroundRange {
  std::optional<double> standard_error;
  std::optional<LikelyRange> range;
};

struct Estimate {
  std::string of;  // "target", a find's name, "positive pits"
  Estimator estimator = Estimator::kHansenHurwitz;
  double mean_per_pit = 0;
  std::optional<double> per_m2;  // nothing for positive pits
  double total = 0;
  std::optional<double> variance_of_mean;
  std::optional<double> standard_error;
  std::optional<LikelyRange> range;  // of mean_per_pit
  GroundRange ground;                // of per_m2
  FigureStatus status = FigureStatus::kFinal;
  std::vector<std::string> why;
};

struct FigureSettings {
  std::vector<std::string> finds;
  double confidence = 0.95;
  double pit_area_m2 = 0;
  bool listed = false;  // the first sample was drawn elsewhere
};

struct Figures {
  Progress progress;
  std::vector<Cluster> clusters;
  std::optional<std::uint64_t> missed_cluster_pits;
  std::vector<Estimate> estimates;  // target, each find, positive pits; by estimator within each
};

Figures day_figures(const Survey& survey, const FigureSettings& settings);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_FIGURES_H_
