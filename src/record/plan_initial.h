// The plan's "initial": how the first sample is drawn, or that it was drawn elsewhere.
#ifndef NEARPIT_RECORD_PLAN_INITIAL_H_
#define NEARPIT_RECORD_PLAN_INITIAL_H_

#include <optional>

#include "record/json_fields.h"
#include "record/plan.h"

namespace nearpit {

constexpr NumberRange kSpacing_m{0.1, 1000};
constexpr std::int64_t kMostEvery = 1000;

// Reads into plan->initial, after the areas. `areas_known`: their names are all good, so that counts can be held against them. Gives the spacing when
// "interval_m" and "between" say it (also when something is wrong with them: 0).
std::optional<double> read_initial(const Fields& plan, bool areas_known, Plan* out);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_PLAN_INITIAL_H_
