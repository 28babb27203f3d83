#include "survey/positive_rule.h"

namespace nearpit {

std::uint64_t PositiveRule::target(const PitRecord& record) const {
  if (record.status != PitStatus::kDug) return 0;
  std::uint64_t sum = 0;
  for (const std::size_t find : finds) {
    if (find < record.counts.size()) sum += record.counts[find];
  }
  return sum;
}

bool PositiveRule::positive(const PitRecord& record) const {
  return record.status == PitStatus::kDug && target(record) >= at_least;
}

}  // namespace nearpit
