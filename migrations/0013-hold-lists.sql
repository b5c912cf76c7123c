-- The bag line a part hung on and the thermocouples on it, as its load says: what kinship is looked up by.
CREATE TABLE load_places (
  load_id INTEGER NOT NULL REFERENCES loads (id),
  kind    TEXT NOT NULL CHECK (kind IN ('bag-line', 'thermocouple')),
  channel TEXT NOT NULL CHECK (channel <> ''),
  part_id INTEGER NOT NULL REFERENCES parts (id),
  PRIMARY KEY (load_id, kind, channel, part_id)
) STRICT, WITHOUT ROWID;

INSERT OR IGNORE INTO load_places (load_id, kind, channel, part_id)
SELECT loads.id, 'bag-line', json_extract(named.value, '$.bagLine'), parts.id
FROM loads JOIN documents ON sha256 = document_sha256, json_each(text, '$.parts') AS named
JOIN parts ON serial = json_extract(named.value, '$.part')
WHERE json_extract(named.value, '$.bagLine') <> '';

INSERT OR IGNORE INTO load_places (load_id, kind, channel, part_id)
SELECT loads.id, 'thermocouple', json_extract(sensor.value, '$.channel'), parts.id
FROM loads JOIN documents ON sha256 = document_sha256, json_each(text, '$.sensors') AS sensor,
  json_each(sensor.value, '$.parts') AS named
JOIN parts ON serial = named.value
JOIN load_parts ON load_parts.load_id = loads.id AND load_parts.part_id = parts.id;

CREATE TRIGGER load_places_are_never_updated BEFORE UPDATE ON load_places
BEGIN SELECT RAISE(ABORT, 'a load is never updated'); END;
CREATE TRIGGER load_places_are_never_deleted BEFORE DELETE ON load_places
BEGIN SELECT RAISE(ABORT, 'a load is never deleted'); END;

CREATE INDEX loads_by_person ON loads (by);

-- Where a part is. The latest of a part holds; without one nobody said.
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

CREATE TRIGGER part_whereabouts_are_never_updated BEFORE UPDATE ON part_whereabouts
BEGIN SELECT RAISE(ABORT, 'where a part was is never updated'); END;
CREATE TRIGGER part_whereabouts_are_never_deleted BEFORE DELETE ON part_whereabouts
BEGIN SELECT RAISE(ABORT, 'where a part was is never deleted'); END;

-- Parts in danger as they were known when somebody asked. The document is the list; nothing on it changes later.
CREATE TABLE hold_lists (
  id              INTEGER PRIMARY KEY,
  document_sha256 TEXT NOT NULL REFERENCES documents (sha256),
  why             TEXT NOT NULL CHECK (why <> ''),
  parts           INTEGER NOT NULL CHECK (parts > 0),
  at              TEXT NOT NULL,
  by              TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE TRIGGER hold_lists_are_never_updated BEFORE UPDATE ON hold_lists
BEGIN SELECT RAISE(ABORT, 'a hold list is never updated; make another'); END;
CREATE TRIGGER hold_lists_are_never_deleted BEFORE DELETE ON hold_lists
BEGIN SELECT RAISE(ABORT, 'a hold list is never deleted'); END;

CREATE TABLE hold_list_parts (
  hold_list_id INTEGER NOT NULL REFERENCES hold_lists (id),
  part_id      INTEGER NOT NULL REFERENCES parts (id),
  PRIMARY KEY (hold_list_id, part_id)
) STRICT, WITHOUT ROWID;

CREATE INDEX hold_list_parts_by_part ON hold_list_parts (part_id, hold_list_id);

CREATE TRIGGER hold_list_parts_are_never_updated BEFORE UPDATE ON hold_list_parts
BEGIN SELECT RAISE(ABORT, 'a hold list is never updated; make another'); END;
CREATE TRIGGER hold_list_parts_are_never_deleted BEFORE DELETE ON hold_list_parts
BEGIN SELECT RAISE(ABORT, 'a hold list is never deleted'); END;
