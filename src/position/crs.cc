#include "position/crs.h"

#include <proj.h>

#include <cmath>
#include <cstdint>
#include <memory>
#include <optional>
#include <string_view>
#include <utility>

#include "base/numbers.h"
#include "base/text.h"

namespace nearpit {
namespace {

constexpr std::string_view kAuthority = "EPSG:";
constexpr double kOutsideUse_deg = 3;
constexpr double kComesBack_deg = 1e-7;

struct FreeContext {
  void operator()(PJ_CONTEXT* context) const { proj_context_destroy(context); }
};
struct FreeObject {
  void operator()(PJ* object) const { proj_destroy(object); }
};
using Context = std::unique_ptr<PJ_CONTEXT, FreeContext>;
using Object = std::unique_ptr<PJ, FreeObject>;

Error bad(const std::string& crs, const std::string& what) {
  return {ErrorKind::kBadInput, "crs: " + in_quotes(crs) + " " + what};
}

// A system and the context that it lives in.
struct System {
  Context context;
  Object crs;
};

struct Axis {
  std::string_view direction;
  double metres = 0;  // of one unit
  std::string unit;
};

std::optional<Axis> axis_of(PJ_CONTEXT* context, const PJ* coordinate_system, int index) {
  const char* direction = nullptr;
  const char* unit = nullptr;
  double metres = 0;
  if (proj_cs_get_axis_info(context, coordinate_system, index, nullptr, nullptr, &direction, &metres, &unit, nullptr,
                            nullptr) == 0) {
    return std::nullopt;
  }
  return Axis{direction, metres, unit == nullptr ? "" : unit};
}

Status check_axes(const System& system, const std::string& crs, const std::string& name) {
  PJ_CONTEXT* context = system.context.get();
  const Object axes(proj_crs_get_coordinate_system(context, system.crs.get()));
  const auto first = axes ? axis_of(context, axes.get(), 0) : std::nullopt;
  const auto second = axes ? axis_of(context, axes.get(), 1) : std::nullopt;
  if (!first || !second) return bad(crs, "(" + name + ") has no axes that PROJ knows; take another system");
  for (const Axis& axis : {*first, *second}) {
    if (axis.metres != 1) {
      return bad(crs,
                 "(" + name + ") is in " + axis.unit + "; legal: a projected system in metres, such as EPSG:32617");
    }
  }
  const auto run = [&](std::string_view one, std::string_view two) {
    return first->direction == one && second->direction == two;
  };
  if (!run("east", "north") && !run("north", "east")) {
    return bad(crs, "(" + name + ") has axes that run " + std::string(first->direction) + " and " +
                        std::string(second->direction) + "; legal: a system whose axes run east and north");
  }
  return ok_status();
}

Result<int> code_of(const std::string& crs) {
  const std::string_view text(crs);
  const auto number = text.starts_with(kAuthority) ? parse_int(text.substr(kAuthority.size())) : std::nullopt;
  if (number && *number >= 1 && *number <= 999'999'999) return static_cast<int>(*number);
  return bad(crs, "is no coordinate system; legal: \"EPSG:<code>\" such as \"EPSG:32617\", or \"local\"");
}

Result<System> system_of(const std::string& crs) {
  NEARPIT_ASSIGN(code, code_of(crs));
  System system{Context(proj_context_create()), nullptr};
  PJ_CONTEXT* context = system.context.get();
  if (context == nullptr) return Error(ErrorKind::kIo, "crs: PROJ can't be started: not enough memory");
  proj_log_level(context, PJ_LOG_NONE);
  proj_context_set_enable_network(context, 0);
  if (proj_context_get_database_path(context) == nullptr) {
    return Error(ErrorKind::kIo,
                 "crs: PROJ's list of coordinate systems (proj.db) is not there; install the package proj-data");
  }
  system.crs.reset(
      proj_create_from_database(context, "EPSG", std::to_string(code).c_str(), PJ_CATEGORY_CRS, 0, nullptr));
  if (!system.crs) return bad(crs, "is not in PROJ's list of coordinate systems; look the code up or use \"local\"");
  const char* written = proj_get_name(system.crs.get());
  const std::string name = written == nullptr ? "" : written;
  if (proj_get_type(system.crs.get()) != PJ_TYPE_PROJECTED_CRS) {
    return bad(crs, "(" + name + ") is not projected; legal: a projected system in metres, such as EPSG:32617");
  }
  NEARPIT_TRY(check_axes(system, crs, name));
  return system;
}

struct UseArea {
  double west = 0, south = 0, east = 0, north = 0;  // degrees; west > east across the antimeridian

  bool holds(const Point& lonlat, double margin) const {
    if (lonlat.y < south - margin || lonlat.y > north + margin) return false;
    const double width = east < west ? east - west + 360 : east - west;
    if (width + 2 * margin >= 360) return true;
    double from_west = std::fmod(lonlat.x - (west - margin), 360.0);
    if (from_west < 0) from_west += 360;
    return from_west <= width + 2 * margin;
  }
  std::string in_words() const {
    return "longitude " + format_trimmed(west, 2) + " to " + format_trimmed(east, 2) + ", latitude " +
           format_trimmed(south, 2) + " to " + format_trimmed(north, 2);
  }
};

std::string degrees(const Point& lonlat) { return format_double(lonlat.x) + ", " + format_double(lonlat.y); }

class Transformation {
 public:
  static Result<Transformation> between_lonlat_and(const std::string& crs) {
    if (crs == "local") {
      return bad(crs,
                 "is a grid of your own, so longitude and latitude have no place in it; give the boundary in metres or "
                 "name an EPSG code");
    }
    NEARPIT_ASSIGN(system, system_of(crs));
    PJ_CONTEXT* context = system.context.get();
    const Object lonlat(proj_create_from_database(context, "EPSG", "4326", PJ_CATEGORY_CRS, 0, nullptr));
    const Object plain(
        lonlat ? proj_create_crs_to_crs_from_pj(context, lonlat.get(), system.crs.get(), nullptr, nullptr) : nullptr);
    Object turned(plain ? proj_normalize_for_visualization(context, plain.get()) : nullptr);
    if (!turned) return bad(crs, "can't be reached from longitude and latitude; give the boundary in metres");
    Transformation made(crs, std::move(system), std::move(turned));
    made.find_use();
    return made;
  }

  Result<Point> to_ground(const Point& lonlat) const {
    const Point ground = through(PJ_FWD, lonlat);
    if (!inside_use(lonlat) || !same_place(through(PJ_INV, ground), lonlat)) return cannot_hold(lonlat);
    return ground;
  }

  Result<Point> to_lonlat(const Point& ground) const {
    const Point lonlat = through(PJ_INV, ground);
    if (std::isfinite(lonlat.x) && std::isfinite(lonlat.y) && inside_use(lonlat)) return lonlat;
    return bad(crs_,
               "does not hold the point " + format_double(ground.x) + ", " + format_double(ground.y) + words_of_use());
  }

 private:
  Transformation(std::string crs, System system, Object steps)
      : crs_(std::move(crs)), system_(std::move(system)), steps_(std::move(steps)) {}

  void find_use() {
    UseArea use;
    const int known = proj_get_area_of_use(system_.context.get(), system_.crs.get(), &use.west, &use.south, &use.east,
                                           &use.north, nullptr);
    // PROJ writes -1000 where nothing is known.
    if (known != 0 && use.west >= -180) use_ = use;
  }
  bool inside_use(const Point& lonlat) const { return !use_ || use_->holds(lonlat, kOutsideUse_deg); }

  // Infinity where PROJ gives none.
  Point through(PJ_DIRECTION way, const Point& from) const {
    proj_errno_reset(steps_.get());
    const PJ_COORD to = proj_trans(steps_.get(), way, proj_coord(from.x, from.y, 0, HUGE_VAL));
    return {to.xy.x, to.xy.y};
  }
  static bool same_place(const Point& back, const Point& lonlat) {
    return std::abs(std::remainder(back.x - lonlat.x, 360.0)) <= kComesBack_deg &&
           std::abs(back.y - lonlat.y) <= kComesBack_deg;
  }
  std::string words_of_use() const { return use_ ? "; it is for " + use_->in_words() : "; take another system"; }
  Error cannot_hold(const Point& lonlat) const {
    return bad(crs_, "does not hold longitude, latitude " + degrees(lonlat) + words_of_use());
  }

  std::string crs_;
  System system_;
  Object steps_;  // ends before the context that it lives in
  std::optional<UseArea> use_;
};

Result<Ring> ring_to_ground(const Ring& lonlat, const Transformation& transformation) {
  Ring ground;
  ground.reserve(lonlat.size());
  for (const Point& point : lonlat) {
    NEARPIT_ASSIGN(moved, transformation.to_ground(point));
    ground.push_back(moved);
  }
  return ground;
}

}  // namespace

Result<CrsFacts> crs_facts(const std::string& crs) {
  if (crs == "local") return CrsFacts{0, "local grid", "undefined"};
  NEARPIT_ASSIGN(system, system_of(crs));
  NEARPIT_ASSIGN(code, code_of(crs));
  const char* const one_line[] = {"MULTILINE=NO", nullptr};
  const char* wkt = proj_as_wkt(system.context.get(), system.crs.get(), PJ_WKT1_GDAL, one_line);
  if (wkt == nullptr) return bad(crs, "can't be written as WKT 1, which a GeoPackage needs; take another system");
  return CrsFacts{code, proj_get_name(system.crs.get()), wkt};
}

Result<MultiPolygon> lonlat_to_ground(const MultiPolygon& lonlat, const std::string& crs) {
  NEARPIT_ASSIGN(transformation, Transformation::between_lonlat_and(crs));
  MultiPolygon ground;
  for (const Polygon& polygon : lonlat) {
    NEARPIT_ASSIGN(outer, ring_to_ground(polygon.outer, transformation));
    Polygon moved{std::move(outer), {}};
    for (const Ring& hole : polygon.holes) {
      NEARPIT_ASSIGN(inner, ring_to_ground(hole, transformation));
      moved.holes.push_back(std::move(inner));
    }
    ground.push_back(std::move(moved));
  }
  return ground;
}

Result<Point> ground_to_lonlat(const Point& ground, const std::string& crs) {
  NEARPIT_ASSIGN(transformation, Transformation::between_lonlat_and(crs));
  return transformation.to_lonlat(ground);
}

}  // namespace nearpit
