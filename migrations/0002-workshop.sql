CREATE TABLE workshop (
  id               INTEGER PRIMARY KEY CHECK (id = 1),
  name             TEXT NOT NULL CHECK (name <> ''),
  zone             TEXT NOT NULL CHECK (zone <> ''),
  temperature_unit TEXT NOT NULL CHECK (temperature_unit IN ('°C', '°F')),
  pressure_unit    TEXT NOT NULL CHECK (pressure_unit IN ('bar', 'kPa', 'MPa', 'psi')),
  vacuum_unit      TEXT NOT NULL CHECK (vacuum_unit IN ('bar', 'kPa', 'mbar', 'inHg', 'mmHg')),
  -- The sentence every page shows where all is invented; NULL in a real workshop.
  practice         TEXT
) STRICT;

CREATE TABLE vessels (
  id   INTEGER PRIMARY KEY,
  name TEXT NOT NULL UNIQUE CHECK (name <> ''),
  kind TEXT NOT NULL CHECK (kind IN ('autoclave', 'oven', 'press', 'heated-tool', 'heat-blanket'))
) STRICT;

-- Every document that was ever an input of a judgement, by the hash of its canonical form.
CREATE TABLE documents (
  sha256 TEXT PRIMARY KEY CHECK (length(sha256) = 64),
  format TEXT NOT NULL CHECK (format <> ''),
  text   TEXT NOT NULL CHECK (json_valid(text))
) STRICT;

CREATE TRIGGER documents_are_never_updated BEFORE UPDATE ON documents
BEGIN SELECT RAISE(ABORT, 'a document is never updated'); END;

CREATE TRIGGER documents_are_never_deleted BEFORE DELETE ON documents
BEGIN SELECT RAISE(ABORT, 'a document is never deleted'); END;

CREATE TABLE recorders (
  id        INTEGER PRIMARY KEY,
  name      TEXT NOT NULL UNIQUE CHECK (name <> ''),
  vessel_id INTEGER REFERENCES vessels (id)
) STRICT;

-- The latest of a recorder is the one its files are read by.
CREATE TABLE recorder_layouts (
  id              INTEGER PRIMARY KEY,
  recorder_id     INTEGER NOT NULL REFERENCES recorders (id),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX recorder_layouts_by_recorder ON recorder_layouts (recorder_id, id);

CREATE TRIGGER recorder_layouts_are_never_updated BEFORE UPDATE ON recorder_layouts
BEGIN SELECT RAISE(ABORT, 'a kept layout is never updated'); END;

CREATE TRIGGER recorder_layouts_are_never_deleted BEFORE DELETE ON recorder_layouts
BEGIN SELECT RAISE(ABORT, 'a kept layout is never deleted'); END;
