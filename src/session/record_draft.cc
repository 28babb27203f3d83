#include "session/record_draft.h"

#include <algorithm>
#include <utility>

#include "base/numbers.h"
#include "base/text.h"
#include "session/blank_fields.h"
#include "session/preferences.h"

namespace nearpit {
namespace {

constexpr std::int64_t kMostCount = 1'000'000;  // as a table of pits takes it
constexpr std::int64_t kMostStepped = 999'999;
constexpr double kDeepest_cm = 1000;

Error bad(std::string line) { return Error(ErrorKind::kBadInput, std::move(line)); }

// ---- what stands ----

std::string revisions_of(const PitEntry& entry) {
  std::vector<std::string> ids;
  for (const Head& head : entry.heads)
    ids.push_back(head.revision);
  std::sort(ids.begin(), ids.end());
  return join(ids, " ");
}

// A draft's pit in the survey as it is now. `named` is nothing when no pit can have the name.
struct Ground {
  std::optional<PitName> named;
  const PitRecord* standing = nullptr;
  std::string revisions;
  bool conflict = false;
  bool amends() const { return standing != nullptr || conflict; }
};

Ground ground_of(const SurveyModel& model, const PitName& pit) {
  Ground ground;
  ground.named = pit;
  const PitEntry* entry = model.entry(pit);
  if (entry == nullptr) return ground;
  ground.standing = entry->standing();
  ground.revisions = revisions_of(*entry);
  ground.conflict = entry->verdict.conflict != Conflict::kNone;
  return ground;
}

Ground ground_of(const SurveyModel& model, const std::string& label) {
  auto named = model.name_of(label);
  return named ? ground_of(model, *named) : Ground{};
}

bool on_judgement(const SurveyModel& model, const PitName& pit) {
  return pit.node == kNoNode || !model.survey().dig_list().in_design(pit.node);
}

// ---- what was typed ----

// Text with nothing but blanks says nothing.
std::string said(const std::string& text) { return text.find_first_not_of(" \n\r\t") == std::string::npos ? "" : text; }

// "45.": the point was typed and nothing after it. Nothing: no number, or none that a depth can be.
std::optional<double> depth_of(const std::string& typed) {
  const auto depth = parse_double(typed.ends_with('.') ? typed.substr(0, typed.size() - 1) : typed);
  return depth && *depth >= 0 && *depth <= kDeepest_cm ? depth : std::nullopt;
}

// "" is 0; nothing: no count.
std::optional<std::uint32_t> count_of(const std::string& typed) {
  if (typed.empty()) return 0u;
  if (typed.find_first_not_of("0123456789") != std::string::npos) return std::nullopt;
  const auto count = parse_int(typed);
  return count && *count <= kMostCount ? std::optional(static_cast<std::uint32_t>(*count)) : std::nullopt;
}

std::string typed_count(const RecordDraft& draft, std::size_t find) {
  return find < draft.counts.size() ? draft.counts[find] : "";
}

bool some_found(const RecordDraft& draft) {
  return std::any_of(draft.counts.begin(), draft.counts.end(),
                     [](const std::string& typed) { return typed.find_first_not_of('0') != std::string::npos; });
}

void fill_from(const PitRecord& record, RecordDraft* draft) {
  draft->not_dug = record.status == PitStatus::kNotDug;
  draft->reason = record.reason;
  draft->started_at = record.started_at;
  draft->stop = record.stop;
  draft->note = record.note;
  draft->judgement = record.chosen_by == ChosenBy::kJudgement;
  if (record.depth_cm) draft->depth_cm = format_double(*record.depth_cm);
  for (std::size_t i = 0; i < draft->counts.size() && i < record.counts.size(); ++i) {
    if (record.counts[i] > 0) draft->counts[i] = std::to_string(record.counts[i]);
  }
  draft->nothing_found = record.status == PitStatus::kDug && !some_found(*draft);
}

RecordDraft draft_on(const SurveyModel& model, const Ground& ground) {
  RecordDraft draft;
  draft.counts.assign(model.plan().finds.size(), "");
  if (!ground.named) return draft;
  draft.pit = ground.named->label;
  draft.amends = ground.amends();
  draft.based_on = ground.revisions;
  draft.judgement = on_judgement(model, *ground.named);
  if (ground.standing != nullptr) fill_from(*ground.standing, &draft);
  return draft;
}

// ---- what is missing ----

void miss_finds(const RecordDraft& draft, const SurveyModel& model, std::vector<std::string>* lacking) {
  const auto& finds = model.plan().finds;
  for (std::size_t i = 0; i < finds.size(); ++i) {
    if (!count_of(typed_count(draft, i))) lacking->push_back("a whole number of " + finds[i] + ", up to 1000000");
  }
  if (draft.not_dug) {
    if (some_found(draft)) lacking->push_back("no finds, as the pit was not dug");
  } else if (draft.nothing_found && some_found(draft)) {
    lacking->push_back("either finds or 'nothing found'");
  } else if (!draft.nothing_found && !some_found(draft)) {
    lacking->push_back("what was found, or 'nothing found'");
  }
}

void miss_rest(const RecordDraft& draft, std::vector<std::string>* lacking) {
  if (draft.not_dug && !draft.reason) lacking->push_back("why it was not dug");
  if (!draft.not_dug && !draft.depth_cm.empty() && !depth_of(draft.depth_cm)) {
    lacking->push_back("a depth from 0 to 1000 cm");
  }
  const std::string note = said(draft.note);
  const bool other = draft.not_dug ? draft.reason == NotDugReason::kOther : draft.stop == StopReason::kOther;
  if (note.empty() && other) lacking->push_back("a note: what 'other' means");
  if (!note.empty() && !is_note(note, kMostNote)) lacking->push_back("a note in plain text of at most 4000 characters");
}

// ---- the action ----

template <class T>
Given<T> given(std::optional<T> value) {
  return Given<T>(std::in_place, std::move(value));
}
Given<std::string> given_text(std::string text) {
  return given(text.empty() ? std::nullopt : std::optional(std::move(text)));
}
template <class T>
Given<T> if_said(std::optional<T> value) {
  return value ? given(std::move(value)) : std::nullopt;
}

// What the draft says of a pit, as a record holds it.
PitRecord shown(const RecordDraft& draft, const SurveyModel& model) {
  PitRecord record;
  record.status = draft.not_dug ? PitStatus::kNotDug : PitStatus::kDug;
  record.started_at = draft.started_at;
  record.note = said(draft.note);
  record.counts.assign(model.plan().finds.size(), 0);
  if (draft.not_dug) {
    record.reason = draft.reason;
    return record;
  }
  record.stop = draft.stop;
  record.depth_cm = depth_of(draft.depth_cm);
  for (std::size_t i = 0; i < record.counts.size(); ++i)
    record.counts[i] = count_of(typed_count(draft, i)).value_or(0);
  return record;
}

RecordPit first_record(const RecordDraft& draft, const PitRecord& said_now, const SurveyModel& model,
                       const std::string& crew, const WallTime& now) {
  RecordPit pit;
  pit.status = given<PitStatus>(said_now.status);
  pit.reason = if_said(said_now.reason);
  if (!crew.empty()) pit.crew = given_text(crew);
  if (!said_now.started_at.empty()) pit.started_at = given_text(said_now.started_at);
  if (!said_now.note.empty()) pit.note = given_text(said_now.note);
  pit.depth_cm = if_said(said_now.depth_cm);
  pit.stop = if_said(said_now.stop);
  if (draft.judgement) pit.chosen_by = given<ChosenBy>(ChosenBy::kJudgement);
  if (said_now.status != PitStatus::kDug) return pit;
  const std::vector<std::string>& required = model.plan().require;
  if (std::find(required.begin(), required.end(), "dug_at") != required.end())
    pit.dug_at = given_text(format_time(in_zone(now, model.zone())));
  for (std::size_t i = 0; i < said_now.counts.size(); ++i)
    pit.counts[i] = said_now.counts[i];
  return pit;
}

// A find that is gone is cleared.
std::optional<std::uint32_t> count_or_cleared(std::uint32_t count) {
  return count > 0 ? std::optional(count) : std::nullopt;
}

// Every field that a draft shows, when `all`; else those that differ from what stands.
RecordPit further_record(const RecordDraft& draft, const PitRecord& said_now, const PitRecord& standing, bool all) {
  RecordPit pit;
  if (all || said_now.status != standing.status) pit.status = given<PitStatus>(said_now.status);
  if (all || said_now.reason != standing.reason) pit.reason = given(said_now.reason);
  if (all || said_now.started_at != standing.started_at) pit.started_at = given_text(said_now.started_at);
  if (all || said_now.depth_cm != standing.depth_cm) pit.depth_cm = given(said_now.depth_cm);
  if (all || said_now.stop != standing.stop) pit.stop = given(said_now.stop);
  if (all || said_now.note != standing.note) pit.note = given_text(said_now.note);
  const bool judged = standing.chosen_by == ChosenBy::kJudgement;
  if (draft.judgement && (all || !judged)) pit.chosen_by = given<ChosenBy>(ChosenBy::kJudgement);
  if (!draft.judgement && judged) pit.chosen_by = given<ChosenBy>(std::nullopt);
  for (std::size_t i = 0; i < said_now.counts.size(); ++i) {
    const std::uint32_t before = i < standing.counts.size() ? standing.counts[i] : 0;
    if (all || said_now.counts[i] != before) pit.counts[i] = count_or_cleared(said_now.counts[i]);
  }
  return pit;
}

// ---- what stays blank ----

// The record as it would be if it were saved now.
PitRecord as_saved(const RecordDraft& draft, const SurveyModel& model, const PitRecord* standing,
                   const std::string& crew) {
  PitRecord record = shown(draft, model);
  if (standing == nullptr) {
    record.crew = crew;
    record.dug_at = "at saving";  // action_of() gives it where the plan requires it
    record.dug_at_defaulted = false;
    return record;
  }
  record.crew = standing->crew;
  record.dug_at = standing->dug_at;
  record.dug_at_defaulted = standing->dug_at_defaulted;
  record.mesh_mm = standing->mesh_mm;
  record.backfilled = standing->backfilled;
  record.bag = standing->bag;
  return record;
}

bool says_nothing(const RecordPit& pit) {
  return !pit.status && !pit.reason && !pit.started_at && !pit.depth_cm && !pit.stop && !pit.note && !pit.chosen_by &&
         pit.counts.empty();
}

bool based_elsewhere(const RecordDraft& draft, const Ground& ground) {
  return ground.named && (draft.based_on != ground.revisions || draft.amends != ground.amends());
}

}  // namespace

RecordDraft new_draft(const SurveyModel& model, const PitName& pit, const WallTime& now) {
  const Ground ground = ground_of(model, pit);
  RecordDraft draft = draft_on(model, ground);
  if (ground.standing == nullptr) draft.started_at = format_time(in_zone(now, model.zone()));
  return draft;
}

bool typed_anything(const RecordDraft& draft, const SurveyModel& model) {
  RecordDraft blank = draft_on(model, ground_of(model, draft.pit));
  RecordDraft typed = draft;
  typed.counts.resize(std::max(typed.counts.size(), blank.counts.size()));
  blank.counts.resize(typed.counts.size());
  blank.pit = typed.pit;
  blank.based_on = typed.based_on;
  blank.amends = typed.amends;
  blank.started_at = typed.started_at;
  blank.judgement = typed.judgement;
  return !(typed == blank);
}

bool typed_beside_why(const RecordDraft& draft, const SurveyModel& model) {
  RecordDraft rest = draft;
  rest.why.clear();
  return typed_anything(rest, model);
}

bool overtaken(const RecordDraft& draft, const SurveyModel& model) {
  return based_elsewhere(draft, ground_of(model, draft.pit));
}

Status not_overtaken(const RecordDraft& draft, const SurveyModel& model) {
  if (!overtaken(draft, model)) return ok_status();
  return Error(ErrorKind::kConflict,
               draft.pit + ": its record was changed since you opened it; look at it, then save again");
}

bool catch_up(RecordDraft* draft, const SurveyModel& model) {
  // Counts beyond the plan's finds (a draft of another plan's file) can't be shown; what they say is not lost.
  for (std::size_t i = model.plan().finds.size(); i < draft->counts.size(); ++i) {
    if (!draft->counts[i].empty())
      draft->note += (draft->note.empty() ? "count of no find: " : "; count of no find: ") + draft->counts[i];
  }
  draft->counts.resize(model.plan().finds.size());
  const Ground ground = ground_of(model, draft->pit);
  if (!based_elsewhere(*draft, ground)) return false;
  draft->based_on = ground.revisions;
  draft->amends = ground.amends();
  return true;
}

std::vector<std::string> missing(const RecordDraft& draft, const SurveyModel& model) {
  std::vector<std::string> lacking;
  const Ground ground = ground_of(model, draft.pit);
  if (!ground.named) {
    lacking.push_back("a pit of this survey");
  } else if (ground.named->node == kNoNode && ground.standing == nullptr) {
    lacking.push_back("where it lies: log a pit off the grid from a table, with x and y");
  }
  if (ground.named && ground.standing == nullptr && !ground.conflict && !draft.judgement &&
      on_judgement(model, *ground.named) && ground.named->node != kNoNode) {
    lacking.push_back("that it is a judgement pit (under More): nothing calls for it any more");
  }
  miss_finds(draft, model, &lacking);
  miss_rest(draft, &lacking);
  const std::string why = said(draft.why);
  if (why.empty() && (draft.amends || ground.amends())) lacking.push_back("why the record is changed");
  if (!why.empty() && !is_note(why, kMostWhy)) lacking.push_back("a reason in plain text of at most 2000 characters");
  return lacking;
}

std::vector<std::string> blanks(const RecordDraft& draft, const SurveyModel& model, const std::string& crew) {
  std::vector<std::string> blank;
  if (draft.not_dug) return blank;
  const Ground ground = ground_of(model, draft.pit);
  const PitRecord saved = as_saved(draft, model, ground.standing, crew);
  for (const std::string& field : model.plan().require) {
    if (is_blank(saved, field)) blank.push_back(field);
  }
  return blank;
}

Result<Action> action_of(const RecordDraft& draft, const SurveyModel& model, const std::string& crew,
                         const WallTime& now) {
  const Ground ground = ground_of(model, draft.pit);
  NEARPIT_TRY(not_overtaken(draft, model));
  if (const auto lacking = missing(draft, model); !lacking.empty()) {
    return bad((draft.pit.empty() ? "" : draft.pit + ": ") + "not saved; still to say: " + join(lacking, "; "));
  }
  if (!crew.empty() && !is_name(crew, kMostCrew)) {
    return bad("crew: " + in_quotes(crew) + " is no name; legal: 1 to 200 characters on one line");
  }
  const PitRecord said_now = shown(draft, model);
  Action action;
  action.by = crew;
  action.why = said(draft.why);
  if (ground.standing == nullptr) {
    action.what = first_record(draft, said_now, model, crew, now);
  } else {
    RecordPit pit = further_record(draft, said_now, *ground.standing, ground.conflict);
    if (says_nothing(pit)) return bad(draft.pit + ": nothing is changed; change something, or leave it as it is");
    action.what = std::move(pit);
  }
  std::get<RecordPit>(action.what).pit = ground.named->label;
  return action;
}

void type_digit(std::string* number, char digit_or_point, std::size_t most) {
  if (digit_or_point == '.') {
    if (number->find('.') != std::string::npos || most == 0) return;
    *number += number->empty() ? "0." : ".";
    return;
  }
  if (digit_or_point < '0' || digit_or_point > '9') return;
  if (number->find_first_not_of('0') == std::string::npos) number->clear();
  const auto digits = std::count_if(number->begin(), number->end(), [](char c) { return c >= '0' && c <= '9'; });
  if (static_cast<std::size_t>(digits) < most) *number += digit_or_point;
}

void step_count(std::string* count, int by) {
  const std::int64_t now = count_of(*count).value_or(0);
  *count = std::to_string(std::clamp<std::int64_t>(now + by, 0, std::max(now, kMostStepped)));
}

}  // namespace nearpit
