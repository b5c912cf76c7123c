-- Thermocouples, pressure and vacuum instruments, by the code that stands on them.
CREATE TABLE instruments (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> '')
) STRICT;

CREATE TRIGGER instruments_are_never_updated BEFORE UPDATE ON instruments
BEGIN SELECT RAISE(ABORT, 'an instrument is never updated'); END;

CREATE TRIGGER instruments_are_never_deleted BEFORE DELETE ON instruments
BEGIN SELECT RAISE(ABORT, 'an instrument is never deleted'); END;

-- What is known of an instrument. The latest of an instrument holds.
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

CREATE TRIGGER instrument_particulars_are_never_updated BEFORE UPDATE ON instrument_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of an instrument is never updated'); END;

CREATE TRIGGER instrument_particulars_are_never_deleted BEFORE DELETE ON instrument_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of an instrument is never deleted'); END;

-- A calibration. A wrong one is replaced by a later row that says why.
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

CREATE TRIGGER calibrations_are_never_updated BEFORE UPDATE ON calibrations
BEGIN SELECT RAISE(ABORT, 'a calibration is never updated'); END;

CREATE TRIGGER calibrations_are_never_deleted BEFORE DELETE ON calibrations
BEGIN SELECT RAISE(ABORT, 'a calibration is never deleted'); END;

CREATE VIEW calibrations_now AS
SELECT * FROM calibrations
WHERE NOT EXISTS (SELECT 1 FROM calibrations AS later WHERE later.replaces_id = calibrations.id);

-- Which instrument a channel of a vessel, a recorder or a live source was read by, and from when to when. A row that no
-- longer holds, or never did, is replaced by a later one; `void` replaces it by nothing.
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
CREATE INDEX instrument_places_by_vessel ON instrument_places (vessel_id, channel) WHERE vessel_id IS NOT NULL;
CREATE INDEX instrument_places_by_recorder ON instrument_places (recorder_id, channel) WHERE recorder_id IS NOT NULL;
CREATE INDEX instrument_places_by_source ON instrument_places (source_id, channel) WHERE source_id IS NOT NULL;

CREATE TRIGGER instrument_places_are_never_updated BEFORE UPDATE ON instrument_places
BEGIN SELECT RAISE(ABORT, 'where an instrument sat is never updated'); END;

CREATE TRIGGER instrument_places_are_never_deleted BEFORE DELETE ON instrument_places
BEGIN SELECT RAISE(ABORT, 'where an instrument sat is never deleted'); END;

CREATE VIEW instrument_places_now AS
SELECT * FROM instrument_places
WHERE void = 0 AND NOT EXISTS (SELECT 1 FROM instrument_places AS later WHERE later.replaces_id = instrument_places.id);

-- How evenly a vessel heats: a uniformity survey of its working zone.
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

CREATE TRIGGER vessel_surveys_are_never_updated BEFORE UPDATE ON vessel_surveys
BEGIN SELECT RAISE(ABORT, 'a survey is never updated'); END;

CREATE TRIGGER vessel_surveys_are_never_deleted BEFORE DELETE ON vessel_surveys
BEGIN SELECT RAISE(ABORT, 'a survey is never deleted'); END;

-- A system accuracy test: a test sensor beside the vessel's own, and how far the two differed.
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

CREATE TRIGGER vessel_accuracy_tests_are_never_updated BEFORE UPDATE ON vessel_accuracy_tests
BEGIN SELECT RAISE(ABORT, 'an accuracy test is never updated'); END;

CREATE TRIGGER vessel_accuracy_tests_are_never_deleted BEFORE DELETE ON vessel_accuracy_tests
BEGIN SELECT RAISE(ABORT, 'an accuracy test is never deleted'); END;

-- The temperatures a vessel may be used at, and by which document. The latest of a vessel holds.
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

CREATE TRIGGER vessel_ranges_are_never_updated BEFORE UPDATE ON vessel_ranges
BEGIN SELECT RAISE(ABORT, 'a qualified range is never updated'); END;

CREATE TRIGGER vessel_ranges_are_never_deleted BEFORE DELETE ON vessel_ranges
BEGIN SELECT RAISE(ABORT, 'a qualified range is never deleted'); END;

-- Records of instruments a judgement rested on; NULL where none were known, and before there were any.
ALTER TABLE evaluations ADD COLUMN instruments_sha256 TEXT REFERENCES documents (sha256);
