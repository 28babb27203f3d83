#include "estimate/met_networks.h"

#include <algorithm>

namespace nearpit {
namespace {

std::size_t index(NodeId id) { return static_cast<std::size_t>(id); }

UnitRef unit_of(const SurveyGround& ground, NodeId id) {
  return {ground.areas.of_node[index(id)], ground.units.of_node[index(id)]};
}

SampleDesign design_of(const SurveyGround& ground) {
  SampleDesign design;
  design.nodes = static_cast<std::uint64_t>(ground.frame.size());
  design.one_node_units = ground.units.kind == DrawKind::kPits;
  for (std::size_t area = 0; area < ground.sample.drawn.size(); ++area) {
    const std::vector<UnitId>& drawn = ground.sample.drawn[area];
    design.strata.push_back({ground.units.count[area], static_cast<std::uint32_t>(drawn.size())});
    for (const UnitId unit : drawn)
      design.drawn.push_back({static_cast<std::uint16_t>(area), unit});
  }
  return design;
}

MetNetwork lying_in(const SurveyGround& ground, const Network& cluster) {
  MetNetwork network;
  for (const NodeId id : cluster.nodes)
    network.units.push_back(unit_of(ground, id));
  std::sort(network.units.begin(), network.units.end());
  network.units.erase(std::unique(network.units.begin(), network.units.end()), network.units.end());
  return network;
}

// The target, each find, positive pits.
std::vector<double> values_of(const PitRecord& record, const PositiveRule& rule, std::size_t finds) {
  std::vector<double> values;
  values.push_back(static_cast<double>(rule.target(record)));
  for (std::size_t find = 0; find < finds; ++find) {
    values.push_back(find < record.counts.size() ? record.counts[find] : 0);
  }
  values.push_back(rule.positive(record) ? 1 : 0);
  return values;
}

void add_to(std::vector<NetworkTotals>* totals, std::size_t network, const std::vector<double>& values) {
  for (std::size_t variable = 0; variable < values.size(); ++variable) {
    (*totals)[variable].sum[network] += values[variable];
    (*totals)[variable].squares[network] += values[variable] * values[variable];
  }
}

std::vector<NetworkTotals> no_totals(std::size_t variables, std::size_t networks) {
  const std::vector<double> zeros(networks, 0);
  return std::vector<NetworkTotals>(variables, NetworkTotals{.sum = zeros, .squares = zeros});
}

// Ascending, so that sums round the same way every time.
std::vector<NodeId> dug_nodes(const Survey& survey) {
  std::vector<NodeId> nodes;
  for (const auto& [id, entry] : survey.pits()) {
    if (entry.record().status == PitStatus::kDug) nodes.push_back(id);
  }
  std::sort(nodes.begin(), nodes.end());
  return nodes;
}

std::size_t position_of(const std::vector<UnitRef>& drawn, const UnitRef& unit) {
  return static_cast<std::size_t>(std::lower_bound(drawn.begin(), drawn.end(), unit) - drawn.begin());
}

}  // namespace

MetNetworks met_networks(const Survey& survey, const std::vector<Network>& clusters, std::size_t finds) {
  const SurveyGround& ground = survey.ground();
  MetNetworks met;
  met.design = design_of(ground);
  for (const UnitRef& unit : met.design.drawn)
    met.own_units.push_back({{unit}});
  for (const Network& cluster : clusters)
    met.networks.push_back(lying_in(ground, cluster));
  met.networks.insert(met.networks.end(), met.own_units.begin(), met.own_units.end());

  const std::size_t variables = finds + 2;
  met.totals = no_totals(variables, met.networks.size());
  met.own_totals = no_totals(variables, met.own_units.size());
  met.found.assign(variables, 0);
  for (const NodeId id : dug_nodes(survey)) {
    const PitRecord& record = survey.pit(id)->record();
    const std::vector<double> values = values_of(record, ground.positive, finds);
    ++met.dug;
    for (std::size_t variable = 0; variable < variables; ++variable)
      met.found[variable] += values[variable];
    if (!ground.sample.holds[index(id)]) continue;
    const std::size_t unit = position_of(met.design.drawn, unit_of(ground, id));
    add_to(&met.own_totals, unit, values);
    if (!ground.positive.positive(record)) add_to(&met.totals, clusters.size() + unit, values);
  }
  for (std::size_t cluster = 0; cluster < clusters.size(); ++cluster) {
    for (const NodeId id : clusters[cluster].nodes) {
      add_to(&met.totals, cluster, values_of(survey.pit(id)->record(), ground.positive, finds));
    }
  }
  return met;
}

}  // namespace nearpit
