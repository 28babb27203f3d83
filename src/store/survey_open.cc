#include "store/survey_open.h"

#include <sqlite3.h>
#include <stdlib.h>
#include <sys/stat.h>

#include <cerrno>
#include <memory>

#include "store/durable_file.h"
#include "store/schema_files.h"

namespace nearpit::store {
namespace {

// The real path: links in the folder's path are followed, the file itself must be no link.
Result<std::string> regular_file(const std::string& path) {
  struct stat found {};
  if (::lstat(path.c_str(), &found) != 0) {
    if (errno == ENOENT || errno == ENOTDIR) {
      return Error(ErrorKind::kNotFound, shown_path(path) + ": no such file; check the name and the folder");
    }
    return system_error(path, "can't be opened", errno);
  }
  if (S_ISLNK(found.st_mode)) {
    return Error(ErrorKind::kIo, shown_path(path) + ": is a symbolic link; give the file itself");
  }
  if (S_ISDIR(found.st_mode)) return Error(ErrorKind::kIo, shown_path(path) + ": is a folder; give a survey file");
  if (!S_ISREG(found.st_mode))
    return Error(ErrorKind::kIo, shown_path(path) + ": is no ordinary file; give a survey file");
  const PathParts parts = parts_of(path);
  const std::unique_ptr<char, decltype(&::free)> folder(::realpath(parts.folder.c_str(), nullptr), &::free);
  if (!folder) return system_error(path, "can't be opened", errno);
  return std::string(folder.get()) + "/" + parts.name;
}

Result<std::int64_t> number_of(Connection& db, const std::string& sql) {
  Statement statement(db, sql);
  NEARPIT_ASSIGN(row, statement.next());
  return row ? statement.integer(0) : 0;
}

// A save that was cut off leaves its journal; undoing it needs a connection that may write.
Status undo_cut_off_save(const std::string& file, const std::string& path) {
  NEARPIT_ASSIGN(db, Connection::open(file, path, Access::kReadWrite));
  NEARPIT_ASSIGN(pages, number_of(db, "SELECT count(*) FROM sqlite_schema"));
  static_cast<void>(pages);
  return ok_status();
}

Result<Connection> connect(const std::string& file, const std::string& path, bool read_only) {
  if (!read_only) return Connection::open(file, path, Access::kReadWrite);
  NEARPIT_ASSIGN(db, Connection::open(file, path, Access::kRead));
  const int code = sqlite3_exec(db.raw(), "SELECT count(*) FROM sqlite_schema", nullptr, nullptr, nullptr);
  if (code != SQLITE_READONLY_ROLLBACK && code != SQLITE_READONLY_RECOVERY) return db;
  NEARPIT_TRY(undo_cut_off_save(file, path));
  return Connection::open(file, path, Access::kRead);
}

// 0: not a survey file of ours.
Result<std::int64_t> schema_number(Connection& db) {
  NEARPIT_ASSIGN(application, number_of(db, "PRAGMA application_id"));
  if (application != kGeoPackageId) return std::int64_t{0};
  NEARPIT_ASSIGN(ours,
                 number_of(db,
                           "SELECT count(*) FROM sqlite_schema WHERE type = 'table' AND name IN ('nearpit_schema', "
                           "'nearpit_survey')"));
  if (ours != 2) return std::int64_t{0};
  return number_of(db, "SELECT max(number) FROM nearpit_schema");
}

Status require_whole_pages(Connection& db) {
  Statement check(db, "PRAGMA quick_check(1)");
  NEARPIT_ASSIGN(row, check.next());
  const std::string said = row ? check.text(0) : "no answer";
  if (said == "ok") return ok_status();
  return Error(ErrorKind::kDamaged, db.shown() + ": the file is damaged (" + shown_path(said) +
                                        "); keep it as it is, don't write to it, and go on with the last good copy");
}

}  // namespace

Status make_saves_safe(Connection& db) {
  Statement mode(db, "PRAGMA journal_mode = DELETE");
  NEARPIT_ASSIGN(row, mode.next());
  if (!row || mode.text(0) != "delete") {
    return Error(ErrorKind::kIo,
                 db.shown() +
                     ": another program keeps the file open in a mode of its own (write-ahead log); close it "
                     "there, then try again");
  }
  NEARPIT_TRY(mode.finish());
  return db.run("PRAGMA synchronous = EXTRA");
}

Result<SurveyFile::Handle> open_survey(const std::string& path, bool read_only) {
  NEARPIT_ASSIGN(file, regular_file(path));
  NEARPIT_ASSIGN(db, connect(file, path, read_only));
  NEARPIT_ASSIGN(number, schema_number(db));
  if (number == 0) return Error(ErrorKind::kBadInput, db.shown() + ": not a survey file of Nearpit");
  const bool too_new = number > kSchemaFileCount;
  if (too_new && !read_only) {
    return Error(ErrorKind::kTooNew, db.shown() + ": was made by a later Nearpit (schema " + std::to_string(number) +
                                         ", this one knows " + std::to_string(kSchemaFileCount) +
                                         "); it can only be read here; update Nearpit to write to it");
  }
  if (!read_only && db.read_only()) {
    return Error(ErrorKind::kIo,
                 db.shown() +
                     ": can't be written; is the card locked, or the file read-only? copy it to a place that can "
                     "be written");
  }
  if (!read_only) {
    NEARPIT_TRY(require_whole_pages(db));
    NEARPIT_TRY(make_saves_safe(db));
  }
  return SurveyFile::Handle{std::move(db), path, read_only, too_new, false};
}

}  // namespace nearpit::store
