// The plan's members, read and checked one after the other; each function fills its part of the plan and adds what is wrong to the findings. What it
// can't read stays at its default, so that the rest of the plan is checked in the same go.
#ifndef NEARPIT_RECORD_PLAN_READER_H_
#define NEARPIT_RECORD_PLAN_READER_H_

#include "record/json_fields.h"
#include "record/plan.h"

namespace nearpit {

// The whole document.
Plan plan_of(const Json& json, Findings* findings);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_PLAN_READER_H_
