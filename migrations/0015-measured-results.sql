-- What a test measured, by kind of test; a wrong row is replaced by a later one that says why.
ALTER TABLE part_results ADD COLUMN kind TEXT
  CHECK (kind IN ('dsc', 'dma', 'ultrasonic', 'short-beam', 'load', 'strain'));
ALTER TABLE part_results ADD COLUMN measured TEXT CHECK (measured IS NULL OR json_valid(measured));
ALTER TABLE part_results ADD COLUMN replaces_id INTEGER REFERENCES part_results (id);
ALTER TABLE part_results ADD COLUMN reason TEXT CHECK (replaces_id IS NULL OR reason IS NOT NULL);

CREATE UNIQUE INDEX part_results_by_replaced ON part_results (replaces_id) WHERE replaces_id IS NOT NULL;

CREATE VIEW part_results_now AS
SELECT * FROM part_results AS result
WHERE NOT EXISTS (SELECT 1 FROM part_results AS later WHERE later.replaces_id = result.id);

-- What does not conform, and what a named authority decided on it, in the words of ISO 9000. The latest of a part and
-- number holds.
CREATE TABLE nonconformances (
  id         INTEGER PRIMARY KEY,
  part_id    INTEGER NOT NULL REFERENCES parts (id),
  number     TEXT NOT NULL CHECK (number <> ''),
  text       TEXT NOT NULL CHECK (text <> ''),
  decision   TEXT CHECK (decision IN ('concession', 'rework', 'repair', 'regrade', 'scrap')),
  authority  TEXT CHECK (authority <> ''),
  because    TEXT CHECK (because <> ''),
  conditions TEXT,
  decided_at TEXT,
  reason     TEXT,
  at         TEXT NOT NULL,
  by         TEXT NOT NULL CHECK (by <> ''),
  CHECK ((decision IS NULL) = (authority IS NULL) AND (decision IS NULL) = (because IS NULL)
    AND (decision IS NULL) = (decided_at IS NULL)),
  CHECK (conditions IS NULL OR decision IS NOT NULL)
) STRICT;

CREATE INDEX nonconformances_by_part ON nonconformances (part_id, number, id);

CREATE TRIGGER nonconformances_are_never_updated BEFORE UPDATE ON nonconformances
BEGIN SELECT RAISE(ABORT, 'a decision is never updated'); END;

CREATE TRIGGER nonconformances_are_never_deleted BEFORE DELETE ON nonconformances
BEGIN SELECT RAISE(ABORT, 'a decision is never deleted'); END;

-- Photographs and documents of a part or a run; their bytes are in files.
CREATE TABLE papers (
  id      INTEGER PRIMARY KEY,
  part_id INTEGER REFERENCES parts (id),
  run_id  INTEGER REFERENCES runs (id),
  file_id INTEGER NOT NULL REFERENCES files (id),
  name    TEXT NOT NULL CHECK (name <> ''),
  -- NULL where the bytes are no picture that is shown.
  picture TEXT CHECK (picture IN ('image/jpeg', 'image/png', 'image/webp', 'image/gif')),
  shows   TEXT,
  at      TEXT NOT NULL,
  by      TEXT NOT NULL CHECK (by <> ''),
  CHECK ((part_id IS NULL) <> (run_id IS NULL))
) STRICT;

CREATE INDEX papers_by_part ON papers (part_id, id) WHERE part_id IS NOT NULL;
CREATE INDEX papers_by_run ON papers (run_id, id) WHERE run_id IS NOT NULL;

CREATE TRIGGER papers_are_never_updated BEFORE UPDATE ON papers
BEGIN SELECT RAISE(ABORT, 'a paper is never updated'); END;

CREATE TRIGGER papers_are_never_deleted BEFORE DELETE ON papers
BEGIN SELECT RAISE(ABORT, 'a paper is never deleted'); END;
