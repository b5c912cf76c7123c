-- Who did what, when and why. Each line carries the hash of itself and of all before it.
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

CREATE TRIGGER audit_is_never_updated BEFORE UPDATE ON audit
BEGIN SELECT RAISE(ABORT, 'the audit trail is never updated'); END;

CREATE TRIGGER audit_is_never_deleted BEFORE DELETE ON audit
BEGIN SELECT RAISE(ABORT, 'the audit trail is never deleted from'); END;

-- No line may be put in before the last: a gap or a second first line would break the chain unseen.
CREATE TRIGGER audit_grows_by_one BEFORE INSERT ON audit
WHEN NEW.n <> (SELECT coalesce(max(n), 0) + 1 FROM audit)
BEGIN SELECT RAISE(ABORT, 'the audit trail grows by one line at its end'); END;
