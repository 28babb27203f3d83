// The numbered SQL of schema/, compiled in by the build: schema/embed_sql.cmake writes the source. File n brings a survey file from schema n - 1 to n; a
// released file is never edited.
#ifndef NEARPIT_STORE_SCHEMA_FILES_H_
#define NEARPIT_STORE_SCHEMA_FILES_H_

namespace nearpit::store {

struct SchemaFile {
  int number;        // 1, 2, 3 … without gaps
  const char* name;  // "0001_first.sql"
  const char* sql;
};

extern const SchemaFile kSchemaFiles[];
extern const int kSchemaFileCount;

}  // namespace nearpit::store

#endif  // NEARPIT_STORE_SCHEMA_FILES_H_
