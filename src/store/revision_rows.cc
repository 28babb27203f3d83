#include "store/revision_rows.h"

#include <string_view>
#include <utility>
#include <vector>

#include "base/text.h"

namespace nearpit::store {
namespace {

std::vector<std::string> words_of(std::string_view text) {
  std::vector<std::string> words;
  while (!text.empty()) {
    const std::size_t space = text.find(' ');
    words.emplace_back(text.substr(0, space));
    text = space == std::string_view::npos ? std::string_view() : text.substr(space + 1);
  }
  return words;
}

// `which` is the rest of the statement, with ?1 for `value`.
template <class Value>
Status read_rows(Connection& db, const std::string& which, const Value& value,
                 const std::function<Status(std::int64_t rowid, Revision&&)>& take) {
  Statement rows(
      db,
      "SELECT number, id, writer, seq, clock, \"by\", at_ms, at_offset_min, object, body, why, parents, hash "
      "FROM nearpit_revision " +
          which);
  rows.add(value);
  while (true) {
    NEARPIT_ASSIGN(row, rows.next());
    if (!row) return ok_status();
    Revision revision;
    revision.id = rows.text(1);
    revision.writer = rows.text(2);
    revision.seq = rows.integer(3);
    revision.clock = rows.integer(4);
    revision.by = rows.text(5);
    revision.at = {rows.integer(6), static_cast<int>(rows.integer(7))};
    revision.object = rows.text(8);
    revision.body = rows.text(9);
    revision.why = rows.text(10);
    revision.parents = words_of(rows.text(11));
    revision.hash = rows.text(12);
    NEARPIT_TRY(take(rows.integer(0), std::move(revision)));
  }
}

}  // namespace

Status insert_revision(Connection& db, const Revision& revision) {
  return Statement(db,
                   "INSERT INTO nearpit_revision (id, writer, seq, clock, \"by\", at_ms, at_offset_min, object, body, "
                   "why, parents, hash) "
                   "VALUES (?1, ?2, ?3, ?4, ?5, ?6, ?7, ?8, ?9, ?10, ?11, ?12)")
      .add(revision.id)
      .add(revision.writer)
      .add(revision.seq)
      .add(revision.clock)
      .add(revision.by)
      .add(revision.at.utc_ms)
      .add(revision.at.offset_min)
      .add(revision.object)
      .add(revision.body)
      .add(revision.why)
      .add(join(revision.parents, " "))
      .add(revision.hash)
      .finish();
}

Status each_revision(Connection& db, const std::string& which, std::int64_t value,
                     const std::function<Status(std::int64_t rowid, Revision&&)>& take) {
  return read_rows(db, which, value, take);
}

Status each_revision_of(Connection& db, const std::string& object,
                        const std::function<Status(std::int64_t rowid, Revision&&)>& take) {
  return read_rows(db, "WHERE object = ?1 ORDER BY number", object, take);
}

}  // namespace nearpit::store
