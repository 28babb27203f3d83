#include "desk/words.h"

#include <array>
#include <cmath>

#include "base/numbers.h"
#include "base/text.h"
#include "estimate/figure_reasons.h"

namespace nearpit::ui {
namespace {

// The stored word with its low lines as spaces, where that is what a crew says.
std::string spaced(std::string_view word) {
  std::string text(word);
  for (char& letter : text) {
    if (letter == '_') letter = ' ';
  }
  return text;
}

std::string finds_in_words(const PitRecord& record, const std::vector<std::string>& finds) {
  std::vector<std::string> words;
  for (std::size_t i = 0; i < finds.size() && i < record.counts.size(); ++i) {
    if (record.counts[i] > 0) words.push_back(finds[i] + " " + std::to_string(record.counts[i]));
  }
  return words.empty() ? "nothing found" : join(words, ", ");
}

}  // namespace

std::string in_words(NotDugReason reason) {
  if (reason == NotDugReason::kStopWork) return "stop-work";
  if (reason == NotDugReason::kUtility) return "buried line";
  return spaced(word(reason));
}

std::string in_words(StopReason reason) {
  switch (reason) {
    case StopReason::kHumanRemainsStop:
      return "human remains";
    case StopReason::kUxoStop:
      return "ordnance";
    case StopReason::kUtilityStop:
      return "buried line";
    case StopReason::kDisturbanceFill:
      return "disturbed fill";
    case StopReason::kMaxDepth:
      return "deepest allowed";
    default:
      return spaced(word(reason));
  }
}

std::string state_in_words(const PitMark& mark) {
  std::string text;
  switch (mark.mark) {
    case Mark::kPlain:
      text = "on the grid, not called for";
      break;
    case Mark::kDue:
      text = mark.asked ? "to dig, asked for" : "to dig";
      break;
    case Mark::kHalted:
      text = "halted: work is stopped near here";
      break;
    case Mark::kNegative:
      text = "dug, negative";
      break;
    case Mark::kPositive:
      text = "dug, positive";
      break;
    case Mark::kNotDug:
      text = "not dug";
      break;
  }
  if (mark.judgement) text += ", judgement pit";
  if (mark.conflict) text += "; two records disagree";
  return text;
}

std::string metres(double distance_m) {
  if (distance_m >= 999.5) return format_trimmed(distance_m / 1000, 2) + " km";
  return format_trimmed(distance_m, distance_m < 10 ? 1 : 0) + " m";
}

std::string bearing(double degrees) {
  const long whole = std::lround(degrees) % 360;
  const std::string digits = std::to_string(whole);
  return std::string(3 - std::min<std::size_t>(3, digits.size()), '0') + digits + "\xC2\xB0";
}

std::string steps_out(std::int32_t ring) {
  if (ring <= 0) return "";
  if (ring == 1) return "one step out";
  if (ring == 2) return "two steps out";
  if (ring == 3) return "three steps out";
  return std::to_string(ring) + " steps out";
}

std::string because(const SurveyModel& model, const DigStop& stop) {
  if (stop.first_sample) return "grid pit";
  constexpr std::size_t kMostNamed = 3;
  std::vector<std::string> names = model.labels_of(stop.of);
  if (names.size() > kMostNamed) {
    const std::size_t more = names.size() - kMostNamed + 1;
    names.resize(kMostNamed - 1);
    names.push_back(std::to_string(more) + " more");
  }
  return names.empty() ? "called for" : "next to " + list_in_words(names);
}

std::string reason_in_words(const std::string& why) {
  if (why == kGroundReason)
    return "per m\xC2\xB2 and the whole ground hold if the grid was laid without regard to what lies below";
  return why;
}

std::string when(const WallTime& time, const WallTime& now) {
  static constexpr std::array<const char*, 12> kMonths = {"Jan", "Feb", "Mar", "Apr", "May", "Jun",
                                                          "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"};
  const std::string written = format_time(time);
  const std::string clock = written.substr(11, 5);
  const std::string day = format_date(time);
  const std::string today = format_date(now);
  if (day == today) return clock;
  const auto month =
      static_cast<std::size_t>(*parse_int(day.substr(5, 2).starts_with('0') ? day.substr(6, 1) : day.substr(5, 2)));
  const std::string number = day.substr(8, 1) == "0" ? day.substr(9, 1) : day.substr(8, 2);
  const std::string year = day.substr(0, 4) == today.substr(0, 4) ? "" : " " + day.substr(0, 4);
  return number + " " + kMonths[month - 1] + year + " " + clock;
}

std::string record_in_words(const PitRecord& record, const std::vector<std::string>& finds) {
  if (record.status == PitStatus::kWithdrawn) return "withdrawn";
  std::string text;
  if (record.status == PitStatus::kNotDug) {
    text = "not dug: " + (record.reason ? in_words(*record.reason) : std::string("no reason said"));
  } else {
    text = "dug" + (record.depth_cm ? " " + format_trimmed(*record.depth_cm, 1) + " cm" : std::string()) + ": " +
           finds_in_words(record, finds);
    if (record.stop) text += "; stopped at " + in_words(*record.stop);
  }
  if (!record.note.empty()) text += "; " + record.note;
  return text;
}

}  // namespace nearpit::ui
