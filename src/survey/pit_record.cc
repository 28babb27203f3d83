#include "survey/pit_record.h"

#include <array>
#include <utility>

namespace nearpit {
namespace {

template <class T, std::size_t N>
using Words = std::array<std::pair<T, std::string_view>, N>;

constexpr Words<PitStatus, 3> kStatuses{{
    {PitStatus::kDug, "dug"},
    {PitStatus::kNotDug, "not_dug"},
    {PitStatus::kWithdrawn, "withdrawn"},
}};

constexpr Words<NotDugReason, 11> kReasons{{
    {NotDugReason::kStandingWater, "standing_water"},
    {NotDugReason::kSlope, "slope"},
    {NotDugReason::kPaved, "paved"},
    {NotDugReason::kDisturbed, "disturbed"},
    {NotDugReason::kBareGround, "bare_ground"},
    {NotDugReason::kStructure, "structure"},
    {NotDugReason::kNoPermission, "no_permission"},
    {NotDugReason::kUtility, "utility"},
    {NotDugReason::kHazard, "hazard"},
    {NotDugReason::kStopWork, "stop_work"},
    {NotDugReason::kOther, "other"},
}};

constexpr Words<StopReason, 12> kStops{{
    {StopReason::kSterileSubsoil, "sterile_subsoil"},
    {StopReason::kBedrock, "bedrock"},
    {StopReason::kImpenetrable, "impenetrable"},
    {StopReason::kWaterTable, "water_table"},
    {StopReason::kMaxDepth, "max_depth"},
    {StopReason::kRoots, "roots"},
    {StopReason::kDisturbanceFill, "disturbance_fill"},
    {StopReason::kHumanRemainsStop, "human_remains_stop"},
    {StopReason::kFeatureFound, "feature_found"},
    {StopReason::kUxoStop, "uxo_stop"},
    {StopReason::kUtilityStop, "utility_stop"},
    {StopReason::kOther, "other"},
}};

constexpr Words<ChosenBy, 3> kChosen{{
    {ChosenBy::kDesign, "design"},
    {ChosenBy::kJudgement, "judgement"},
    {ChosenBy::kAsked, "asked"},
}};

template <class T, std::size_t N>
std::string_view word_in(const Words<T, N>& words, T value) {
  for (const auto& [key, text] : words) {
    if (key == value) return text;
  }
  return "";
}

template <class T, std::size_t N>
std::optional<T> value_in(const Words<T, N>& words, std::string_view text) {
  for (const auto& [key, known] : words) {
    if (known == text) return key;
  }
  return std::nullopt;
}

template <class T, std::size_t N>
std::string all_of(const Words<T, N>& words) {
  std::string all;
  for (const auto& [key, text] : words) {
    if (!all.empty()) all += ", ";
    all += text;
  }
  return all;
}

}  // namespace

ReasonClass class_of(NotDugReason reason) {
  switch (reason) {
    case NotDugReason::kStandingWater:
    case NotDugReason::kSlope:
    case NotDugReason::kPaved:
    case NotDugReason::kDisturbed:
    case NotDugReason::kBareGround:
    case NotDugReason::kStructure:
      return ReasonClass::kGround;
    case NotDugReason::kNoPermission:
    case NotDugReason::kUtility:
    case NotDugReason::kHazard:
    case NotDugReason::kStopWork:
    case NotDugReason::kOther:
      break;
  }
  return ReasonClass::kAccess;
}

std::string_view word(PitStatus status) { return word_in(kStatuses, status); }
std::string_view word(NotDugReason reason) { return word_in(kReasons, reason); }
std::string_view word(StopReason reason) { return word_in(kStops, reason); }
std::string_view word(ChosenBy chosen) { return word_in(kChosen, chosen); }

std::optional<PitStatus> pit_status_of(std::string_view text) { return value_in(kStatuses, text); }
std::optional<NotDugReason> not_dug_reason_of(std::string_view text) { return value_in(kReasons, text); }
std::optional<StopReason> stop_reason_of(std::string_view text) { return value_in(kStops, text); }
std::optional<ChosenBy> chosen_by_of(std::string_view text) { return value_in(kChosen, text); }

std::string all_pit_statuses() { return all_of(kStatuses); }
std::string all_not_dug_reasons() { return all_of(kReasons); }
std::string all_stop_reasons() { return all_of(kStops); }
std::string all_chosen_by() { return all_of(kChosen); }

}  // namespace nearpit
