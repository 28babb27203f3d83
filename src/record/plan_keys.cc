#include "record/plan_keys.h"

namespace nearpit {
namespace {

constexpr std::string_view kPlan[] = {
    "survey", "crs",        "tie",        "boundary",      "lattice",         "neighbours",      "pit",
    "finds",  "positive",   "strata",     "initial",       "ring_limit",      "confine",         "order",
    "labels", "confidence", "max_move_m", "depth_limit_m", "stop_distance_m", "declination_deg", "time_zone",
    "crews",  "contacts",   "permits",    "record",        "expect"};
constexpr std::string_view kTie[] = {"at", "lonlat"};
constexpr std::string_view kBoundary[] = {"type", "coordinates", "file"};
constexpr std::string_view kGeometry[] = {"type", "coordinates"};
constexpr std::string_view kLattice[] = {"kind", "spacing_m", "origin", "transect_bearing_deg"};
constexpr std::string_view kPit[] = {"shape", "size_m"};
constexpr std::string_view kPositive[] = {"finds", "at_least"};
constexpr std::string_view kArea[] = {"name", "boundary"};
constexpr std::string_view kInitial[] = {"draw",  "as",   "every", "interval_m", "between",
                                         "count", "seed", "pits",  "how"};
constexpr std::string_view kConfine[] = {"block"};
constexpr std::string_view kLabels[] = {"kind", "datum"};
constexpr std::string_view kRecord[] = {"ask", "require"};
constexpr std::string_view kExpect[] = {"site",     "finds_per_m2",    "clustering",     "sites_per_km2",
                                        "recovery", "minutes_per_pit", "walk_m_per_min", "diggers",
                                        "days",     "hours_per_day"};
constexpr std::string_view kSite[] = {"shape", "length_m", "width_m", "bearing_deg"};
constexpr std::string_view kClustering[] = {"model", "k"};

constexpr KeysOfObject kAll[] = {
    {"", kPlan},
    {"tie[]", kTie},
    {"boundary", kBoundary},
    {"lattice", kLattice},
    {"pit", kPit},
    {"positive", kPositive},
    {"strata[]", kArea},
    {"strata[].boundary", kGeometry},
    {"initial", kInitial},
    {"confine", kConfine},
    {"labels", kLabels},
    {"record", kRecord},
    {"expect", kExpect},
    {"expect.site", kSite},
    {"expect.clustering", kClustering},
};

constexpr std::string_view kRecordFields[] = {"crew",    "started_at", "dug_at", "depth_cm", "stop",
                                              "mesh_mm", "backfilled", "bag",    "note"};

}  // namespace

std::span<const KeysOfObject> all_plan_keys() { return kAll; }

KeyList plan_keys(std::string_view where) {
  for (const KeysOfObject& object : kAll) {
    if (object.where == where) return object.keys;
  }
  return {};
}

KeyList record_field_names() { return kRecordFields; }

}  // namespace nearpit
