import type { Found } from '../contract/find.ts';
import type { Db } from './database.ts';

type Hit = Found['hits'][number];

/** Everything a typed or scanned code may mean, exact hits first. */
export function findCode(db: Db, code: string): Found {
  const run = /^(?:run\s*)?(\d{1,9})$/i.exec(code);
  const values = { code, start: `${code.replace(/[\\%_]/g, '\\$&')}%`, run: run === null ? null : Number(run[1]) };
  const hits = db
    .prepare<object, { kind: Hit['kind']; title: string; page: string; exact: number }>(SELECT)
    .all(values)
    .map(({ exact, page, ...hit }) => ({ ...hit, page: encodePage(page), exact: exact === 1 }));
  return { code, hits };
}

const SELECT = `
  SELECT kind, title, page, exact FROM (
  SELECT 'run' AS kind, 'Run ' || id AS title, '/runs' || char(31) || id AS page, 1 AS exact, 1 AS rank
    FROM runs WHERE id = @run
  UNION ALL
  SELECT * FROM (SELECT 'part', serial, '/parts' || char(31) || serial, serial = @code COLLATE NOCASE AS exact, 2
    FROM parts WHERE serial LIKE @start ESCAPE '\\' ORDER BY exact DESC, serial LIMIT 20)
  UNION ALL
  SELECT 'tool', 'Tool ' || code, '/tools' || char(31) || code, code = @code COLLATE NOCASE, 2
    FROM tools WHERE code LIKE @start ESCAPE '\\'
  UNION ALL
  SELECT * FROM (SELECT 'coupon', 'Coupon ' || code || ' of ' || serial, '/parts' || char(31) || serial,
      code = @code COLLATE NOCASE AS exact, 3
    FROM coupons JOIN parts ON parts.id = part_id
    WHERE code LIKE @start ESCAPE '\\' AND coupons.id = (SELECT max(id) FROM coupons AS latest WHERE latest.code = coupons.code)
    ORDER BY exact DESC, code LIMIT 20)
  UNION ALL
  SELECT * FROM (SELECT kind, CASE kind WHEN 'roll' THEN 'Roll ' ELSE 'Kit ' END || code,
      CASE kind WHEN 'roll' THEN '/rolls' ELSE '/kits' END || char(31) || code, code = @code COLLATE NOCASE AS exact, 3
    FROM material_items WHERE code LIKE @start ESCAPE '\\' ORDER BY exact DESC, code LIMIT 20)
  UNION ALL
  SELECT * FROM (SELECT 'batch', 'Batch ' || batches.code || ' of ' || name, '/materials' || char(31) || materials.code,
      batches.code = @code COLLATE NOCASE AS exact, 3
    FROM batches JOIN batch_particulars AS about
      ON about.id = (SELECT max(id) FROM batch_particulars WHERE batch_id = batches.id)
    JOIN materials ON materials.id = material_id
    WHERE batches.code LIKE @start ESCAPE '\\' ORDER BY exact DESC, batches.code LIMIT 20)
  UNION ALL
  SELECT 'material', name, '/materials' || char(31) || code, code = @code COLLATE NOCASE, 3
    FROM materials WHERE code LIKE @start ESCAPE '\\'
      AND id = (SELECT max(id) FROM materials AS latest WHERE latest.code = materials.code)
  UNION ALL
  SELECT * FROM (SELECT 'instrument', 'Instrument ' || code, '/instruments' || char(31) || code,
      code = @code COLLATE NOCASE AS exact, 3
    FROM instruments WHERE code LIKE @start ESCAPE '\\' ORDER BY exact DESC, code LIMIT 20)
  UNION ALL
  SELECT 'cycle', code || ' issue ' || issue, '/cycles' || char(31) || code || char(31) || issue,
    code = @code COLLATE NOCASE, 3 FROM cycles WHERE code LIKE @start ESCAPE '\\'
  UNION ALL
  SELECT 'resin', name, '/resins' || char(31) || code, code = @code COLLATE NOCASE, 4
    FROM resins WHERE code LIKE @start ESCAPE '\\'
  UNION ALL
  SELECT * FROM (SELECT 'work-order', 'Work order ' || work_order || ', run ' || run_id,
      '/runs' || char(31) || run_id, work_order = @code COLLATE NOCASE AS exact, 5
    FROM loads WHERE work_order LIKE @start ESCAPE '\\'
      AND id = (SELECT max(id) FROM loads AS latest WHERE latest.run_id = loads.run_id)
    ORDER BY exact DESC, run_id DESC LIMIT 20)
  UNION ALL
  SELECT 'vessel', name, '/runs?vessel=' || char(31) || name, name = @code COLLATE NOCASE, 6
    FROM vessels WHERE name LIKE @start ESCAPE '\\'
  UNION ALL
  SELECT 'recorder', name, '/recorders' || char(31) || name, name = @code COLLATE NOCASE, 7
    FROM recorders WHERE name LIKE @start ESCAPE '\\'
  UNION ALL
  SELECT * FROM (SELECT 'file', name || ', run ' || run_id, '/runs' || char(31) || run_id,
      files.sha256 = lower(@code) OR name = @code COLLATE NOCASE AS exact, 8
    FROM source_files JOIN run_sources ON run_sources.id = source_id JOIN files ON files.id = file_id
    WHERE name LIKE @start ESCAPE '\\' OR (length(@code) >= 8 AND files.sha256 LIKE lower(@start) ESCAPE '\\')
    ORDER BY exact DESC, run_id DESC LIMIT 20)
  ) ORDER BY exact DESC, rank, title LIMIT 60`;

/** The pieces of an address are kept apart by a unit separator until each has been made safe for one. */
function encodePage(page: string): string {
  const [folder = '', ...pieces] = page.split('\u001f');
  return pieces.reduce(
    (address, piece) => `${address}${address.endsWith('=') ? '' : '/'}${encodeURIComponent(piece)}`,
    folder,
  );
}
