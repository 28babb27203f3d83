-- Schema 1 of a survey file: an OGC GeoPackage 1.3.1 (OGC 12-128r17), our private tables (nearpit_*), and the layers that other programs read.
-- Runs inside one transaction. The program adds what depends on the plan: the coordinate system, the rows of gpkg_contents and
-- gpkg_geometry_columns, and one column find_<name> a find in the layers pits and clusters.
-- No STRICT and no WITHOUT ROWID tables, no R-tree: old readers open the file, and nothing in it needs functions that plain SQLite lacks.
PRAGMA application_id = 1196444487;
PRAGMA user_version = 10300;

-- ---- GeoPackage core, clauses 1.1.2 and 1.1.3, 2.1.5, 2.3.2 of the standard ----
CREATE TABLE gpkg_spatial_ref_sys (
  srs_name TEXT NOT NULL,
  srs_id INTEGER NOT NULL PRIMARY KEY,
  organization TEXT NOT NULL,
  organization_coordsys_id INTEGER NOT NULL,
  definition TEXT NOT NULL,
  description TEXT
);
CREATE TABLE gpkg_contents (
  table_name TEXT NOT NULL PRIMARY KEY,
  data_type TEXT NOT NULL,
  identifier TEXT UNIQUE,
  description TEXT DEFAULT '',
  last_change DATETIME NOT NULL DEFAULT (strftime('%Y-%m-%dT%H:%M:%fZ','now')),
  min_x DOUBLE,
  min_y DOUBLE,
  max_x DOUBLE,
  max_y DOUBLE,
  srs_id INTEGER,
  CONSTRAINT fk_gc_r_srs_id FOREIGN KEY (srs_id) REFERENCES gpkg_spatial_ref_sys(srs_id)
);
CREATE TABLE gpkg_geometry_columns (
  table_name TEXT NOT NULL,
  column_name TEXT NOT NULL,
  geometry_type_name TEXT NOT NULL,
  srs_id INTEGER NOT NULL,
  z TINYINT NOT NULL,
  m TINYINT NOT NULL,
  CONSTRAINT pk_geom_cols PRIMARY KEY (table_name, column_name),
  CONSTRAINT uk_gc_table_name UNIQUE (table_name),
  CONSTRAINT fk_gc_tn FOREIGN KEY (table_name) REFERENCES gpkg_contents(table_name),
  CONSTRAINT fk_gc_srs FOREIGN KEY (srs_id) REFERENCES gpkg_spatial_ref_sys (srs_id)
);
CREATE TABLE gpkg_extensions (
  table_name TEXT,
  column_name TEXT,
  extension_name TEXT NOT NULL,
  definition TEXT NOT NULL,
  scope TEXT NOT NULL,
  CONSTRAINT ge_tce UNIQUE (table_name, column_name, extension_name)
);

INSERT INTO gpkg_spatial_ref_sys (srs_name, srs_id, organization, organization_coordsys_id, definition, description) VALUES
  ('Undefined Cartesian SRS', -1, 'NONE', -1, 'undefined', 'undefined Cartesian coordinate reference system'),
  ('Undefined geographic SRS', 0, 'NONE', 0, 'undefined', 'undefined geographic coordinate reference system'),
  ('WGS 84 geodetic', 4326, 'EPSG', 4326,
   'GEOGCS["WGS 84",DATUM["WGS_1984",SPHEROID["WGS 84",6378137,298.257223563,AUTHORITY["EPSG","7030"]],AUTHORITY["EPSG","6326"]],PRIMEM["Greenwich",0,AUTHORITY["EPSG","8901"]],UNIT["degree",0.0174532925199433,AUTHORITY["EPSG","9122"]],AXIS["Latitude",NORTH],AXIS["Longitude",EAST],AUTHORITY["EPSG","4326"]]',
   'longitude and latitude in decimal degrees on the WGS 84 spheroid');

-- ---- private tables: what is true ----
CREATE TABLE nearpit_schema (
  number INTEGER PRIMARY KEY,         -- the largest is the file's schema
  name TEXT NOT NULL,                 -- the SQL file that brought it there
  applied_at TEXT NOT NULL            -- ISO 8601
);
CREATE TABLE nearpit_survey (
  id INTEGER PRIMARY KEY CHECK (id = 1),
  survey_id TEXT NOT NULL CHECK (typeof(survey_id) = 'text'),  -- UUID, the same in every copy
  plan TEXT NOT NULL CHECK (typeof(plan) = 'text'),            -- JSON, the boundary in place
  srs_id INTEGER NOT NULL REFERENCES gpkg_spatial_ref_sys (srs_id),  -- of every coordinate in this file
  made_at_ms INTEGER NOT NULL CHECK (typeof(made_at_ms) = 'integer'),        -- milliseconds since 1970-01-01T00:00:00Z
  made_at_offset_min INTEGER NOT NULL CHECK (typeof(made_at_offset_min) = 'integer')  -- minutes east of UTC
);
CREATE TABLE nearpit_find (
  number INTEGER PRIMARY KEY,         -- order of the plan, from 1
  name TEXT NOT NULL CHECK (typeof(name) = 'text'),
  column_name TEXT NOT NULL           -- its column in the layers pits and clusters
);
CREATE TABLE nearpit_drawn (
  number INTEGER PRIMARY KEY,         -- order in which the units stand in the first sample
  area INTEGER NOT NULL CHECK (typeof(area) = 'integer' AND area >= 0),  -- order of the plan, from 0
  unit INTEGER NOT NULL CHECK (typeof(unit) = 'integer' AND unit >= 0),  -- primary unit within its area, from 0
  UNIQUE (area, unit)
);
CREATE TABLE nearpit_writer (
  number INTEGER PRIMARY KEY,
  id TEXT NOT NULL UNIQUE CHECK (typeof(id) = 'text'),  -- UUID of a device and a random id
  device TEXT NOT NULL,                                 -- name of the machine, for people
  first_seen_ms INTEGER NOT NULL,
  first_seen_offset_min INTEGER NOT NULL
);
CREATE TABLE nearpit_revision (
  number INTEGER PRIMARY KEY AUTOINCREMENT,  -- order in which this file took them
  id TEXT NOT NULL UNIQUE CHECK (typeof(id) = 'text'),  -- UUID version 7
  writer TEXT NOT NULL REFERENCES nearpit_writer (id),
  seq INTEGER NOT NULL CHECK (typeof(seq) = 'integer' AND seq >= 1),  -- 1, 2, 3 … of its writer
  clock INTEGER NOT NULL CHECK (typeof(clock) = 'integer'),  -- hybrid logical clock: milliseconds * 65536 + counter
  "by" TEXT NOT NULL CHECK (typeof("by") = 'text'),
  at_ms INTEGER NOT NULL CHECK (typeof(at_ms) = 'integer'),  -- wall clock, milliseconds since 1970-01-01T00:00:00Z
  at_offset_min INTEGER NOT NULL CHECK (typeof(at_offset_min) = 'integer'),
  object TEXT NOT NULL CHECK (typeof(object) = 'text'),      -- pit/T7-12, area/<uuid>, stop/<uuid>
  body TEXT NOT NULL CHECK (typeof(body) = 'text'),          -- the whole record, JSON
  why TEXT NOT NULL CHECK (typeof(why) = 'text'),
  parents TEXT NOT NULL CHECK (typeof(parents) = 'text'),    -- ids that it replaces, ascending, one space between
  hash TEXT NOT NULL CHECK (typeof(hash) = 'text'),          -- SHA-256 over the hash of its writer before it and every field
  UNIQUE (writer, seq)
);

-- Nothing of these is ever changed or taken out, whatever program asks. The insert triggers stop INSERT OR REPLACE, which deletes without a delete trigger.
CREATE TRIGGER nearpit_schema_no_update BEFORE UPDATE ON nearpit_schema BEGIN
  SELECT RAISE(ABORT, 'nearpit: the history of the schema is never changed');
END;
CREATE TRIGGER nearpit_schema_no_delete BEFORE DELETE ON nearpit_schema BEGIN
  SELECT RAISE(ABORT, 'nearpit: the history of the schema is never changed');
END;
CREATE TRIGGER nearpit_schema_no_replace BEFORE INSERT ON nearpit_schema
WHEN EXISTS (SELECT 1 FROM nearpit_schema WHERE number = NEW.number) BEGIN
  SELECT RAISE(ABORT, 'nearpit: the history of the schema is never changed');
END;
CREATE TRIGGER nearpit_survey_no_update BEFORE UPDATE ON nearpit_survey BEGIN
  SELECT RAISE(ABORT, 'nearpit: the plan is fixed');
END;
CREATE TRIGGER nearpit_survey_no_delete BEFORE DELETE ON nearpit_survey BEGIN
  SELECT RAISE(ABORT, 'nearpit: the plan is fixed');
END;
CREATE TRIGGER nearpit_survey_no_replace BEFORE INSERT ON nearpit_survey
WHEN EXISTS (SELECT 1 FROM nearpit_survey) BEGIN
  SELECT RAISE(ABORT, 'nearpit: the plan is fixed');
END;
CREATE TRIGGER nearpit_find_no_update BEFORE UPDATE ON nearpit_find BEGIN
  SELECT RAISE(ABORT, 'nearpit: the finds of the plan are fixed');
END;
CREATE TRIGGER nearpit_find_no_delete BEFORE DELETE ON nearpit_find BEGIN
  SELECT RAISE(ABORT, 'nearpit: the finds of the plan are fixed');
END;
CREATE TRIGGER nearpit_find_no_insert BEFORE INSERT ON nearpit_find
WHEN EXISTS (SELECT 1 FROM nearpit_survey) BEGIN
  SELECT RAISE(ABORT, 'nearpit: the finds of the plan are fixed');
END;
CREATE TRIGGER nearpit_drawn_no_update BEFORE UPDATE ON nearpit_drawn BEGIN
  SELECT RAISE(ABORT, 'nearpit: the drawn first sample is fixed');
END;
CREATE TRIGGER nearpit_drawn_no_delete BEFORE DELETE ON nearpit_drawn BEGIN
  SELECT RAISE(ABORT, 'nearpit: the drawn first sample is fixed');
END;
CREATE TRIGGER nearpit_drawn_no_insert BEFORE INSERT ON nearpit_drawn
WHEN EXISTS (SELECT 1 FROM nearpit_survey) BEGIN
  SELECT RAISE(ABORT, 'nearpit: the drawn first sample is fixed');
END;
CREATE TRIGGER nearpit_writer_no_update BEFORE UPDATE ON nearpit_writer BEGIN
  SELECT RAISE(ABORT, 'nearpit: a writer is never changed');
END;
CREATE TRIGGER nearpit_writer_no_delete BEFORE DELETE ON nearpit_writer BEGIN
  SELECT RAISE(ABORT, 'nearpit: a writer is never deleted');
END;
CREATE TRIGGER nearpit_writer_no_replace BEFORE INSERT ON nearpit_writer
WHEN EXISTS (SELECT 1 FROM nearpit_writer WHERE id = NEW.id OR number = NEW.number) BEGIN
  SELECT RAISE(ABORT, 'nearpit: a writer is never changed');
END;
CREATE TRIGGER nearpit_revision_no_update BEFORE UPDATE ON nearpit_revision BEGIN
  SELECT RAISE(ABORT, 'nearpit: a revision is never changed; a correction is a new one');
END;
CREATE TRIGGER nearpit_revision_no_delete BEFORE DELETE ON nearpit_revision BEGIN
  SELECT RAISE(ABORT, 'nearpit: a revision is never deleted');
END;
CREATE TRIGGER nearpit_revision_no_replace BEFORE INSERT ON nearpit_revision
WHEN EXISTS (SELECT 1 FROM nearpit_revision WHERE id = NEW.id OR number = NEW.number OR (writer = NEW.writer AND seq = NEW.seq)) BEGIN
  SELECT RAISE(ABORT, 'nearpit: a revision is never changed; a correction is a new one');
END;

-- ---- layers: derived from the log, for other programs ----
CREATE TABLE pits (
  fid INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL,
  geom POINT,
  label TEXT NOT NULL UNIQUE,
  outcome TEXT NOT NULL,
  area TEXT,
  first_sample BOOLEAN NOT NULL,
  ring INTEGER,
  chosen_by TEXT,
  reason TEXT,
  crew TEXT,
  dug_at TEXT,
  depth_cm DOUBLE,
  stop TEXT,
  bag TEXT,
  note TEXT
);
CREATE TABLE clusters (
  fid INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL,
  geom MULTIPOLYGON,
  label TEXT NOT NULL UNIQUE,
  pits INTEGER NOT NULL,
  in_first_sample INTEGER NOT NULL,
  area_m2 DOUBLE NOT NULL,
  closed BOOLEAN NOT NULL
);
CREATE TABLE boundary (
  fid INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL,
  geom MULTIPOLYGON,
  survey TEXT NOT NULL UNIQUE
);
CREATE TABLE strata (
  fid INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL,
  geom MULTIPOLYGON,
  name TEXT NOT NULL UNIQUE,
  nodes INTEGER NOT NULL,
  primary_units INTEGER NOT NULL,
  drawn INTEGER NOT NULL
);
CREATE TABLE closed_areas (
  fid INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL,
  geom MULTIPOLYGON,
  object TEXT NOT NULL UNIQUE,
  name TEXT,
  reason TEXT,
  closed_by TEXT,
  open_again BOOLEAN NOT NULL
);
CREATE TABLE column_notes (
  fid INTEGER PRIMARY KEY AUTOINCREMENT NOT NULL,
  layer_name TEXT NOT NULL,
  column_name TEXT NOT NULL,
  meaning TEXT NOT NULL,
  UNIQUE (layer_name, column_name)
);

INSERT INTO column_notes (layer_name, column_name, meaning) VALUES
  ('pits', 'geom', 'where the pit was dug, or its grid point while it is not'),
  ('pits', 'label', 'row (transect) and column of the pit on the grid, or a name of its own off the grid'),
  ('pits', 'outcome', 'positive, negative, not dug, due (to dig) or halted (stop-work near by)'),
  ('pits', 'area', 'the area (stratum) of the plan that the pit stands in; empty off the grid'),
  ('pits', 'first_sample', '1: the pit belongs to the drawn first sample'),
  ('pits', 'ring', 'steps from the first sample through positive pits; empty when the design does not reach the pit'),
  ('pits', 'chosen_by', 'what the crew said: design, judgement or asked'),
  ('pits', 'reason', 'why the pit was not dug'),
  ('pits', 'crew', 'who dug'),
  ('pits', 'dug_at', 'when, ISO 8601'),
  ('pits', 'depth_cm', 'depth below the surface, centimetres'),
  ('pits', 'stop', 'why digging stopped'),
  ('pits', 'bag', 'bag of the finds'),
  ('pits', 'note', 'what else the crew wrote'),
  ('clusters', 'geom', 'the ground that the positive pits of the cluster stand for'),
  ('clusters', 'label', 'the first pit dug of the cluster'),
  ('clusters', 'pits', 'number of positive pits'),
  ('clusters', 'in_first_sample', 'how many of them belong to the first sample'),
  ('clusters', 'area_m2', 'pits times the ground that one pit stands for, square metres'),
  ('clusters', 'closed', '1: no neighbour of the cluster is left to dig'),
  ('boundary', 'geom', 'the ground surveyed'),
  ('boundary', 'survey', 'name of the survey'),
  ('strata', 'geom', 'the area (stratum) of the plan'),
  ('strata', 'name', 'its name'),
  ('strata', 'nodes', 'grid points inside'),
  ('strata', 'primary_units', 'units that the first sample was drawn from'),
  ('strata', 'drawn', 'units drawn'),
  ('closed_areas', 'geom', 'ground where nobody digs'),
  ('closed_areas', 'object', 'identity of the closed area in the record'),
  ('closed_areas', 'name', 'its name'),
  ('closed_areas', 'reason', 'why it was closed'),
  ('closed_areas', 'closed_by', 'who closed it'),
  ('closed_areas', 'open_again', '1: it has been opened again');

-- Other programs may read everything here; a program that does not know these tables should not write the file.
INSERT INTO gpkg_extensions (table_name, column_name, extension_name, definition, scope) VALUES
  ('nearpit_schema', NULL, 'nearpit_log', 'Private tables of Nearpit: the plan and the append-only log of a survey. The layers can be read without them.', 'write-only'),
  ('nearpit_survey', NULL, 'nearpit_log', 'Private tables of Nearpit: the plan and the append-only log of a survey. The layers can be read without them.', 'write-only'),
  ('nearpit_find', NULL, 'nearpit_log', 'Private tables of Nearpit: the plan and the append-only log of a survey. The layers can be read without them.', 'write-only'),
  ('nearpit_drawn', NULL, 'nearpit_log', 'Private tables of Nearpit: the plan and the append-only log of a survey. The layers can be read without them.', 'write-only'),
  ('nearpit_writer', NULL, 'nearpit_log', 'Private tables of Nearpit: the plan and the append-only log of a survey. The layers can be read without them.', 'write-only'),
  ('nearpit_revision', NULL, 'nearpit_log', 'Private tables of Nearpit: the plan and the append-only log of a survey. The layers can be read without them.', 'write-only');
