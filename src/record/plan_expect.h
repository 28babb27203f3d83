// The plan's "expect": the site that the survey should find and the days it has. Only its form is checked here; every member may be left out.
#ifndef NEARPIT_RECORD_PLAN_EXPECT_H_
#define NEARPIT_RECORD_PLAN_EXPECT_H_

#include "record/json_fields.h"

namespace nearpit {

void check_expect(const Fields& plan);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_PLAN_EXPECT_H_
