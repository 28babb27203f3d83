#include "record/plan_reader.h"

#include <algorithm>
#include <optional>
#include <set>
#include <utility>

#include "base/text.h"
#include "record/plan_initial.h"
#include "record/plan_keys.h"
#include "record/plan_options.h"

namespace nearpit {
namespace {

constexpr std::size_t kLongestName = 60;

bool is_epsg(const std::string& crs) {
  const std::string digits = crs.starts_with("EPSG:") ? crs.substr(5) : "";
  return !digits.empty() && digits.size() <= 7 && digits[0] != '0' &&
         digits.find_first_not_of("0123456789") == std::string::npos;
}

void read_crs(const Fields& plan, Plan* out) {
  const std::string legal = "\"EPSG:\" and a code, such as \"EPSG:32617\", or \"local\"";
  const Json* crs = plan.take("crs", Need::kRequired, legal);
  if (crs == nullptr) return;
  if (crs->is_string() && (*crs == "local" || is_epsg(crs->get_ref<const std::string&>()))) {
    out->crs = crs->get<std::string>();
    return;
  }
  plan.findings()->add(plan.at("crs"), shown(*crs) + " is no coordinate system; legal: " + legal);
}

void read_boundary(const Fields& plan, Plan* out) {
  const Json* boundary = plan.take("boundary", Need::kRequired, "a Polygon, a MultiPolygon or {\"file\": name}");
  if (boundary == nullptr) return;
  if (!boundary->is_object() || !boundary->contains("file")) {
    const KeyList keys = boundary->is_object() ? plan_keys("boundary") : KeyList();
    out->boundary = geometry_of(plan.findings(), *boundary, plan.at("boundary"), keys);
    return;
  }
  const Fields fields(plan.findings(), *boundary, plan.at("boundary"), plan_keys("boundary"));
  fields.refuse("type", "has no place beside \"file\"; give the polygon or the file's name");
  fields.refuse("coordinates", "has no place beside \"file\"; give the polygon or the file's name");
  out->boundary_file = fields.name("file", Need::kRequired, 1000).value_or("");
  if (out->crs == "local") {
    plan.findings()->add(fields.at("file"), in_quotes(out->boundary_file) +
                                                " holds longitude and latitude, which \"crs\": \"local\" has no place "
                                                "for; legal: a Polygon here, or an EPSG code as crs");
  }
}

void read_origin(const Fields& lattice, Plan* out) {
  const Json* origin = lattice.find("origin");
  if (origin == nullptr) return;
  if (*origin == "random") {
    out->random_origin = true;
    if (out->initial.listed) {
      lattice.findings()->add(lattice.at("origin"),
                              "\"random\" has no seed with a listed first sample; legal: [x, y], or leave it out");
    }
    return;
  }
  if (origin->is_array()) {
    out->origin = point_of(lattice.findings(), *origin, lattice.at("origin"));
    return;
  }
  lattice.findings()->add(lattice.at("origin"), shown(*origin) + " is no origin; legal: [x, y] or \"random\"");
}

std::optional<LatticeKind> lattice_kind(const Fields& lattice) {
  constexpr std::string_view kKinds[] = {"square", "staggered", "triangular"};
  const auto kind = lattice.choice("kind", Need::kRequired, kKinds);
  if (!kind) return std::nullopt;
  return *kind == "square"      ? LatticeKind::kSquare
         : *kind == "staggered" ? LatticeKind::kStaggered
                                : LatticeKind::kTriangular;
}

// `spacing` is what the first sample's interval_m and between already said. False when the kind is not known.
bool read_lattice(const Fields& plan, std::optional<double> spacing, Plan* out) {
  const Json* value = plan.take("lattice", Need::kRequired, "{\"kind\": …, \"spacing_m\": …}");
  if (value == nullptr) return false;
  const Fields lattice(plan.findings(), *value, plan.at("lattice"), plan_keys("lattice"));
  const auto kind = lattice_kind(lattice);
  out->lattice = kind.value_or(LatticeKind::kSquare);
  if (spacing) {
    lattice.refuse("spacing_m", "is given by initial.between already; take one of them out");
    out->spacing_m = *spacing;
  } else {
    out->spacing_m = lattice.number("spacing_m", Need::kRequired, kSpacing_m).value_or(0);
  }
  out->bearing_deg =
      lattice.number("transect_bearing_deg", Need::kOptional, {0, 360, false, true}).value_or(out->bearing_deg);
  read_origin(lattice, out);
  return kind.has_value();
}

std::optional<NeighbourRule> neighbour_rule(const Json& value) {
  if (value == "4x2") return NeighbourRule::kFourByTwo;
  if (!value.is_number()) return std::nullopt;
  if (value == 8) return NeighbourRule::kEight;
  if (value == 4) return NeighbourRule::kFour;
  if (value == 6) return NeighbourRule::kSix;
  return std::nullopt;
}

void read_neighbours(const Fields& plan, bool kind_known, Plan* out) {
  out->neighbours = default_rule(out->lattice);
  const Json* value = plan.find("neighbours");
  if (value == nullptr || !kind_known) return;
  const auto rule = neighbour_rule(*value);
  if (rule && rule_fits(*rule, out->lattice)) {
    out->neighbours = *rule;
    return;
  }
  const std::string kind(lattice_kind_name(out->lattice));
  plan.findings()->add(plan.at("neighbours"),
                       shown(*value) + " is not a neighbour rule of a " + kind + " lattice; legal: " +
                           (out->lattice == LatticeKind::kSquare ? "8, 4 or \"4x2\"" : "6, or leave it out"));
}

void read_pit(const Fields& plan, Plan* out) {
  const Json* value = plan.take("pit", Need::kRequired, "{\"shape\": …, \"size_m\": …}");
  if (value == nullptr) return;
  const Fields pit(plan.findings(), *value, plan.at("pit"), plan_keys("pit"));
  constexpr std::string_view kShapes[] = {"square", "round"};
  const auto shape = pit.choice("shape", Need::kRequired, kShapes);
  out->pit_shape = shape == "round" ? PitShape::kRound : PitShape::kSquare;
  out->pit_size_m = pit.number("size_m", Need::kRequired, {0.05, 10}).value_or(0);
  if (out->spacing_m > 0 && out->pit_size_m > out->spacing_m) {
    plan.findings()->add(pit.at("size_m"), shown(*pit.find("size_m")) + " is more than the spacing, so that pits " +
                                               "overlap; legal: at most the spacing");
  }
}

void read_finds(const Fields& plan, Plan* out) {
  const Json* value = plan.take("finds", Need::kRequired, "a list of 1 to 100 names of finds");
  if (value == nullptr) return;
  out->finds = names_of(plan.findings(), *value, plan.at("finds"), 1, 100, kLongestName, true);
  if (!value->is_array()) return;
  for (std::size_t i = 0; i < value->size(); ++i) {
    const Json& name = (*value)[i];
    const std::string folded = name.is_string() ? fold_case(name.get_ref<const std::string&>()) : "";
    if (folded != "target" && folded != "positive pits") continue;
    plan.findings()->add(child_pointer(plan.at("finds"), i),
                         shown(name) + " names a figure of the tally; legal: any other name");
  }
}

void read_positive(const Fields& plan, Plan* out) {
  const Json* value = plan.take("positive", Need::kRequired, "{\"finds\": […], \"at_least\": …}");
  if (value == nullptr) return;
  const Fields positive(plan.findings(), *value, plan.at("positive"), plan_keys("positive"));
  const std::int64_t most = 4294967295;
  out->positive.at_least = static_cast<std::uint32_t>(positive.whole("at_least", Need::kRequired, 1, most).value_or(1));
  const Json* finds = positive.take("finds", Need::kRequired, "a list of some of the plan's finds");
  if (finds == nullptr) return;
  const std::size_t before = plan.findings()->size();
  const auto names = names_of(plan.findings(), *finds, positive.at("finds"), 1, 100, kLongestName, false);
  if (plan.findings()->size() > before) return;
  const std::vector<std::string_view> known(out->finds.begin(), out->finds.end());
  for (std::size_t i = 0; i < names.size(); ++i) {
    const auto found = std::find(known.begin(), known.end(), names[i]);
    if (found != known.end()) {
      out->positive.finds.push_back(static_cast<std::size_t>(found - known.begin()));
    } else if (!known.empty()) {
      plan.findings()->add(child_pointer(positive.at("finds"), i),
                           in_quotes(names[i]) + " is not among the plan's finds; legal: " + quoted_list(known));
    }
  }
}

PlanArea read_area(const Fields& area, std::set<std::string>* seen) {
  PlanArea out;
  Findings* findings = area.findings();
  if (const auto name = area.name("name", Need::kRequired, kLongestName)) {
    const std::string folded = fold_case(*name);
    if (folded == "all") {
      findings->add(area.at("name"), in_quotes(*name) + " is kept for surveys without areas; legal: any other name");
    } else if (!seen->insert(folded).second) {
      findings->add(area.at("name"), in_quotes(*name) + " stands twice; legal: distinct names, ignoring case");
    }
    out.name = *name;
  }
  if (const Json* boundary = area.take("boundary", Need::kRequired, "a Polygon or MultiPolygon")) {
    out.boundary = geometry_of(findings, *boundary, area.at("boundary"), plan_keys("strata[].boundary"));
  }
  return out;
}

// False when the areas' names are not all known.
bool read_areas(const Fields& plan, Plan* out) {
  const Json* value = plan.find("strata");
  if (value == nullptr) return true;
  if (!value->is_array() || value->empty() || value->size() > kMostAreas) {
    plan.findings()->add(plan.at("strata"), shown(*value) + " is not a list of areas; legal: 1 to " +
                                                std::to_string(kMostAreas) + " of {\"name\": …, \"boundary\": …}");
    return false;
  }
  const std::size_t before = plan.findings()->size();
  std::set<std::string> seen;
  for (std::size_t i = 0; i < value->size(); ++i) {
    const Fields area(plan.findings(), (*value)[i], child_pointer(plan.at("strata"), i), plan_keys("strata[]"));
    if (area.is_object()) out->areas.push_back(read_area(area, &seen));
  }
  return plan.findings()->size() == before;
}

}  // namespace

Plan plan_of(const Json& json, Findings* findings) {
  Plan plan;
  const Fields fields(findings, json, "", plan_keys(""));
  if (!fields.is_object()) return plan;
  plan.survey = fields.name("survey", Need::kRequired, 200).value_or("");
  read_crs(fields, &plan);
  read_boundary(fields, &plan);
  const bool areas_known = read_areas(fields, &plan);
  const auto spacing = read_initial(fields, areas_known, &plan);
  const bool kind_known = read_lattice(fields, spacing, &plan);
  read_neighbours(fields, kind_known, &plan);
  read_pit(fields, &plan);
  read_finds(fields, &plan);
  read_positive(fields, &plan);
  read_options(fields, &plan);
  return plan;
}

}  // namespace nearpit
