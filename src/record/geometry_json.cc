#include "record/geometry_json.h"

#include <cmath>
#include <optional>
#include <utility>

#include "record/json_fields.h"

namespace nearpit {
namespace {

constexpr double kLargest = 1e8;
constexpr std::size_t kMostFaults = 100;

// Appends to the list until it is full.
class Faults {
 public:
  explicit Faults(std::vector<JsonFault>* list) : list_(list), before_(list->size()) {}
  void add(std::string field, std::string what) {
    if (!full()) list_->push_back({std::move(field), std::move(what)});
  }
  bool none() const { return list_->size() == before_; }
  bool full() const { return list_->size() - before_ >= kMostFaults; }

 private:
  std::vector<JsonFault>* list_;
  std::size_t before_;
};

std::string child(const std::string& field, std::size_t index) { return field + "/" + std::to_string(index); }

std::optional<double> coordinate(const Json& value, const std::string& field, Faults* faults) {
  if (!value.is_number()) {
    faults->add(field, shown(value) + " is not a number; legal: a number from -100000000 to 100000000");
    return std::nullopt;
  }
  const auto number = value.get<double>();
  if (std::isfinite(number) && std::abs(number) <= kLargest) return number;
  faults->add(field, shown(value) + " is too large; legal: a number from -100000000 to 100000000");
  return std::nullopt;
}

// A position may have a height behind its two coordinates (RFC 7946 section 3.1.1); it is passed over.
std::optional<Point> position(const Json& value, const std::string& field, Faults* faults) {
  if (!value.is_array() || value.size() < 2 || value.size() > 3) {
    faults->add(field, shown(value) + " is not a position; legal: [x, y]");
    return std::nullopt;
  }
  const auto x = coordinate(value[0], child(field, 0), faults);
  const auto y = coordinate(value[1], child(field, 1), faults);
  if (!x || !y) return std::nullopt;
  return Point{*x, *y};
}

Ring ring_of(const Json& value, const std::string& field, Faults* faults) {
  Ring ring;
  if (!value.is_array() || value.size() < 4) {
    faults->add(field,
                shown(value) + " is not a ring; legal: a list of at least four positions, the last equal to the first");
    return ring;
  }
  ring.reserve(value.size());
  for (std::size_t i = 0; i < value.size() && !faults->full(); ++i) {
    if (const auto point = position(value[i], child(field, i), faults)) ring.push_back(*point);
  }
  if (ring.size() != value.size()) return {};
  if (ring.front() != ring.back()) {
    faults->add(child(field, value.size() - 1),
                "is not the ring's first position; close the ring with " + value[0].dump());
    return {};
  }
  ring.pop_back();
  return ring;
}

Polygon polygon_of(const Json& value, const std::string& field, Faults* faults) {
  Polygon polygon;
  if (!value.is_array() || value.empty()) {
    faults->add(field, shown(value) + " is not a polygon; legal: a list of rings, the outer one first");
    return polygon;
  }
  polygon.outer = ring_of(value[0], child(field, 0), faults);
  for (std::size_t i = 1; i < value.size() && !faults->full(); ++i) {
    polygon.holes.push_back(ring_of(value[i], child(field, i), faults));
  }
  return polygon;
}

MultiPolygon read_coordinates(const std::string& type, const Json& coordinates, Faults* faults) {
  const std::string field = "/coordinates";
  if (type == "Polygon") return {polygon_of(coordinates, field, faults)};
  MultiPolygon polygons;
  if (!coordinates.is_array() || coordinates.empty()) {
    faults->add(field, shown(coordinates) + " is not a list of polygons; legal: at least one polygon's list of rings");
    return polygons;
  }
  for (std::size_t i = 0; i < coordinates.size() && !faults->full(); ++i) {
    polygons.push_back(polygon_of(coordinates[i], child(field, i), faults));
  }
  return polygons;
}

Json ring_json(const Ring& ring) {
  Json json = Json::array();
  for (const Point& point : ring)
    json.push_back({point.x, point.y});
  if (!ring.empty()) json.push_back({ring.front().x, ring.front().y});
  return json;
}

Json polygon_json(const Polygon& polygon) {
  Json json = Json::array({ring_json(polygon.outer)});
  for (const Ring& hole : polygon.holes)
    json.push_back(ring_json(hole));
  return json;
}

}  // namespace

MultiPolygon polygons_of(const Json& geometry, std::vector<JsonFault>* faults) {
  Faults list(faults);
  if (!geometry.is_object()) {
    list.add("", shown(geometry) +
                     " is not a geometry; legal: {\"type\": \"Polygon\" or \"MultiPolygon\", \"coordinates\": […]}");
    return {};
  }
  const auto type = geometry.find("type");
  const auto coordinates = geometry.find("coordinates");
  const bool known = type != geometry.end() && type->is_string() && (*type == "Polygon" || *type == "MultiPolygon");
  if (type == geometry.end()) {
    list.add("/type", "missing; legal: \"Polygon\", \"MultiPolygon\"");
  } else if (!known) {
    list.add("/type", shown(*type) + " is no kind of polygon; legal: \"Polygon\", \"MultiPolygon\"");
  }
  if (coordinates == geometry.end()) list.add("/coordinates", "missing; legal: a list of rings");
  if (!list.none()) return {};
  MultiPolygon polygons = read_coordinates(type->get<std::string>(), *coordinates, &list);
  if (!list.none()) return {};
  if (const auto problem = polygon_problem(polygons)) {
    list.add("", *problem + "; legal: rings that don't cross, holes inside, parts that don't overlap");
    return {};
  }
  return polygons;
}

Json geometry_json(const MultiPolygon& polygons) {
  Json json;
  if (polygons.size() == 1) {
    json["type"] = "Polygon";
    json["coordinates"] = polygon_json(polygons.front());
    return json;
  }
  json["type"] = "MultiPolygon";
  Json all = Json::array();
  for (const Polygon& polygon : polygons)
    all.push_back(polygon_json(polygon));
  json["coordinates"] = std::move(all);
  return json;
}

}  // namespace nearpit
