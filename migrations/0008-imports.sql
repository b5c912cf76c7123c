-- A file that came in: waiting for someone, recorded as a run, or set aside.
CREATE TABLE imports (
  id          INTEGER PRIMARY KEY,
  sha256      TEXT NOT NULL CHECK (length(sha256) = 64),
  bytes       INTEGER NOT NULL CHECK (bytes >= 0),
  -- NULL where the bytes are no log at all and are not kept.
  file_id     INTEGER REFERENCES files (id),
  name        TEXT NOT NULL CHECK (name <> ''),
  origin      TEXT NOT NULL CHECK (origin IN ('upload', 'watched-folder', 'command')),
  recorder_id INTEGER REFERENCES recorders (id),
  state       TEXT NOT NULL CHECK (state IN ('waiting', 'recorded', 'discarded')),
  run_id      INTEGER REFERENCES runs (id),
  -- Why it could not become a run by itself.
  refusal     TEXT CHECK (json_valid(refusal)),
  at          TEXT NOT NULL,
  by          TEXT NOT NULL CHECK (by <> ''),
  CHECK ((state = 'recorded') = (run_id IS NOT NULL)),
  CHECK (file_id IS NOT NULL OR refusal IS NOT NULL)
) STRICT;

CREATE INDEX imports_waiting ON imports (state, id);
CREATE INDEX imports_by_hash ON imports (sha256);

CREATE TRIGGER imports_are_never_deleted BEFORE DELETE ON imports
BEGIN SELECT RAISE(ABORT, 'an import is never deleted'); END;
