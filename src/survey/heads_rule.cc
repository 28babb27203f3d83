#include "survey/heads_rule.h"

#include <algorithm>
#include <tuple>

namespace nearpit {
namespace {

int rank(const PitRecord& record, const PositiveRule& rule) {
  if (rule.positive(record)) return 3;
  if (record.status == PitStatus::kDug) return 2;
  return record.status == PitStatus::kNotDug ? 1 : 0;
}

bool equal_but_for_default_time(PitRecord a, PitRecord b) {
  if (a.dug_at_defaulted || b.dug_at_defaulted) {
    a.dug_at = b.dug_at;
    a.dug_at_defaulted = b.dug_at_defaulted;
  }
  return a == b;
}

}  // namespace

HeadsVerdict judge_heads(const std::vector<Head>& heads, const PositiveRule& rule) {
  HeadsVerdict verdict;
  const auto later = [&](std::size_t a, std::size_t b) {
    return std::tie(heads[a].clock, heads[a].writer, heads[a].revision) >
           std::tie(heads[b].clock, heads[b].writer, heads[b].revision);
  };
  std::size_t positives = 0;
  for (std::size_t i = 0; i < heads.size(); ++i) {
    const int own = rank(heads[i].record, rule);
    const int best = rank(heads[verdict.counts].record, rule);
    if (own > best || (own == best && later(i, verdict.counts))) verdict.counts = i;
    if (later(i, verdict.latest)) verdict.latest = i;
    if (own == 3) ++positives;
  }
  bool all_equal = true;
  for (const Head& head : heads) {
    for (const Head& other : heads)
      all_equal = all_equal && equal_but_for_default_time(head.record, other.record);
  }
  if (all_equal) return verdict;
  verdict.conflict = positives == 0 || positives == heads.size() ? Conflict::kSameOutcome : Conflict::kOutcome;
  return verdict;
}

}  // namespace nearpit
