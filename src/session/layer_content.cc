#include "session/layer_content.h"

#include <algorithm>
#include <optional>
#include <unordered_map>

#include "lattice/cells.h"
#include "record/revision.h"
#include "survey/clusters.h"

namespace nearpit {
namespace {

void fill_from_record(const PitRecord& record, const PositiveRule& rule, PitRow* row) {
  row->outcome = record.status == PitStatus::kNotDug ? "not dug" : rule.positive(record) ? "positive" : "negative";
  if (record.place) row->place = *record.place;
  row->chosen_by = word(record.chosen_by);
  if (record.reason) row->reason = word(*record.reason);
  row->crew = record.crew;
  row->dug_at = record.dug_at;
  row->depth_cm = record.depth_cm;
  if (record.stop) row->stop = word(*record.stop);
  row->bag = record.bag;
  row->note = record.note;
  if (record.status != PitStatus::kDug) return;
  for (std::size_t i = 0; i < row->finds.size(); ++i)
    row->finds[i] = record.counts[i];
}

// Why each node of a closed area counts as not dug: an access reason wins over a reason of the ground.
class ClosedReasons {
 public:
  explicit ClosedReasons(const Survey& survey) {
    for (const auto& [object, area] : survey.closed_areas()) {
      if (area.open_again) continue;
      for (const NodeId id : survey.nodes_in(area)) {
        const auto [at, fresh] = reasons_.emplace(id, area.reason);
        if (!fresh && class_of(at->second) == ReasonClass::kGround) at->second = area.reason;
      }
    }
  }
  std::string of(NodeId id) const {
    const auto found = reasons_.find(id);
    return found == reasons_.end() ? "" : std::string(word(found->second));
  }

 private:
  std::unordered_map<NodeId, NotDugReason> reasons_;
};

// Nothing when the layer does not show the node: nobody dug it and nobody has to.
std::optional<PitRow> pit_row(const SurveyModel& model, const ClosedReasons& closed, NodeId id) {
  const Survey& survey = model.survey();
  const SurveyGround& ground = survey.ground();
  const DigList& list = survey.dig_list();
  PitRow row;
  row.label = model.label(id);
  row.place = ground.frame.ground(id);
  row.area = ground.areas.list[ground.areas.of_node[static_cast<std::size_t>(id)]].name;
  row.first_sample = ground.sample.holds[static_cast<std::size_t>(id)];
  if (list.in_design(id)) row.ring = list.ring(id);
  row.finds.resize(model.plan().finds.size());
  const PitEntry* entry = survey.pit(id);
  if (entry && !entry->withdrawn()) {
    fill_from_record(entry->record(), ground.positive, &row);
  } else if (list.halted(id)) {
    row.outcome = "halted";
  } else if (list.due(id)) {
    row.outcome = "due";
  } else if (list.in_design(id)) {
    row.outcome = "not dug";
    row.reason = closed.of(id);
  } else {
    return std::nullopt;
  }
  return row;
}

std::optional<PitRow> off_grid_row(const SurveyModel& model, const std::string& label) {
  const PitEntry* entry = model.survey().off_grid(label);
  if (!entry || entry->withdrawn()) return std::nullopt;
  PitRow row;
  row.label = label;
  row.finds.resize(model.plan().finds.size());
  fill_from_record(entry->record(), model.survey().ground().positive, &row);
  return row;
}

std::vector<ClusterRow> cluster_rows(const SurveyModel& model) {
  const Frame& frame = model.survey().ground().frame;
  std::vector<ClusterRow> rows;
  for (const Cluster& cluster : find_clusters(model.survey(), model.plan().finds.size())) {
    ClusterRow row;
    row.label = model.label(cluster.label);
    row.pits = static_cast<std::int64_t>(cluster.network.nodes.size());
    row.in_first_sample = static_cast<std::int64_t>(cluster.in_first_sample);
    row.area_m2 = cluster.area_m2;
    row.closed = cluster.closed();
    row.finds.assign(cluster.finds.begin(), cluster.finds.end());
    std::vector<Node> nodes;
    for (const NodeId id : cluster.network.nodes)
      nodes.push_back(frame.node(id));
    row.outline = cells_outline(frame.lattice(), nodes);
    rows.push_back(std::move(row));
  }
  return rows;
}

std::vector<AreaRow> area_rows(const SurveyModel& model) {
  const SurveyGround& ground = model.survey().ground();
  std::vector<AreaRow> rows;
  for (std::size_t i = 0; i < ground.areas.list.size(); ++i) {
    AreaRow row;
    row.name = ground.areas.list[i].name;
    row.primary_units = ground.units.count[i];
    row.drawn = static_cast<std::int64_t>(ground.sample.drawn[i].size());
    row.outline = ground.areas.list[i].boundary.empty() ? model.plan().boundary : ground.areas.list[i].boundary;
    rows.push_back(std::move(row));
  }
  for (const AreaId area : ground.areas.of_node)
    ++rows[area].nodes;
  return rows;
}

std::vector<ClosedAreaRow> closed_rows(const SurveyModel& model) {
  const Frame& frame = model.survey().ground().frame;
  std::vector<ClosedAreaRow> rows;
  for (const auto& [object, area] : model.survey().closed_areas()) {
    ClosedAreaRow row{object, area.name, std::string(word(area.reason)), area.by, area.open_again, area.polygon};
    if (row.outline.empty()) {
      std::vector<Node> nodes;
      for (const NodeId id : model.survey().nodes_in(area))
        nodes.push_back(frame.node(id));
      row.outline = cells_outline(frame.lattice(), nodes);
    }
    rows.push_back(std::move(row));
  }
  return rows;
}

}  // namespace

LayerRows layer_rows(const SurveyModel& model) {
  LayerRows rows;
  rows.finds = model.plan().finds;
  const ClosedReasons closed(model.survey());
  for (NodeId id = 0; id < model.survey().ground().frame.size(); ++id) {
    if (!model.survey().dig_list().in_design(id) && !model.survey().pit(id)) continue;
    if (auto row = pit_row(model, closed, id)) rows.pits.push_back(std::move(*row));
  }
  for (const auto& [label, entry] : model.survey().off_grid_pits()) {
    if (auto row = off_grid_row(model, label)) rows.pits.push_back(std::move(*row));
  }
  rows.clusters = cluster_rows(model);
  rows.boundary = model.plan().boundary;
  rows.survey = model.plan().survey;
  rows.strata = area_rows(model);
  rows.closed_areas = closed_rows(model);
  return rows;
}

LayerChanges layer_changes(const SurveyModel& model, std::vector<NodeId> nodes, const std::set<std::string>& objects) {
  LayerChanges changes;
  std::sort(nodes.begin(), nodes.end());
  nodes.erase(std::unique(nodes.begin(), nodes.end()), nodes.end());
  const ClosedReasons closed(model.survey());
  for (const NodeId id : nodes) {
    if (auto row = pit_row(model, closed, id)) {
      changes.put_pits.push_back(std::move(*row));
    } else {
      changes.remove_pits.push_back(model.label(id));
    }
  }
  bool areas = false;
  for (const std::string& object : objects) {
    areas = areas || is_area_object(object);
    const std::string label(object_name(object));
    if (!is_pit_object(object) || Labels::looks_like_node(label)) continue;
    if (auto row = off_grid_row(model, label)) {
      changes.put_pits.push_back(std::move(*row));
    } else {
      changes.remove_pits.push_back(label);
    }
  }
  changes.clusters = cluster_rows(model);
  if (areas) changes.closed_areas = closed_rows(model);
  return changes;
}

}  // namespace nearpit
