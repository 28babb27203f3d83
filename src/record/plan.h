// The plan: what a survey fixes before the first pit, as read from the plan file (schema/plan.schema.json) and kept in the survey file.
// Reading checks everything that can be checked without the ground: kinds, ranges, names, unknown keys. What depends on the
// frame (counts against primary units, listed pits) is checked when the ground is made (make_ground).
#ifndef NEARPIT_RECORD_PLAN_H_
#define NEARPIT_RECORD_PLAN_H_

#include <cstdint>
#include <map>
#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "base/clock.h"
#include "base/status.h"
#include "design/areas.h"
#include "design/primary_units.h"
#include "lattice/label.h"
#include "record/json_text.h"
#include "survey/confinement.h"
#include "survey/positive_rule.h"
#include "survey/survey_ground.h"

namespace nearpit {

struct PlanArea {
  std::string name;
  MultiPolygon boundary;
};

enum class PitShape { kSquare, kRound };

struct InitialSample {
  bool listed = false;
  DrawKind draw = DrawKind::kPits;             // listed: what the list stands for
  std::int32_t every = 1;                      // systematic
  std::map<std::string, std::uint32_t> count;  // by area name; empty when listed
  std::uint64_t seed = 0;                      // not when listed
  std::vector<std::string> pits;               // listed: labels as written
  std::string how;                             // listed: how it was drawn, in words
};

struct Plan {
  std::string survey;         // 1..200 code points
  std::string crs;            // "EPSG:<code>" or "local"
  MultiPolygon boundary;      // empty while boundary_file is not read yet
  std::string boundary_file;  // "boundary": {"file": ...}; empty otherwise
  LatticeKind lattice = LatticeKind::kSquare;
  double spacing_m = 0;     // 0.1 .. 1000
  double bearing_deg = 90;  // 0 <= b < 360
  std::optional<Point> origin;
  bool random_origin = false;  // from initial.seed, inside one cell
  NeighbourRule neighbours = NeighbourRule::kEight;
  PitShape pit_shape = PitShape::kSquare;
  double pit_size_m = 0;           // side or diameter, 0.05 .. 10 and at most the spacing
  std::vector<std::string> finds;  // 1..100, distinct ignoring case
  PositiveRule positive;
  std::vector<PlanArea> areas;  // empty: one area named "all"
  InitialSample initial;
  std::optional<std::int32_t> ring_limit;  // >= 1 .. 100000
  Confinement confinement;
  bool nearest_order = false;  // "order": "nearest"; default transect
  LabelKind labels = LabelKind::kTransect;
  std::optional<Point> label_datum;
  double confidence = 0.95;       // 0.5 .. 0.999
  double max_move_m = 2;          // 0 .. 100
  double depth_limit_m = 1.2;     // 0.1 .. 10
  double stop_distance_m = 30;    // 1 .. 10000
  double declination_deg = 0;     // -180 .. 180
  std::string time_zone = "UTC";  // checked against the system's zones
  std::vector<std::string> crews;
  std::vector<std::string> require;  // record.require: fields a finished record must have

  double pit_area_m2() const;
};

// Reads a plan's text. `file` is only for error lines. Every finding is a line of the Error, the first one first in the file:
//   FILE:LINE: FIELD: VALUE is ...; legal: ...
Result<Plan> read_plan(std::string_view text, const std::string& file);

// The plan's ground: lattice, frame, areas, primary units, first sample. `drawn` is what a survey file holds; nothing: draw it now. Errors name field, value and
// what is legal, and begin with `file`.
Result<std::unique_ptr<SurveyGround>> make_ground(const Plan& plan, const std::string& file,
                                                  const std::vector<std::vector<UnitId>>* drawn);
Labels labels_of(const Plan& plan, const Lattice& lattice);

// The plan's text with a boundary read from a file put in its place, as the survey file keeps it: `text` is the original.
std::string with_boundary(std::string_view text, const MultiPolygon& boundary);

}  // namespace nearpit

#endif  // NEARPIT_RECORD_PLAN_H_
