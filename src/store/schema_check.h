// Tables, triggers and notices of the file against what this program makes.
#ifndef NEARPIT_STORE_SCHEMA_CHECK_H_
#define NEARPIT_STORE_SCHEMA_CHECK_H_

#include "store/layer_check.h"
#include "store/sqlite_handle.h"

namespace nearpit::store {

// Makes the same file again in memory, for the same plan and finds, and compares: the text of every table and trigger, and the rows that GeoPackage readers go
// by. Tables of other programs are none of our business; triggers and indexes of theirs on our tables are.
void check_schema(Connection& db, Findings& findings);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_SCHEMA_CHECK_H_
