// Several last records of one pit (two tablets wrote of it): which one counts until a person settles, and whether it matters.
//
// The latest positive head counts if any is positive, else the latest dug, else the latest not dug, else the latest withdrawn; later
// means by clock, then by writer. Heads that are equal in all fields but a defaulted dug_at are no conflict.
#ifndef NEARPIT_SURVEY_HEADS_RULE_H_
#define NEARPIT_SURVEY_HEADS_RULE_H_

#include <cstdint>
#include <string>
#include <vector>

#include "survey/pit_record.h"
#include "survey/positive_rule.h"

namespace nearpit {

struct Head {
  std::string revision;    // id of the revision
  std::int64_t clock = 0;  // hybrid logical clock
  std::string writer;
  PitRecord record;
};

enum class Conflict {
  kNone,
  kSameOutcome,  // every head positive, or none: estimates are provisional, ranges stand
  kOutcome,      // what is positive depends on it
};

struct HeadsVerdict {
  std::size_t counts = 0;  // index of the head that counts
  std::size_t latest = 0;  // index of the later head by clock, then writer
  Conflict conflict = Conflict::kNone;
};

// At least one head.
HeadsVerdict judge_heads(const std::vector<Head>& heads, const PositiveRule& rule);

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_HEADS_RULE_H_
