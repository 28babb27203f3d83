#include "session/survey_model.h"

#include <algorithm>
#include <tuple>
#include <utility>

#include "base/text.h"
#include "record/record_json.h"

namespace nearpit {
namespace {

TimeZone zone_of(const Plan& plan) {
  auto zone = TimeZone::named(plan.time_zone);  // the plan's reader has checked the name
  return zone ? *zone : TimeZone::utc();
}

const LogHead& latest(const std::vector<LogHead>& heads) {
  return *std::max_element(heads.begin(), heads.end(), [](const LogHead& a, const LogHead& b) {
    return std::tie(a.clock, a.writer, a.revision) < std::tie(b.clock, b.writer, b.revision);
  });
}

std::string frame_extent(const Survey& survey) {
  const Frame& frame = survey.ground().frame;
  std::int32_t widest = 0;
  for (const Run& run : frame.runs())
    widest = std::max(widest, run.last);
  return "rows T" + std::to_string(frame.runs().front().row) + " to T" + std::to_string(frame.runs().back().row) +
         ", pits up to " + std::to_string(widest) + ", inside the boundary";
}

}  // namespace

SurveyModel::SurveyModel(Plan plan, std::unique_ptr<const SurveyGround> ground)
    : plan_(std::move(plan)),
      zone_(zone_of(plan_)),
      survey_(std::move(ground)),
      labels_(nearpit::labels_of(plan_, survey_.ground().frame.lattice())) {}

std::vector<std::string> SurveyModel::labels_of(const std::vector<NodeId>& ids) const {
  std::vector<std::string> out;
  out.reserve(ids.size());
  for (const NodeId id : ids)
    out.push_back(label(id));
  return out;
}

Result<PitName> SurveyModel::name_of(std::string_view text) const {
  const Frame& frame = survey_.ground().frame;
  if (const auto node = labels_.read(text)) {
    if (const NodeId id = frame.find(*node); id != kNoNode) {
      return PitName{id, pit_object(transect_label(*node)), label(id)};
    }
  }
  if (Labels::looks_like_node(text)) {
    return Error(ErrorKind::kBadInput, in_quotes(text) + " is no pit of this survey; legal: " + frame_extent(survey_));
  }
  if (!is_name(text, kLongestFreeLabel)) {
    return Error(ErrorKind::kBadInput, in_quotes(text) + " can't name a pit; legal: a pit of the grid such as " +
                                           label(0) + ", or a free label of 1 to " + std::to_string(kLongestFreeLabel) +
                                           " characters for a judgement pit off the grid");
  }
  // One pit, whichever case somebody writes it in.
  for (const auto& [label, entry] : survey_.off_grid_pits()) {
    if (fold_case(label) == fold_case(text)) return PitName{kNoNode, pit_object(label), label};
  }
  return PitName{kNoNode, pit_object(std::string(text)), std::string(text)};
}

const PitEntry* SurveyModel::entry(const PitName& pit) const {
  return pit.node != kNoNode ? survey_.pit(pit.node) : survey_.off_grid(std::string(object_name(pit.object)));
}

Status SurveyModel::set_object(const std::string& object, const std::vector<LogHead>& heads,
                               std::vector<NodeId>* changed) {
  const auto add = [&](const std::vector<NodeId>& nodes) {
    changed->insert(changed->end(), nodes.begin(), nodes.end());
  };
  if (is_pit_object(object)) {
    std::vector<Head> read;
    for (const LogHead& head : heads) {
      NEARPIT_ASSIGN(record, pit_record_of(head.body, plan_.finds));
      read.push_back({head.revision, head.clock, head.writer, std::move(record)});
    }
    const std::string name(object_name(object));
    const auto node = Labels::looks_like_node(name) ? labels_.read(name) : std::nullopt;
    const NodeId id = node ? survey_.ground().frame.find(*node) : kNoNode;
    if (id != kNoNode) {
      add(survey_.set_pit(id, std::move(read)));
    } else {
      survey_.set_off_grid(name, std::move(read));
    }
  } else if (is_area_object(object)) {
    if (heads.empty()) {
      add(survey_.forget_closed_area(object));
      return ok_status();
    }
    NEARPIT_ASSIGN(area, closed_area_of(latest(heads).body));
    add(survey_.set_closed_area(object, std::move(area)));
  } else if (is_stop_object(object) && !heads.empty()) {
    NEARPIT_ASSIGN(stop, stop_work_of(latest(heads).body));
    add(survey_.set_stop_work(object, std::move(stop)));
  } else {
    return Error(ErrorKind::kTooNew, "a later Nearpit wrote it; use that one");
  }
  return ok_status();
}

}  // namespace nearpit
