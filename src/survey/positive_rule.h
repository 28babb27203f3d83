// The positive rule (condition C): a dug pit is positive when its counts of the plan's target finds sum to at least `at_least`.
// Always on observed counts; a pit that is not dug or withdrawn is never positive.
#ifndef NEARPIT_SURVEY_POSITIVE_RULE_H_
#define NEARPIT_SURVEY_POSITIVE_RULE_H_

#include <cstdint>
#include <vector>

#include "survey/pit_record.h"

namespace nearpit {

struct PositiveRule {
  std::vector<std::size_t> finds;  // indices into the plan's finds, at least one, distinct
  std::uint32_t at_least = 1;      // >= 1

  std::uint64_t target(const PitRecord& record) const;
  bool positive(const PitRecord& record) const;
};

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_POSITIVE_RULE_H_
