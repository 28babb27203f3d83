// One pit's record: what somebody wrote of it. Whether the pit is positive, due or part of the design is derived elsewhere and
// never stored here. Field practice: New Mexico 4.10.15.15 NMAC (C)(1); West Virginia SHPO guidelines; Georgia standards (2001) p. 13.
#ifndef NEARPIT_SURVEY_PIT_RECORD_H_
#define NEARPIT_SURVEY_PIT_RECORD_H_

#include <cstdint>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "lattice/coordinates.h"

namespace nearpit {

enum class PitStatus { kDug, kNotDug, kWithdrawn };

// Why a pit was not dug. Ground reasons mean undiggable ground; access reasons mean non-response: the ground may hold
// anything, so estimates stay provisional.
enum class NotDugReason {
  kStandingWater,
  kSlope,
  kPaved,
  kDisturbed,
  kBareGround,
  kStructure,  // ground
  kNoPermission,
  kUtility,
  kHazard,
  kStopWork,
  kOther,  // access
};
enum class ReasonClass { kGround, kAccess };
ReasonClass class_of(NotDugReason reason);

enum class StopReason {
  kSterileSubsoil,
  kBedrock,
  kImpenetrable,
  kWaterTable,
  kMaxDepth,
  kRoots,
  kDisturbanceFill,
  kHumanRemainsStop,
  kFeatureFound,
  kUxoStop,
  kUtilityStop,
  kOther,
};

// What the crew said of how the pit was chosen; membership of the design is always derived.
enum class ChosenBy { kUnsaid, kDesign, kJudgement, kAsked };

struct PitRecord {
  PitStatus status = PitStatus::kDug;
  std::optional<NotDugReason> reason;  // exactly when not dug
  std::string crew;
  std::string started_at;          // ISO 8601 with offset, or a date; empty: not said
  std::string dug_at;              // the same; never empty once saved
  bool dug_at_defaulted = false;   // nobody said when: it is the time of saving
  std::optional<double> depth_cm;  // 0 .. 1000
  std::optional<StopReason> stop;
  ChosenBy chosen_by = ChosenBy::kUnsaid;
  std::optional<Point> place;     // as dug, ground metres; always there off the grid
  std::string moved;              // why it was dug off its node
  std::optional<double> mesh_mm;  // (0, 100]
  std::optional<bool> backfilled;
  std::string bag;
  std::string note;
  std::vector<std::uint32_t> counts;             // by the plan's order of finds; all zero unless dug
  std::vector<std::optional<double>> weights_g;  // by the plan's order of finds, >= 0
  bool opens_neighbours = false;                 // a judgement positive whose ring the crew asked for

  friend bool operator==(const PitRecord&, const PitRecord&) = default;
};

// The words of files and screens <-> values; frozen, they are stored.
std::string_view word(PitStatus status);
std::string_view word(NotDugReason reason);
std::string_view word(StopReason reason);
std::string_view word(ChosenBy chosen);  // kUnsaid: ""
std::optional<PitStatus> pit_status_of(std::string_view text);
std::optional<NotDugReason> not_dug_reason_of(std::string_view text);
std::optional<StopReason> stop_reason_of(std::string_view text);
std::optional<ChosenBy> chosen_by_of(std::string_view text);  // not ""
// "dug, not_dug, withdrawn" and so on, for error lines.
std::string all_pit_statuses();
std::string all_not_dug_reasons();
std::string all_stop_reasons();
std::string all_chosen_by();

}  // namespace nearpit

#endif  // NEARPIT_SURVEY_PIT_RECORD_H_
