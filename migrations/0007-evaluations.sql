-- What people decided about suspected sensors. The latest of a run and channel holds.
CREATE TABLE sensor_decisions (
  id       INTEGER PRIMARY KEY,
  run_id   INTEGER NOT NULL REFERENCES runs (id),
  channel  TEXT NOT NULL CHECK (channel <> ''),
  decision TEXT NOT NULL CHECK (decision IN ('exclude', 'keep')),
  kind     TEXT,
  since    TEXT,
  reason   TEXT NOT NULL CHECK (reason <> ''),
  at       TEXT NOT NULL,
  by       TEXT NOT NULL CHECK (by <> ''),
  CHECK ((decision = 'exclude') = (since IS NOT NULL))
) STRICT;

CREATE INDEX sensor_decisions_by_run ON sensor_decisions (run_id, id);

CREATE TRIGGER sensor_decisions_are_never_updated BEFORE UPDATE ON sensor_decisions
BEGIN SELECT RAISE(ABORT, 'a decision is never updated'); END;

CREATE TRIGGER sensor_decisions_are_never_deleted BEFORE DELETE ON sensor_decisions
BEGIN SELECT RAISE(ABORT, 'a decision is never deleted'); END;

-- One judgement of a run, with the hash of everything it was computed from.
CREATE TABLE evaluations (
  id               INTEGER PRIMARY KEY,
  run_id           INTEGER NOT NULL REFERENCES runs (id),
  because          TEXT NOT NULL CHECK (because <> ''),
  engine           TEXT NOT NULL CHECK (engine <> ''),
  verdict          TEXT NOT NULL CHECK (verdict IN ('conforms', 'does-not-conform', 'cannot-tell', 'pending')),
  -- Channels of suspected sensors nobody had decided on.
  undecided        TEXT NOT NULL CHECK (json_valid(undecided)),
  not_met          TEXT NOT NULL CHECK (json_valid(not_met)),
  cannot_tell      TEXT NOT NULL CHECK (json_valid(cannot_tell)),
  readings_sha256  TEXT NOT NULL CHECK (length(readings_sha256) = 64),
  layout_sha256    TEXT NOT NULL CHECK (length(layout_sha256) = 64),
  load_sha256      TEXT NOT NULL REFERENCES documents (sha256),
  cycle_sha256     TEXT NOT NULL REFERENCES documents (sha256),
  resin_sha256     TEXT REFERENCES documents (sha256),
  decisions_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  sha256           TEXT NOT NULL CHECK (length(sha256) = 64),
  packed           BLOB NOT NULL,
  at               TEXT NOT NULL,
  by               TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX evaluations_by_run ON evaluations (run_id, id);

CREATE TABLE evaluation_parts (
  evaluation_id INTEGER NOT NULL REFERENCES evaluations (id),
  part_id       INTEGER NOT NULL REFERENCES parts (id),
  verdict       TEXT NOT NULL CHECK (verdict IN ('conforms', 'does-not-conform', 'cannot-tell', 'pending')),
  PRIMARY KEY (evaluation_id, part_id)
) STRICT, WITHOUT ROWID;

CREATE INDEX evaluation_parts_by_part ON evaluation_parts (part_id, evaluation_id);

CREATE TRIGGER evaluations_are_never_updated BEFORE UPDATE ON evaluations
BEGIN SELECT RAISE(ABORT, 'an evaluation is never updated'); END;

CREATE TRIGGER evaluations_are_never_deleted BEFORE DELETE ON evaluations
BEGIN SELECT RAISE(ABORT, 'an evaluation is never deleted'); END;

CREATE TRIGGER evaluation_parts_are_never_updated BEFORE UPDATE ON evaluation_parts
BEGIN SELECT RAISE(ABORT, 'an evaluation is never updated'); END;

CREATE TRIGGER evaluation_parts_are_never_deleted BEFORE DELETE ON evaluation_parts
BEGIN SELECT RAISE(ABORT, 'an evaluation is never deleted'); END;
