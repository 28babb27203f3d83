// How far the survey is: counts of pits, and whether anything is open.
#ifndef NEARPIT_SURVEY_PROGRESS_H_
#define NEARPIT_SURVEY_PROGRESS_H_

#include <cstddef>

#include "survey/survey.h"

namespace nearpit {

struct Progress {
  std::size_t first_sample = 0;
  std::size_t first_sample_dug = 0;  // with any record, or in a closed area
  std::size_t dug = 0;               // judgement pits and pits off the grid too
  std::size_t positive = 0;          // the same scope
  std::size_t not_dug = 0;           // by record, or design pits in a closed area
  std::size_t judgement = 0;         // recorded pits that the design does not reach
  std::size_t due = 0;
  std::size_t halted = 0;
  std::size_t no_longer_required =
      0;  // those of `judgement` that are on the grid and that nobody called judgement or asked for
  std::size_t withdrawn = 0;
  std::size_t conflicts = 0;
  std::size_t access_refused = 0;  // design pits not dug for an access reason
  // first-sample pits due, halted or in a conflict that could change what is positive
  std::size_t first_sample_open = 0;
  std::size_t outcome_conflicts = 0;  // conflicts on design pits that could change what is positive
  bool complete = false;              // the first sample recorded; nothing due, halted, in conflict or refused
  bool truncated = false;             // the ring limit kept a pit off
};

Progress progress_of(const Survey& survey);

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_PROGRESS_H_
