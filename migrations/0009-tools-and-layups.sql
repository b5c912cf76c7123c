CREATE TABLE tools (
  id   INTEGER PRIMARY KEY,
  code TEXT NOT NULL UNIQUE CHECK (code <> '')
) STRICT;

INSERT INTO tools (code) SELECT DISTINCT tool FROM part_particulars WHERE tool <> '' ORDER BY tool;

-- The latest of a tool is what it is now.
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

-- How a part was laid up. The latest of a part holds.
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

-- What was done to a part after its cure: trimming, drilling. One that was written down wrong is replaced by another.
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

-- Coupons cured beside a part to be tested for it. The latest of a code holds.
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

CREATE INDEX part_particulars_by_drawing ON part_particulars (drawing);
CREATE INDEX part_particulars_by_tool ON part_particulars (tool);

CREATE TRIGGER tool_records_are_never_updated BEFORE UPDATE ON tool_records
BEGIN SELECT RAISE(ABORT, 'the record of a tool is never updated'); END;

CREATE TRIGGER tool_records_are_never_deleted BEFORE DELETE ON tool_records
BEGIN SELECT RAISE(ABORT, 'the record of a tool is never deleted'); END;

CREATE TRIGGER part_layups_are_never_updated BEFORE UPDATE ON part_layups
BEGIN SELECT RAISE(ABORT, 'a lay-up is never updated'); END;

CREATE TRIGGER part_layups_are_never_deleted BEFORE DELETE ON part_layups
BEGIN SELECT RAISE(ABORT, 'a lay-up is never deleted'); END;

CREATE TRIGGER layup_debulks_are_never_updated BEFORE UPDATE ON layup_debulks
BEGIN SELECT RAISE(ABORT, 'a lay-up is never updated'); END;

CREATE TRIGGER layup_debulks_are_never_deleted BEFORE DELETE ON layup_debulks
BEGIN SELECT RAISE(ABORT, 'a lay-up is never deleted'); END;

CREATE TRIGGER part_works_are_never_updated BEFORE UPDATE ON part_works
BEGIN SELECT RAISE(ABORT, 'work on a part is never updated'); END;

CREATE TRIGGER part_works_are_never_deleted BEFORE DELETE ON part_works
BEGIN SELECT RAISE(ABORT, 'work on a part is never deleted'); END;

CREATE TRIGGER coupons_are_never_updated BEFORE UPDATE ON coupons
BEGIN SELECT RAISE(ABORT, 'the record of a coupon is never updated'); END;

CREATE TRIGGER coupons_are_never_deleted BEFORE DELETE ON coupons
BEGIN SELECT RAISE(ABORT, 'the record of a coupon is never deleted'); END;
