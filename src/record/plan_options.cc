#include "record/plan_options.h"

#include <algorithm>

#include "base/clock.h"
#include "base/text.h"
#include "record/plan_expect.h"
#include "record/plan_keys.h"

namespace nearpit {
namespace {

constexpr std::int64_t kMostSteps = 100'000;
constexpr std::int64_t kLargestBlock = 1'000'000;

void read_confine(const Fields& plan, Plan* out) {
  const Json* value = plan.find("confine");
  if (value == nullptr) return;
  const std::string legal = "{\"block\": [columns, rows]} or \"stratum\"";
  plan.refuse("ring_limit", "has no place beside \"confine\"; take one of them out");
  if (*value == "stratum") {
    out->confinement.kind = Confinement::Kind::kArea;
    return;
  }
  if (!value->is_object()) {
    return plan.findings()->add(plan.at("confine"), shown(*value) + " is no confinement; legal: " + legal);
  }
  const Fields confine(plan.findings(), *value, plan.at("confine"), plan_keys("confine"));
  const Json* block = confine.take("block", Need::kRequired, "[columns, rows]");
  if (block == nullptr) return;
  if (!block->is_array() || block->size() != 2) {
    return plan.findings()->add(confine.at("block"), shown(*block) + " is no block; legal: [columns, rows]");
  }
  const auto side = [&](std::size_t i) {
    const std::string place = child_pointer(confine.at("block"), i);
    return whole_of(plan.findings(), (*block)[i], place, 1, kLargestBlock).value_or(1);
  };
  out->confinement.kind = Confinement::Kind::kBlock;
  out->confinement.block_columns = static_cast<std::int32_t>(side(0));
  out->confinement.block_rows = static_cast<std::int32_t>(side(1));
}

void read_labels(const Fields& plan, Plan* out) {
  const Json* value = plan.find("labels");
  if (value == nullptr) return;
  constexpr std::string_view kKinds[] = {"transect", "grid"};
  std::optional<std::string> kind;
  if (value->is_object()) {
    const Fields labels(plan.findings(), *value, plan.at("labels"), plan_keys("labels"));
    kind = labels.choice("kind", Need::kRequired, kKinds);
    if (const Json* datum = labels.find("datum")) {
      out->label_datum = point_of(plan.findings(), *datum, labels.at("datum"));
    }
  } else {
    kind = choice_of(plan.findings(), *value, plan.at("labels"), kKinds);
  }
  if (kind == "grid") out->labels = LabelKind::kGrid;
}

void read_time_zone(const Fields& plan, Plan* out) {
  const auto name = plan.name("time_zone", Need::kOptional, 60);
  if (!name) return;
  if (TimeZone::named(*name)) {
    out->time_zone = *name;
    return;
  }
  plan.findings()->add(plan.at("time_zone"), in_quotes(*name) +
                                                 " is no time zone of this machine; legal: a name such "
                                                 "as \"America/New_York\", or \"UTC\"");
}

// Contacts and permits are kept as they are written.
void check_cards(const Fields& plan, std::string_view key) {
  const Json* value = plan.find(key);
  if (value == nullptr) return;
  if (!value->is_array() || value->size() > 100) {
    return plan.findings()->add(plan.at(key), shown(*value) +
                                                  " is no list of cards; legal: a list of up to 100 texts "
                                                  "or objects of texts");
  }
  const auto is_text = [](const Json& json) {
    return json.is_string() && is_note(json.get_ref<const std::string&>(), 2000);
  };
  for (std::size_t i = 0; i < value->size(); ++i) {
    const Json& card = (*value)[i];
    const std::string place = child_pointer(plan.at(key), i);
    if (!card.is_object()) {
      if (!is_text(card))
        plan.findings()->add(place, shown(card) +
                                        " is no text or object of texts; legal: "
                                        "\"…\" or {\"name\": \"…\", …}, 1 to 2000 characters");
      continue;
    }
    for (const auto& [name, text] : card.items()) {
      if (is_text(text)) continue;
      plan.findings()->add(child_pointer(place, name), shown(text) + " is no text; legal: 1 to 2000 characters");
    }
  }
}

std::vector<std::string> field_names(const Fields& record, std::string_view key) {
  std::vector<std::string> names;
  const Json* value = record.find(key);
  if (value == nullptr) return names;
  if (!value->is_array()) {
    record.findings()->add(record.at(key), shown(*value) + " is not a list; legal: a list of some of " +
                                               quoted_list(record_field_names()));
    return names;
  }
  for (std::size_t i = 0; i < value->size() && i < 100; ++i) {
    const std::string place = child_pointer(record.at(key), i);
    const auto name = choice_of(record.findings(), (*value)[i], place, record_field_names());
    if (!name) continue;
    if (std::find(names.begin(), names.end(), *name) != names.end()) {
      record.findings()->add(place, in_quotes(*name) + " stands twice; legal: each field once");
    }
    names.push_back(*name);
  }
  return names;
}

void read_record(const Fields& plan, Plan* out) {
  const Json* value = plan.find("record");
  if (value == nullptr) return;
  const Fields record(plan.findings(), *value, plan.at("record"), plan_keys("record"));
  field_names(record, "ask");
  out->require = field_names(record, "require");
}

void check_tie_point(const Fields& tie, std::vector<Point>* places) {
  if (const Json* at = tie.take("at", Need::kRequired, "[x, y], metres of the local grid")) {
    const auto point = point_of(tie.findings(), *at, tie.at("at"));
    if (point) places->push_back(*point);
  }
  const Json* lonlat = tie.take("lonlat", Need::kRequired, "[longitude, latitude], degrees");
  if (lonlat == nullptr) return;
  if (!lonlat->is_array() || lonlat->size() != 2) {
    return tie.findings()->add(tie.at("lonlat"), shown(*lonlat) + " is no place; legal: [longitude, latitude]");
  }
  const auto degrees = [&](std::size_t i, double most) {
    number_of(tie.findings(), (*lonlat)[i], child_pointer(tie.at("lonlat"), i), {-most, most});
  };
  degrees(0, 180);
  degrees(1, 90);
}

void check_tie(const Fields& plan, const Plan& out) {
  const Json* value = plan.find("tie");
  if (value == nullptr) return;
  if (!out.crs.empty() && out.crs != "local") {
    plan.refuse("tie", "has a place only with \"crs\": \"local\"; take it out");
  }
  if (!value->is_array() || value->size() != 2) {
    return plan.findings()->add(plan.at("tie"), shown(*value) +
                                                    " is no tie; legal: two of {\"at\": [x, y], "
                                                    "\"lonlat\": [longitude, latitude]}");
  }
  std::vector<Point> places;
  for (std::size_t i = 0; i < 2; ++i) {
    const Fields tie(plan.findings(), (*value)[i], child_pointer(plan.at("tie"), i), plan_keys("tie[]"));
    if (tie.is_object()) check_tie_point(tie, &places);
  }
  if (places.size() == 2 && distance_m(places[0], places[1]) < 1) {
    plan.findings()->add(plan.at("tie"), "both points are the same; legal: two points at least 1 m apart");
  }
}

void read_numbers(const Fields& plan, Plan* out) {
  const auto ring_limit = plan.whole("ring_limit", Need::kOptional, 1, kMostSteps);
  if (ring_limit) out->ring_limit = static_cast<std::int32_t>(*ring_limit);
  const auto number = [&](std::string_view key, const NumberRange& range, double* into) {
    *into = plan.number(key, Need::kOptional, range).value_or(*into);
  };
  number("confidence", {0.5, 0.999}, &out->confidence);
  number("max_move_m", {0, 100}, &out->max_move_m);
  number("depth_limit_m", {0.1, 10}, &out->depth_limit_m);
  number("stop_distance_m", {1, 10'000}, &out->stop_distance_m);
  number("declination_deg", {-180, 180}, &out->declination_deg);
}

}  // namespace

void read_options(const Fields& plan, Plan* out) {
  read_numbers(plan, out);
  read_confine(plan, out);
  constexpr std::string_view kOrders[] = {"transect", "nearest"};
  out->nearest_order = plan.choice("order", Need::kOptional, kOrders) == "nearest";
  read_labels(plan, out);
  read_time_zone(plan, out);
  if (const Json* crews = plan.find("crews")) {
    out->crews = names_of(plan.findings(), *crews, plan.at("crews"), 1, 100, 60, true);
  }
  check_cards(plan, "contacts");
  check_cards(plan, "permits");
  read_record(plan, out);
  check_tie(plan, *out);
  check_expect(plan);
}

}  // namespace nearpit
