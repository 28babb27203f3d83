#include "store/schema_build.h"

#include "base/text.h"
#include "store/schema_files.h"

namespace nearpit::store {
namespace {

struct LayerNotice {
  const char* table;
  const char* geometry;  // empty: a table without
  const char* description;
};

constexpr LayerNotice kLayers[] = {
    {"pits", "POINT", "Pits of the first sample, and every other pit dug, to dig or not dug"},
    {"clusters", "MULTIPOLYGON", "Clusters of neighbouring positive pits"},
    {"boundary", "MULTIPOLYGON", "The ground surveyed"},
    {"strata", "MULTIPOLYGON", "The areas that the first sample was drawn in"},
    {"closed_areas", "MULTIPOLYGON", "Ground where nobody digs"},
    {"column_notes", "", "What each column of each layer means"},
};

Status run_schema_files(Connection& db, const std::string& made_at) {
  for (int i = 0; i < kSchemaFileCount; ++i) {
    const SchemaFile& file = kSchemaFiles[i];
    NEARPIT_TRY(db.run(file.sql));
    NEARPIT_TRY(Statement(db, "INSERT INTO nearpit_schema (number, name, applied_at) VALUES (?1, ?2, ?3)")
                    .add(file.number)
                    .add(file.name)
                    .add(made_at)
                    .finish());
  }
  return ok_status();
}

Status add_crs(Connection& db, const FileStart& start) {
  if (start.epsg == 0) return ok_status();
  // WGS 84 stands in every GeoPackage already.
  return Statement(
             db,
             "INSERT INTO gpkg_spatial_ref_sys (srs_name, srs_id, organization, organization_coordsys_id, definition) "
             "VALUES (?1, ?2, 'EPSG', ?2, ?3) ON CONFLICT (srs_id) DO NOTHING")
      .add(start.crs_name)
      .add(start.epsg)
      .add(start.crs_wkt)
      .finish();
}

Status add_layer(Connection& db, const LayerNotice& layer, int srs_id, const std::string& made_at) {
  const bool with_geometry = *layer.geometry != '\0';
  NEARPIT_TRY(
      Statement(db,
                "INSERT INTO gpkg_contents (table_name, data_type, identifier, description, last_change, srs_id) "
                "VALUES (?1, ?2, ?1, ?3, ?4, ?5)")
          .add(layer.table)
          .add(with_geometry ? "features" : "attributes")
          .add(layer.description)
          .add(made_at)
          .add(with_geometry ? Value(std::int64_t{srs_id}) : Value())
          .finish());
  if (!with_geometry) return ok_status();
  return Statement(db,
                   "INSERT INTO gpkg_geometry_columns (table_name, column_name, geometry_type_name, srs_id, z, m) "
                   "VALUES (?1, 'geom', ?2, ?3, 0, 0)")
      .add(layer.table)
      .add(layer.geometry)
      .add(srs_id)
      .finish();
}

Status add_find(Connection& db, std::int64_t number, const std::string& find, const std::string& column) {
  NEARPIT_TRY(Statement(db, "INSERT INTO nearpit_find (number, name, column_name) VALUES (?1, ?2, ?3)")
                  .add(number)
                  .add(find)
                  .add(column)
                  .finish());
  const std::pair<const char*, const char*> meanings[] = {
      {"pits", "how many of this find the pit yielded; empty unless it was dug: "},
      {"clusters", "how many of this find the pits of the cluster yielded: "},
  };
  for (const auto& [table, meaning] : meanings) {
    NEARPIT_TRY(db.run("ALTER TABLE " + std::string(table) + " ADD COLUMN " + quoted_identifier(column) + " INTEGER"));
    NEARPIT_TRY(Statement(db, "INSERT INTO column_notes (layer_name, column_name, meaning) VALUES (?1, ?2, ?3)")
                    .add(table)
                    .add(column)
                    .add(meaning + find)
                    .finish());
  }
  return ok_status();
}

Status add_drawn(Connection& db, const FileStart& start) {
  Statement insert(db, "INSERT INTO nearpit_drawn (area, unit) VALUES (?1, ?2)");
  for (std::size_t area = 0; area < start.drawn.size(); ++area) {
    for (const UnitId unit : start.drawn[area]) {
      NEARPIT_TRY(insert.add(static_cast<std::int64_t>(area)).add(std::int64_t{unit}).finish());
    }
  }
  return ok_status();
}

}  // namespace

int srs_id_of(const FileStart& start) { return start.epsg == 0 ? -1 : start.epsg; }

Status build_schema(Connection& db, const FileStart& start) {
  const std::string made_at = format_time_utc(start.made_at);
  const int srs_id = srs_id_of(start);
  NEARPIT_TRY(run_schema_files(db, made_at));
  NEARPIT_TRY(add_crs(db, start));
  for (const LayerNotice& layer : kLayers)
    NEARPIT_TRY(add_layer(db, layer, srs_id, made_at));
  const std::vector<std::string> columns = find_columns(start.finds);
  for (std::size_t i = 0; i < columns.size(); ++i) {
    NEARPIT_TRY(add_find(db, static_cast<std::int64_t>(i) + 1, start.finds[i], columns[i]));
  }
  NEARPIT_TRY(add_drawn(db, start));
  // Last: from here on the finds and the first sample are fixed.
  return Statement(db,
                   "INSERT INTO nearpit_survey (id, survey_id, plan, srs_id, made_at_ms, made_at_offset_min) "
                   "VALUES (1, ?1, ?2, ?3, ?4, ?5)")
      .add(start.survey_id)
      .add(start.plan)
      .add(srs_id)
      .add(start.made_at.utc_ms)
      .add(start.made_at.offset_min)
      .finish();
}

Result<LayerShape> read_shape(Connection& db) {
  LayerShape shape;
  Statement survey(db, "SELECT srs_id FROM nearpit_survey");
  NEARPIT_ASSIGN(there, survey.next());
  if (!there) return Error(ErrorKind::kDamaged, db.shown() + ": holds no plan; go on with the last good copy");
  shape.srs_id = static_cast<int>(survey.integer(0));
  Statement finds(db, "SELECT column_name FROM nearpit_find ORDER BY number");
  while (true) {
    NEARPIT_ASSIGN(row, finds.next());
    if (!row) return shape;
    shape.find_columns.push_back(finds.text(0));
  }
}

}  // namespace nearpit::store
