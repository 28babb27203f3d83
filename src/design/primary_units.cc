#include "design/primary_units.h"

#include <map>
#include <utility>

namespace nearpit {
namespace {

using Start = std::pair<std::int32_t, std::int32_t>;

std::int32_t modulo(std::int32_t value, std::int32_t k) { return ((value % k) + k) % k; }

Start sub_lattice_start(const Lattice& lattice, const Node& node, std::int32_t k) {
  const std::int32_t p = node.row - 1;
  const std::int32_t q = lattice.rows_shift() ? (node.column - 1) - p / 2 : node.column - 1;  // p >= 0
  return {modulo(q, k), modulo(p, k)};
}

void number_pits(const Areas& areas, PrimaryUnits* units) {
  for (std::size_t i = 0; i < areas.of_node.size(); ++i)
    units->of_node[i] = units->count[areas.of_node[i]]++;
}

void number_transects(const Frame& frame, const Areas& areas, PrimaryUnits* units) {
  std::vector<std::int32_t> last_row(areas.list.size(), 0);  // rows count from 1
  NodeId id = 0;
  for (const Run& run : frame.runs()) {
    for (std::int32_t column = run.first; column <= run.last; ++column, ++id) {
      const auto at = static_cast<std::size_t>(id);
      const AreaId area = areas.of_node[at];
      if (last_row[area] != run.row) ++units->count[area];
      last_row[area] = run.row;
      units->of_node[at] = units->count[area] - 1;
    }
  }
}

void number_sub_lattices(const Frame& frame, const Areas& areas, PrimaryUnits* units) {
  std::vector<std::map<Start, UnitId>> starts(areas.list.size());
  for (NodeId id = 0; id < frame.size(); ++id) {
    starts[areas.of_node[static_cast<std::size_t>(id)]].emplace(
        sub_lattice_start(frame.lattice(), frame.node(id), units->every), 0);
  }
  for (std::size_t area = 0; area < starts.size(); ++area) {
    for (auto& [start, unit] : starts[area])
      unit = units->count[area]++;
  }
  for (NodeId id = 0; id < frame.size(); ++id) {
    const auto at = static_cast<std::size_t>(id);
    units->of_node[at] = starts[areas.of_node[at]].at(sub_lattice_start(frame.lattice(), frame.node(id), units->every));
  }
}

}  // namespace

std::string_view draw_kind_name(DrawKind kind) {
  switch (kind) {
    case DrawKind::kPits:
      return "pits";
    case DrawKind::kTransects:
      return "transects";
    case DrawKind::kSystematic:
      return "systematic";
  }
  return "";
}

std::string_view unit_word(DrawKind kind, bool several) {
  switch (kind) {
    case DrawKind::kPits:
      return several ? "pits" : "pit";
    case DrawKind::kTransects:
      return several ? "transects" : "transect";
    case DrawKind::kSystematic:
      break;
  }
  return several ? "systematic starts" : "systematic start";
}

PrimaryUnits PrimaryUnits::of(const Frame& frame, const Areas& areas, DrawKind kind, std::int32_t every) {
  PrimaryUnits units;
  units.kind = kind;
  units.every = kind == DrawKind::kSystematic ? every : 1;
  units.of_node.assign(static_cast<std::size_t>(frame.size()), 0);
  units.count.assign(areas.list.size(), 0);
  switch (kind) {
    case DrawKind::kPits:
      number_pits(areas, &units);
      break;
    case DrawKind::kTransects:
      number_transects(frame, areas, &units);
      break;
    case DrawKind::kSystematic:
      number_sub_lattices(frame, areas, &units);
      break;
  }
  return units;
}

}  // namespace nearpit
