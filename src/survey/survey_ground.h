// What a survey fixes before anybody digs: the frame, its areas and primary units, the first sample, and the rules by which pits
// open others. Never changes once pits are logged.
#ifndef NEARPIT_SURVEY_SURVEY_GROUND_H_
#define NEARPIT_SURVEY_SURVEY_GROUND_H_

#include <optional>

#include "design/first_sample.h"
#include "survey/confinement.h"
#include "survey/positive_rule.h"

namespace nearpit {

struct SurveyGround {
  Frame frame;
  Areas areas;
  PrimaryUnits units;
  FirstSample sample;
  NeighbourRule neighbours = NeighbourRule::kEight;
  Confinement confinement;
  std::optional<std::int32_t> ring_limit;
  PositiveRule positive;

  // Neighbours that a positive at `id` may open: in the frame and in the same part.
  template <class Visit>
  void each_opened(NodeId id, Visit visit) const {
    frame.each_neighbour(neighbours, id, [&](NodeId other) {
      if (confinement.allows(frame, areas, id, other)) visit(other);
    });
  }
};

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_SURVEY_GROUND_H_
