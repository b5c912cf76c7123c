CREATE TABLE audit (
  n               INTEGER PRIMARY KEY CHECK (n > 0),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> ''),
  verb            TEXT NOT NULL CHECK (verb <> ''),
  subject         TEXT NOT NULL CHECK (subject <> ''),
  why             TEXT,
  details         TEXT NOT NULL CHECK (json_valid(details)),
  previous_sha256 TEXT NOT NULL CHECK (length(previous_sha256) = 64),
  sha256          TEXT NOT NULL UNIQUE CHECK (length(sha256) = 64)
) STRICT;

CREATE INDEX audit_by_subject ON audit (subject, n);

CREATE TRIGGER audit_grows_by_one BEFORE INSERT ON audit
WHEN NEW.n <> (SELECT coalesce(max(n), 0) + 1 FROM audit)
BEGIN SELECT RAISE(ABORT, 'the audit trail grows by one line at its end'); END;

CREATE TRIGGER audit_is_never_deleted BEFORE DELETE ON audit
BEGIN SELECT RAISE(ABORT, 'the audit trail is never deleted from'); END;

CREATE TRIGGER audit_is_never_updated BEFORE UPDATE ON audit
BEGIN SELECT RAISE(ABORT, 'the audit trail is never updated'); END;

CREATE TABLE batch_particulars (
  id          INTEGER PRIMARY KEY,
  batch_id    INTEGER NOT NULL REFERENCES batches (id),
  material_id INTEGER NOT NULL REFERENCES materials (id),
  made        TEXT CHECK (made IS NULL OR length(made) = 10),
  expires     TEXT CHECK (expires IS NULL OR length(expires) = 10),
  certificate TEXT,
  reason      TEXT,
  at          TEXT NOT NULL,
  by          TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX batch_particulars_by_batch ON batch_particulars (batch_id, id);

CREATE INDEX batch_particulars_by_material ON batch_particulars (material_id);

CREATE TRIGGER batch_particulars_are_never_deleted BEFORE DELETE ON batch_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of a batch is never deleted'); END;

CREATE TRIGGER batch_particulars_are_never_updated BEFORE UPDATE ON batch_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of a batch is never updated'); END;

CREATE TABLE batches (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> '')
) STRICT;

CREATE TABLE calibrations (
  id               INTEGER PRIMARY KEY,
  instrument_id    INTEGER NOT NULL REFERENCES instruments (id),
  -- Days in the workshop's zone; it holds from the first through the last of the two.
  done_on          TEXT NOT NULL CHECK (length(done_on) = 10),
  valid_from       TEXT NOT NULL CHECK (length(valid_from) = 10),
  valid_until      TEXT NOT NULL CHECK (length(valid_until) = 10),
  calibrated_by    TEXT NOT NULL CHECK (calibrated_by <> ''),
  certificate      TEXT,
  unit             TEXT NOT NULL CHECK (unit <> ''),
  -- [reading, correction] in `unit`, in rising order.
  points           TEXT NOT NULL CHECK (json_valid(points)),
  -- Expanded, k = 2, in `unit`; NULL where the certificate gives none.
  uncertainty      REAL CHECK (uncertainty > 0),
  -- Whether it was out of tolerance as it came in; NULL where nobody looked.
  found_out        INTEGER CHECK (found_out IN (0, 1)),
  -- What would have corrected it as it came in, as `points`; NULL where it was in tolerance or nobody looked.
  found_points     TEXT CHECK (found_points IS NULL OR json_valid(found_points)),
  replaces_id      INTEGER UNIQUE REFERENCES calibrations (id),
  reason           TEXT,
  at               TEXT NOT NULL,
  by               TEXT NOT NULL CHECK (by <> ''),
  CHECK (valid_from >= done_on),
  CHECK (valid_until >= valid_from),
  CHECK (found_points IS NULL OR found_out = 1),
  CHECK (found_out IS NOT 1 OR found_points IS NOT NULL),
  CHECK (replaces_id IS NULL OR reason IS NOT NULL)
) STRICT;

CREATE INDEX calibrations_by_instrument ON calibrations (instrument_id, done_on);

CREATE TRIGGER calibrations_are_never_deleted BEFORE DELETE ON calibrations
BEGIN SELECT RAISE(ABORT, 'a calibration is never deleted'); END;

CREATE TRIGGER calibrations_are_never_updated BEFORE UPDATE ON calibrations
BEGIN SELECT RAISE(ABORT, 'a calibration is never updated'); END;

CREATE VIEW calibrations_now AS
SELECT * FROM calibrations
WHERE NOT EXISTS (SELECT 1 FROM calibrations AS later WHERE later.replaces_id = calibrations.id);

CREATE TABLE coupons (
  id       INTEGER PRIMARY KEY,
  code     TEXT NOT NULL CHECK (code <> ''),
  part_id  INTEGER NOT NULL REFERENCES parts (id),
  -- The run it was cured in, where that is known already.
  run_id   INTEGER REFERENCES runs (id),
  position TEXT,
  reason   TEXT,
  at       TEXT NOT NULL,
  by       TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX coupons_by_code ON coupons (code, id);

CREATE INDEX coupons_by_part ON coupons (part_id, id);

CREATE TRIGGER coupons_are_never_deleted BEFORE DELETE ON coupons
BEGIN SELECT RAISE(ABORT, 'the record of a coupon is never deleted'); END;

CREATE TRIGGER coupons_are_never_updated BEFORE UPDATE ON coupons
BEGIN SELECT RAISE(ABORT, 'the record of a coupon is never updated'); END;

CREATE TABLE cycle_statuses (
  id       INTEGER PRIMARY KEY,
  cycle_id INTEGER NOT NULL REFERENCES cycles (id),
  status   TEXT NOT NULL CHECK (status IN ('draft', 'released', 'withdrawn')),
  reason   TEXT,
  at       TEXT NOT NULL,
  by       TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX cycle_statuses_by_cycle ON cycle_statuses (cycle_id, id);

CREATE TRIGGER cycle_statuses_are_never_deleted BEFORE DELETE ON cycle_statuses
BEGIN SELECT RAISE(ABORT, 'the history of a cycle is never deleted'); END;

CREATE TRIGGER cycle_statuses_are_never_updated BEFORE UPDATE ON cycle_statuses
BEGIN SELECT RAISE(ABORT, 'the history of a cycle is never updated'); END;

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

CREATE TRIGGER cycles_are_never_deleted BEFORE DELETE ON cycles
BEGIN SELECT RAISE(ABORT, 'a cycle is never deleted'); END;

CREATE TRIGGER released_cycles_are_frozen BEFORE UPDATE ON cycles
WHEN EXISTS (SELECT 1 FROM cycle_statuses WHERE cycle_id = OLD.id AND status <> 'draft')
BEGIN SELECT RAISE(ABORT, 'a released issue is frozen'); END;

CREATE TABLE documents (
  sha256 TEXT PRIMARY KEY CHECK (length(sha256) = 64),
  format TEXT NOT NULL CHECK (format <> ''),
  text   TEXT NOT NULL CHECK (json_valid(text))
) STRICT;

CREATE TRIGGER documents_are_never_deleted BEFORE DELETE ON documents
BEGIN SELECT RAISE(ABORT, 'a document is never deleted'); END;

CREATE TRIGGER documents_are_never_updated BEFORE UPDATE ON documents
BEGIN SELECT RAISE(ABORT, 'a document is never updated'); END;

CREATE TABLE evaluation_parts (
  evaluation_id INTEGER NOT NULL REFERENCES evaluations (id),
  part_id       INTEGER NOT NULL REFERENCES parts (id),
  verdict       TEXT NOT NULL CHECK (verdict IN ('conforms', 'does-not-conform', 'cannot-tell', 'pending')),
  PRIMARY KEY (evaluation_id, part_id)
) STRICT, WITHOUT ROWID;

CREATE INDEX evaluation_parts_by_part ON evaluation_parts (part_id, evaluation_id);

CREATE TRIGGER evaluation_parts_are_never_deleted BEFORE DELETE ON evaluation_parts
BEGIN SELECT RAISE(ABORT, 'an evaluation is never deleted'); END;

CREATE TRIGGER evaluation_parts_are_never_updated BEFORE UPDATE ON evaluation_parts
BEGIN SELECT RAISE(ABORT, 'an evaluation is never updated'); END;

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
, materials_sha256 TEXT REFERENCES documents (sha256), instruments_sha256 TEXT REFERENCES documents (sha256)) STRICT;

CREATE INDEX evaluations_by_run ON evaluations (run_id, id);

CREATE TRIGGER evaluations_are_never_deleted BEFORE DELETE ON evaluations
BEGIN SELECT RAISE(ABORT, 'an evaluation is never deleted'); END;

CREATE TRIGGER evaluations_are_never_updated BEFORE UPDATE ON evaluations
BEGIN SELECT RAISE(ABORT, 'an evaluation is never updated'); END;

CREATE TABLE file_chunks (
  id      INTEGER PRIMARY KEY,
  file_id INTEGER NOT NULL REFERENCES files (id),
  n       INTEGER NOT NULL CHECK (n >= 0),
  bytes   INTEGER NOT NULL CHECK (bytes > 0),
  packed  BLOB NOT NULL,
  UNIQUE (file_id, n)
) STRICT;

CREATE TRIGGER file_chunks_are_never_deleted BEFORE DELETE ON file_chunks
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;

CREATE TRIGGER file_chunks_are_never_updated BEFORE UPDATE ON file_chunks
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;

CREATE TABLE files (
  id     INTEGER PRIMARY KEY,
  sha256 TEXT NOT NULL UNIQUE CHECK (length(sha256) = 64),
  bytes  INTEGER NOT NULL CHECK (bytes >= 0)
) STRICT;

CREATE TRIGGER files_are_never_deleted BEFORE DELETE ON files
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;

CREATE TRIGGER files_are_never_updated BEFORE UPDATE ON files
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;

CREATE TABLE hold_list_parts (
  hold_list_id INTEGER NOT NULL REFERENCES hold_lists (id),
  part_id      INTEGER NOT NULL REFERENCES parts (id),
  PRIMARY KEY (hold_list_id, part_id)
) STRICT, WITHOUT ROWID;

CREATE INDEX hold_list_parts_by_part ON hold_list_parts (part_id, hold_list_id);

CREATE TRIGGER hold_list_parts_are_never_deleted BEFORE DELETE ON hold_list_parts
BEGIN SELECT RAISE(ABORT, 'a hold list is never deleted'); END;

CREATE TRIGGER hold_list_parts_are_never_updated BEFORE UPDATE ON hold_list_parts
BEGIN SELECT RAISE(ABORT, 'a hold list is never updated; make another'); END;

CREATE TABLE hold_lists (
  id              INTEGER PRIMARY KEY,
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  why             TEXT NOT NULL CHECK (why <> ''),
  parts           INTEGER NOT NULL CHECK (parts > 0),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE TRIGGER hold_lists_are_never_deleted BEFORE DELETE ON hold_lists
BEGIN SELECT RAISE(ABORT, 'a hold list is never deleted'); END;

CREATE TRIGGER hold_lists_are_never_updated BEFORE UPDATE ON hold_lists
BEGIN SELECT RAISE(ABORT, 'a hold list is never updated; make another'); END;

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

CREATE INDEX imports_by_hash ON imports (sha256);

CREATE INDEX imports_waiting ON imports (state, id);

CREATE TRIGGER imports_are_never_deleted BEFORE DELETE ON imports
BEGIN SELECT RAISE(ABORT, 'an import is never deleted'); END;

CREATE TABLE instrument_particulars (
  id            INTEGER PRIMARY KEY,
  instrument_id INTEGER NOT NULL REFERENCES instruments (id),
  kind          TEXT NOT NULL CHECK (kind IN ('thermocouple', 'pressure', 'vacuum')),
  type          TEXT CHECK (type IN ('K', 'J', 'T', 'N', 'E')),
  maker_number  TEXT,
  out_of_use    INTEGER NOT NULL CHECK (out_of_use IN (0, 1)),
  reason        TEXT,
  at            TEXT NOT NULL,
  by            TEXT NOT NULL CHECK (by <> ''),
  CHECK (type IS NULL OR kind = 'thermocouple')
) STRICT;

CREATE INDEX instrument_particulars_by_instrument ON instrument_particulars (instrument_id, id);

CREATE TRIGGER instrument_particulars_are_never_deleted BEFORE DELETE ON instrument_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of an instrument is never deleted'); END;

CREATE TRIGGER instrument_particulars_are_never_updated BEFORE UPDATE ON instrument_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of an instrument is never updated'); END;

CREATE TABLE instrument_places (
  id            INTEGER PRIMARY KEY,
  instrument_id INTEGER NOT NULL REFERENCES instruments (id),
  vessel_id     INTEGER REFERENCES vessels (id),
  recorder_id   INTEGER REFERENCES recorders (id),
  source_id     INTEGER REFERENCES live_sources (id),
  channel       TEXT NOT NULL CHECK (channel <> ''),
  from_ms       REAL NOT NULL,
  -- NULL while it sits there.
  until_ms      REAL,
  void          INTEGER NOT NULL DEFAULT 0 CHECK (void IN (0, 1)),
  replaces_id   INTEGER UNIQUE REFERENCES instrument_places (id),
  reason        TEXT,
  at            TEXT NOT NULL,
  by            TEXT NOT NULL CHECK (by <> ''),
  CHECK ((vessel_id IS NOT NULL) + (recorder_id IS NOT NULL) + (source_id IS NOT NULL) = 1),
  CHECK (until_ms > from_ms),
  CHECK (replaces_id IS NULL OR reason IS NOT NULL),
  CHECK (void = 0 OR replaces_id IS NOT NULL)
) STRICT;

CREATE INDEX instrument_places_by_instrument ON instrument_places (instrument_id, from_ms);

CREATE INDEX instrument_places_by_recorder ON instrument_places (recorder_id, channel) WHERE recorder_id IS NOT NULL;

CREATE INDEX instrument_places_by_source ON instrument_places (source_id, channel) WHERE source_id IS NOT NULL;

CREATE INDEX instrument_places_by_vessel ON instrument_places (vessel_id, channel) WHERE vessel_id IS NOT NULL;

CREATE TRIGGER instrument_places_are_never_deleted BEFORE DELETE ON instrument_places
BEGIN SELECT RAISE(ABORT, 'where an instrument sat is never deleted'); END;

CREATE TRIGGER instrument_places_are_never_updated BEFORE UPDATE ON instrument_places
BEGIN SELECT RAISE(ABORT, 'where an instrument sat is never updated'); END;

CREATE VIEW instrument_places_now AS
SELECT * FROM instrument_places
WHERE void = 0 AND NOT EXISTS (SELECT 1 FROM instrument_places AS later WHERE later.replaces_id = instrument_places.id);

CREATE TABLE instruments (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> '')
) STRICT;

CREATE TRIGGER instruments_are_never_deleted BEFORE DELETE ON instruments
BEGIN SELECT RAISE(ABORT, 'an instrument is never deleted'); END;

CREATE TRIGGER instruments_are_never_updated BEFORE UPDATE ON instruments
BEGIN SELECT RAISE(ABORT, 'an instrument is never updated'); END;

CREATE TABLE layup_debulks (
  layup_id    INTEGER NOT NULL REFERENCES part_layups (id),
  n           INTEGER NOT NULL CHECK (n >= 0),
  began_at    TEXT,
  minutes     REAL CHECK (minutes > 0),
  vacuum      REAL,
  vacuum_unit TEXT,
  PRIMARY KEY (layup_id, n),
  CHECK ((vacuum IS NULL) = (vacuum_unit IS NULL))
) STRICT, WITHOUT ROWID;

CREATE TRIGGER layup_debulks_are_never_deleted BEFORE DELETE ON layup_debulks
BEGIN SELECT RAISE(ABORT, 'a lay-up is never deleted'); END;

CREATE TRIGGER layup_debulks_are_never_updated BEFORE UPDATE ON layup_debulks
BEGIN SELECT RAISE(ABORT, 'a lay-up is never updated'); END;

CREATE TABLE live_arrivals (
  id          INTEGER PRIMARY KEY CHECK (id = 1),
  reserved_to INTEGER NOT NULL CHECK (reserved_to >= 0)
) STRICT;

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

CREATE INDEX live_runs_by_vessel ON live_runs (vessel_id, ended_ms);

CREATE INDEX live_runs_not_cleared ON live_runs (run_id) WHERE cleared_at IS NULL;

CREATE UNIQUE INDEX live_runs_open ON live_runs (vessel_id) WHERE closed_at IS NULL;

CREATE TRIGGER live_runs_are_never_deleted BEFORE DELETE ON live_runs
BEGIN SELECT RAISE(ABORT, 'a run is never deleted'); END;

CREATE TRIGGER live_runs_only_go_on BEFORE UPDATE ON live_runs
WHEN NEW.run_id <> OLD.run_id OR NEW.vessel_id <> OLD.vessel_id OR NEW.begun_ms <> OLD.begun_ms
  OR NEW.begun_arrival <> OLD.begun_arrival
  OR (OLD.ended_ms IS NOT NULL AND (NEW.ended_ms IS NOT OLD.ended_ms OR NEW.ended_arrival IS NOT OLD.ended_arrival))
  OR (OLD.closed_at IS NOT NULL AND (NEW.closed_at IS NOT OLD.closed_at OR NEW.closed_arrival IS NOT OLD.closed_arrival))
  OR (OLD.cleared_at IS NOT NULL AND NEW.cleared_at IS NOT OLD.cleared_at)
BEGIN SELECT RAISE(ABORT, 'a run is ended once and closed once'); END;

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

CREATE TABLE live_source_passwords (
  source_id INTEGER PRIMARY KEY REFERENCES live_sources (id),
  password  TEXT NOT NULL
) STRICT;

CREATE TABLE live_source_settings (
  id              INTEGER PRIMARY KEY,
  source_id       INTEGER NOT NULL REFERENCES live_sources (id),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  resting         INTEGER NOT NULL CHECK (resting IN (0, 1)),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX live_source_settings_by_source ON live_source_settings (source_id, id);

CREATE TRIGGER live_source_settings_are_never_deleted BEFORE DELETE ON live_source_settings
BEGIN SELECT RAISE(ABORT, 'settings are never deleted'); END;

CREATE TRIGGER live_source_settings_are_never_updated BEFORE UPDATE ON live_source_settings
BEGIN SELECT RAISE(ABORT, 'settings are never updated'); END;

CREATE TABLE live_sources (
  id        INTEGER PRIMARY KEY,
  name      TEXT NOT NULL UNIQUE CHECK (name <> ''),
  vessel_id INTEGER NOT NULL REFERENCES vessels (id),
  at        TEXT NOT NULL,
  by        TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX live_sources_by_vessel ON live_sources (vessel_id, id);

CREATE TRIGGER live_sources_are_never_deleted BEFORE DELETE ON live_sources
BEGIN SELECT RAISE(ABORT, 'a live source is never deleted'); END;

CREATE TRIGGER live_sources_are_never_updated BEFORE UPDATE ON live_sources
BEGIN SELECT RAISE(ABORT, 'a live source is never updated'); END;

CREATE TABLE load_parts (
  load_id  INTEGER NOT NULL REFERENCES loads (id),
  part_id  INTEGER NOT NULL REFERENCES parts (id),
  n        INTEGER NOT NULL CHECK (n >= 0),
  quantity INTEGER NOT NULL CHECK (quantity > 0),
  PRIMARY KEY (load_id, part_id)
) STRICT, WITHOUT ROWID;

CREATE INDEX load_parts_by_part ON load_parts (part_id, load_id);

CREATE TRIGGER load_parts_are_never_deleted BEFORE DELETE ON load_parts
BEGIN SELECT RAISE(ABORT, 'a load is never deleted'); END;

CREATE TRIGGER load_parts_are_never_updated BEFORE UPDATE ON load_parts
BEGIN SELECT RAISE(ABORT, 'a load is never updated'); END;

CREATE TABLE load_places (
  load_id INTEGER NOT NULL REFERENCES loads (id),
  kind    TEXT NOT NULL CHECK (kind IN ('bag-line', 'thermocouple')),
  channel TEXT NOT NULL CHECK (channel <> ''),
  part_id INTEGER NOT NULL REFERENCES parts (id),
  PRIMARY KEY (load_id, kind, channel, part_id)
) STRICT, WITHOUT ROWID;

CREATE TRIGGER load_places_are_never_deleted BEFORE DELETE ON load_places
BEGIN SELECT RAISE(ABORT, 'a load is never deleted'); END;

CREATE TRIGGER load_places_are_never_updated BEFORE UPDATE ON load_places
BEGIN SELECT RAISE(ABORT, 'a load is never updated'); END;

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

CREATE INDEX loads_by_cycle ON loads (cycle_id);

CREATE INDEX loads_by_person ON loads (by);

CREATE INDEX loads_by_run ON loads (run_id, id);

CREATE INDEX loads_by_work_order ON loads (work_order);

CREATE TRIGGER loads_are_never_deleted BEFORE DELETE ON loads
BEGIN SELECT RAISE(ABORT, 'a load is never deleted'); END;

CREATE TRIGGER loads_are_never_updated BEFORE UPDATE ON loads
BEGIN SELECT RAISE(ABORT, 'a load is never updated'); END;

CREATE TABLE material_events (
  id          INTEGER PRIMARY KEY,
  item_id     INTEGER NOT NULL REFERENCES material_items (id),
  kind        TEXT NOT NULL CHECK (kind IN ('received', 'cut', 'out', 'in', 'room', 'thawed', 'opened', 'excursion',
                'extended', 'scrapped', 'void')),
  happened_at TEXT NOT NULL,
  -- Of `received`.
  batch_id    INTEGER REFERENCES batches (id),
  -- Of `cut`: what it was cut from.
  parent_id   INTEGER REFERENCES material_items (id),
  length_m    REAL CHECK (length_m > 0),
  -- The line as models/material reads it.
  line        TEXT NOT NULL CHECK (json_valid(line)),
  replaces_id INTEGER UNIQUE REFERENCES material_events (id),
  reason      TEXT,
  at          TEXT NOT NULL,
  by          TEXT NOT NULL CHECK (by <> ''),
  CHECK ((kind = 'received') = (batch_id IS NOT NULL)),
  CHECK ((kind = 'cut') = (parent_id IS NOT NULL)),
  CHECK (parent_id IS NOT item_id),
  CHECK (replaces_id IS NULL OR reason IS NOT NULL),
  CHECK (kind <> 'void' OR replaces_id IS NOT NULL)
) STRICT;

CREATE INDEX material_events_by_batch ON material_events (batch_id) WHERE batch_id IS NOT NULL;

CREATE INDEX material_events_by_item ON material_events (item_id, id);

CREATE INDEX material_events_by_parent ON material_events (parent_id) WHERE parent_id IS NOT NULL;

CREATE TRIGGER material_events_are_never_deleted BEFORE DELETE ON material_events
BEGIN SELECT RAISE(ABORT, 'a line of the out-life ledger is never deleted'); END;

CREATE TRIGGER material_events_are_never_updated BEFORE UPDATE ON material_events
BEGIN SELECT RAISE(ABORT, 'a line of the out-life ledger is never updated'); END;

CREATE VIEW material_events_now AS
SELECT * FROM material_events
WHERE kind <> 'void' AND NOT EXISTS (SELECT 1 FROM material_events AS later WHERE later.replaces_id = material_events.id);

CREATE TABLE material_items (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> ''),
  kind TEXT NOT NULL CHECK (kind IN ('roll', 'kit'))
) STRICT;

CREATE TRIGGER material_items_are_never_deleted BEFORE DELETE ON material_items
BEGIN SELECT RAISE(ABORT, 'a roll or kit is never deleted'); END;

CREATE TRIGGER material_items_are_never_updated BEFORE UPDATE ON material_items
BEGIN SELECT RAISE(ABORT, 'a roll or kit is never updated'); END;

CREATE TABLE materials (
  id              INTEGER PRIMARY KEY,
  code            TEXT NOT NULL CHECK (code <> ''),
  issue           TEXT NOT NULL CHECK (issue <> ''),
  name            TEXT NOT NULL CHECK (name <> ''),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> ''),
  UNIQUE (code, issue)
) STRICT;

CREATE TRIGGER materials_are_never_deleted BEFORE DELETE ON materials
BEGIN SELECT RAISE(ABORT, 'an issue of a material is never deleted'); END;

CREATE TRIGGER materials_are_never_updated BEFORE UPDATE ON materials
BEGIN SELECT RAISE(ABORT, 'an issue of a material is never updated'); END;

CREATE TABLE migrations (
  name   TEXT PRIMARY KEY,
  sha256 TEXT NOT NULL CHECK (length(sha256) = 64),
  at     TEXT NOT NULL
) STRICT;

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

CREATE TRIGGER nonconformances_are_never_deleted BEFORE DELETE ON nonconformances
BEGIN SELECT RAISE(ABORT, 'a decision is never deleted'); END;

CREATE TRIGGER nonconformances_are_never_updated BEFORE UPDATE ON nonconformances
BEGIN SELECT RAISE(ABORT, 'a decision is never updated'); END;

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

CREATE TRIGGER papers_are_never_deleted BEFORE DELETE ON papers
BEGIN SELECT RAISE(ABORT, 'a paper is never deleted'); END;

CREATE TRIGGER papers_are_never_updated BEFORE UPDATE ON papers
BEGIN SELECT RAISE(ABORT, 'a paper is never updated'); END;

CREATE TABLE part_layups (
  id                     INTEGER PRIMARY KEY,
  part_id                INTEGER NOT NULL REFERENCES parts (id),
  tool_id                INTEGER REFERENCES tools (id),
  work_order             TEXT,
  customer               TEXT,
  -- Of the cured part.
  thickness_mm           REAL CHECK (thickness_mm > 0),
  plies                  INTEGER CHECK (plies > 0),
  -- By volume.
  fibre_fraction         REAL CHECK (fibre_fraction > 0 AND fibre_fraction < 1),
  laminate               TEXT,
  density_kg_m3          REAL CHECK (density_kg_m3 > 0),
  specific_heat_j_kg_k   REAL CHECK (specific_heat_j_kg_k > 0),
  -- Across the thickness.
  conductivity_w_m_k     REAL CHECK (conductivity_w_m_k > 0),
  resin_density_kg_m3    REAL CHECK (resin_density_kg_m3 > 0),
  source                 TEXT,
  began_at               TEXT,
  ended_at               TEXT,
  room_c                 REAL,
  humidity_percent       REAL CHECK (humidity_percent BETWEEN 0 AND 100),
  reason                 TEXT,
  at                     TEXT NOT NULL,
  by                     TEXT NOT NULL CHECK (by <> ''),
  CHECK ((laminate IS NULL) = (density_kg_m3 IS NULL) AND (laminate IS NULL) = (specific_heat_j_kg_k IS NULL)
    AND (laminate IS NULL) = (conductivity_w_m_k IS NULL) AND (laminate IS NULL) = (source IS NULL))
) STRICT;

CREATE INDEX part_layups_by_part ON part_layups (part_id, id);

CREATE INDEX part_layups_by_tool ON part_layups (tool_id, id);

CREATE INDEX part_layups_by_work_order ON part_layups (work_order);

CREATE TRIGGER part_layups_are_never_deleted BEFORE DELETE ON part_layups
BEGIN SELECT RAISE(ABORT, 'a lay-up is never deleted'); END;

CREATE TRIGGER part_layups_are_never_updated BEFORE UPDATE ON part_layups
BEGIN SELECT RAISE(ABORT, 'a lay-up is never updated'); END;

CREATE TABLE part_material_sets (
  id      INTEGER PRIMARY KEY,
  part_id INTEGER NOT NULL REFERENCES parts (id),
  reason  TEXT,
  at      TEXT NOT NULL,
  by      TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX part_material_sets_by_part ON part_material_sets (part_id, id);

CREATE TRIGGER part_material_sets_are_never_deleted BEFORE DELETE ON part_material_sets
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never deleted'); END;

CREATE TRIGGER part_material_sets_are_never_updated BEFORE UPDATE ON part_material_sets
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never updated'); END;

CREATE TABLE part_materials (
  set_id     INTEGER NOT NULL REFERENCES part_material_sets (id),
  n          INTEGER NOT NULL CHECK (n >= 0),
  part_id    INTEGER NOT NULL REFERENCES parts (id),
  item_id    INTEGER NOT NULL REFERENCES material_items (id),
  plies      INTEGER CHECK (plies > 0),
  laid_from  TEXT,
  laid_until TEXT,
  PRIMARY KEY (set_id, n),
  CHECK (laid_until IS NULL OR laid_from IS NOT NULL)
) STRICT, WITHOUT ROWID;

CREATE INDEX part_materials_by_item ON part_materials (item_id, part_id);

CREATE INDEX part_materials_by_part ON part_materials (part_id, set_id);

CREATE TRIGGER part_materials_are_never_deleted BEFORE DELETE ON part_materials
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never deleted'); END;

CREATE TRIGGER part_materials_are_never_updated BEFORE UPDATE ON part_materials
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never updated'); END;

CREATE VIEW part_materials_now AS
SELECT part_materials.* FROM part_materials
WHERE set_id = (SELECT max(id) FROM part_material_sets WHERE part_material_sets.part_id = part_materials.part_id);

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

CREATE INDEX part_particulars_by_drawing ON part_particulars (drawing);

CREATE INDEX part_particulars_by_part ON part_particulars (part_id, id);

CREATE INDEX part_particulars_by_tool ON part_particulars (tool);

CREATE TRIGGER part_particulars_are_never_deleted BEFORE DELETE ON part_particulars
BEGIN SELECT RAISE(ABORT, 'particulars are never deleted'); END;

CREATE TRIGGER part_particulars_are_never_updated BEFORE UPDATE ON part_particulars
BEGIN SELECT RAISE(ABORT, 'particulars are never updated'); END;

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
  by        TEXT NOT NULL CHECK (by <> ''), kind TEXT
  CHECK (kind IN ('dsc', 'dma', 'ultrasonic', 'short-beam', 'load', 'strain')), measured TEXT CHECK (measured IS NULL OR json_valid(measured)), replaces_id INTEGER REFERENCES part_results (id), reason TEXT CHECK (replaces_id IS NULL OR reason IS NOT NULL),
  CHECK (figure IS NULL OR unit IS NOT NULL)
) STRICT;

CREATE INDEX part_results_by_part ON part_results (part_id, id);

CREATE UNIQUE INDEX part_results_by_replaced ON part_results (replaces_id) WHERE replaces_id IS NOT NULL;

CREATE TRIGGER part_results_are_never_deleted BEFORE DELETE ON part_results
BEGIN SELECT RAISE(ABORT, 'a test result is never deleted'); END;

CREATE TRIGGER part_results_are_never_updated BEFORE UPDATE ON part_results
BEGIN SELECT RAISE(ABORT, 'a test result is never updated'); END;

CREATE VIEW part_results_now AS
SELECT * FROM part_results AS result
WHERE NOT EXISTS (SELECT 1 FROM part_results AS later WHERE later.replaces_id = result.id);

CREATE TABLE part_whereabouts (
  id       INTEGER PRIMARY KEY,
  part_id  INTEGER NOT NULL REFERENCES parts (id),
  place    TEXT NOT NULL CHECK (place IN ('in-shop', 'shipped')),
  customer TEXT,
  since    TEXT NOT NULL CHECK (length(since) = 10),
  text     TEXT,
  at       TEXT NOT NULL,
  by       TEXT NOT NULL CHECK (by <> ''),
  CHECK ((place = 'shipped') = (customer IS NOT NULL))
) STRICT;

CREATE INDEX part_whereabouts_by_part ON part_whereabouts (part_id, id);

CREATE TRIGGER part_whereabouts_are_never_deleted BEFORE DELETE ON part_whereabouts
BEGIN SELECT RAISE(ABORT, 'where a part was is never deleted'); END;

CREATE TRIGGER part_whereabouts_are_never_updated BEFORE UPDATE ON part_whereabouts
BEGIN SELECT RAISE(ABORT, 'where a part was is never updated'); END;

CREATE TABLE part_works (
  id          INTEGER PRIMARY KEY,
  part_id     INTEGER NOT NULL REFERENCES parts (id),
  replaces_id INTEGER UNIQUE REFERENCES part_works (id),
  work        TEXT NOT NULL CHECK (work IN ('trimming', 'drilling', 'other')),
  text        TEXT NOT NULL CHECK (text <> ''),
  done_at     TEXT NOT NULL,
  reason      TEXT,
  at          TEXT NOT NULL,
  by          TEXT NOT NULL CHECK (by <> ''),
  CHECK (replaces_id IS NULL OR reason IS NOT NULL)
) STRICT;

CREATE INDEX part_works_by_part ON part_works (part_id, id);

CREATE TRIGGER part_works_are_never_deleted BEFORE DELETE ON part_works
BEGIN SELECT RAISE(ABORT, 'work on a part is never deleted'); END;

CREATE TRIGGER part_works_are_never_updated BEFORE UPDATE ON part_works
BEGIN SELECT RAISE(ABORT, 'work on a part is never updated'); END;

CREATE TABLE parts (
  id     INTEGER PRIMARY KEY,
  serial TEXT NOT NULL UNIQUE CHECK (serial <> '')
) STRICT;

CREATE TABLE reading_blocks (
  id         INTEGER PRIMARY KEY,
  source_id  INTEGER NOT NULL REFERENCES run_sources (id),
  column_n   INTEGER NOT NULL CHECK (column_n >= 0),
  first_scan INTEGER NOT NULL CHECK (first_scan >= 0),
  scans      INTEGER NOT NULL CHECK (scans > 0),
  packed     BLOB NOT NULL,
  UNIQUE (source_id, column_n, first_scan)
) STRICT;

CREATE TRIGGER reading_blocks_are_never_deleted BEFORE DELETE ON reading_blocks
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TRIGGER reading_blocks_are_never_updated BEFORE UPDATE ON reading_blocks
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TABLE recorder_layouts (
  id              INTEGER PRIMARY KEY,
  recorder_id     INTEGER NOT NULL REFERENCES recorders (id),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX recorder_layouts_by_recorder ON recorder_layouts (recorder_id, id);

CREATE TRIGGER recorder_layouts_are_never_deleted BEFORE DELETE ON recorder_layouts
BEGIN SELECT RAISE(ABORT, 'a kept layout is never deleted'); END;

CREATE TRIGGER recorder_layouts_are_never_updated BEFORE UPDATE ON recorder_layouts
BEGIN SELECT RAISE(ABORT, 'a kept layout is never updated'); END;

CREATE TABLE recorders (
  id        INTEGER PRIMARY KEY,
  name      TEXT NOT NULL UNIQUE CHECK (name <> ''),
  vessel_id INTEGER REFERENCES vessels (id)
) STRICT;

CREATE TABLE resins (
  id              INTEGER PRIMARY KEY,
  code            TEXT NOT NULL UNIQUE CHECK (code <> ''),
  name            TEXT NOT NULL,
  status          TEXT NOT NULL CHECK (status IN ('published', 'recalled', 'fitted', 'illustrative')),
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE TRIGGER resins_are_never_deleted BEFORE DELETE ON resins
BEGIN SELECT RAISE(ABORT, 'a resin set is never deleted'); END;

CREATE TRIGGER resins_are_never_updated BEFORE UPDATE ON resins
BEGIN SELECT RAISE(ABORT, 'a resin set is never updated'); END;

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

CREATE TRIGGER run_notes_are_never_deleted BEFORE DELETE ON run_notes
BEGIN SELECT RAISE(ABORT, 'a note is never deleted'); END;

CREATE TRIGGER run_notes_are_never_updated BEFORE UPDATE ON run_notes
BEGIN SELECT RAISE(ABORT, 'a note is never updated'); END;

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

CREATE TRIGGER run_sources_are_never_deleted BEFORE DELETE ON run_sources
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TRIGGER run_sources_are_never_updated BEFORE UPDATE ON run_sources
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

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

CREATE TRIGGER sender_keys_are_never_deleted BEFORE DELETE ON sender_keys
BEGIN SELECT RAISE(ABORT, 'a key is never deleted'); END;

CREATE TRIGGER sender_keys_are_only_revoked
BEFORE UPDATE OF id, vessel_id, name, sha256, at, by, revoked_at, revoked_by ON sender_keys
WHEN OLD.revoked_at IS NOT NULL OR NEW.id <> OLD.id OR NEW.vessel_id <> OLD.vessel_id OR NEW.name <> OLD.name
  OR NEW.sha256 <> OLD.sha256 OR NEW.at <> OLD.at OR NEW.by <> OLD.by
BEGIN SELECT RAISE(ABORT, 'a key is revoked once, and nothing else of it changes'); END;

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

CREATE TRIGGER sensor_decisions_are_never_deleted BEFORE DELETE ON sensor_decisions
BEGIN SELECT RAISE(ABORT, 'a decision is never deleted'); END;

CREATE TRIGGER sensor_decisions_are_never_updated BEFORE UPDATE ON sensor_decisions
BEGIN SELECT RAISE(ABORT, 'a decision is never updated'); END;

CREATE TABLE silent_sources (
  run_id        INTEGER NOT NULL REFERENCES runs (id),
  n             INTEGER NOT NULL CHECK (n > 0),
  layout_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  at            TEXT NOT NULL,
  by            TEXT NOT NULL CHECK (by <> ''),
  PRIMARY KEY (run_id, n)
) STRICT, WITHOUT ROWID;

CREATE TRIGGER silent_sources_are_never_deleted BEFORE DELETE ON silent_sources
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TRIGGER silent_sources_are_never_updated BEFORE UPDATE ON silent_sources
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TABLE source_files (
  source_id INTEGER NOT NULL REFERENCES run_sources (id),
  n         INTEGER NOT NULL CHECK (n >= 0),
  file_id   INTEGER NOT NULL REFERENCES files (id),
  name      TEXT NOT NULL CHECK (name <> ''),
  PRIMARY KEY (source_id, n)
) STRICT, WITHOUT ROWID;

CREATE INDEX source_files_by_file ON source_files (file_id);

CREATE INDEX source_files_by_name ON source_files (name);

CREATE TRIGGER source_files_are_never_deleted BEFORE DELETE ON source_files
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TRIGGER source_files_are_never_updated BEFORE UPDATE ON source_files
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TABLE source_joins (
  source_id INTEGER PRIMARY KEY REFERENCES run_sources (id),
  -- Added to the instants of its scans when it is read; what is stored keeps its own clock.
  shift_ms  REAL NOT NULL,
  because   TEXT NOT NULL CHECK (because <> '')
) STRICT;

CREATE TRIGGER source_joins_are_never_deleted BEFORE DELETE ON source_joins
BEGIN SELECT RAISE(ABORT, 'readings are never deleted'); END;

CREATE TRIGGER source_joins_are_never_updated BEFORE UPDATE ON source_joins
BEGIN SELECT RAISE(ABORT, 'readings are never updated'); END;

CREATE TABLE tool_records (
  id                    INTEGER PRIMARY KEY,
  tool_id               INTEGER NOT NULL REFERENCES tools (id),
  title                 TEXT,
  drawing               TEXT,
  -- Under the part.
  thickness_mm          REAL CHECK (thickness_mm > 0),
  material              TEXT,
  density_kg_m3         REAL CHECK (density_kg_m3 > 0),
  specific_heat_j_kg_k  REAL CHECK (specific_heat_j_kg_k > 0),
  conductivity_w_m_k    REAL CHECK (conductivity_w_m_k > 0),
  -- Where the figures of the material come from.
  source                TEXT,
  reason                TEXT,
  at                    TEXT NOT NULL,
  by                    TEXT NOT NULL CHECK (by <> ''),
  CHECK ((material IS NULL) = (density_kg_m3 IS NULL) AND (material IS NULL) = (specific_heat_j_kg_k IS NULL)
    AND (material IS NULL) = (conductivity_w_m_k IS NULL) AND (material IS NULL) = (source IS NULL))
) STRICT;

CREATE INDEX tool_records_by_tool ON tool_records (tool_id, id);

CREATE TRIGGER tool_records_are_never_deleted BEFORE DELETE ON tool_records
BEGIN SELECT RAISE(ABORT, 'the record of a tool is never deleted'); END;

CREATE TRIGGER tool_records_are_never_updated BEFORE UPDATE ON tool_records
BEGIN SELECT RAISE(ABORT, 'the record of a tool is never updated'); END;

CREATE TABLE tools (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> '')
) STRICT;

CREATE TABLE vessel_accuracy_tests (
  id          INTEGER PRIMARY KEY,
  vessel_id   INTEGER NOT NULL REFERENCES vessels (id),
  done_on     TEXT NOT NULL CHECK (length(done_on) = 10),
  valid_until TEXT NOT NULL CHECK (length(valid_until) = 10),
  channel     TEXT,
  unit        TEXT NOT NULL CHECK (unit IN ('°C', '°F')),
  -- Vessel's sensor less test sensor, in `unit`, at a temperature.
  difference  REAL NOT NULL,
  temperature REAL,
  certificate TEXT,
  replaces_id INTEGER UNIQUE REFERENCES vessel_accuracy_tests (id),
  reason      TEXT,
  at          TEXT NOT NULL,
  by          TEXT NOT NULL CHECK (by <> ''),
  CHECK (valid_until >= done_on),
  CHECK (replaces_id IS NULL OR reason IS NOT NULL)
) STRICT;

CREATE INDEX vessel_accuracy_tests_by_vessel ON vessel_accuracy_tests (vessel_id, done_on);

CREATE TRIGGER vessel_accuracy_tests_are_never_deleted BEFORE DELETE ON vessel_accuracy_tests
BEGIN SELECT RAISE(ABORT, 'an accuracy test is never deleted'); END;

CREATE TRIGGER vessel_accuracy_tests_are_never_updated BEFORE UPDATE ON vessel_accuracy_tests
BEGIN SELECT RAISE(ABORT, 'an accuracy test is never updated'); END;

CREATE TABLE vessel_ranges (
  id        INTEGER PRIMARY KEY,
  vessel_id INTEGER NOT NULL REFERENCES vessels (id),
  unit      TEXT NOT NULL CHECK (unit IN ('°C', '°F')),
  lowest    REAL NOT NULL,
  highest   REAL NOT NULL,
  document  TEXT NOT NULL CHECK (document <> ''),
  reason    TEXT,
  at        TEXT NOT NULL,
  by        TEXT NOT NULL CHECK (by <> ''),
  CHECK (highest > lowest)
) STRICT;

CREATE INDEX vessel_ranges_by_vessel ON vessel_ranges (vessel_id, id);

CREATE TRIGGER vessel_ranges_are_never_deleted BEFORE DELETE ON vessel_ranges
BEGIN SELECT RAISE(ABORT, 'a qualified range is never deleted'); END;

CREATE TRIGGER vessel_ranges_are_never_updated BEFORE UPDATE ON vessel_ranges
BEGIN SELECT RAISE(ABORT, 'a qualified range is never updated'); END;

CREATE TABLE vessel_surveys (
  id          INTEGER PRIMARY KEY,
  vessel_id   INTEGER NOT NULL REFERENCES vessels (id),
  done_on     TEXT NOT NULL CHECK (length(done_on) = 10),
  valid_until TEXT NOT NULL CHECK (length(valid_until) = 10),
  zone        TEXT NOT NULL CHECK (zone <> ''),
  unit        TEXT NOT NULL CHECK (unit IN ('°C', '°F')),
  -- The range of temperature it was surveyed over, and the greatest departure from the setpoint found, in `unit`.
  lowest      REAL NOT NULL,
  highest     REAL NOT NULL,
  uniformity  REAL NOT NULL CHECK (uniformity >= 0),
  certificate TEXT,
  replaces_id INTEGER UNIQUE REFERENCES vessel_surveys (id),
  reason      TEXT,
  at          TEXT NOT NULL,
  by          TEXT NOT NULL CHECK (by <> ''),
  CHECK (valid_until >= done_on),
  CHECK (highest >= lowest),
  CHECK (replaces_id IS NULL OR reason IS NOT NULL)
) STRICT;

CREATE INDEX vessel_surveys_by_vessel ON vessel_surveys (vessel_id, done_on);

CREATE TRIGGER vessel_surveys_are_never_deleted BEFORE DELETE ON vessel_surveys
BEGIN SELECT RAISE(ABORT, 'a survey is never deleted'); END;

CREATE TRIGGER vessel_surveys_are_never_updated BEFORE UPDATE ON vessel_surveys
BEGIN SELECT RAISE(ABORT, 'a survey is never updated'); END;

CREATE TABLE vessels (
  id   INTEGER PRIMARY KEY,
  name TEXT NOT NULL UNIQUE CHECK (name <> ''),
  kind TEXT NOT NULL CHECK (kind IN ('autoclave', 'oven', 'press', 'heated-tool', 'heat-blanket'))
) STRICT;

CREATE TABLE warning_acknowledgements (
  id         INTEGER PRIMARY KEY,
  warning_id INTEGER NOT NULL UNIQUE REFERENCES warnings (id),
  text       TEXT,
  at         TEXT NOT NULL,
  by         TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE TRIGGER warning_acknowledgements_are_never_deleted BEFORE DELETE ON warning_acknowledgements
BEGIN SELECT RAISE(ABORT, 'an acknowledgement is never deleted'); END;

CREATE TRIGGER warning_acknowledgements_are_never_updated BEFORE UPDATE ON warning_acknowledgements
BEGIN SELECT RAISE(ABORT, 'an acknowledgement is never updated'); END;

CREATE TABLE warning_mail_passwords (
  id       INTEGER PRIMARY KEY CHECK (id = 1),
  password TEXT NOT NULL
) STRICT;

CREATE TABLE warning_routes (
  id      INTEGER PRIMARY KEY,
  routes  TEXT NOT NULL CHECK (json_valid(routes)),
  at      TEXT NOT NULL,
  by      TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE TRIGGER warning_routes_are_never_deleted BEFORE DELETE ON warning_routes
BEGIN SELECT RAISE(ABORT, 'where warnings were told is never deleted'); END;

CREATE TRIGGER warning_routes_are_never_updated BEFORE UPDATE ON warning_routes
BEGIN SELECT RAISE(ABORT, 'where warnings were told is never updated'); END;

CREATE TABLE warnings (
  id        INTEGER PRIMARY KEY,
  kind      TEXT NOT NULL CHECK (kind IN ('approaching-limit', 'limit-broken', 'sensor-fault', 'source-silent',
              'disk-low', 'cannot-be-kept', 'clock-jumped', 'program-restarted', 'damaged')),
  vessel_id INTEGER REFERENCES vessels (id),
  run_id    INTEGER REFERENCES runs (id),
  -- A limit's name, a channel, a source.
  subject   TEXT NOT NULL,
  text      TEXT NOT NULL CHECK (text <> ''),
  began     TEXT NOT NULL,
  over      TEXT
) STRICT;

CREATE INDEX warnings_by_over ON warnings (over, id);

CREATE INDEX warnings_by_run ON warnings (run_id, id);

CREATE TRIGGER warnings_are_never_deleted BEFORE DELETE ON warnings
BEGIN SELECT RAISE(ABORT, 'a warning is never deleted'); END;

CREATE TRIGGER warnings_only_end BEFORE UPDATE ON warnings
WHEN OLD.over IS NOT NULL OR NEW.id <> OLD.id OR NEW.kind <> OLD.kind OR NEW.vessel_id IS NOT OLD.vessel_id
  OR NEW.run_id IS NOT OLD.run_id OR NEW.subject <> OLD.subject OR NEW.text <> OLD.text OR NEW.began <> OLD.began
BEGIN SELECT RAISE(ABORT, 'of a warning only its end is written'); END;

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
