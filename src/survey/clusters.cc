#include "survey/clusters.h"

#include <algorithm>
#include <limits>
#include <utility>

#include "base/clock.h"

namespace nearpit {
namespace {

// Milliseconds; a time that can't be read comes last.
std::int64_t dug_when(const Survey& survey, NodeId id) {
  const auto parsed = parse_time(survey.pit(id)->record().dug_at, TimeZone::utc());
  return parsed ? parsed->time.utc_ms : std::numeric_limits<std::int64_t>::max();
}

Cluster cluster_of(const Survey& survey, Network network, std::size_t finds) {
  const SurveyGround& ground = survey.ground();
  Cluster cluster;
  cluster.finds.assign(finds, 0);
  std::int64_t earliest = 0;
  for (const NodeId id : network.nodes) {
    const std::vector<std::uint32_t>& counts = survey.pit(id)->record().counts;
    for (std::size_t find = 0; find < std::min(finds, counts.size()); ++find)
      cluster.finds[find] += counts[find];
    if (ground.sample.holds[static_cast<std::size_t>(id)]) ++cluster.in_first_sample;
    const std::int64_t when = dug_when(survey, id);
    if (cluster.label != kNoNode && when >= earliest) continue;
    cluster.label = id;
    earliest = when;
  }
  cluster.area_m2 = static_cast<double>(network.nodes.size()) * ground.frame.lattice().cell_area_m2();
  cluster.network = std::move(network);
  return cluster;
}

}  // namespace

std::vector<Cluster> as_clusters(const Survey& survey, std::vector<Network> networks, std::size_t finds) {
  std::vector<Cluster> clusters;
  clusters.reserve(networks.size());
  for (Network& network : networks)
    clusters.push_back(cluster_of(survey, std::move(network), finds));
  return clusters;
}

std::vector<Cluster> find_clusters(const Survey& survey, std::size_t finds) {
  return as_clusters(survey, find_networks(survey.dig_list()), finds);
}

}  // namespace nearpit
