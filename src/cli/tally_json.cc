#include "cli/tally_json.h"

#include <nlohmann/json.hpp>
#include <string>

namespace nearpit::cli {
namespace {

template <class T>
Json or_null(const std::optional<T>& value) {
  return value ? Json(*value) : Json(nullptr);
}

Json range_json(const std::optional<LikelyRange>& range) {
  if (!range) return nullptr;
  return {{"level", range->level}, {"lower", range->lower}, {"upper", range->upper}, {"method", range->method}};
}

Json frame_json(const SurveyModel& model) {
  const SurveyGround& ground = model.survey().ground();
  Json strata = Json::array();
  for (std::size_t i = 0; i < ground.areas.list.size(); ++i) {
    strata.push_back({{"name", ground.areas.list[i].name},
                      {"primary_units", ground.units.count[i]},
                      {"drawn", ground.sample.drawn[i].size()}});
  }
  return {{"pits", ground.frame.size()},
          {"area_m2", ground.frame.size() * ground.frame.lattice().cell_area_m2()},
          {"boundary_m2", area_m2(model.plan().boundary)},
          {"pit_area_m2", model.plan().pit_area_m2()},
          {"strata", std::move(strata)}};
}

Json progress_json(const Progress& progress) {
  return {{"first_sample", progress.first_sample},
          {"first_sample_dug", progress.first_sample_dug},
          {"dug", progress.dug},
          {"positive", progress.positive},
          {"not_dug", progress.not_dug},
          {"judgement", progress.judgement},
          {"due", progress.due},
          {"halted", progress.halted},
          {"no_longer_required", progress.no_longer_required},
          {"withdrawn", progress.withdrawn},
          {"conflicts", progress.conflicts},
          {"complete", progress.complete},
          {"truncated", progress.truncated}};
}

Json cluster_json(const Cluster& cluster, const SurveyModel& model) {
  Json finds = Json::object();
  for (std::size_t i = 0; i < cluster.finds.size(); ++i)
    finds[model.plan().finds[i]] = cluster.finds[i];
  return {{"label", model.label(cluster.label)},
          {"pits", model.labels_of(cluster.network.nodes)},
          {"finds", std::move(finds)},
          {"area_m2", cluster.area_m2},
          {"in_first_sample", cluster.in_first_sample},
          {"closed", cluster.closed()},
          {"open_because", model.labels_of(cluster.network.open)},
          {"cut_at_edge", cluster.network.cut_at_edge}};
}

Json estimate_json(const Estimate& estimate) {
  return {
      {"of", estimate.of},
      {"estimator", word(estimate.estimator)},
      {"mean_per_pit", estimate.mean_per_pit},
      {"per_m2", or_null(estimate.per_m2)},
      {"total", estimate.total},
      {"variance_of_mean", or_null(estimate.variance_of_mean)},
      {"standard_error", or_null(estimate.standard_error)},
      {"interval", range_json(estimate.range)},
      {"ground",
       {{"standard_error", or_null(estimate.ground.standard_error)}, {"interval", range_json(estimate.ground.range)}}},
      {"status", word(estimate.status)},
      {"why", estimate.why}};
}

}  // namespace

Json tally_json(const Figures& figures, const SurveyModel& model) {
  Json clusters = Json::array();
  for (const Cluster& cluster : figures.clusters)
    clusters.push_back(cluster_json(cluster, model));
  Json estimates = Json::array();
  for (const Estimate& estimate : figures.estimates)
    estimates.push_back(estimate_json(estimate));
  return {{"survey", model.plan().survey},
          {"frame", frame_json(model)},
          {"progress", progress_json(figures.progress)},
          {"clusters", std::move(clusters)},
          {"missed_cluster_pits", or_null(figures.missed_cluster_pits)},
          {"estimates", std::move(estimates)}};
}

}  // namespace nearpit::cli
