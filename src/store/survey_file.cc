#include "store/survey_file.h"

#include <sys/stat.h>

#include <algorithm>
#include <utility>

#include "base/text.h"
#include "store/durable_file.h"
#include "store/layer_writer.h"
#include "store/revision_rows.h"
#include "store/schema_build.h"
#include "store/survey_handle.h"
#include "store/survey_open.h"

namespace nearpit {
namespace {

using store::Connection;
using store::Doing;
using store::LayerContent;
using store::LayerWriter;
using store::Statement;

Status write_layer(Connection& db, const LayerContent& content, const WallTime& now) {
  LayerWriter writer(db, content.table);
  NEARPIT_TRY(writer.become(content));
  return writer.stamp(now);
}

Status fill(const std::string& file, const std::string& path, const FileStart& start, const LayerRows& layers) {
  NEARPIT_ASSIGN(db, Connection::open(file, path, store::Access::kReadWrite));
  db.set_doing(Doing::kMaking);
  NEARPIT_TRY(store::make_saves_safe(db));
  NEARPIT_TRY(db.run("BEGIN IMMEDIATE"));
  NEARPIT_TRY(store::build_schema(db, start));
  const store::LayerShape shape{store::srs_id_of(start), store::find_columns(start.finds)};
  for (const LayerContent& content : store::all_contents(layers, shape)) {
    NEARPIT_TRY(write_layer(db, content, start.made_at));
  }
  return db.run("COMMIT");
}

Result<std::string> text_of(Connection& db, const char* column) {
  Statement survey(db, std::string("SELECT ") + column + " FROM nearpit_survey");
  NEARPIT_ASSIGN(row, survey.next());
  if (!row) return Error(ErrorKind::kDamaged, db.shown() + ": holds no plan; go on with the last good copy");
  return survey.text(0);
}

Status put_pits(Connection& db, const LayerChanges& changes, const store::LayerShape& shape, const WallTime& now) {
  LayerWriter writer(db, store::pits_table(shape));
  for (const std::string& label : changes.remove_pits)
    NEARPIT_TRY(writer.remove(label));
  for (const PitRow& row : changes.put_pits)
    NEARPIT_TRY(writer.put(store::values_of(row, shape)));
  return writer.stamp(now);
}

Status apply(Connection& db, const LayerChanges& changes, const WallTime& now) {
  NEARPIT_ASSIGN(shape, store::read_shape(db));
  NEARPIT_TRY(put_pits(db, changes, shape, now));
  if (changes.clusters) NEARPIT_TRY(write_layer(db, store::clusters_content(*changes.clusters, shape), now));
  if (changes.closed_areas)
    NEARPIT_TRY(write_layer(db, store::closed_areas_content(*changes.closed_areas, shape), now));
  return ok_status();
}

// One step of a save. After a step that failed the save can't go on: SQLite may have rolled it back by itself, and what followed would be
// saved without what came before.
template <class Work>
Status step(SurveyFile* file, Work work) {
  if (file == nullptr) return Error(ErrorKind::kInternal, "this save is over already; nothing more was saved");
  SurveyFile::Handle& handle = file->handle();
  if (handle.broken || !handle.db.in_transaction()) {
    return Error(ErrorKind::kIo, handle.db.shown() + ": an earlier step of this save failed; nothing was saved");
  }
  Status done = work(handle.db);
  handle.broken = !done.ok();
  return done;
}

}  // namespace

Status SurveyFile::create(const std::string& path, const FileStart& start, const LayerRows& layers) {
  struct stat found {};
  if (::lstat(path.c_str(), &found) == 0) {
    return Error(ErrorKind::kExists, store::shown_path(path) + ": exists already; choose another name");
  }
  NEARPIT_ASSIGN(file, store::NewFile::beside(path));
  NEARPIT_TRY(fill(file.written(), path, start, layers));
  return file.place_new();
}

Result<SurveyFile> SurveyFile::open(const std::string& path, bool read_only) {
  NEARPIT_ASSIGN(handle, store::open_survey(path, read_only));
  return SurveyFile(std::make_unique<Handle>(std::move(handle)));
}

SurveyFile::SurveyFile(std::unique_ptr<Handle> handle) : handle_(std::move(handle)) {}
SurveyFile::SurveyFile(SurveyFile&&) noexcept = default;
SurveyFile& SurveyFile::operator=(SurveyFile&&) noexcept = default;
SurveyFile::~SurveyFile() = default;

const std::string& SurveyFile::path() const { return handle_->path; }

Result<std::string> SurveyFile::survey_id() { return text_of(handle_->db, "survey_id"); }
Result<std::string> SurveyFile::plan() { return text_of(handle_->db, "plan"); }

Result<std::vector<std::vector<UnitId>>> SurveyFile::drawn(std::size_t areas) {
  std::vector<std::vector<UnitId>> drawn(areas);
  Statement rows(handle_->db, "SELECT area, unit FROM nearpit_drawn ORDER BY number");
  while (true) {
    NEARPIT_ASSIGN(row, rows.next());
    if (!row) return drawn;
    const std::int64_t area = rows.integer(0);
    const std::int64_t unit = rows.integer(1);
    if (area < 0 || area >= static_cast<std::int64_t>(areas) || !std::in_range<UnitId>(unit)) {
      return Error(ErrorKind::kDamaged, handle_->db.shown() + ": the first sample names unit " + std::to_string(unit) +
                                            " of area " + std::to_string(area) +
                                            ", which the plan does not have; go on with the last good copy");
    }
    drawn[static_cast<std::size_t>(area)].push_back(static_cast<UnitId>(unit));
  }
}

Result<std::string> SurveyFile::chain_start() {
  NEARPIT_ASSIGN(survey_id, this->survey_id());
  NEARPIT_ASSIGN(plan, this->plan());
  std::size_t areas = 0;
  Statement last(handle_->db, "SELECT coalesce(max(area) + 1, 0) FROM nearpit_drawn");
  NEARPIT_ASSIGN(row, last.next());
  if (row) areas = static_cast<std::size_t>(std::clamp<std::int64_t>(last.integer(0), 0, kMostAreas));
  NEARPIT_ASSIGN(units, drawn(areas));
  return start_hash(survey_id, plan, units);
}

Status SurveyFile::read_as_one(const std::function<Status()>& reads) {
  Connection& db = handle_->db;
  NEARPIT_TRY(db.run("BEGIN"));
  const Status done = reads();
  const Status ended = db.run("ROLLBACK");  // nothing was written
  return done ? ended : done;
}

Status SurveyFile::each_revision(std::int64_t after,
                                 const std::function<Status(std::int64_t rowid, Revision&&)>& take) {
  return store::each_revision(handle_->db, "WHERE number > ?1 ORDER BY number", after, take);
}

Status SurveyFile::each_revision_of(const std::string& object,
                                    const std::function<Status(std::int64_t rowid, Revision&&)>& take) {
  return store::each_revision_of(handle_->db, object, take);
}

Result<std::int64_t> SurveyFile::last_rowid() {
  Statement last(handle_->db, "SELECT coalesce(max(number), 0) FROM nearpit_revision");
  NEARPIT_ASSIGN(row, last.next());
  return row ? last.integer(0) : 0;
}

Result<std::optional<WriterRow>> SurveyFile::writer(const std::string& id) {
  Statement writer(handle_->db, "SELECT device FROM nearpit_writer WHERE id = ?1");
  writer.add(id);
  NEARPIT_ASSIGN(known, writer.next());
  if (!known) return std::optional<WriterRow>();
  WriterRow found{id, writer.text(0), 0, ""};
  Statement last(handle_->db, "SELECT seq, hash FROM nearpit_revision WHERE writer = ?1 ORDER BY seq DESC LIMIT 1");
  last.add(id);
  NEARPIT_ASSIGN(wrote, last.next());
  if (wrote) {
    found.last_seq = last.integer(0);
    found.last_hash = last.text(1);
  } else {
    NEARPIT_ASSIGN(start, chain_start());
    found.last_hash = std::move(start);
  }
  return std::optional<WriterRow>(std::move(found));
}

Result<SurveyFile::Transaction> SurveyFile::begin() {
  Connection& db = handle_->db;
  if (handle_->read_only) {
    return Error(ErrorKind::kIo, db.shown() + ": was opened to be read only; nothing was saved");
  }
  if (db.in_transaction()) {
    return Error(ErrorKind::kInternal, db.shown() + ": a save is under way already; nothing was saved");
  }
  db.set_doing(Doing::kSaving);
  const Status begun = db.run("BEGIN IMMEDIATE");
  if (!begun) {
    db.set_doing(Doing::kReading);
    return begun.error();
  }
  handle_->broken = false;
  return Transaction(*this);
}

SurveyFile::Transaction::Transaction(SurveyFile& file) : file_(&file) {}
SurveyFile::Transaction::Transaction(Transaction&& other) noexcept : file_(std::exchange(other.file_, nullptr)) {}

SurveyFile::Transaction::~Transaction() {
  if (file_ == nullptr) return;
  Connection& db = file_->handle_->db;
  // SQLite has rolled back by itself after some errors; a rollback that fails is made up for by the journal at the next open.
  if (db.in_transaction()) static_cast<void>(db.run("ROLLBACK"));
  db.set_doing(Doing::kReading);
}

Status SurveyFile::Transaction::add_writer(const std::string& id, const std::string& device,
                                           const WallTime& first_seen) {
  return step(file_, [&](Connection& db) {
    return Statement(
               db,
               "INSERT INTO nearpit_writer (id, device, first_seen_ms, first_seen_offset_min) VALUES (?1, ?2, ?3, ?4)")
        .add(id)
        .add(device)
        .add(first_seen.utc_ms)
        .add(first_seen.offset_min)
        .finish();
  });
}

Status SurveyFile::Transaction::append(const Revision& revision) {
  return step(file_, [&](Connection& db) { return store::insert_revision(db, revision); });
}

Status SurveyFile::Transaction::update_layers(const LayerChanges& changes, const WallTime& now) {
  return step(file_, [&](Connection& db) { return apply(db, changes, now); });
}

Status SurveyFile::Transaction::commit() {
  const Status committed = step(file_, [](Connection& db) { return db.run("COMMIT"); });
  if (!committed) return committed;
  file_->handle().db.set_doing(Doing::kReading);
  file_ = nullptr;
  return ok_status();
}

}  // namespace nearpit
