#include "session/judge_record.h"

#include <algorithm>

#include "base/numbers.h"
#include "base/text.h"

namespace nearpit {
namespace {

constexpr double kSamePlace_m = 0.01;

Error bad(std::string line) { return Error(ErrorKind::kBadInput, std::move(line)); }

template <class T>
void take(const Given<T>& given, std::optional<T>* field) {
  if (given) *field = *given;
}

void take(const Given<std::string>& given, std::string* field) {
  if (given) *field = given->value_or("");
}

PitRecord blank(const SurveyModel& model) {
  PitRecord record;
  record.counts.assign(model.plan().finds.size(), 0);
  record.weights_g.assign(model.plan().finds.size(), std::nullopt);
  return record;
}

void take_fields(const RecordPit& given, PitRecord* record) {
  take(given.reason, &record->reason);
  take(given.crew, &record->crew);
  take(given.started_at, &record->started_at);
  take(given.depth_cm, &record->depth_cm);
  take(given.stop, &record->stop);
  take(given.moved, &record->moved);
  take(given.mesh_mm, &record->mesh_mm);
  take(given.backfilled, &record->backfilled);
  take(given.bag, &record->bag);
  take(given.note, &record->note);
  if (given.chosen_by) record->chosen_by = given.chosen_by->value_or(ChosenBy::kUnsaid);
  for (const auto& [find, count] : given.counts)
    record->counts[find] = count.value_or(0);
  for (const auto& [find, grams] : given.weights_g)
    record->weights_g[find] = grams;
}

void take_time(const RecordPit& given, const SurveyModel& model, const WallTime& now, PitRecord* record) {
  if (given.dug_at) {
    record->dug_at = given.dug_at->value_or("");
    record->dug_at_defaulted = false;
  }
  if (!record->dug_at.empty()) return;
  record->dug_at = format_time(in_zone(now, model.zone()));
  record->dug_at_defaulted = true;
}

// "flint 2, pottery 1.5 g"; empty when nothing was found.
std::string finds_in_words(const PitRecord& record, const std::vector<std::string>& finds) {
  std::vector<std::string> words;
  for (std::size_t i = 0; i < finds.size(); ++i) {
    if (record.counts[i] > 0) words.push_back(finds[i] + " " + std::to_string(record.counts[i]));
    if (record.weights_g[i] > 0.0) words.push_back(finds[i] + " " + format_trimmed(*record.weights_g[i], 3) + " g");
  }
  return join(words, ", ");
}

Status take_place(const RecordPit& given, PitRecord* record) {
  if (!given.x && !given.y) return ok_status();
  const auto x = given.x.value_or(std::nullopt);
  const auto y = given.y.value_or(std::nullopt);
  if (x.has_value() != y.has_value()) return bad(std::string(x ? "y" : "x") + ": missing; x and y go together");
  record->place = x ? std::optional<Point>(Point{*x, *y}) : std::nullopt;
  return ok_status();
}

// A filled cell that says something else than the record would be lost in silence.
Status nothing_else(const RecordPit& given, const PitRecord& record, const PitName& pit) {
  RecordPit filled = given;
  const auto drop_empty = [](auto& field) {
    if (field && !*field) field.reset();
  };
  drop_empty(filled.reason), drop_empty(filled.crew), drop_empty(filled.started_at), drop_empty(filled.depth_cm);
  drop_empty(filled.stop), drop_empty(filled.chosen_by), drop_empty(filled.x), drop_empty(filled.y);
  drop_empty(filled.moved), drop_empty(filled.mesh_mm), drop_empty(filled.backfilled), drop_empty(filled.bag);
  drop_empty(filled.note), drop_empty(filled.dug_at);
  std::erase_if(filled.counts, [](const auto& count) { return !count.second; });
  std::erase_if(filled.weights_g, [](const auto& grams) { return !grams.second; });
  PitRecord changed = record;
  take_fields(filled, &changed);
  if (filled.dug_at) changed.dug_at = **filled.dug_at;
  NEARPIT_TRY(take_place(filled, &changed));
  if (changed == record) return ok_status();
  return bad("status: 'withdrawn', but other cells of the row differ from the record of " + pit.label +
             "; leave them empty, or correct the record first");
}

}  // namespace

Status check_place(const SurveyModel& model, const PitName& pit, const PitRecord& record) {
  if (pit.node == kNoNode) {
    if (!record.place) return bad("x: missing; a pit off the grid needs x and y, metres in the plan's coordinates");
    return ok_status();
  }
  if (!record.place) {
    if (!record.moved.empty())
      return bad("moved: " + in_quotes(record.moved) + " needs x and y, where the pit was dug");
    return ok_status();
  }
  const double away = distance_m(model.survey().ground().frame.ground(pit.node), *record.place);
  const double most = model.plan().max_move_m;
  if (away > most + kSamePlace_m) {
    return bad("x: " + pit.label + " was dug " + format_trimmed(away, 2) + " m from its place, legal: up to " +
               format_trimmed(most, 2) + " m; record a judgement pit under a label of its own, or this pit as not_dug");
  }
  if (away > kSamePlace_m && record.moved.empty()) {
    return bad("moved: missing; " + pit.label + " was dug " + format_trimmed(away, 2) +
               " m from its place, say why (such as 'tree root')");
  }
  return ok_status();
}

namespace {

// Each status with the fields that go with it.
Status settle_status(const SurveyModel& model, const PitName& pit, const RecordPit& given, PitRecord* record) {
  if (record->status == PitStatus::kDug) {
    if (given.reason && *given.reason) {
      return bad("reason: " + in_quotes(word(**given.reason)) + " goes with status not_dug only");
    }
    record->reason.reset();
    if (record->stop == StopReason::kOther && record->note.empty()) {
      return bad("note: missing; stop 'other' needs a note");
    }
    return ok_status();
  }
  if (!record->reason) return bad("reason: missing; legal: " + all_not_dug_reasons());
  if (const std::string found = finds_in_words(*record, model.plan().finds); !found.empty()) {
    return bad("status: 'not_dug', but " + pit.label + " has finds (" + found +
               "); clear them with empty cells, or withdraw the record");
  }
  if (record->reason == NotDugReason::kOther && record->note.empty()) {
    return bad("note: missing; reason 'other' needs a note");
  }
  record->depth_cm.reset();
  record->stop.reset();
  std::fill(record->counts.begin(), record->counts.end(), 0u);
  std::fill(record->weights_g.begin(), record->weights_g.end(), std::nullopt);
  return ok_status();
}

}  // namespace

Result<PitRecord> new_record(const SurveyModel& model, const PitName& pit, const RecordPit& given,
                             const std::string& why, const WallTime& now) {
  const PitEntry* entry = model.entry(pit);
  const PitRecord* before = entry == nullptr ? nullptr : entry->standing();
  if (entry && entry->verdict.conflict != Conflict::kNone && why.empty()) {
    return bad("why: missing; " + pit.label + " has " + std::to_string(entry->heads.size()) +
               " records that disagree, say why this one holds");
  }
  PitRecord record = before == nullptr ? blank(model) : *before;
  if (given.status) record.status = given.status->value_or(PitStatus::kDug);
  if (record.status == PitStatus::kWithdrawn) {
    if (!before) {
      return bad("status: 'withdrawn', but " + pit.label +
                 (entry ? "'s record is withdrawn already" : " has no record") + "; legal: dug, not_dug");
    }
    if (why.empty()) return bad("why: missing; say why the record of " + pit.label + " is withdrawn");
    PitRecord kept = *before;
    NEARPIT_TRY(nothing_else(given, kept, pit));
    kept.status = PitStatus::kWithdrawn;
    return kept;
  }
  take_fields(given, &record);
  take_time(given, model, now, &record);
  if (pit.node == kNoNode && record.chosen_by != ChosenBy::kJudgement) {
    return bad("pit: " + in_quotes(pit.label) +
               " is no pit of the grid; if it was dug off the grid on judgement, say so with " +
               "chosen_by 'judgement' and x, y; if not, correct the label");
  }
  NEARPIT_TRY(take_place(given, &record));
  NEARPIT_TRY(check_place(model, pit, record));
  NEARPIT_TRY(settle_status(model, pit, given, &record));
  return record;
}

}  // namespace nearpit
