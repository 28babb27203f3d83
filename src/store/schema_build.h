// Makes the content of a survey file in an empty database: the numbered SQL, then what depends on the plan. A new file and the pattern that a check
// compares with are made by this one function.
#ifndef NEARPIT_STORE_SCHEMA_BUILD_H_
#define NEARPIT_STORE_SCHEMA_BUILD_H_

#include "base/status.h"
#include "store/layer_tables.h"
#include "store/sqlite_handle.h"
#include "store/survey_file.h"

namespace nearpit::store {

// srs_id of a file: the EPSG code, -1 (undefined Cartesian) for a local grid.
int srs_id_of(const FileStart& start);

// Inside the transaction that is open.
Status build_schema(Connection& db, const FileStart& start);

// The shape of a file's layers, as nearpit_survey and nearpit_find say.
Result<LayerShape> read_shape(Connection& db);

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_SCHEMA_BUILD_H_
