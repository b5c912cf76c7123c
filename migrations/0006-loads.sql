CREATE TABLE parts (
  id     INTEGER PRIMARY KEY,
  serial TEXT NOT NULL UNIQUE CHECK (serial <> '')
) STRICT;

-- The latest of a part is what it is now.
CREATE TABLE part_particulars (
  id            INTEGER PRIMARY KEY,
  part_id       INTEGER NOT NULL REFERENCES parts (id),
  title         TEXT,
  drawing       TEXT,
  drawing_issue TEXT,
  tool          TEXT,
  at            TEXT NOT NULL,
  by            TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX part_particulars_by_part ON part_particulars (part_id, id);

CREATE TABLE part_results (
  id        INTEGER PRIMARY KEY,
  part_id   INTEGER NOT NULL REFERENCES parts (id),
  tested_at TEXT NOT NULL,
  test      TEXT NOT NULL CHECK (test <> ''),
  outcome   TEXT NOT NULL CHECK (outcome IN ('passed', 'failed', 'noted')),
  figure    REAL,
  unit      TEXT,
  text      TEXT NOT NULL,
  at        TEXT NOT NULL,
  by        TEXT NOT NULL CHECK (by <> ''),
  CHECK (figure IS NULL OR unit IS NOT NULL)
) STRICT;

CREATE INDEX part_results_by_part ON part_results (part_id, id);

-- What was in the vessel and by which cycle. The latest of a run holds.
CREATE TABLE loads (
  id              INTEGER PRIMARY KEY,
  run_id          INTEGER NOT NULL REFERENCES runs (id),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  work_order      TEXT,
  cycle_id        INTEGER REFERENCES cycles (id),
  reason          TEXT,
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX loads_by_run ON loads (run_id, id);
CREATE INDEX loads_by_work_order ON loads (work_order);
CREATE INDEX loads_by_cycle ON loads (cycle_id);

CREATE TABLE load_parts (
  load_id  INTEGER NOT NULL REFERENCES loads (id),
  part_id  INTEGER NOT NULL REFERENCES parts (id),
  n        INTEGER NOT NULL CHECK (n >= 0),
  quantity INTEGER NOT NULL CHECK (quantity > 0),
  PRIMARY KEY (load_id, part_id)
) STRICT, WITHOUT ROWID;

CREATE INDEX load_parts_by_part ON load_parts (part_id, load_id);

CREATE TRIGGER part_particulars_are_never_updated BEFORE UPDATE ON part_particulars
BEGIN SELECT RAISE(ABORT, 'particulars are never updated'); END;

CREATE TRIGGER part_particulars_are_never_deleted BEFORE DELETE ON part_particulars
BEGIN SELECT RAISE(ABORT, 'particulars are never deleted'); END;

CREATE TRIGGER part_results_are_never_updated BEFORE UPDATE ON part_results
BEGIN SELECT RAISE(ABORT, 'a test result is never updated'); END;

CREATE TRIGGER part_results_are_never_deleted BEFORE DELETE ON part_results
BEGIN SELECT RAISE(ABORT, 'a test result is never deleted'); END;

CREATE TRIGGER loads_are_never_updated BEFORE UPDATE ON loads
BEGIN SELECT RAISE(ABORT, 'a load is never updated'); END;

CREATE TRIGGER loads_are_never_deleted BEFORE DELETE ON loads
BEGIN SELECT RAISE(ABORT, 'a load is never deleted'); END;

CREATE TRIGGER load_parts_are_never_updated BEFORE UPDATE ON load_parts
BEGIN SELECT RAISE(ABORT, 'a load is never updated'); END;

CREATE TRIGGER load_parts_are_never_deleted BEFORE DELETE ON load_parts
BEGIN SELECT RAISE(ABORT, 'a load is never deleted'); END;
