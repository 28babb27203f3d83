#include "store/sqlite_handle.h"

#include <sqlite3.h>

#include <cstring>
#include <utility>

namespace nearpit::store {
namespace {

constexpr int kWaitMs = 5000;
constexpr int kLongestValue = 256 << 20;

std::string nothing_saved(Doing doing) {
  if (doing == Doing::kSaving) return "; nothing was saved";
  if (doing == Doing::kMaking) return "; no file was made";
  return "";
}

std::string system_words(int number) { return number == 0 ? "" : std::string(" (") + std::strerror(number) + ")"; }

}  // namespace

Result<Connection> Connection::open(const std::string& file, const std::string& shown, Access access) {
  const int flags = (access == Access::kRead ? SQLITE_OPEN_READONLY : SQLITE_OPEN_READWRITE) | SQLITE_OPEN_NOFOLLOW |
                    SQLITE_OPEN_EXRESCODE;
  sqlite3* db = nullptr;
  const int code = sqlite3_open_v2(file.c_str(), &db, flags, nullptr);
  Connection connection(db, shown_path(shown));
  if (code != SQLITE_OK) return connection.error(code);
  NEARPIT_TRY(connection.harden());
  return connection;
}

Result<Connection> Connection::in_memory() {
  sqlite3* db = nullptr;
  const int code = sqlite3_open_v2(":memory:", &db, SQLITE_OPEN_READWRITE | SQLITE_OPEN_EXRESCODE, nullptr);
  Connection connection(db, "memory");
  if (code != SQLITE_OK) return connection.error(code);
  NEARPIT_TRY(connection.harden());
  return connection;
}

Status Connection::harden() {
  const std::pair<int, int> settings[] = {
      {SQLITE_DBCONFIG_DEFENSIVE, 1},      {SQLITE_DBCONFIG_TRUSTED_SCHEMA, 0},
      {SQLITE_DBCONFIG_ENABLE_TRIGGER, 0}, {SQLITE_DBCONFIG_ENABLE_VIEW, 0},
      {SQLITE_DBCONFIG_DQS_DML, 0},        {SQLITE_DBCONFIG_DQS_DDL, 0},
      {SQLITE_DBCONFIG_ENABLE_FKEY, 1},    {SQLITE_DBCONFIG_ENABLE_LOAD_EXTENSION, 0},
  };
  for (const auto& [setting, value] : settings) {
    const int code = sqlite3_db_config(db_, setting, value, nullptr);
    if (code != SQLITE_OK) return error(code);
  }
  sqlite3_limit(db_, SQLITE_LIMIT_LENGTH, kLongestValue);
  sqlite3_busy_timeout(db_, kWaitMs);
  return run(
      "PRAGMA foreign_keys = ON; PRAGMA trusted_schema = OFF; PRAGMA cell_size_check = ON; PRAGMA mmap_size = 0;");
}

Connection::Connection(Connection&& other) noexcept
    : db_(std::exchange(other.db_, nullptr)), shown_(std::move(other.shown_)), doing_(other.doing_) {}

Connection& Connection::operator=(Connection&& other) noexcept {
  std::swap(db_, other.db_);
  std::swap(shown_, other.shown_);
  std::swap(doing_, other.doing_);
  return *this;
}

Connection::~Connection() { sqlite3_close_v2(db_); }

Status Connection::run(const char* sql) {
  const int code = sqlite3_exec(db_, sql, nullptr, nullptr, nullptr);
  if (code != SQLITE_OK) return error(code);
  return ok_status();
}

Error Connection::error() const { return error(sqlite3_extended_errcode(db_)); }

Error Connection::error(int code) const {
  const std::string message = db_ != nullptr ? sqlite3_errmsg(db_) : sqlite3_errstr(code);
  const std::string system = db_ != nullptr ? system_words(sqlite3_system_errno(db_)) : "";
  const std::string nothing = nothing_saved(doing_);
  switch (code & 0xff) {
    case SQLITE_BUSY:
    case SQLITE_LOCKED:
      return {ErrorKind::kIo, shown_ + ": another program is using the file (waited 5 s)" + nothing +
                                  "; close it there, then try again"};
    case SQLITE_FULL:
      return {ErrorKind::kIo, shown_ + ": the disk is full" + nothing + "; make room on it, then try again"};
    case SQLITE_READONLY:
      return {ErrorKind::kIo,
              shown_ + ": can't be written" + system + nothing +
                  "; is the card locked, or the file or its folder read-only? copy it to a place that can be written"};
    case SQLITE_CANTOPEN:
      if (code == SQLITE_CANTOPEN_SYMLINK) {
        return {ErrorKind::kIo, shown_ + ": is a symbolic link; give the file itself"};
      }
      return {ErrorKind::kIo, shown_ + ": can't be opened, or its folder can't be written" + system + nothing +
                                  "; check the permissions of both and that the card is not locked"};
    case SQLITE_NOTADB:
      return {ErrorKind::kBadInput, shown_ + ": not a survey file of Nearpit"};
    case SQLITE_CORRUPT:
      return {ErrorKind::kDamaged, shown_ + ": the file is damaged (" + message + ")" + nothing +
                                       "; keep it as it is, don't write to it, and go on with the last good copy"};
    case SQLITE_IOERR:
      return {ErrorKind::kIo, shown_ + ": the disk refused to read or write" + system + nothing +
                                  "; check the card or stick and the room on it, then try again"};
    case SQLITE_PERM:
    case SQLITE_AUTH:
      return {ErrorKind::kIo,
              shown_ + ": permission denied" + system + nothing + "; check the permissions of the file"};
    case SQLITE_NOMEM:
      return {ErrorKind::kIo, shown_ + ": out of memory" + nothing + "; close other programs, then try again"};
    default:
      return {ErrorKind::kInternal, shown_ + ": the database answered '" + message + "' (code " + std::to_string(code) +
                                        ")" + nothing + "; check the file"};
  }
}

bool Connection::in_transaction() const { return db_ != nullptr && sqlite3_get_autocommit(db_) == 0; }
bool Connection::read_only() const { return sqlite3_db_readonly(db_, "main") != 0; }
std::int64_t Connection::rows_changed() const { return sqlite3_total_changes64(db_); }

Statement::Statement(Connection& db, std::string_view sql) : db_(db) {
  code_ = sqlite3_prepare_v3(db.raw(), sql.data(), static_cast<int>(sql.size()), 0, &statement_, nullptr);
}

Statement::~Statement() { sqlite3_finalize(statement_); }

Statement& Statement::add(std::int64_t value) {
  if (code_ == SQLITE_OK) code_ = sqlite3_bind_int64(statement_, ++bound_, value);
  return *this;
}

Statement& Statement::add(double value) {
  if (code_ == SQLITE_OK) code_ = sqlite3_bind_double(statement_, ++bound_, value);
  return *this;
}

Statement& Statement::add(std::string_view value) {
  const char* data = value.data() != nullptr ? value.data() : "";
  if (code_ == SQLITE_OK) {
    code_ = sqlite3_bind_text64(statement_, ++bound_, data, value.size(), SQLITE_TRANSIENT, SQLITE_UTF8);
  }
  return *this;
}

Statement& Statement::add(const Value& value) {
  if (const auto* integer = std::get_if<std::int64_t>(&value)) return add(*integer);
  if (const auto* real = std::get_if<double>(&value)) return add(*real);
  if (const auto* text = std::get_if<std::string>(&value)) return add(std::string_view(*text));
  if (code_ != SQLITE_OK) return *this;
  if (const auto* blob = std::get_if<Blob>(&value)) {
    code_ = sqlite3_bind_blob64(statement_, ++bound_, blob->bytes.data(), blob->bytes.size(), SQLITE_TRANSIENT);
  } else {
    code_ = sqlite3_bind_null(statement_, ++bound_);
  }
  return *this;
}

Result<bool> Statement::next() {
  if (code_ == SQLITE_OK) code_ = sqlite3_step(statement_);
  if (code_ == SQLITE_ROW) {
    code_ = SQLITE_OK;
    return true;
  }
  if (code_ == SQLITE_DONE) {
    reset();
    return false;
  }
  // The line is made before the reset, which would take SQLite's message away.
  Error error = db_.error(code_);
  reset();
  return error;
}

Status Statement::finish() {
  while (true) {
    NEARPIT_ASSIGN(row, next());
    if (!row) return ok_status();
  }
}

void Statement::reset() {
  sqlite3_reset(statement_);
  bound_ = 0;
  code_ = statement_ != nullptr ? SQLITE_OK : SQLITE_MISUSE;
}

std::int64_t Statement::integer(int column) const { return sqlite3_column_int64(statement_, column); }

std::string Statement::text(int column) const {
  const auto* data = static_cast<const char*>(sqlite3_column_blob(statement_, column));
  const auto size = static_cast<std::size_t>(sqlite3_column_bytes(statement_, column));
  return data != nullptr ? std::string(data, size) : std::string();
}

Value Statement::value(int column) const {
  switch (sqlite3_column_type(statement_, column)) {
    case SQLITE_INTEGER:
      return integer(column);
    case SQLITE_FLOAT:
      return sqlite3_column_double(statement_, column);
    case SQLITE_TEXT:
      return text(column);
    case SQLITE_BLOB:
      return Blob{text(column)};
    default:
      return std::monostate{};
  }
}

std::string quoted_identifier(std::string_view name) {
  std::string quoted = "\"";
  for (const char c : name) {
    if (c == '"') quoted += '"';
    quoted += c;
  }
  return quoted + '"';
}

std::string shown_path(std::string_view path) {
  std::string shown(path);
  for (char& c : shown) {
    if (static_cast<unsigned char>(c) < 0x20 || c == 0x7f) c = '?';
  }
  return shown;
}

}  // namespace nearpit::store
