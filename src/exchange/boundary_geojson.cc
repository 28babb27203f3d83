#include "exchange/boundary_geojson.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <optional>
#include <utility>
#include <vector>

#include "record/geometry_json.h"
#include "record/json_fields.h"
#include "record/json_text.h"

namespace nearpit {
namespace {

constexpr std::size_t kMostFeatures = 1'000;
constexpr std::string_view kLegalTypes = "Polygon, MultiPolygon, or a Feature or FeatureCollection of them";

// Where in nested coordinates the first position stands that is no longitude and latitude.
struct OutOfRange {
  std::string pointer;
  double first = 0;
  double second = 0;
};

std::optional<OutOfRange> out_of_range(const Json& coordinates, const std::string& pointer) {
  if (!coordinates.is_array() || coordinates.empty()) return std::nullopt;
  if (coordinates[0].is_number()) {
    if (coordinates.size() < 2 || !coordinates[1].is_number()) return std::nullopt;
    const auto longitude = coordinates[0].get<double>();
    const auto latitude = coordinates[1].get<double>();
    if (std::abs(longitude) <= 180 && std::abs(latitude) <= 90) return std::nullopt;
    return OutOfRange{pointer, longitude, latitude};
  }
  for (std::size_t i = 0; i < coordinates.size(); ++i) {
    if (auto found = out_of_range(coordinates[i], child_pointer(pointer, i))) return found;
  }
  return std::nullopt;
}

std::string complaint(const OutOfRange& position) {
  const std::string shown_position = Json::array({position.first, position.second}).dump();
  const bool turned_round = std::abs(position.first) <= 90 && std::abs(position.second) <= 180;
  const bool metres = std::abs(position.first) > 360 || std::abs(position.second) > 360;
  std::string hint = "GeoJSON is longitude, latitude by RFC 7946";
  if (metres) hint += ", these look like metres: save the file in WGS 84, or write the boundary into the plan";
  if (turned_round) hint += ", these look like latitude, longitude";
  return shown_position + " is out of range; legal: longitude -180 to 180, latitude -90 to 90; " + hint;
}

class BoundaryReader {
 public:
  BoundaryReader(const JsonDocument& document, Findings* findings) : document_(document), findings_(findings) {}

  std::vector<MultiPolygon> read() {
    const Json& top = document_.value;
    const std::string type = type_of(top, "");
    if (type == "FeatureCollection") {
      check_crs(top, "");
      read_features(top);
    } else if (type == "Feature") {
      read_feature(top, "");
    } else if (!type.empty()) {
      read_geometry(top, "", "/type", kLegalTypes);
    }
    return std::move(parts_);
  }

 private:
  // Empty, and a finding, when there is none.
  std::string type_of(const Json& value, const std::string& pointer) {
    if (!value.is_object()) {
      findings_->add(pointer, shown(value) + " is no GeoJSON object; legal: " + std::string(kLegalTypes));
      return "";
    }
    const auto type = value.find("type");
    if (type == value.end()) {
      findings_->add_missing(pointer, "type", std::string(kLegalTypes));
    } else if (!type->is_string() || type->get_ref<const std::string&>().empty()) {
      findings_->add(pointer + "/type", shown(*type) + " is no boundary; legal: " + std::string(kLegalTypes));
    } else {
      return type->get<std::string>();
    }
    return "";
  }

  void read_features(const Json& collection) {
    const auto features = collection.find("features");
    if (features == collection.end()) return findings_->add_missing("", "features", "a list of Features");
    if (!features->is_array() || features->empty()) {
      return findings_->add("/features", shown(*features) + " holds no feature; legal: a list of at least one Feature");
    }
    if (features->size() > kMostFeatures) {
      return findings_->add("/features", std::to_string(features->size()) + " features; legal: up to " +
                                             std::to_string(kMostFeatures) + "; unite them first");
    }
    for (std::size_t i = 0; i < features->size(); ++i) {
      const std::string pointer = child_pointer("/features", i);
      const std::string type = type_of((*features)[i], pointer);
      if (type == "Feature") {
        read_feature((*features)[i], pointer);
      } else if (!type.empty()) {
        findings_->add(pointer + "/type", shown(type) + " is no feature; legal: Feature");
      }
    }
  }

  void read_feature(const Json& feature, const std::string& pointer) {
    check_crs(feature, pointer);
    const auto geometry = feature.find("geometry");
    const std::string at = pointer + "/geometry";
    if (geometry == feature.end()) return findings_->add_missing(pointer, "geometry", "a Polygon or MultiPolygon");
    if (!type_of(*geometry, at).empty()) read_geometry(*geometry, at, at + "/type", "Polygon, MultiPolygon");
  }

  void read_geometry(const Json& geometry, const std::string& pointer, const std::string& type_pointer,
                     std::string_view legal) {
    check_crs(geometry, pointer);
    const Json& type = geometry.at("type");
    if (type != "Polygon" && type != "MultiPolygon") {
      return findings_->add(type_pointer, shown(type) + " is no boundary; legal: " + std::string(legal));
    }
    if (const auto coordinates = geometry.find("coordinates"); coordinates != geometry.end()) {
      if (const auto outside = out_of_range(*coordinates, pointer + "/coordinates")) {
        return findings_->add(outside->pointer, complaint(*outside));
      }
    }
    std::vector<JsonFault> faults;
    MultiPolygon polygons = polygons_of(geometry, &faults);
    for (const JsonFault& fault : faults)
      findings_->add(pointer + fault.field, fault.what);
    if (faults.empty()) parts_.push_back(std::move(polygons));
  }

  // RFC 7946 section 4. The forms of its forerunner, the GeoJSON specification of 2008, section 3.
  void check_crs(const Json& value, const std::string& pointer) {
    constexpr std::array<std::string_view, 4> kSame = {"urn:ogc:def:crs:OGC:1.3:CRS84", "urn:ogc:def:crs:OGC::CRS84",
                                                       "OGC:CRS84", "http://www.opengis.net/def/crs/OGC/1.3/CRS84"};
    const auto crs = value.find("crs");
    if (crs == value.end()) return;
    const Json* name = &*crs;
    for (const char* key : {"properties", "name"}) {
      if (!name->is_object() || !name->contains(key)) break;
      name = &name->at(key);
    }
    const bool same =
        name->is_string() && std::find(kSame.begin(), kSame.end(), name->get_ref<const std::string&>()) != kSame.end();
    if (same) return;
    findings_->add(pointer + "/crs", shown(*name) +
                                         " is refused; legal: no crs (RFC 7946), or CRS84; save the file as "
                                         "longitude, latitude in WGS 84");
  }

  const JsonDocument& document_;
  Findings* findings_;
  std::vector<MultiPolygon> parts_;
};

}  // namespace

Result<MultiPolygon> read_boundary_geojson(std::string_view text, const std::string& file) {
  NEARPIT_ASSIGN(document, read_json(text, file));
  Findings findings(document, file);
  const std::vector<MultiPolygon> parts = BoundaryReader(document, &findings).read();
  if (!findings.none()) return findings.error();
  MultiPolygon boundary = united(parts);
  if (const auto problem = polygon_problem(boundary)) {
    findings.add("", "the features together make a boundary that " + *problem + "; unite them before saving the file");
    return findings.error();
  }
  return boundary;
}

}  // namespace nearpit
