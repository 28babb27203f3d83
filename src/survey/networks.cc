#include "survey/networks.h"

#include <algorithm>
#include <unordered_set>

namespace nearpit {
namespace {

Network grown_from(NodeId seed, const DigList& list, std::unordered_set<NodeId>* seen) {
  const SurveyGround& ground = list.ground();
  Network network;
  network.nodes.push_back(seed);
  seen->insert(seed);
  for (std::size_t next = 0; next < network.nodes.size(); ++next) {
    const NodeId at = network.nodes[next];
    ground.frame.each_neighbour(ground.neighbours, at, [&](NodeId other) {
      if (!ground.confinement.allows(ground.frame, ground.areas, at, other)) {
        network.cut_at_edge = true;
      } else if (list.due(other) || list.halted(other)) {
        network.open.push_back(other);
      } else if (list.in_design(other) && list.state(other) == PitState::kPositive && seen->insert(other).second) {
        network.nodes.push_back(other);
      }
    });
  }
  std::sort(network.nodes.begin(), network.nodes.end());
  std::sort(network.open.begin(), network.open.end());
  network.open.erase(std::unique(network.open.begin(), network.open.end()), network.open.end());
  return network;
}

}  // namespace

std::vector<Network> find_networks(const DigList& list) {
  std::vector<Network> networks;
  std::unordered_set<NodeId> seen;
  for (const NodeId id : list.design_positives()) {
    if (!seen.contains(id)) networks.push_back(grown_from(id, list, &seen));
  }
  return networks;
}

}  // namespace nearpit
