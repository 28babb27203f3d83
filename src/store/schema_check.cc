#include "store/schema_check.h"

#include <map>
#include <set>
#include <string>
#include <utility>

#include "base/text.h"
#include "store/schema_build.h"

namespace nearpit::store {
namespace {

constexpr const char* kAction =
    "another program changed the file's structure; go on with the last good copy, or have that program take its change "
    "back";

struct SchemaObject {
  std::string table;
  std::string sql;
};
using Objects = std::map<std::pair<std::string, std::string>, SchemaObject>;  // by type and name

// What must stand in the file as it stands in the pattern; other rows are other programs'.
constexpr const char* kNotices[] = {
    "SELECT 'layer ' || table_name, data_type || ' ' || identifier || ' ' || description || ' ' || coalesce(srs_id, "
    "'none') FROM gpkg_contents",
    "SELECT 'geometry of ' || table_name, column_name || ' ' || geometry_type_name || ' ' || srs_id || ' ' || z || ' ' "
    "|| m FROM "
    "gpkg_geometry_columns",
    "SELECT 'extension ' || extension_name || ' of ' || table_name, scope FROM gpkg_extensions",
    "SELECT 'coordinate system ' || srs_id, organization || ' ' || organization_coordsys_id FROM gpkg_spatial_ref_sys",
    "SELECT 'note on ' || layer_name || '.' || column_name, meaning FROM column_notes",
    "SELECT 'schema ' || number, name FROM nearpit_schema",
};

// The start of the file as it tells it itself.
Result<FileStart> start_of(Connection& db) {
  FileStart start;
  Statement survey(db, "SELECT survey_id, plan, srs_id, made_at_ms, made_at_offset_min FROM nearpit_survey");
  NEARPIT_ASSIGN(there, survey.next());
  if (!there) return Error(ErrorKind::kDamaged, "holds no plan");
  start.survey_id = survey.text(0);
  start.plan = survey.text(1);
  const std::int64_t srs_id = survey.integer(2);
  start.epsg = srs_id == -1 ? 0 : static_cast<int>(srs_id);
  start.made_at = {survey.integer(3), static_cast<int>(survey.integer(4))};
  Statement finds(db, "SELECT name FROM nearpit_find ORDER BY number");
  while (true) {
    NEARPIT_ASSIGN(row, finds.next());
    if (!row) return start;
    start.finds.push_back(finds.text(0));
  }
}

Result<Objects> objects_of(Connection& db) {
  Objects objects;
  Statement rows(
      db,
      "SELECT type, name, tbl_name, coalesce(sql, '') FROM sqlite_schema WHERE name NOT LIKE 'sqlite\\_%' ESCAPE '\\'");
  while (true) {
    NEARPIT_ASSIGN(row, rows.next());
    if (!row) return objects;
    objects.emplace(std::pair(rows.text(0), rows.text(1)), SchemaObject{rows.text(2), rows.text(3)});
  }
}

Result<std::map<std::string, std::string>> notices_of(Connection& db, const char* sql) {
  std::map<std::string, std::string> notices;
  Statement rows(db, sql);
  while (true) {
    NEARPIT_ASSIGN(row, rows.next());
    if (!row) return notices;
    notices.emplace(rows.text(0), rows.text(1));
  }
}

void compare_objects(const Objects& is, const Objects& should, Findings& findings) {
  std::set<std::string> ours;
  for (const auto& [key, object] : should) {
    const auto& [type, name] = key;
    ours.insert(object.table);
    const auto found = is.find(key);
    if (found == is.end()) {
      findings.add({"schema", type + " " + name, "is missing", kAction});
    } else if (found->second.sql != object.sql || found->second.table != object.table) {
      findings.add(
          {"schema", type + " " + name, "is not as this program made it: " + in_quotes(found->second.sql), kAction});
    }
  }
  for (const auto& [key, object] : is) {
    if (should.contains(key) || !ours.contains(object.table)) continue;
    findings.add({"schema", key.first + " " + in_quotes(key.second),
                  "was added to table " + object.table + " by another program: " + in_quotes(object.sql), kAction});
  }
}

void compare_notices(Connection& db, Connection& pattern, const char* sql, Findings& findings) {
  const auto should = notices_of(pattern, sql);
  const auto is = notices_of(db, sql);
  if (!should || !is) {
    findings.add({"schema", "notices of the layers", (is ? should : is).error().one_line(), kAction});
    return;
  }
  for (const auto& [name, text] : *should) {
    const auto found = is->find(name);
    if (found == is->end()) {
      findings.add({"schema", name, "is missing", kAction});
    } else if (found->second != text) {
      findings.add({"schema", name, "says " + in_quotes(found->second) + ", should say " + in_quotes(text), kAction});
    }
  }
}

Status compare_with_pattern(Connection& db, Findings& findings) {
  NEARPIT_ASSIGN(start, start_of(db));
  NEARPIT_ASSIGN(pattern, Connection::in_memory());
  NEARPIT_TRY(build_schema(pattern, start));
  NEARPIT_ASSIGN(is, objects_of(db));
  NEARPIT_ASSIGN(should, objects_of(pattern));
  compare_objects(is, should, findings);
  for (const char* sql : kNotices)
    compare_notices(db, pattern, sql, findings);
  return ok_status();
}

}  // namespace

void check_schema(Connection& db, Findings& findings) {
  const Status compared = compare_with_pattern(db, findings);
  if (!compared) findings.add({"schema", "tables", compared.error().one_line(), kAction});
}

}  // namespace nearpit::store
