#include "record/record_json.h"

#include <algorithm>
#include <cmath>
#include <limits>
#include <optional>
#include <utility>

#include "base/clock.h"
#include "base/text.h"
#include "record/geometry_json.h"
#include "record/json_fields.h"
#include "record/json_text.h"

namespace nearpit {
namespace {

// Never throws: a text that is not UTF-8 is written with replacement characters.
std::string written(const Json& json) { return json.dump(-1, ' ', false, Json::error_handler_t::replace); }

void put(Json* json, const char* key, const std::string& text) {
  if (!text.empty()) (*json)[key] = text;
}
template <class T>
void put(Json* json, const char* key, const std::optional<T>& value) {
  if (value) (*json)[key] = *value;
}

// Reads the members of a stored object. The first thing wrong is kept; keys that nobody asks for are passed over.
class StoredObject {
 public:
  StoredObject(const Json& json, std::string what) : json_(json), what_(std::move(what)) {
    if (!json.is_object()) fail("", "is not an object");
  }

  const Json* find(const char* key) const {
    if (!json_.is_object()) return nullptr;
    const auto found = json_.find(key);
    return found == json_.end() ? nullptr : &*found;
  }
  std::string text(const char* key) {
    const Json* value = find(key);
    if (value == nullptr) return "";
    if (value->is_string()) return value->get<std::string>();
    fail(key, shown(*value) + " is not a text");
    return "";
  }
  std::optional<double> number(const char* key, const NumberRange& range) {
    const Json* value = find(key);
    if (value == nullptr) return std::nullopt;
    return number_in(*value, key, range);
  }
  std::optional<double> number_in(const Json& value, const std::string& field, const NumberRange& range) {
    if (value.is_number() && range.holds(value.get<double>())) return value.get<double>();
    fail(field, shown(value) + " is not " + range.in_words());
    return std::nullopt;
  }
  std::optional<bool> truth(const char* key) {
    const Json* value = find(key);
    if (value == nullptr) return std::nullopt;
    if (value->is_boolean()) return value->get<bool>();
    fail(key, shown(*value) + " is not true or false");
    return std::nullopt;
  }
  // A word of one of the frozen lists.
  template <class Word>
  std::optional<Word> word(const char* key, std::optional<Word> (*of)(std::string_view), const std::string& legal) {
    const std::string text_found = text(key);
    if (text_found.empty()) return std::nullopt;
    const auto found = of(text_found);
    if (!found) fail(key, in_quotes(text_found) + " is not known; legal: " + legal);
    return found;
  }
  // A day or a day and time, kept as it was written.
  std::string time(const char* key) {
    std::string found = text(key);
    if (!found.empty() && !parse_time(found, TimeZone::utc())) {
      fail(key, in_quotes(found) + " is not a date or time of ISO 8601");
    }
    return found;
  }
  void fail(const std::string& field, const std::string& what) {
    if (failure_.empty()) failure_ = what_ + ": " + (field.empty() ? "" : field + ": ") + what;
  }
  bool failed() const { return !failure_.empty(); }
  Error error() const { return {ErrorKind::kDamaged, failure_}; }

 private:
  const Json& json_;
  std::string what_;
  std::string failure_;
};

Result<JsonDocument> stored(std::string_view json, const std::string& what) {
  auto document = read_json(json, what);
  if (!document) return Error(ErrorKind::kDamaged, document.error().lines);
  return document;
}

Json counts_json(const PitRecord& record, const std::vector<std::string>& finds) {
  Json counts = Json::object();
  for (std::size_t i = 0; i < finds.size(); ++i)
    counts[finds[i]] = i < record.counts.size() ? record.counts[i] : 0u;
  return counts;
}

Json weights_json(const PitRecord& record, const std::vector<std::string>& finds) {
  Json weights = Json::object();
  for (std::size_t i = 0; i < finds.size() && i < record.weights_g.size(); ++i) {
    if (record.weights_g[i]) weights[finds[i]] = *record.weights_g[i];
  }
  return weights;
}

// Calls visit(index of the find, value) for each member of an object whose keys are finds.
template <class Visit>
void each_find(StoredObject* object, const char* key, const std::vector<std::string>& finds, Visit visit) {
  const Json* value = object->find(key);
  if (value == nullptr) return;
  if (!value->is_object()) return object->fail(key, shown(*value) + " is not an object");
  for (const auto& [name, member] : value->items()) {
    const auto place = std::find(finds.begin(), finds.end(), name);
    if (place == finds.end()) {
      return object->fail(key, in_quotes(name) + " is not a find of the plan; legal: " + join(finds, ", "));
    }
    visit(static_cast<std::size_t>(place - finds.begin()), name, member);
  }
}

void read_counts(StoredObject* object, const std::vector<std::string>& finds, PitRecord* record) {
  record->counts.assign(finds.size(), 0);
  record->weights_g.assign(finds.size(), std::nullopt);
  constexpr std::uint64_t kMost = std::numeric_limits<std::uint32_t>::max();
  each_find(object, "finds", finds, [&](std::size_t find, const std::string& name, const Json& value) {
    if (!value.is_number_unsigned() || value.get<std::uint64_t>() > kMost) {
      return object->fail("finds." + name, shown(value) + " is not a count");
    }
    record->counts[find] = static_cast<std::uint32_t>(value.get<std::uint64_t>());
  });
  each_find(object, "weights_g", finds, [&](std::size_t find, const std::string& name, const Json& value) {
    record->weights_g[find] = object->number_in(value, "weights_g." + name, {0, 1e9});
  });
}

void read_place(StoredObject* object, PitRecord* record) {
  const auto x = object->number("x", {-1e9, 1e9});
  const auto y = object->number("y", {-1e9, 1e9});
  if (x.has_value() != y.has_value()) return object->fail(x ? "y" : "x", "missing beside the other coordinate");
  if (x) record->place = Point{*x, *y};
}

// What a record may not say together.
void check_record(StoredObject* object, const PitRecord& record) {
  const bool not_dug = record.status == PitStatus::kNotDug;
  if (not_dug != record.reason.has_value()) {
    object->fail("reason", not_dug ? "missing for a pit that is not dug" : "has no place unless the pit is not dug");
  }
  const bool found = std::any_of(record.counts.begin(), record.counts.end(), [](std::uint32_t n) { return n > 0; });
  if (found && record.status != PitStatus::kDug) object->fail("finds", "counts have no place unless the pit is dug");
}

}  // namespace

std::string pit_record_json(const PitRecord& record, const std::string& label, const std::vector<std::string>& finds) {
  Json json;
  json["pit"] = label;
  json["status"] = word(record.status);
  if (record.status == PitStatus::kNotDug && record.reason) json["reason"] = word(*record.reason);
  put(&json, "crew", record.crew);
  put(&json, "started_at", record.started_at);
  put(&json, "dug_at", record.dug_at);
  if (record.dug_at_defaulted) json["dug_at_defaulted"] = true;
  put(&json, "depth_cm", record.depth_cm);
  if (record.stop) json["stop"] = word(*record.stop);
  if (record.chosen_by != ChosenBy::kUnsaid) json["chosen_by"] = word(record.chosen_by);
  if (record.place) {
    json["x"] = record.place->x;
    json["y"] = record.place->y;
  }
  put(&json, "moved", record.moved);
  put(&json, "mesh_mm", record.mesh_mm);
  put(&json, "backfilled", record.backfilled);
  put(&json, "bag", record.bag);
  put(&json, "note", record.note);
  if (record.status == PitStatus::kDug) json["finds"] = counts_json(record, finds);
  if (Json weights = weights_json(record, finds); !weights.empty()) json["weights_g"] = std::move(weights);
  if (record.opens_neighbours) json["opens_neighbours"] = true;
  return written(json);
}

Result<PitRecord> pit_record_of(std::string_view json, const std::vector<std::string>& finds) {
  NEARPIT_ASSIGN(document, stored(json, "pit record"));
  StoredObject object(document.value, "pit record");
  PitRecord record;
  const auto status = object.word<PitStatus>("status", pit_status_of, all_pit_statuses());
  if (!status) object.fail("status", "missing");
  record.status = status.value_or(PitStatus::kDug);
  record.reason = object.word<NotDugReason>("reason", not_dug_reason_of, all_not_dug_reasons());
  record.crew = object.text("crew");
  record.started_at = object.time("started_at");
  record.dug_at = object.time("dug_at");
  record.dug_at_defaulted = object.truth("dug_at_defaulted").value_or(false);
  record.depth_cm = object.number("depth_cm", {0, 1000});
  record.stop = object.word<StopReason>("stop", stop_reason_of, all_stop_reasons());
  record.chosen_by = object.word<ChosenBy>("chosen_by", chosen_by_of, all_chosen_by()).value_or(ChosenBy::kUnsaid);
  read_place(&object, &record);
  record.moved = object.text("moved");
  record.mesh_mm = object.number("mesh_mm", {0, 100, true});
  record.backfilled = object.truth("backfilled");
  record.bag = object.text("bag");
  record.note = object.text("note");
  record.opens_neighbours = object.truth("opens_neighbours").value_or(false);
  read_counts(&object, finds, &record);
  check_record(&object, record);
  if (object.failed()) return object.error();
  return record;
}

std::string closed_area_json(const ClosedArea& area) {
  Json json;
  json["name"] = area.name;
  json["reason"] = word(area.reason);
  if (!area.polygon.empty()) json["polygon"] = geometry_json(area.polygon);
  if (!area.rows.empty()) json["rows"] = area.rows;
  put(&json, "by", area.by);
  if (area.open_again) json["open_again"] = true;
  return written(json);
}

Result<ClosedArea> closed_area_of(std::string_view json) {
  NEARPIT_ASSIGN(document, stored(json, "closed area"));
  StoredObject object(document.value, "closed area");
  ClosedArea area;
  area.name = object.text("name");
  area.by = object.text("by");
  area.open_again = object.truth("open_again").value_or(false);
  const auto reason = object.word<NotDugReason>("reason", not_dug_reason_of, all_not_dug_reasons());
  if (!reason) object.fail("reason", "missing");
  area.reason = reason.value_or(NotDugReason::kOther);
  if (const Json* polygon = object.find("polygon")) {
    std::vector<JsonFault> faults;
    area.polygon = polygons_of(*polygon, &faults);
    if (!faults.empty()) object.fail(dotted("/polygon" + faults.front().field), faults.front().what);
  }
  if (const Json* rows = object.find("rows")) {
    for (const Json& row : rows->is_array() ? *rows : Json::array({*rows})) {
      const auto number = object.number_in(row, "rows", {1, 1e8});
      if (number) area.rows.push_back(static_cast<std::int32_t>(*number));
    }
  }
  if (area.polygon.empty() == area.rows.empty()) object.fail("polygon", "a closed area has either a polygon or rows");
  if (object.failed()) return object.error();
  return area;
}

std::string stop_work_json(const StopWork& stop) {
  Json json;
  json["x"] = stop.place.x;
  json["y"] = stop.place.y;
  json["distance_m"] = stop.distance_m;
  put(&json, "reason", stop.reason);
  if (stop.lifted) json["lifted"] = true;
  return written(json);
}

Result<StopWork> stop_work_of(std::string_view json) {
  NEARPIT_ASSIGN(document, stored(json, "stop-work"));
  StoredObject object(document.value, "stop-work");
  const auto x = object.number("x", {-1e9, 1e9});
  const auto y = object.number("y", {-1e9, 1e9});
  const auto distance = object.number("distance_m", {0, 1e6, true});
  if (!x || !y || !distance) object.fail(!x ? "x" : !y ? "y" : "distance_m", "missing");
  StopWork stop;
  stop.reason = object.text("reason");
  stop.lifted = object.truth("lifted").value_or(false);
  if (object.failed()) return object.error();
  stop.place = {*x, *y};
  stop.distance_m = *distance;
  return stop;
}

}  // namespace nearpit
