#include "session/session.h"

#include <utility>

#include "base/text.h"
#include "record/record_json.h"
#include "session/blank_fields.h"
#include "session/judge_batch.h"
#include "session/layer_content.h"

namespace nearpit {
namespace {

// The plan, ground and first sample that a survey file holds.
Result<std::unique_ptr<SurveyModel>> stored_model(SurveyFile& file) {
  NEARPIT_ASSIGN(text, file.plan());
  NEARPIT_ASSIGN(plan, read_plan(text, file.path() + " (plan)"));
  NEARPIT_ASSIGN(drawn, file.drawn(plan.areas.empty() ? 1 : plan.areas.size()));
  NEARPIT_ASSIGN(ground, make_ground(plan, file.path() + " (plan)", &drawn));
  return std::make_unique<SurveyModel>(std::move(plan), std::move(ground));
}

Status take_objects(const std::string& path, LogFold& log, SurveyModel& model, std::vector<NodeId>* changed) {
  for (const std::string& object : log.take_changed()) {
    const Status done = model.set_object(object, log.heads(object), changed);
    if (!done) {
      return Error(ErrorKind::kDamaged, path + ": the record of " + object + " can't be read: " +
                                            done.error().lines.front() + "; run 'nearpit check' on it");
    }
  }
  return ok_status();
}

std::string unremembered(const Error& error) {
  return error.one_line() + "; the records are saved, but the next save will go on as a new writer";
}

FileProblem unreadable(const std::string& path, const Error& error) {
  return {"content", path, error.one_line(), "keep the file as it is and go on with the last good copy"};
}

struct ChosenWriter {
  WriterRow row;
  bool is_new = false;
  std::vector<std::string> notes;
};

// Who writes: the remembered writer when the file's last hash is the remembered one, else a new one.
Result<ChosenWriter> choose_writer(SurveyFile& file, const std::string& survey_id, Environment& environment) {
  ChosenWriter chosen;
  if (const auto remembered = environment.memory.recall(survey_id)) {
    NEARPIT_ASSIGN(row, file.writer(remembered->id));
    if (row && (row->last_hash == remembered->last_hash || row->last_hash == remembered->pending_hash)) {
      chosen.row = std::move(*row);
      return chosen;
    }
    chosen.notes.push_back(
        "this copy of the survey does not hold what this device last wrote (an older or another copy): "
        "it goes on as a new writer, and the copies can be merged later");
  }
  chosen.row.id = environment.new_id();
  NEARPIT_ASSIGN(start, file.chain_start());
  chosen.row.last_hash = std::move(start);
  chosen.row.device = environment.device;
  chosen.is_new = true;
  return chosen;
}

}  // namespace

Result<Session> Session::open(const std::string& path, Environment& environment, bool read_only) {
  NEARPIT_ASSIGN(file, SurveyFile::open(path, read_only));
  NEARPIT_ASSIGN(model, stored_model(file));
  NEARPIT_ASSIGN(survey_id, file.survey_id());
  Session session(std::move(file), environment, std::move(model));
  session.survey_id_ = survey_id;
  NEARPIT_TRY(session.catch_up());
  return session;
}

Status Session::catch_up() {
  NEARPIT_TRY(file_.each_revision(last_rowid_, [&](std::int64_t rowid, Revision&& revision) {
    log_.add(revision);
    last_rowid_ = rowid;
    last_written_ = revision.at;
    return ok_status();
  }));
  std::vector<NodeId> changed;
  return take_objects(file_.path(), log_, *model_, &changed);
}

Result<Applied> Session::apply(const std::vector<Action>& actions,
                               const std::function<Status(const SurveyModel&)>& still_holds) {
  NEARPIT_ASSIGN(transaction, file_.begin());
  NEARPIT_TRY(catch_up());
  if (still_holds) NEARPIT_TRY(still_holds(*model_));
  NEARPIT_ASSIGN(writer, choose_writer(file_, survey_id_, *environment_));
  RevisionMaker maker(*environment_, writer.row.id, writer.row.last_seq, writer.row.last_hash, log_.largest_clock(),
                      model_->zone());
  BatchJudge batch(*model_, log_, maker);
  NEARPIT_TRY(batch.judge(actions));
  Applied applied;
  applied.actions = actions.size();
  applied.revisions = batch.revisions().size();
  applied.notes = std::move(writer.notes);
  const auto write_all = [&]() -> Status {
    if (writer.is_new) NEARPIT_TRY(transaction.add_writer(writer.row.id, writer.row.device, maker.now()));
    for (const Revision& revision : batch.revisions())
      NEARPIT_TRY(transaction.append(revision));
    NEARPIT_TRY(
        transaction.update_layers(layer_changes(*model_, batch.changed_nodes(), batch.changed_objects()), maker.now()));
    // If the power goes now, either hash is this writer's. That it could not be kept is said below, if it still holds then.
    static_cast<void>(
        environment_->memory.remember(survey_id_, {writer.row.id, writer.row.last_hash, maker.last_hash()}));
    NEARPIT_ASSIGN(last, file_.last_rowid());
    NEARPIT_TRY(transaction.commit());
    last_rowid_ = last;
    return ok_status();
  };
  if (const Status written = write_all(); !written) {
    batch.take_back();
    return written.error();
  }
  // The records are on the disk: nothing from here on may say otherwise.
  const Status kept = environment_->memory.remember(survey_id_, {writer.row.id, maker.last_hash(), maker.last_hash()});
  if (!kept) applied.notes.push_back(unremembered(kept.error()));
  for (const Revision& revision : batch.revisions()) {
    log_.add(revision);
    last_written_ = revision.at;
  }
  log_.take_changed();  // the model holds them already
  for (const std::string& caution : batch.cautions())
    applied.notes.push_back(caution);
  return applied;
}

DigOrder Session::dig_order(const std::string& crew, const std::optional<Point>& from) const {
  return nearpit::dig_order(*model_, crew, from);
}

FigureSettings Session::figure_settings() const {
  const Plan& plan = model_->plan();
  return {plan.finds, plan.confidence, plan.pit_area_m2(), plan.initial.listed};
}

const Figures& Session::figures() {
  if (!figures_ || figures_revision_ != revision()) {
    figures_ = day_figures(model_->survey(), figure_settings());
    figures_revision_ = revision();
  }
  return *figures_;
}

Result<Figures> Session::figures_of_day(const std::string& day) {
  if (!is_date(day)) {
    return Error(ErrorKind::kBadInput, "--day: " + in_quotes(day) + " is no date; legal: a day such as 2026-05-04");
  }
  NEARPIT_ASSIGN(then, stored_model(file_));
  LogFold log;
  NEARPIT_TRY(file_.each_revision(0, [&](std::int64_t, Revision&& revision) {
    if (format_date(in_zone(revision.at, then->zone())) <= day) log.add(revision);
    return ok_status();
  }));
  std::vector<NodeId> changed;
  NEARPIT_TRY(take_objects(file_.path(), log, *then, &changed));
  return day_figures(then->survey(), figure_settings());
}

Result<std::vector<Session::PastRecord>> Session::history(const PitName& pit) {
  std::vector<PastRecord> past;
  NEARPIT_TRY(file_.each_revision_of(pit.object, [&](std::int64_t, Revision&& revision) -> Status {
    NEARPIT_ASSIGN(record, pit_record_of(revision.body, model_->plan().finds));
    past.push_back({in_zone(revision.at, model_->zone()), revision.by, revision.why, std::move(record)});
    return ok_status();
  }));
  return past;
}

CheckReport Session::check() {
  CheckReport report;
  const Status read = file_.read_as_one([&]() -> Status {
    report.problems = check_file(file_);
    NEARPIT_TRY(catch_up());
    for (FileProblem& problem : check_layers(file_, layer_rows(*model_)))
      report.problems.push_back(std::move(problem));
    return ok_status();
  });
  if (!read) report.problems.push_back(unreadable(file_.path(), read.error()));
  report.whole = report.problems.empty();
  for (FileProblem& problem : blank_fields(*model_))
    report.problems.push_back(std::move(problem));
  report.complete = report.problems.empty();
  return report;
}

Result<CheckReport> check_survey(const std::string& path, Environment& environment) {
  auto session = Session::open(path, environment, true);
  if (session) return session->check();
  NEARPIT_ASSIGN(file, SurveyFile::open(path, true));
  CheckReport report;
  report.problems = check_file(file);
  report.problems.push_back(unreadable(path, session.error()));
  return report;
}

}  // namespace nearpit
