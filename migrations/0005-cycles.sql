CREATE TABLE cycles (
  id              INTEGER PRIMARY KEY,
  code            TEXT NOT NULL CHECK (code <> ''),
  issue           TEXT NOT NULL CHECK (issue <> ''),
  title           TEXT NOT NULL,
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  -- Code of the resin set it estimates with.
  resin           TEXT,
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> ''),
  UNIQUE (code, issue)
) STRICT;

-- The latest of a cycle is what it is now.
CREATE TABLE cycle_statuses (
  id       INTEGER PRIMARY KEY,
  cycle_id INTEGER NOT NULL REFERENCES cycles (id),
  status   TEXT NOT NULL CHECK (status IN ('draft', 'released', 'withdrawn')),
  reason   TEXT,
  at       TEXT NOT NULL,
  by       TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX cycle_statuses_by_cycle ON cycle_statuses (cycle_id, id);

CREATE TRIGGER cycle_statuses_are_never_updated BEFORE UPDATE ON cycle_statuses
BEGIN SELECT RAISE(ABORT, 'the history of a cycle is never updated'); END;

CREATE TRIGGER cycle_statuses_are_never_deleted BEFORE DELETE ON cycle_statuses
BEGIN SELECT RAISE(ABORT, 'the history of a cycle is never deleted'); END;

CREATE TRIGGER released_cycles_are_frozen BEFORE UPDATE ON cycles
WHEN EXISTS (SELECT 1 FROM cycle_statuses WHERE cycle_id = OLD.id AND status <> 'draft')
BEGIN SELECT RAISE(ABORT, 'a released issue is frozen'); END;

CREATE TRIGGER cycles_are_never_deleted BEFORE DELETE ON cycles
BEGIN SELECT RAISE(ABORT, 'a cycle is never deleted'); END;

CREATE TABLE resins (
  id              INTEGER PRIMARY KEY,
  code            TEXT NOT NULL UNIQUE CHECK (code <> ''),
  name            TEXT NOT NULL,
  status          TEXT NOT NULL CHECK (status IN ('published', 'recalled', 'fitted', 'illustrative')),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE TRIGGER resins_are_never_updated BEFORE UPDATE ON resins
BEGIN SELECT RAISE(ABORT, 'a resin set is never updated'); END;

CREATE TRIGGER resins_are_never_deleted BEFORE DELETE ON resins
BEGIN SELECT RAISE(ABORT, 'a resin set is never deleted'); END;
