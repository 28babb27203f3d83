#include "desk/desk.h"

#include <algorithm>
#include <filesystem>
#include <utility>

#include "base/text.h"
#include "desk/words.h"
#include "lattice/cells.h"
#include "session/make_survey.h"

namespace nearpit::ui {
namespace {

std::string absolute_path(const std::string& path) {
  std::error_code failed;
  const std::filesystem::path whole = std::filesystem::absolute(path, failed);
  return failed ? path : whole.lexically_normal().string();
}

}  // namespace

Desk::Desk(Environment& environment)
    : environment_(environment), preference_file_(environment.user_folder), preferences_(preference_file_.read()) {
  view_.dusk = preferences_.dusk;
  view_.px_per_mm = preferences_.px_per_mm;
  view_.recent = preferences_.recent;
  view_.places = usual_places();
  view_.card = preferences_.px_per_mm ? CardKind::kStart : CardKind::kSizes;
}

void Desk::carry_out(const Request& request) {
  std::visit([this](const auto& one) { carry_out_one(one); }, request);
}

bool Desk::look_at_the_clock() {
  if (!session_ || today_ == format_date(now())) return false;
  if (view_.notice.kind == NoticeKind::kSaved && !view_.notice.to_be_read()) view_.notice = {};
  survey_changed();
  return true;
}

std::int64_t Desk::ms_to_midnight() const {
  constexpr std::int64_t kDay_ms = 24 * 60 * 60 * 1000;
  const WallTime time = now();
  const std::int64_t of_day = ((time.utc_ms + time.offset_min * 60'000LL) % kDay_ms + kDay_ms) % kDay_ms;
  return kDay_ms - of_day;
}

void Desk::say(const Error& error) { view_.notice = {NoticeKind::kSays, error.one_line(), {}}; }

WallTime Desk::now() const {
  const WallTime wall = environment_.clock->now();
  return session_ ? in_zone(wall, session_->model().zone()) : wall;
}

void Desk::keep_preferences() {
  view_.dusk = preferences_.dusk;
  view_.px_per_mm = preferences_.px_per_mm;
  view_.recent = preferences_.recent;
  const Status kept = preference_file_.write(preferences_);
  if (!kept) {
    view_.notice = {
        NoticeKind::kSays, "What this window remembers of you could not be kept: " + kept.error().one_line(), {}};
  }
}

// ---- start ----

void Desk::carry_out_one(const BrowseFolder& request) {
  if (request.path.empty()) {
    view_.folder.reset();
    view_.places = usual_places();
    return;
  }
  auto list = list_folder(request.path, {".gpkg", ".json"}, TimeZone::utc());
  if (list) {
    view_.folder = std::move(*list);
  } else {
    say(list.error());
  }
}

void Desk::carry_out_one(const OpenSurvey& request) { open(absolute_path(request.path)); }

void Desk::open(const std::string& path) {
  auto session = Session::open(path, environment_, false);
  if (!session) {
    say(session.error());
    return;
  }
  session_ = std::make_unique<Session>(std::move(*session));
  book_ = std::make_unique<DraftBook>(environment_.user_folder, session_->survey_id());
  drafts_refused_ = false;
  walk_to_ = kNoNode;
  view_.notice = {};
  view_.survey.emplace();
  SurveyView& survey = *view_.survey;
  survey.file = path;
  survey.name = session_->model().plan().survey;
  survey.model = &session_->model();
  const auto crew = preferences_.crew_of.find(session_->survey_id());
  if (crew != preferences_.crew_of.end()) {
    survey.crew = crew->second;
  } else if (session_->model().plan().crews.size() == 1) {
    survey.crew = session_->model().plan().crews.front();
  }
  opened(&preferences_, path);
  keep_preferences();
  // On the first start of all the glass is measured first.
  view_.card = preferences_.px_per_mm ? CardKind::kDigList : CardKind::kSizes;
  read_drafts();
  survey_changed();
}

void Desk::carry_out_one(const MakeSurvey& request) {
  const auto file = new_file_path(request.folder, request.name);
  if (!file) {
    say(file.error());
    return;
  }
  const auto made = make_survey(request.plan_path, *file, environment_);
  if (!made) {
    // All that is wrong with the plan, so that it is mended in one go.
    view_.notice = {NoticeKind::kSays, "No survey was made.", made.error().lines};
    return;
  }
  open(*file);
  if (!made->warnings.empty() && view_.survey)
    view_.notice = {NoticeKind::kSays, "The survey is made.", made->warnings};
}

void Desk::carry_out_one(const CloseSurvey&) {
  view_.survey.reset();
  session_.reset();
  book_.reset();
  view_.places = usual_places();
  view_.notice = {};
  view_.card = CardKind::kStart;
  if (view_.folder) carry_out_one(BrowseFolder{view_.folder->path});
}

// ---- drafts ----

namespace {

constexpr const char* kOvertaken =
    " was recorded by somebody else since you began. What you typed is kept: look at the pit's history, then save "
    "yours with the reason, or forget it.";

}  // namespace

void Desk::read_drafts() {
  if (book_->read(session_->model())) {
    view_.notice = {NoticeKind::kSays,
                    "A half-written record was begun before the pit's record changed; look at it before you save it.",
                    {}};
  }
  // What was being written when the program ended is what the crew stands at.
  for (const auto& [label, draft] : book_->all()) {
    const auto name = session_->model().name_of(label);
    if (name && name->node != kNoNode && survey().dig_list().due(name->node)) walk_to_ = name->node;
  }
}

// Said once, not with every touch: typing and saving go on all the same.
bool Desk::told(const Status& kept) {
  if (!kept && !drafts_refused_ && !view_.notice.to_be_read()) {
    view_.notice = {NoticeKind::kSays,
                    "What is half typed can't be kept on this disk (a crash would lose it): " + kept.error().one_line(),
                    {}};
  }
  drafts_refused_ = !kept;
  return kept.ok();
}

// The record's card goes; what was typed is in the book.
void Desk::put_draft_away() {
  if (!view_.survey->draft) return;
  view_.survey->draft.reset();
  view_.survey->recorded_pit.reset();
  list_due();
  propose();
}

void Desk::carry_out_one(const OpenRecord& request) {
  if (!session_) return;
  const auto name = session_->model().name_of(request.label);
  if (!name) {
    say(name.error());
    return;
  }
  SurveyView& view = *view_.survey;
  view_.card = CardKind::kRecord;
  if (view.draft && view.draft->pit == name->label) return;
  put_draft_away();
  const RecordDraft* kept = book_->find(name->label);
  view.draft = kept != nullptr ? *kept : new_draft(session_->model(), *name, now());
  if (kept != nullptr && overtaken_draft(&*view.draft, session_->model())) {
    told(book_->keep(*view.draft, session_->model()));
    view_.notice = {NoticeKind::kSays, name->label + kOvertaken, {}};
  }
  ++view.opened;
  if (name->node != kNoNode && survey().dig_list().due(name->node)) walk_to_ = name->node;
  view.chosen = chosen_pit(*name);
  view.recorded_pit = view.chosen;
  draft_changed();
  propose();
}

void Desk::draft_changed() {
  SurveyView& view = *view_.survey;
  view.missing.clear();
  view.blanks.clear();
  view.typed = false;
  if (!view.draft) return;
  view.missing = missing(*view.draft, session_->model());
  view.blanks = blanks(*view.draft, session_->model(), view.crew);
  view.typed = typed_beside_why(*view.draft, session_->model());
}

void Desk::carry_out_one(const KeepDraft& request) {
  if (!session_ || !view_.survey->draft || view_.survey->draft->pit != request.draft.pit) return;
  view_.survey->draft = request.draft;
  told(book_->keep(request.draft, session_->model()));
  draft_changed();
}

void Desk::carry_out_one(const DropDraft&) {
  if (!session_ || !view_.survey->draft) return;
  const std::string label = view_.survey->draft->pit;
  told(book_->forget(label));
  if (view_.survey->refused == label) view_.survey->refused.clear();
  put_draft_away();
  view_.card = CardKind::kDigList;
}

// ---- cards ----

void Desk::carry_out_one(const ShowCard& request) {
  if (session_ && request.card != CardKind::kRecord) put_draft_away();
  view_.card = session_ || request.card == CardKind::kStart || request.card == CardKind::kSizes ||
                       request.card == CardKind::kKeys
                   ? request.card
                   : CardKind::kStart;
  figures_if_shown();
}

void Desk::carry_out_one(const ChoosePit& request) {
  if (!session_) return;
  view_.survey->chosen.reset();
  if (request.label.empty()) return;
  if (const auto name = session_->model().name_of(request.label)) view_.survey->chosen = chosen_pit(*name);
}

void Desk::carry_out_one(const WalkTo& request) {
  if (!session_) return;
  walk_to_ = request.node;
  propose();
  const auto name = session_->model().name_of(session_->model().label(request.node));
  if (name) view_.survey->chosen = chosen_pit(*name);
}

void Desk::carry_out_one(const GridPitsFirst& request) {
  if (!session_) return;
  view_.survey->grid_pits_first = request.on;
  walk_to_ = kNoNode;
  list_due();
  propose();
}

void Desk::carry_out_one(const SetCrew& request) {
  if (!session_) return;
  if (!request.name.empty() && !is_name(request.name, kMostCrew)) {
    view_.notice = {
        NoticeKind::kSays, in_quotes(request.name) + " can't be a crew's name; legal: 1 to 200 characters", {}};
    return;
  }
  view_.survey->crew = request.name;
  preferences_.crew_of[session_->survey_id()] = request.name;
  keep_preferences();
  survey_changed();
}

void Desk::carry_out_one(const SetDusk& request) {
  preferences_.dusk = request.on;
  keep_preferences();
}

void Desk::carry_out_one(const SetMillimetre& request) {
  preferences_.px_per_mm = std::clamp(request.px_per_mm, kLeastPxPerMm, kMostPxPerMm);
  keep_preferences();
  if (view_.card == CardKind::kSizes) view_.card = session_ ? CardKind::kDigList : CardKind::kStart;
}

void Desk::carry_out_one(const DismissNotice&) {
  // 'Saved' stays on the strip.
  if (view_.notice.kind == NoticeKind::kSaved) {
    view_.notice.more.clear();
  } else {
    view_.notice = {};
  }
}

// ---- writing ----

void Desk::refuse(const std::string& label, const std::string& why) {
  view_.notice = {NoticeKind::kNotSaved, label + ": " + why, {}};
  view_.survey->refused = label;
}

void Desk::write(const Action& action, const std::string& label, const std::string& done) {
  const RecordDraft draft = *view_.survey->draft;
  const auto applied = session_->apply({action}, [&](const SurveyModel& model) { return not_overtaken(draft, model); });
  if (!applied) {
    refuse(label, applied.error().one_line());
    others_wrote();
    return;
  }
  view_.notice = {NoticeKind::kSaved, label + done + " at " + when(now(), now()), applied->notes};
  if (view_.survey->refused == label) view_.survey->refused.clear();
  // That the copy of what was typed can't be removed is told the next time; the record is on the disk.
  static_cast<void>(book_->forget(label));
  view_.survey->draft.reset();
  view_.survey->recorded_pit.reset();
  view_.card = CardKind::kDigList;
  const auto name = session_->model().name_of(label);
  survey_changed();
  walk_to_ =
      next_stop(session_->model(), view_.survey->order, name ? name->node : kNoNode, view_.survey->grid_pits_first);
  propose();
}

// Shows what a write that was refused found in the file: somebody else may have recorded the pit since the draft was begun. What is typed stays, as a
// change of what stands now, and the person looks before anything is written.
void Desk::others_wrote() {
  SurveyView& view = *view_.survey;
  if (session_->revision() == view.revision) return;
  const bool overtaken = catch_up(&*view.draft, session_->model());
  survey_changed();
  if (!overtaken) return;
  if (const auto name = session_->model().name_of(view.draft->pit)) view.chosen = view.recorded_pit = chosen_pit(*name);
  draft_changed();
  static_cast<void>(book_->keep(*view.draft, session_->model()));
  view_.notice = {NoticeKind::kNotSaved, view.draft->pit + kOvertaken, {}};
}

void Desk::carry_out_one(const SaveRecord&) {
  if (!session_ || !view_.survey->draft) return;
  const RecordDraft draft = *view_.survey->draft;
  const auto action = action_of(draft, session_->model(), view_.survey->crew, now());
  if (!action) {
    refuse(draft.pit, action.error().one_line());
    return;
  }
  write(*action, draft.pit, draft.amends ? " changed" : "");
}

// A record that stands is taken back, moved or opened around as it stands: changes half typed would go with it unsaid.
bool Desk::may_change(const std::string& why) {
  if (!session_ || !view_.survey->draft) return false;
  const std::string& label = view_.survey->draft->pit;
  if (view_.survey->typed) {
    refuse(label, "what you changed is not saved yet; save or forget that first");
    return false;
  }
  if (!is_note(why, kMostWhy)) {
    refuse(label, "say why");
    return false;
  }
  return true;
}

void Desk::carry_out_one(const WithdrawRecord& request) {
  if (!may_change(request.why)) return;
  const std::string label = view_.survey->draft->pit;
  write({WithdrawPit{label}, view_.survey->crew, request.why, {}}, label, " withdrawn");
}

void Desk::carry_out_one(const MoveRecord& request) {
  if (!may_change(request.why)) return;
  const std::string label = view_.survey->draft->pit;
  write({BelongsTo{label, request.other}, view_.survey->crew, request.why, {}}, label, " moved to " + request.other);
}

void Desk::carry_out_one(const OpenNeighbours& request) {
  if (!may_change(request.why)) return;
  const std::string label = view_.survey->draft->pit;
  write({AskNeighbours{label}, view_.survey->crew, request.why, {}}, label, ": its neighbours are on the list");
}

// ---- what cards see ----

void Desk::survey_changed() {
  SurveyView& view = *view_.survey;
  const SurveyModel& model = session_->model();
  view.revision = session_->revision();
  view.marks = std::make_unique<const MapMarks>(model);
  view.clusters = find_clusters(model.survey(), model.plan().finds.size());
  const Frame& frame = model.survey().ground().frame;
  const auto outline_of = [&](const std::vector<NodeId>& ids) {
    std::vector<Node> nodes;
    for (const NodeId id : ids)
      nodes.push_back(frame.node(id));
    return cells_outline(frame.lattice(), nodes);
  };
  view.cluster_outlines.clear();
  for (const Cluster& cluster : view.clusters)
    view.cluster_outlines.push_back(outline_of(cluster.network.nodes));
  view.closed_outlines.clear();
  for (const auto& [object, area] : model.survey().closed_areas()) {
    if (area.open_again) continue;
    view.closed_outlines.push_back(area.polygon.empty() ? outline_of(model.survey().nodes_in(area)) : area.polygon);
  }
  view.order = session_->dig_order(view.crew, std::nullopt);
  const WallTime today = now();
  today_ = format_date(today);
  view.pits_today = 0;
  const auto count = [&](const PitEntry& entry) {
    if (!entry.withdrawn() && entry.record().dug_at.starts_with(format_date(today))) ++view.pits_today;
  };
  for (const auto& [node, entry] : model.survey().pits())
    count(entry);
  for (const auto& [label, entry] : model.survey().off_grid_pits())
    count(entry);
  view.last_save = session_->last_written() ? when(in_zone(*session_->last_written(), model.zone()), today) : "";
  list_due();
  propose();
  figures_if_shown();
  if (view.chosen) view.chosen = chosen_pit(view.chosen->name);
  draft_changed();
}

void Desk::figures_if_shown() {
  if (!session_) return;
  if (view_.card == CardKind::kDay || view_.card == CardKind::kClusters) {
    view_.survey->figures = session_->figures();
  } else {
    view_.survey->figures.reset();
  }
}

DueRow Desk::due_row(const DigStop& stop) const {
  DueRow row;
  row.stop = stop;
  row.label = session_->model().label(stop.node);
  row.because = because(session_->model(), stop);
  row.walk = metres(stop.distance_m) + ", " + bearing(stop.bearing_deg);
  row.ring = steps_out(stop.ring);
  row.half_written = book_->find(row.label) != nullptr;
  return row;
}

void Desk::list_due() {
  SurveyView& view = *view_.survey;
  const bool only_grid = view.grid_pits_first && view.order.first_sample_left > 0;
  view.due.clear();
  for (const DigStop& stop : view.order.due) {
    if (stop.first_sample || !only_grid) view.due.push_back(due_row(stop));
  }
  view.asked.clear();
  const SurveyModel& model = session_->model();
  for (const NodeId node : view.order.asked) {
    DueRow row;
    row.stop.node = node;
    row.stop.place = model.survey().ground().frame.ground(node);
    row.label = model.label(node);
    row.because = "asked for by the crew";
    row.half_written = book_->find(row.label) != nullptr;
    view.asked.push_back(std::move(row));
  }
  // Half written, and on neither list: changes of records, pits that nothing calls for any more.
  view.left_half_written.clear();
  for (const auto& [label, draft] : book_->all()) {
    const auto name = model.name_of(label);
    const bool listed =
        name && name->node != kNoNode &&
        (model.survey().dig_list().due(name->node) ||
         std::find(view.order.asked.begin(), view.order.asked.end(), name->node) != view.order.asked.end());
    if (listed) continue;
    DueRow row;
    row.label = label;
    row.because = draft.amends ? "a change of its record" : "not on the list";
    row.half_written = true;
    view.left_half_written.push_back(std::move(row));
  }
}

void Desk::propose() {
  SurveyView& view = *view_.survey;
  view.proposed.reset();
  if (walk_to_ != kNoNode && !survey().dig_list().due(walk_to_)) walk_to_ = kNoNode;
  const auto wanted =
      std::find_if(view.due.begin(), view.due.end(), [&](const DueRow& row) { return row.stop.node == walk_to_; });
  if (wanted != view.due.end()) {
    view.proposed = *wanted;
  } else if (!view.due.empty()) {
    view.proposed = view.due.front();
  }
  if (!view.proposed) return;
  walk_to_ = view.proposed->stop.node;
  // The walk to it begins where the crew dug last, else at the grid's origin.
  const auto last = last_dug(session_->model(), view.crew);
  view.walk_from = last ? last->label : "";
  view.walk_from_place = last ? std::optional<Point>(last->place) : std::nullopt;
  const Point from = last ? last->place : survey().ground().frame.lattice().origin;
  DigStop stop = view.proposed->stop;
  stop.distance_m = distance_m(from, stop.place);
  stop.bearing_deg = bearing_deg(from, stop.place);
  view.proposed = due_row(stop);
}

ChosenPit Desk::chosen_pit(const PitName& name) {
  const SurveyModel& model = session_->model();
  ChosenPit pit;
  pit.name = name;
  if (name.node != kNoNode) {
    pit.mark = mark_of(model, name.node);
  } else {
    for (const PitMark& mark : view_.survey->marks->marked()) {
      if (mark.node == kNoNode &&
          view_.survey->marks->free_labels()[static_cast<std::size_t>(mark.free_label)] == name.label)
        pit.mark = mark;
    }
  }
  pit.state = state_in_words(pit.mark);
  const DigList& list = model.survey().dig_list();
  if (name.node != kNoNode && list.in_design(name.node) && (list.due(name.node) || list.halted(name.node))) {
    DigStop stop;
    stop.node = name.node;
    stop.first_sample = model.survey().ground().sample.holds[static_cast<std::size_t>(name.node)];
    if (!stop.first_sample) stop.of = list.opened_by(name.node);
    stop.ring = list.ring(name.node);
    pit.why.push_back(because(model, stop));
    if (stop.ring > 0) pit.why.push_back(steps_out(stop.ring));
  }
  if (auto past = session_->history(name)) {
    for (auto line = past->rbegin(); line != past->rend(); ++line) {
      std::string what = record_in_words(line->record, model.plan().finds);
      // A record may be written long after the pit was dug.
      const auto dug = parse_time(line->record.dug_at, model.zone());
      if (dug && !line->record.dug_at_defaulted && line->record.status == PitStatus::kDug)
        what += "; dug " + (dug->date_only ? format_date(dug->time) : when(in_zone(dug->time, model.zone()), now()));
      pit.history.push_back({when(line->at, now()), line->by, what, line->why});
    }
  }
  return pit;
}

}  // namespace nearpit::ui
