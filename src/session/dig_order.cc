#include "session/dig_order.h"

#include <algorithm>
#include <cstdint>

#include "base/clock.h"
#include "route/walking_order.h"
#include "survey/networks.h"

namespace nearpit {
namespace {

// Rows that hold a pit of the first sample, ascending: the lines that are walked.
std::vector<std::int32_t> first_sample_rows(const SurveyGround& ground) {
  std::vector<std::int32_t> rows;
  for (const Run& run : ground.frame.runs()) {
    if (!rows.empty() && rows.back() == run.row) continue;
    const NodeId last = run.start + (run.last - run.first);
    for (NodeId id = run.start; id <= last; ++id) {
      if (!ground.sample.holds[static_cast<std::size_t>(id)]) continue;
      rows.push_back(run.row);
      break;
    }
  }
  return rows;
}

struct LastPit {
  std::int64_t dug_ms = INT64_MIN;
  std::int64_t clock = INT64_MIN;
  std::string label;
  Point place;
};

std::vector<NodeId> walked(const SurveyModel& model, const std::vector<NodeId>& due, const Point& start) {
  const Frame& frame = model.survey().ground().frame;
  std::vector<std::size_t> order;
  if (model.plan().nearest_order) {
    std::vector<Point> places;
    for (const NodeId id : due)
      places.push_back(frame.ground(id));
    order = nearest_order(start, places);
  } else {
    std::vector<Node> nodes;
    for (const NodeId id : due)
      nodes.push_back(frame.node(id));
    order = transect_order(frame.lattice(), first_sample_rows(model.survey().ground()), nodes);
  }
  std::vector<NodeId> sorted;
  for (const std::size_t i : order)
    sorted.push_back(due[i]);
  return sorted;
}

// Stops of the list that the crew means to do now.
std::vector<NodeId> wanted(const DigOrder& order, bool first_sample_first) {
  const bool only_first = first_sample_first && order.first_sample_left > 0;
  std::vector<NodeId> stops;
  for (const DigStop& stop : order.due) {
    if (stop.first_sample || !only_first) stops.push_back(stop.node);
  }
  return stops;
}

}  // namespace

std::optional<LastDug> last_dug(const SurveyModel& model, const std::string& crew) {
  std::optional<LastPit> last;
  const auto look_at = [&](const PitEntry& entry, const Point& node_place, const auto& label) {
    const PitRecord& record = entry.record();
    if (record.status != PitStatus::kDug || (!crew.empty() && record.crew != crew)) return;
    const auto when = parse_time(record.dug_at, model.zone());
    const std::int64_t dug_ms = when ? when->time.utc_ms : INT64_MIN;
    const std::int64_t clock = entry.heads[entry.verdict.counts].clock;
    if (last && std::tie(dug_ms, clock) <= std::tie(last->dug_ms, last->clock)) return;
    last = {dug_ms, clock, label(), record.place.value_or(node_place)};
  };
  for (const auto& [id, entry] : model.survey().pits())
    look_at(entry, model.survey().ground().frame.ground(id), [&, node = id] { return model.label(node); });
  for (const auto& [label, entry] : model.survey().off_grid_pits())
    look_at(entry, {}, [&, name = label] { return name; });
  return last ? std::optional<LastDug>({last->label, last->place}) : std::nullopt;
}

NodeId next_stop(const SurveyModel& model, const DigOrder& order, NodeId after, bool first_sample_first) {
  std::vector<NodeId> stops = wanted(order, first_sample_first);
  if (stops.empty()) return kNoNode;
  // In the nearest order the list begins where the crew stands.
  if (after == kNoNode || model.plan().nearest_order) return stops.front();
  if (std::find(stops.begin(), stops.end(), after) == stops.end()) stops.push_back(after);
  const Point place = model.survey().ground().frame.ground(after);
  const std::vector<NodeId> line = walked(model, stops, place);
  const auto here = std::find(line.begin(), line.end(), after);
  return here + 1 == line.end() ? line.front() : *(here + 1);
}

DigOrder dig_order(const SurveyModel& model, const std::string& crew, const std::optional<Point>& from) {
  const Survey& survey = model.survey();
  const SurveyGround& ground = survey.ground();
  const DigList& list = survey.dig_list();
  Point at = ground.frame.lattice().origin;
  if (from) {
    at = *from;
  } else if (const auto last = last_dug(model, crew)) {
    at = last->place;
  }
  DigOrder order;
  for (const NodeId id : walked(model, list.due(), at)) {
    DigStop stop;
    stop.node = id;
    stop.first_sample = ground.sample.holds[static_cast<std::size_t>(id)];
    if (!stop.first_sample) stop.of = list.opened_by(id);
    stop.ring = list.ring(id);
    stop.place = ground.frame.ground(id);
    stop.distance_m = distance_m(at, stop.place);
    stop.bearing_deg = bearing_deg(at, stop.place);
    at = stop.place;
    ++(stop.first_sample ? order.first_sample_left : order.neighbours_left);
    order.due.push_back(std::move(stop));
  }
  order.asked = survey.asked();
  for (const Network& network : find_networks(list))
    order.open_clusters += network.open.empty() ? 0u : 1u;
  return order;
}

}  // namespace nearpit
