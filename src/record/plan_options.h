// What a plan may leave out: limits, order, labels, crews, contacts, permits, what a record asks for, the tie of a local grid, and what is
// expected of the ground.
#ifndef NEARPIT_RECORD_PLAN_OPTIONS_H_
#define NEARPIT_RECORD_PLAN_OPTIONS_H_

#include "record/json_fields.h"
#include "record/plan.h"

namespace nearpit {

// After the members that must be there.
void read_options(const Fields& plan, Plan* out);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_PLAN_OPTIONS_H_
