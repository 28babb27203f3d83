// Nearpit's values in a crew's words, as the screens say them: one place for each phrase.
#ifndef NEARPIT_UI_DESK_WORDS_H_
#define NEARPIT_UI_DESK_WORDS_H_

#include <cstdint>
#include <string>
#include <vector>

#include "base/clock.h"
#include "field_map/map_marks.h"
#include "session/dig_order.h"
#include "session/survey_model.h"

namespace nearpit::ui {

std::string in_words(NotDugReason reason);  // "standing water"
std::string in_words(StopReason reason);    // "sterile subsoil"
// "to dig", "positive", "not dug"; "on the grid, not called for" for a plain node.
std::string state_in_words(const PitMark& mark);
// "20 m", "3.5 m", "1.25 km".
std::string metres(double distance_m);
// "045°", from grid north.
std::string bearing(double degrees);
// "one step out", "two steps out", "12 steps out"; "" for the first sample.
std::string steps_out(std::int32_t ring);
// "grid pit", "next to T3-4", "next to T3-4 and T3-5".
std::string because(const SurveyModel& model, const DigStop& stop);
// A figure's reason as a screen says it.
std::string reason_in_words(const std::string& why);
// "14:32" when the day is the same as now's, else "4 May 14:32" (with the year when that differs).
std::string when(const WallTime& time, const WallTime& now);
// "dug 45 cm: flaked stone 2, pottery 1; stopped at sterile subsoil", "not dug: slope", "withdrawn".
std::string record_in_words(const PitRecord& record, const std::vector<std::string>& finds);

}  // namespace nearpit::ui

#endif  // NEARPIT_UI_DESK_WORDS_H_
