// Networks: maximal connected sets of the design's positives, two being joined when one may open the other (Thompson SK 1990, JASA
// 85:1050-1059). With a ring limit it is the connected part that was dug. People call a network a cluster.
#ifndef NEARPIT_SURVEY_NETWORKS_H_
#define NEARPIT_SURVEY_NETWORKS_H_

#include <vector>

#include "survey/dig_list.h"

namespace nearpit {

struct Network {
  std::vector<NodeId> nodes;  // ascending, at least one
  std::vector<NodeId> open;   // due or halted pits next to it, ascending
  bool cut_at_edge = false;   // confinement keeps a neighbour in another part
};

// In order of their first node. Cost: the design's positives.
std::vector<Network> find_networks(const DigList& list);

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_NETWORKS_H_
