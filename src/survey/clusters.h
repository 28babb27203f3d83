// Clusters: what people call the networks of the design's positives, single positives too.
#ifndef NEARPIT_SURVEY_CLUSTERS_H_
#define NEARPIT_SURVEY_CLUSTERS_H_

#include <cstddef>
#include <cstdint>
#include <vector>

#include "survey/networks.h"
#include "survey/survey.h"

namespace nearpit {

struct Cluster {
  NodeId label = kNoNode;  // its first dug pit: earliest dug_at, then row, then column
  Network network;
  std::vector<std::uint64_t> finds;  // by the plan's order
  std::size_t in_first_sample = 0;
  double area_m2 = 0;
  bool closed() const { return network.open.empty(); }
};

// One cluster a network, in the same order; `finds` is how many finds the plan has.
std::vector<Cluster> as_clusters(const Survey& survey, std::vector<Network> networks, std::size_t finds);
std::vector<Cluster> find_clusters(const Survey& survey, std::size_t finds);

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_CLUSTERS_H_
