-- What sends readings while a vessel runs: an instrument, a program, a person at a gauge.
CREATE TABLE live_sources (
  id        INTEGER PRIMARY KEY,
  name      TEXT NOT NULL UNIQUE CHECK (name <> ''),
  vessel_id INTEGER NOT NULL REFERENCES vessels (id),
  at        TEXT NOT NULL,
  by        TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX live_sources_by_vessel ON live_sources (vessel_id, id);

CREATE TRIGGER live_sources_are_never_updated BEFORE UPDATE ON live_sources
BEGIN SELECT RAISE(ABORT, 'a live source is never updated'); END;

CREATE TRIGGER live_sources_are_never_deleted BEFORE DELETE ON live_sources
BEGIN SELECT RAISE(ABORT, 'a live source is never deleted'); END;

-- How a source is read; the latest holds.
CREATE TABLE live_source_settings (
  id              INTEGER PRIMARY KEY,
  source_id       INTEGER NOT NULL REFERENCES live_sources (id),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  resting         INTEGER NOT NULL CHECK (resting IN (0, 1)),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX live_source_settings_by_source ON live_source_settings (source_id, id);

CREATE TRIGGER live_source_settings_are_never_updated BEFORE UPDATE ON live_source_settings
BEGIN SELECT RAISE(ABORT, 'settings are never updated'); END;

CREATE TRIGGER live_source_settings_are_never_deleted BEFORE DELETE ON live_source_settings
BEGIN SELECT RAISE(ABORT, 'settings are never deleted'); END;

-- What a source asks of us to be let in. Never in a document: those are shown and hashed.
CREATE TABLE live_source_passwords (
  source_id INTEGER PRIMARY KEY REFERENCES live_sources (id),
  password  TEXT NOT NULL
) STRICT;

-- Keys of those who push scans; only the hash is kept.
CREATE TABLE sender_keys (
  id           INTEGER PRIMARY KEY,
  vessel_id    INTEGER NOT NULL REFERENCES vessels (id),
  name         TEXT NOT NULL CHECK (name <> ''),
  sha256       TEXT NOT NULL UNIQUE CHECK (length(sha256) = 64),
  at           TEXT NOT NULL,
  by           TEXT NOT NULL CHECK (by <> ''),
  revoked_at   TEXT,
  revoked_by   TEXT,
  last_used_at TEXT,
  CHECK ((revoked_at IS NULL) = (revoked_by IS NULL))
) STRICT;

CREATE INDEX sender_keys_by_vessel ON sender_keys (vessel_id, id);

CREATE TRIGGER sender_keys_are_only_revoked
BEFORE UPDATE OF id, vessel_id, name, sha256, at, by, revoked_at, revoked_by ON sender_keys
WHEN OLD.revoked_at IS NOT NULL OR NEW.id <> OLD.id OR NEW.vessel_id <> OLD.vessel_id OR NEW.name <> OLD.name
  OR NEW.sha256 <> OLD.sha256 OR NEW.at <> OLD.at OR NEW.by <> OLD.by
BEGIN SELECT RAISE(ABORT, 'a key is revoked once, and nothing else of it changes'); END;

CREATE TRIGGER sender_keys_are_never_deleted BEFORE DELETE ON sender_keys
BEGIN SELECT RAISE(ABORT, 'a key is never deleted'); END;

-- Runs that were logged as they happened. What is NULL is not so yet, and becomes a value once.
CREATE TABLE live_runs (
  run_id         INTEGER PRIMARY KEY REFERENCES runs (id),
  vessel_id      INTEGER NOT NULL REFERENCES vessels (id),
  begun_ms       REAL NOT NULL,
  -- The last arrival before it was begun, ended, closed: which scans came when is told by it.
  begun_arrival  INTEGER NOT NULL,
  -- Scans up to here count.
  ended_ms       REAL,
  ended_arrival  INTEGER,
  closed_at      TEXT,
  closed_arrival INTEGER,
  -- When the last of its live rows, merged and verified, was taken away.
  cleared_at     TEXT,
  CHECK (ended_ms >= begun_ms),
  CHECK ((ended_ms IS NULL) = (ended_arrival IS NULL)),
  CHECK ((closed_at IS NULL) = (closed_arrival IS NULL)),
  CHECK (closed_at IS NULL OR ended_ms IS NOT NULL),
  CHECK (cleared_at IS NULL OR closed_at IS NOT NULL)
) STRICT;

CREATE UNIQUE INDEX live_runs_open ON live_runs (vessel_id) WHERE closed_at IS NULL;
CREATE INDEX live_runs_not_cleared ON live_runs (run_id) WHERE cleared_at IS NULL;
CREATE INDEX live_runs_by_vessel ON live_runs (vessel_id, ended_ms);

CREATE TRIGGER live_runs_only_go_on BEFORE UPDATE ON live_runs
WHEN NEW.run_id <> OLD.run_id OR NEW.vessel_id <> OLD.vessel_id OR NEW.begun_ms <> OLD.begun_ms
  OR NEW.begun_arrival <> OLD.begun_arrival
  OR (OLD.ended_ms IS NOT NULL AND (NEW.ended_ms IS NOT OLD.ended_ms OR NEW.ended_arrival IS NOT OLD.ended_arrival))
  OR (OLD.closed_at IS NOT NULL AND (NEW.closed_at IS NOT OLD.closed_at OR NEW.closed_arrival IS NOT OLD.closed_arrival))
  OR (OLD.cleared_at IS NOT NULL AND NEW.cleared_at IS NOT OLD.cleared_at)
BEGIN SELECT RAISE(ABORT, 'a run is ended once and closed once'); END;

CREATE TRIGGER live_runs_are_never_deleted BEFORE DELETE ON live_runs
BEGIN SELECT RAISE(ABORT, 'a run is never deleted'); END;

-- Scans as they came, the last days of each source and all of a run that is open.
CREATE TABLE live_scans (
  source_id   INTEGER NOT NULL REFERENCES live_sources (id),
  time_ms     REAL NOT NULL,
  -- Rises with every scan that is kept, whatever its instant.
  arrival     INTEGER NOT NULL,
  settings_id INTEGER NOT NULL REFERENCES live_source_settings (id),
  sequence    INTEGER,
  arrived_ms  REAL NOT NULL,
  -- One binary64 a channel of the settings' document, little endian; 0x7ff8000000000000 is an absent reading.
  packed      BLOB NOT NULL,
  -- On the last scan of each commit in an open run: SHA-256 of the canonical form of all its scans known by then.
  chain       BLOB CHECK (chain IS NULL OR length(chain) = 32),
  PRIMARY KEY (source_id, time_ms)
) STRICT, WITHOUT ROWID;

CREATE TRIGGER live_scans_are_never_updated BEFORE UPDATE ON live_scans
WHEN OLD.chain IS NOT NULL OR NEW.source_id <> OLD.source_id OR NEW.time_ms <> OLD.time_ms
  OR NEW.arrival <> OLD.arrival OR NEW.settings_id <> OLD.settings_id OR NEW.sequence IS NOT OLD.sequence
  OR NEW.arrived_ms <> OLD.arrived_ms OR NEW.packed <> OLD.packed
BEGIN SELECT RAISE(ABORT, 'a scan is never updated'); END;

CREATE TRIGGER live_scans_of_an_open_run_stay BEFORE DELETE ON live_scans
WHEN EXISTS (
  SELECT 1 FROM live_sources JOIN live_runs ON live_runs.vessel_id = live_sources.vessel_id AND closed_at IS NULL
  WHERE live_sources.id = OLD.source_id AND begun_ms <= OLD.time_ms)
BEGIN SELECT RAISE(ABORT, 'scans of an open run stay'); END;

-- Arrivals are given out in portions, so that a start need not look for the last one.
CREATE TABLE live_arrivals (
  id          INTEGER PRIMARY KEY CHECK (id = 1),
  reserved_to INTEGER NOT NULL CHECK (reserved_to >= 0)
) STRICT;

INSERT INTO live_arrivals (id, reserved_to) VALUES (1, 0);

-- Sources that were bound to a run's vessel and sent nothing: their channels are the run's all the same.
CREATE TABLE silent_sources (
  run_id        INTEGER NOT NULL REFERENCES runs (id),
  n             INTEGER NOT NULL CHECK (n > 0),
  layout_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  at            TEXT NOT NULL,
  by            TEXT NOT NULL CHECK (by <> ''),
  PRIMARY KEY (run_id, n)
) STRICT, WITHOUT ROWID;

CREATE TRIGGER silent_sources_are_never_updated BEFORE UPDATE ON silent_sources
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TRIGGER silent_sources_are_never_deleted BEFORE DELETE ON silent_sources
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

-- Sources whose channels are those of an earlier one: they fill what it did not read.
CREATE TABLE source_joins (
  source_id INTEGER PRIMARY KEY REFERENCES run_sources (id),
  -- Added to the instants of its scans when it is read; what is stored keeps its own clock.
  shift_ms  REAL NOT NULL,
  because   TEXT NOT NULL CHECK (because <> '')
) STRICT;

CREATE TRIGGER source_joins_are_never_updated BEFORE UPDATE ON source_joins
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TRIGGER source_joins_are_never_deleted BEFORE DELETE ON source_joins
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;
