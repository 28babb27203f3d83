// The pits to dig, in walking order, with why each is due and how to walk there.
#ifndef NEARPIT_SESSION_DIG_ORDER_H_
#define NEARPIT_SESSION_DIG_ORDER_H_

#include <optional>
#include <string>
#include <vector>

#include "session/survey_model.h"

namespace nearpit {

struct DigStop {
  NodeId node = kNoNode;
  bool first_sample = false;
  std::vector<NodeId> of;  // positives that opened it; empty for the first sample
  std::int32_t ring = 0;
  Point place;
  double distance_m = 0;   // from the stop before
  double bearing_deg = 0;  // clockwise from grid north
};

// Where a crew dug last (any crew when `crew` is empty): the latest dug pit, by the time dug, then by the log's clock.
struct LastDug {
  std::string label;
  Point place;
};
std::optional<LastDug> last_dug(const SurveyModel& model, const std::string& crew);

struct DigOrder {
  std::vector<DigStop> due;
  std::vector<NodeId> asked;  // judgement pits that the crew asked for, apart
  std::size_t first_sample_left = 0;
  std::size_t neighbours_left = 0;
  std::size_t open_clusters = 0;
};

// Walking starts at `from`, else at the crew's last pit (any crew's when `crew` is empty), else at the lattice's origin.
DigOrder dig_order(const SurveyModel& model, const std::string& crew, const std::optional<Point>& from);

// The pit to walk to when `after` has just been recorded: the next due pit in walking order, the first one when it was the last; only pits of the first
// sample where the crew wants those first, as long as there are any. `order` is the order of now. kNoNode: nothing is due.
NodeId next_stop(const SurveyModel& model, const DigOrder& order, NodeId after, bool first_sample_first);

}  // namespace nearpit

#endif  // NEARPIT_SESSION_DIG_ORDER_H_
