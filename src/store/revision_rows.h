// Revisions <-> rows of nearpit_revision.
#ifndef NEARPIT_STORE_REVISION_ROWS_H_
#define NEARPIT_STORE_REVISION_ROWS_H_

#include <cstdint>
#include <functional>
#include <string>

#include "base/status.h"
#include "record/revision.h"
#include "store/sqlite_handle.h"

namespace nearpit::store {

Status insert_revision(Connection& db, const Revision& revision);

// `which` is the rest of the statement, with ?1 for `value`: "WHERE number > ?1 ORDER BY number". Stops at the first error of `take`.
Status each_revision(Connection& db, const std::string& which, std::int64_t value,
                     const std::function<Status(std::int64_t rowid, Revision&&)>& take);
// Those of one object, in order of rowid.
Status each_revision_of(Connection& db, const std::string& object,
                        const std::function<Status(std::int64_t rowid, Revision&&)>& take);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_REVISION_ROWS_H_
