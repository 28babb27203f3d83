// SQLite behind scoped objects: a connection that closes itself, a statement that finalizes itself, and SQLite's codes turned into lines for the
// person at the screen. Only sources of this folder include sqlite3.h.
#ifndef NEARPIT_STORE_SQLITE_HANDLE_H_
#define NEARPIT_STORE_SQLITE_HANDLE_H_

#include <cstdint>
#include <string>
#include <string_view>
#include <variant>

#include "base/status.h"

struct sqlite3;
struct sqlite3_stmt;

namespace nearpit::store {

struct Blob {
  std::string bytes;
  friend bool operator==(const Blob&, const Blob&) = default;
};
// NULL, INTEGER, REAL, TEXT, BLOB: SQLite's five storage classes.
using Value = std::variant<std::monostate, std::int64_t, double, std::string, Blob>;

// What a person is waiting for; it decides whether an error line says that nothing was saved.
enum class Doing { kReading, kSaving, kMaking };

enum class Access { kRead, kReadWrite };

class Connection {
 public:
  // `file` is the real path (no link in it is followed), `shown` the one to name in errors. Hardened: no extensions, no schema trusted, no foreign
  // trigger or view run (docs: sqlite.org/security.html), no double-quoted strings, waits 5 s for other programs.
  static Result<Connection> open(const std::string& file, const std::string& shown, Access access);
  // A database of its own that is gone with the object.
  static Result<Connection> in_memory();

  Connection(Connection&& other) noexcept;
  Connection& operator=(Connection&& other) noexcept;
  ~Connection();

  // One or more statements without values.
  Status run(const char* sql);
  Status run(const std::string& sql) { return run(sql.c_str()); }

  // One line: the file, what happened, what to do.
  Error error(int code) const;
  Error error() const;

  bool in_transaction() const;
  bool read_only() const;
  std::int64_t rows_changed() const;
  const std::string& shown() const { return shown_; }
  void set_doing(Doing doing) { doing_ = doing; }
  sqlite3* raw() { return db_; }

 private:
  Connection(sqlite3* db, std::string shown) : db_(db), shown_(std::move(shown)) {}
  Status harden();

  sqlite3* db_ = nullptr;
  std::string shown_;
  Doing doing_ = Doing::kReading;
};

// One statement, used any number of times. A mistake in the SQL or in a value is reported by next() or finish().
class Statement {
 public:
  Statement(Connection& db, std::string_view sql);
  Statement(const Statement&) = delete;
  Statement& operator=(const Statement&) = delete;
  ~Statement();

  // ?1, ?2 … in order.
  Statement& add(std::int64_t value);
  Statement& add(int value) { return add(static_cast<std::int64_t>(value)); }
  Statement& add(double value);
  Statement& add(std::string_view value);
  Statement& add(const std::string& value) { return add(std::string_view(value)); }
  Statement& add(const char* value) { return add(std::string_view(value)); }
  Statement& add(const Value& value);

  // True: a row is there. False: no more rows; the statement is ready for new values.
  Result<bool> next();
  // Runs to the end and makes ready for new values.
  Status finish();

  // Columns of the row, from 0. Text comes as its bytes, whatever they are.
  std::int64_t integer(int column) const;
  std::string text(int column) const;
  Value value(int column) const;

 private:
  void reset();

  Connection& db_;
  sqlite3_stmt* statement_ = nullptr;
  int code_ = 0;
  int bound_ = 0;
};

// "name" with every quotation mark doubled: safe as an identifier whatever it holds.
std::string quoted_identifier(std::string_view name);

// A path as an error line may show it: control characters become '?'.
std::string shown_path(std::string_view path);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_SQLITE_HANDLE_H_
