CREATE TABLE runs (
  id        INTEGER PRIMARY KEY AUTOINCREMENT,
  vessel_id INTEGER REFERENCES vessels (id),
  -- First and last scan of all its sources, ms since 1970-01-01T00:00:00Z.
  from_ms   REAL NOT NULL,
  until_ms  REAL NOT NULL,
  at        TEXT NOT NULL,
  by        TEXT NOT NULL CHECK (by <> ''),
  CHECK (until_ms >= from_ms)
) STRICT;

CREATE INDEX runs_by_time ON runs (from_ms);
CREATE INDEX runs_by_vessel ON runs (vessel_id, from_ms);

CREATE TRIGGER runs_are_never_deleted BEFORE DELETE ON runs
BEGIN SELECT RAISE(ABORT, 'a run is never deleted'); END;

-- One recorder's readings of a run, read by one layout.
CREATE TABLE run_sources (
  id              INTEGER PRIMARY KEY,
  run_id          INTEGER NOT NULL REFERENCES runs (id),
  n               INTEGER NOT NULL CHECK (n > 0),
  recorder_id     INTEGER REFERENCES recorders (id),
  -- The source whose file this one reads again, by another layout.
  replaces_id     INTEGER UNIQUE REFERENCES run_sources (id),
  layout_sha256   TEXT NOT NULL REFERENCES documents (sha256),
  -- Over the canonical form of its scans in order; does not depend on how they are cut into blocks.
  chain_sha256    TEXT NOT NULL CHECK (length(chain_sha256) = 64),
  scans           INTEGER NOT NULL CHECK (scans > 0),
  from_ms         REAL NOT NULL,
  until_ms        REAL NOT NULL,
  repairs         TEXT NOT NULL CHECK (json_valid(repairs)),
  passed_over     TEXT NOT NULL CHECK (json_valid(passed_over)),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> ''),
  UNIQUE (run_id, n),
  CHECK (until_ms >= from_ms)
) STRICT;

CREATE TABLE source_files (
  source_id INTEGER NOT NULL REFERENCES run_sources (id),
  n         INTEGER NOT NULL CHECK (n >= 0),
  file_id   INTEGER NOT NULL REFERENCES files (id),
  name      TEXT NOT NULL CHECK (name <> ''),
  PRIMARY KEY (source_id, n)
) STRICT, WITHOUT ROWID;

CREATE INDEX source_files_by_file ON source_files (file_id);
CREATE INDEX source_files_by_name ON source_files (name);

-- Readings of one column over a stretch of scans. Column 0 is the time, 1 the layout's first channel.
CREATE TABLE reading_blocks (
  id         INTEGER PRIMARY KEY,
  source_id  INTEGER NOT NULL REFERENCES run_sources (id),
  column_n   INTEGER NOT NULL CHECK (column_n >= 0),
  first_scan INTEGER NOT NULL CHECK (first_scan >= 0),
  scans      INTEGER NOT NULL CHECK (scans > 0),
  packed     BLOB NOT NULL,
  UNIQUE (source_id, column_n, first_scan)
) STRICT;

CREATE TRIGGER run_sources_are_never_updated BEFORE UPDATE ON run_sources
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TRIGGER run_sources_are_never_deleted BEFORE DELETE ON run_sources
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TRIGGER source_files_are_never_updated BEFORE UPDATE ON source_files
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TRIGGER source_files_are_never_deleted BEFORE DELETE ON source_files
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TRIGGER reading_blocks_are_never_updated BEFORE UPDATE ON reading_blocks
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TRIGGER reading_blocks_are_never_deleted BEFORE DELETE ON reading_blocks
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TABLE run_notes (
  id     INTEGER PRIMARY KEY,
  run_id INTEGER NOT NULL REFERENCES runs (id),
  -- The instant of the run it is about.
  about  TEXT NOT NULL,
  text   TEXT NOT NULL CHECK (text <> ''),
  at     TEXT NOT NULL,
  by     TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX run_notes_by_run ON run_notes (run_id, id);

CREATE TRIGGER run_notes_are_never_updated BEFORE UPDATE ON run_notes
BEGIN SELECT RAISE(ABORT, 'a note is never updated'); END;

CREATE TRIGGER run_notes_are_never_deleted BEFORE DELETE ON run_notes
BEGIN SELECT RAISE(ABORT, 'a note is never deleted'); END;
