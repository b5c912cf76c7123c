-- Bytes as they came, known by their hash; each chunk deflated by itself.
CREATE TABLE files (
  id     INTEGER PRIMARY KEY,
  sha256 TEXT NOT NULL UNIQUE CHECK (length(sha256) = 64),
  bytes  INTEGER NOT NULL CHECK (bytes >= 0)
) STRICT;

CREATE TABLE file_chunks (
  id      INTEGER PRIMARY KEY,
  file_id INTEGER NOT NULL REFERENCES files (id),
  n       INTEGER NOT NULL CHECK (n >= 0),
  bytes   INTEGER NOT NULL CHECK (bytes > 0),
  packed  BLOB NOT NULL,
  UNIQUE (file_id, n)
) STRICT;

CREATE TRIGGER files_are_never_updated BEFORE UPDATE ON files
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;

CREATE TRIGGER file_chunks_are_never_updated BEFORE UPDATE ON file_chunks
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;

CREATE TRIGGER files_are_never_deleted BEFORE DELETE ON files
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;

CREATE TRIGGER file_chunks_are_never_deleted BEFORE DELETE ON file_chunks
BEGIN SELECT RAISE(ABORT, 'a file is kept as it came'); END;
