// From a survey's records to what the estimators take: the sample design, the networks that the first sample met, and what each holds of
// every variable.
//
//   variables    the target, each find in the plan's order, then positive pits (1 for a positive, 0 for any other)
//   counted      only pits of the design that are dug: a due, halted, withdrawn or not-dug pit counts 0 and is not positive; judgement pits
//                that the design does not reach and pits off the grid never count
//   networks     each network of positives, in order of its first node; then, for each drawn unit, all its other pits as one: each is a
//                network of one, and they are always met together, so this is exact
//   own units    each drawn unit as a network of its own, which turns the Hansen-Hurwitz code into the ordinary estimator of the first sample
#ifndef NEARPIT_ESTIMATE_MET_NETWORKS_H_
#define NEARPIT_ESTIMATE_MET_NETWORKS_H_

#include <cstddef>
#include <vector>

#include "estimate/sample_design.h"
#include "survey/networks.h"
#include "survey/survey.h"

namespace nearpit {

// One variable over networks, in their order.
struct NetworkTotals {
  std::vector<double> sum;      // of y over the network's nodes: y*_k
  std::vector<double> squares;  // of y^2 over the network's nodes
};

struct MetNetworks {
  SampleDesign design;
  std::vector<MetNetwork> networks;
  std::vector<NetworkTotals> totals;      // by variable
  std::vector<MetNetwork> own_units;      // in the order of design.drawn
  std::vector<NetworkTotals> own_totals;  // by variable, of all pits of the unit
  double dug = 0;                         // pits of the frame that were dug, judgement pits too
  std::vector<double> found;              // by variable, over all dug pits of the frame, judgement pits too
};

// `clusters` is find_networks(survey.dig_list()); `finds` how many finds the plan has.
MetNetworks met_networks(const Survey& survey, const std::vector<Network>& clusters, std::size_t finds);

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_MET_NETWORKS_H_
