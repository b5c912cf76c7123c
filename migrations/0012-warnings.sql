-- Something a person should know. It begins, lasts, and is over; nothing of it is taken back.
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

-- Where warnings are told besides the screen. The latest row holds.
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

-- Let in by the mail server; not part of what is shown.
CREATE TABLE warning_mail_passwords (
  id       INTEGER PRIMARY KEY CHECK (id = 1),
  password TEXT NOT NULL
) STRICT;
