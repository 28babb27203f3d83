#include "session/judge_batch.h"

#include <algorithm>
#include <variant>

#include "base/text.h"
#include "record/record_json.h"
#include "session/judge_record.h"

namespace nearpit {
namespace {

Error bad(std::string line) { return Error(ErrorKind::kBadInput, std::move(line)); }

std::string at(const Origin& origin) {
  return origin.place.empty() ? "" : origin.place + ":" + std::to_string(origin.line) + ": ";
}

Status needs_why(const Action& action, const std::string& what) {
  return action.why.empty() ? Status(bad("why: missing; say why " + what)) : ok_status();
}

}  // namespace

Status BatchJudge::judge(const std::vector<Action>& actions) {
  for (const Action& action : actions) {
    if (const auto* record = std::get_if<RecordPit>(&action.what)) note_known(record->pit);
    if (const auto* belongs = std::get_if<BelongsTo>(&action.what)) note_known(belongs->other);
  }
  std::vector<std::string> findings;
  for (const Action& action : actions) {
    const Status done = judge_one(action);
    if (done) continue;
    for (const std::string& line : done.error().lines)
      findings.push_back(at(action.origin) + line);
  }
  if (findings.empty()) findings = not_reached();
  if (findings.empty()) return ok_status();
  take_back();
  return Error(ErrorKind::kBadInput, std::move(findings));
}

void BatchJudge::take_back() {
  std::vector<NodeId> ignored;
  for (const std::string& object : touched_) {
    const Status restored = model_.set_object(object, log_.heads(object), &ignored);
    static_cast<void>(restored);  // these heads were read once already
  }
}

Status BatchJudge::judge_one(const Action& action) {
  return std::visit([&](const auto& given) { return carry_out(given, action); }, action.what);
}

const std::vector<LogHead>& BatchJudge::heads(const std::string& object) const {
  const auto own = written_.find(object);
  return own == written_.end() ? log_.heads(object) : own->second;
}

Status BatchJudge::write(const std::string& object, std::string body, const std::string& by, const std::string& why) {
  std::vector<std::string> parents;
  for (const LogHead& head : heads(object))
    parents.push_back(head.revision);
  Revision revision = maker_.make(object, std::move(body), by, why, std::move(parents));
  std::vector<LogHead> now{{revision.id, revision.clock, revision.writer, revision.by, revision.body}};
  touched_.insert(object);
  NEARPIT_TRY(model_.set_object(object, now, &changed_));
  written_[object] = std::move(now);
  revisions_.push_back(std::move(revision));
  return ok_status();
}

Status BatchJudge::write_pit(const PitName& pit, const PitRecord& record, const std::string& by,
                             const std::string& why) {
  return write(pit.object, pit_record_json(record, pit.label, model_.plan().finds), by, why);
}

void BatchJudge::note_known(const std::string& text) {
  const auto pit = model_.name_of(text);
  if (!pit) return;
  const PitEntry* entry = model_.entry(*pit);
  const bool reached = pit->node != kNoNode && model_.survey().dig_list().in_design(pit->node);
  if (reached || (entry && !entry->withdrawn())) known_before_.insert(pit->object);
}

void BatchJudge::caution_if_stopped(const PitName& pit, const PitRecord& record) {
  const PitEntry* before = model_.entry(pit);
  if (!record.stop || (before && before->record().stop == record.stop)) return;
  std::string what;
  if (record.stop == StopReason::kHumanRemainsStop)
    what = "possible human remains: stop, protect the place, move nothing";
  if (record.stop == StopReason::kUxoStop) what = "possible ordnance: leave it untouched, go back the way you came";
  if (record.stop == StopReason::kUtilityStop) what = "a buried line: stop, keep everybody away";
  if (what.empty()) return;
  cautions_.push_back(pit.label + ": " + what +
                      ", and tell those whom the law names; the pits around it stay on the dig list until the area "
                      "is closed");
}

void BatchJudge::remember_recorded(const PitName& pit, const std::string& field, ChosenBy chosen_by,
                                   const Origin& origin) {
  recorded_.push_back({pit, field, chosen_by, origin});
}

// A pit must be known before, reached after the whole batch, or said to be judgement or asked for: a mistyped label must not become a judgement pit in silence.
std::vector<std::string> BatchJudge::not_reached() const {
  std::vector<std::string> findings;
  for (const Recorded& recorded : recorded_) {
    if (recorded.chosen_by == ChosenBy::kJudgement || recorded.chosen_by == ChosenBy::kAsked) continue;
    if (known_before_.contains(recorded.pit.object)) continue;
    if (recorded.pit.node != kNoNode && model_.survey().dig_list().in_design(recorded.pit.node)) continue;
    const bool said = recorded.chosen_by == ChosenBy::kDesign;
    findings.push_back(at(recorded.origin) + (said ? "chosen_by: 'design', but " : recorded.field + ": ") +
                       recorded.pit.label +
                       " is not due; correct the label, or say chosen_by 'judgement' if it was dug "
                       "on judgement, 'asked' if another crew's find opened it");
  }
  return findings;
}

Result<PitName> BatchJudge::recorded_pit(const std::string& field, const std::string& text) const {
  auto named = model_.name_of(text);
  if (!named) return bad(field + ": " + named.error().lines.front());
  const PitEntry* entry = model_.entry(*named);
  if (!entry || entry->withdrawn()) {
    return bad(field + ": " + named->label + (entry ? "'s record is withdrawn already" : " has no record") +
               "; legal: a pit that has one");
  }
  return named;
}

Status BatchJudge::carry_out(const RecordPit& given, const Action& action) {
  auto named = model_.name_of(given.pit);
  if (!named) return bad("pit: " + named.error().lines.front());
  const auto [first, is_new] = first_rows_.emplace(named->object, action.origin);
  if (!is_new) {
    return bad("pit: " + in_quotes(given.pit) + " is " + named->label + ", which stands on line " +
               std::to_string(first->second.line) + " already; keep one row for each pit");
  }
  NEARPIT_ASSIGN(record, new_record(model_, *named, given, action.why, maker_.now()));
  remember_recorded(*named, "pit", record.chosen_by, action.origin);
  caution_if_stopped(*named, record);
  return write_pit(*named, record, action.by.empty() ? record.crew : action.by, action.why);
}

Status BatchJudge::carry_out(const WithdrawPit& given, const Action& action) {
  NEARPIT_TRY(needs_why(action, "the record is withdrawn"));
  NEARPIT_ASSIGN(pit, recorded_pit("pit", given.pit));
  PitRecord record = model_.entry(pit)->record();
  record.status = PitStatus::kWithdrawn;
  return write_pit(pit, record, action.by, action.why);
}

Status BatchJudge::carry_out(const BelongsTo& given, const Action& action) {
  NEARPIT_TRY(needs_why(action, "the record belongs to another pit"));
  NEARPIT_ASSIGN(pit, recorded_pit("pit", given.pit));
  auto other = model_.name_of(given.other);
  if (!other) return bad("other: " + other.error().lines.front());
  if (other->object == pit.object) return bad("other: " + other->label + " is the same pit; legal: another pit");
  const PitEntry* taken = model_.entry(*other);
  if (taken && !taken->withdrawn()) {
    return bad("other: " + other->label + " has a record of its own; withdraw that first if it is wrong");
  }
  PitRecord record = model_.entry(pit)->record();
  if (other->node == kNoNode && (!record.place || record.chosen_by != ChosenBy::kJudgement)) {
    return bad("other: " + in_quotes(other->label) + " is no pit of the grid; legal: a pit such as " + model_.label(0));
  }
  PitRecord gone = record;
  gone.status = PitStatus::kWithdrawn;
  if (other->node != kNoNode && record.place && record.moved.empty()) record.moved = action.why;
  if (const Status fits = check_place(model_, *other, record); !fits) {
    return bad("other: the record does not fit " + other->label + ": " + fits.error().lines.front());
  }
  remember_recorded(*other, "other", record.chosen_by, action.origin);
  NEARPIT_TRY(write_pit(pit, gone, action.by, action.why));
  return write_pit(*other, record, action.by, action.why);
}

Status BatchJudge::carry_out(const AskNeighbours& given, const Action& action) {
  NEARPIT_TRY(needs_why(action, "its neighbours should be dug"));
  NEARPIT_ASSIGN(pit, recorded_pit("pit", given.pit));
  const bool judgement = pit.node != kNoNode && !model_.survey().dig_list().in_design(pit.node) &&
                         model_.survey().ground().positive.positive(model_.entry(pit)->record());
  if (!judgement) {
    return bad("pit: " + pit.label +
               " is no positive judgement pit on the grid; only such a pit needs its neighbours asked for");
  }
  PitRecord record = model_.entry(pit)->record();
  record.opens_neighbours = true;
  return write_pit(pit, record, action.by, action.why);
}

std::string BatchJudge::free_area_name() const {
  const auto& areas = model_.survey().closed_areas();
  for (std::size_t number = 1;; ++number) {
    const std::string name = "closed area " + std::to_string(number);
    const bool taken =
        std::any_of(areas.begin(), areas.end(), [&](const auto& area) { return area.second.name == name; });
    if (!taken) return name;
  }
}

Status BatchJudge::carry_out(const CloseArea& given, const Action& action) {
  if (given.reason == NotDugReason::kOther) NEARPIT_TRY(needs_why(action, "the area is closed (reason 'other')"));
  const Survey& survey = model_.survey();
  for (const auto& [object, area] : survey.closed_areas()) {
    if (!given.name.empty() && area.name == given.name && !area.open_again) {
      return bad("area: " + in_quotes(given.name) + " is closed already; use another name");
    }
  }
  ClosedArea area;
  area.name = given.name.empty() ? free_area_name() : given.name;
  area.reason = given.reason;
  area.polygon = given.polygon;
  area.rows = given.rows;
  area.by = action.by;
  const auto& runs = survey.ground().frame.runs();
  for (const std::int32_t row : area.rows) {
    if (std::any_of(runs.begin(), runs.end(), [&](const Run& run) { return run.row == row; })) continue;
    return bad("rows: " + std::to_string(row) + " is no row of this survey; legal: " +
               std::to_string(runs.front().row) + " to " + std::to_string(runs.back().row));
  }
  if (survey.nodes_in(area).empty()) {
    return bad("polygon: no pit of this survey lies inside it; give it in the plan's coordinates, metres");
  }
  return write("area/" + maker_.new_id(), closed_area_json(area), action.by, action.why);
}

Status BatchJudge::carry_out(const ReopenArea& given, const Action& action) {
  NEARPIT_TRY(needs_why(action, "the area is open again"));
  std::vector<std::string> closed;
  for (const auto& [object, area] : model_.survey().closed_areas()) {
    if (area.open_again) continue;
    if (area.name == given.area) {
      ClosedArea again = area;
      again.open_again = true;
      const std::string name = object;
      return write(name, closed_area_json(again), action.by, action.why);
    }
    closed.push_back(in_quotes(area.name));
  }
  return bad("area: " + in_quotes(given.area) + " is no closed area; " +
             (closed.empty() ? "none is closed" : "closed now: " + join(closed, ", ")));
}

}  // namespace nearpit
