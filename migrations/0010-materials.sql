-- Issues of material documents: what counts against the lives of a product. An issue is frozen from the start.
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

CREATE TRIGGER materials_are_never_updated BEFORE UPDATE ON materials
BEGIN SELECT RAISE(ABORT, 'an issue of a material is never updated'); END;

CREATE TRIGGER materials_are_never_deleted BEFORE DELETE ON materials
BEGIN SELECT RAISE(ABORT, 'an issue of a material is never deleted'); END;

CREATE TABLE batches (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> '')
) STRICT;

-- What is known of a maker's lot. The latest of a batch holds.
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

CREATE TRIGGER batch_particulars_are_never_updated BEFORE UPDATE ON batch_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of a batch is never updated'); END;

CREATE TRIGGER batch_particulars_are_never_deleted BEFORE DELETE ON batch_particulars
BEGIN SELECT RAISE(ABORT, 'what was known of a batch is never deleted'); END;

-- Rolls, and kits cut from them.
CREATE TABLE material_items (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> ''),
  kind TEXT NOT NULL CHECK (kind IN ('roll', 'kit'))
) STRICT;

CREATE TRIGGER material_items_are_never_updated BEFORE UPDATE ON material_items
BEGIN SELECT RAISE(ABORT, 'a roll or kit is never updated'); END;

CREATE TRIGGER material_items_are_never_deleted BEFORE DELETE ON material_items
BEGIN SELECT RAISE(ABORT, 'a roll or kit is never deleted'); END;

-- The out-life ledger. A wrong line is replaced by a later one that says why; `void` replaces it by nothing.
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

CREATE INDEX material_events_by_item ON material_events (item_id, id);
CREATE INDEX material_events_by_parent ON material_events (parent_id) WHERE parent_id IS NOT NULL;
CREATE INDEX material_events_by_batch ON material_events (batch_id) WHERE batch_id IS NOT NULL;

CREATE TRIGGER material_events_are_never_updated BEFORE UPDATE ON material_events
BEGIN SELECT RAISE(ABORT, 'a line of the out-life ledger is never updated'); END;

CREATE TRIGGER material_events_are_never_deleted BEFORE DELETE ON material_events
BEGIN SELECT RAISE(ABORT, 'a line of the out-life ledger is never deleted'); END;

-- What a part was laid up from, as it was said at one time. The latest of a part holds.
CREATE TABLE part_material_sets (
  id      INTEGER PRIMARY KEY,
  part_id INTEGER NOT NULL REFERENCES parts (id),
  reason  TEXT,
  at      TEXT NOT NULL,
  by      TEXT NOT NULL CHECK (by <> '')
) STRICT;

CREATE INDEX part_material_sets_by_part ON part_material_sets (part_id, id);

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

CREATE INDEX part_materials_by_part ON part_materials (part_id, set_id);
CREATE INDEX part_materials_by_item ON part_materials (item_id, part_id);

CREATE TRIGGER part_material_sets_are_never_updated BEFORE UPDATE ON part_material_sets
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never updated'); END;

CREATE TRIGGER part_material_sets_are_never_deleted BEFORE DELETE ON part_material_sets
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never deleted'); END;

CREATE TRIGGER part_materials_are_never_updated BEFORE UPDATE ON part_materials
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never updated'); END;

CREATE TRIGGER part_materials_are_never_deleted BEFORE DELETE ON part_materials
BEGIN SELECT RAISE(ABORT, 'what a part was laid up from is never deleted'); END;

-- Lines of the ledger that hold: neither replaced nor void.
CREATE VIEW material_events_now AS
SELECT * FROM material_events
WHERE kind <> 'void' AND NOT EXISTS (SELECT 1 FROM material_events AS later WHERE later.replaces_id = material_events.id);

-- What parts were laid up from, as it is known now.
CREATE VIEW part_materials_now AS
SELECT part_materials.* FROM part_materials
WHERE set_id = (SELECT max(id) FROM part_material_sets WHERE part_material_sets.part_id = part_materials.part_id);

-- Records of material a judgement rested on; NULL where the cycle asks for none, and before there were any.
ALTER TABLE evaluations ADD COLUMN materials_sha256 TEXT REFERENCES documents (sha256);
