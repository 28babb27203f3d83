#include "record/plan.h"

#include <algorithm>
#include <cmath>
#include <numbers>
#include <set>
#include <unordered_map>
#include <utility>

#include "base/random.h"
#include "base/text.h"
#include "record/geometry_json.h"
#include "record/plan_reader.h"

namespace nearpit {
namespace {

// The lines of an error of the ground, which begin with the plan's field, each led by the file.
Error in_file(const std::string& file, const Error& error) {
  std::vector<std::string> lines;
  for (const std::string& line : error.lines)
    lines.push_back(file + ": " + line);
  return {error.kind, std::move(lines)};
}

Lattice lattice_of(const Plan& plan) {
  Lattice lattice{plan.lattice, plan.spacing_m, {}, plan.bearing_deg};
  if (plan.origin) {
    lattice.origin = *plan.origin;
  } else if (plan.random_origin) {
    SeededRandom random(plan.initial.seed, RandomStream::kOrigin);
    const double along = random.unit();
    const double across = random.unit();
    lattice.origin = default_origin(lattice, plan.boundary, along, across);
  } else {
    lattice.origin = default_origin(lattice, plan.boundary);
  }
  return lattice;
}

std::vector<Area> areas_of(const Plan& plan) {
  if (plan.areas.empty()) return {{"all", {}}};
  std::vector<Area> areas;
  for (const PlanArea& area : plan.areas)
    areas.push_back({area.name, area.boundary});
  return areas;
}

// The nodes of a listed first sample.
Result<std::vector<NodeId>> listed_nodes(const Plan& plan, const std::string& file, const Frame& frame) {
  const Labels labels = labels_of(plan, frame.lattice());
  std::vector<NodeId> nodes;
  std::vector<std::string> lines;
  std::unordered_map<NodeId, std::size_t> first;
  for (std::size_t i = 0; i < plan.initial.pits.size(); ++i) {
    const std::string& label = plan.initial.pits[i];
    const std::string lead = file + ": initial.pits." + std::to_string(i) + ": " + in_quotes(label);
    const auto node = labels.read(label);
    const NodeId id = node ? frame.find(*node) : kNoNode;
    if (id == kNoNode) {
      lines.push_back(lead + (node ? " lies outside the boundary" : " is no label of this lattice") +
                      "; legal: labels of pits inside the boundary, such as " + in_quotes(labels.write(frame.node(0))));
    } else if (const auto [place, fresh] = first.emplace(id, i); !fresh) {
      lines.push_back(lead + " is the same pit as " + in_quotes(plan.initial.pits[place->second]) +
                      "; legal: each pit once");
    } else {
      nodes.push_back(id);
    }
  }
  if (!lines.empty()) return Error(ErrorKind::kBadInput, std::move(lines));
  return nodes;
}

std::vector<std::uint32_t> counts_of(const Plan& plan, const Areas& areas) {
  std::vector<std::uint32_t> counts;
  for (const Area& area : areas.list) {
    const auto found = plan.initial.count.find(area.name);
    counts.push_back(found == plan.initial.count.end() ? 0 : found->second);
  }
  return counts;
}

// What is wrong with a first sample that a survey file holds, or nothing.
std::string stored_sample_problem(const Plan& plan, const SurveyGround& ground,
                                  const std::vector<std::vector<UnitId>>& drawn) {
  const std::size_t areas = ground.areas.list.size();
  if (drawn.size() != areas) {
    return "holds " + std::to_string(drawn.size()) + " areas where the plan has " + std::to_string(areas);
  }
  const std::vector<std::uint32_t> counts = counts_of(plan, ground.areas);
  for (std::size_t h = 0; h < areas; ++h) {
    const std::string of = "of area " + in_quotes(ground.areas.list[h].name) + " ";
    if (drawn[h].empty()) return of + "holds no unit";
    if (!plan.initial.listed && drawn[h].size() != counts[h]) {
      return of + "holds " + std::to_string(drawn[h].size()) + " units where the plan has " + std::to_string(counts[h]);
    }
    if (std::adjacent_find(drawn[h].begin(), drawn[h].end(), std::greater_equal<>()) != drawn[h].end()) {
      return of + "holds units that are out of order or twice there";
    }
    if (drawn[h].back() >= ground.units.count[h]) {
      return of + "holds unit " + std::to_string(drawn[h].back()) + " of " + std::to_string(ground.units.count[h]);
    }
  }
  return "";
}

Result<FirstSample> first_sample(const Plan& plan, const std::string& file, const SurveyGround& ground,
                                 const std::vector<std::vector<UnitId>>* drawn) {
  if (drawn != nullptr) {
    const std::string problem = stored_sample_problem(plan, ground, *drawn);
    if (!problem.empty()) return Error(ErrorKind::kDamaged, file + ": the stored first sample " + problem);
    return FirstSample::from_units(ground.areas, ground.units, *drawn);
  }
  if (plan.initial.listed) {
    NEARPIT_ASSIGN(nodes, listed_nodes(plan, file, ground.frame));
    auto sample = listed_first_sample(ground.areas, ground.units, nodes);
    if (!sample) return in_file(file, sample.error());
    return sample;
  }
  auto sample = draw_first_sample(ground.areas, ground.units, counts_of(plan, ground.areas), plan.initial.seed);
  if (!sample) return in_file(file, sample.error());
  return sample;
}

}  // namespace

double Plan::pit_area_m2() const {
  const double square = pit_size_m * pit_size_m;
  return pit_shape == PitShape::kRound ? std::numbers::pi / 4 * square : square;
}

Result<Plan> read_plan(std::string_view text, const std::string& file) {
  NEARPIT_ASSIGN(document, read_json(text, file));
  Findings findings(document, file);
  Plan plan = plan_of(document.value, &findings);
  if (!findings.none()) return findings.error();
  return plan;
}

Result<std::unique_ptr<SurveyGround>> make_ground(const Plan& plan, const std::string& file,
                                                  const std::vector<std::vector<UnitId>>* drawn) {
  if (plan.boundary.empty()) return Error(ErrorKind::kInternal, file + ": boundary: not read yet");
  auto ground = std::make_unique<SurveyGround>();
  auto frame = Frame::clip(lattice_of(plan), plan.boundary);
  if (!frame) return in_file(file, frame.error());
  ground->frame = std::move(frame).value();
  auto areas = Areas::assign(ground->frame, areas_of(plan));
  if (!areas) return in_file(file, areas.error());
  ground->areas = std::move(areas).value();
  ground->units = PrimaryUnits::of(ground->frame, ground->areas, plan.initial.draw, plan.initial.every);
  auto sample = first_sample(plan, file, *ground, drawn);
  if (!sample) return sample.error();
  ground->sample = std::move(sample).value();
  ground->neighbours = plan.neighbours;
  ground->confinement = plan.confinement;
  ground->ring_limit = plan.ring_limit;
  ground->positive = plan.positive;
  return ground;
}

Labels labels_of(const Plan& plan, const Lattice& lattice) {
  return {plan.labels, lattice, plan.label_datum.value_or(lattice.origin)};
}

std::string with_boundary(std::string_view text, const MultiPolygon& boundary) {
  auto document = read_json(text, "plan");
  if (!document || !document->value.is_object()) return std::string(text);
  document->value["boundary"] = geometry_json(boundary);
  return document->value.dump(2) + "\n";
}

}  // namespace nearpit
