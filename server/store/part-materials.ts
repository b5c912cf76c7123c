import type { PartMaterial } from '../../models/material/ledger.ts';
import type { ItemUse } from '../contract/materials.ts';
import type { Db } from './database.ts';
import { requireItem } from './material-items.ts';

export interface PartMaterialSet {
  readonly materials: readonly PartMaterial[];
  readonly at: string;
  readonly by: string;
}

/** What a part was laid up from, as it is known now; null where nobody said. */
export function findPartMaterials(db: Db, part: string): PartMaterialSet | null {
  const set = db
    .prepare<[string], { id: number; at: string; by: string }>(
      `SELECT part_material_sets.id, at, by FROM part_material_sets JOIN parts ON parts.id = part_id
       WHERE serial = ? ORDER BY part_material_sets.id DESC LIMIT 1`,
    )
    .get(part);
  if (set === undefined) return null;
  const materials = db
    .prepare<[number], UseRow & { item: string }>(
      `SELECT code AS item, plies, laid_from AS laidUpFrom, laid_until AS laidUpUntil
       FROM part_materials JOIN material_items ON material_items.id = item_id WHERE set_id = ? ORDER BY n`,
    )
    .all(set.id)
    .map(({ item, ...use }): PartMaterial => ({ item, ...present(use) }));
  return { materials, at: set.at, by: set.by };
}

export function insertPartMaterials(
  db: Db,
  partId: number,
  materials: readonly PartMaterial[],
  { reason, at, by }: { readonly reason: string | null; readonly at: string; readonly by: string },
): void {
  const { lastInsertRowid } = db
    .prepare('INSERT INTO part_material_sets (part_id, reason, at, by) VALUES (?, ?, ?, ?)')
    .run(partId, reason, at, by);
  const insert = db.prepare(
    `INSERT INTO part_materials (set_id, n, part_id, item_id, plies, laid_from, laid_until)
     VALUES (?, ?, ?, ?, ?, ?, ?)`,
  );
  materials.forEach(({ item, plies = null, laidUpFrom = null, laidUpUntil = null }, n) => {
    insert.run(lastInsertRowid, n, partId, requireItem(db, item).id, plies, laidUpFrom, laidUpUntil);
  });
}

/** Parts laid up from an item, as they are known now. */
export function readUsesOfItem(db: Db, itemId: number): ItemUse[] {
  return db
    .prepare<[number], UseRow & { part: string }>(
      `SELECT serial AS part, plies, laid_from AS laidUpFrom, laid_until AS laidUpUntil
       FROM part_materials_now AS used JOIN parts ON parts.id = part_id WHERE item_id = ? ORDER BY laid_from, serial`,
    )
    .all(itemId);
}

/** When a part was cured, as its loads stand now: first and last scan of each run, in order. */
export function readCures(db: Db, part: string): { readonly fromMs: number; readonly untilMs: number }[] {
  return db
    .prepare<[string], { fromMs: number; untilMs: number }>(
      `SELECT from_ms AS fromMs, until_ms AS untilMs FROM parts
       JOIN load_parts ON part_id = parts.id JOIN loads ON loads.id = load_id JOIN runs ON runs.id = run_id
       WHERE serial = ? AND loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id) ORDER BY from_ms`,
    )
    .all(part);
}

/** Codes of the rolls and kits that some part is laid up from. */
export function listLaidUpItems(db: Db): ReadonlySet<string> {
  return new Set(
    db
      .prepare<[], string>(
        'SELECT DISTINCT code FROM part_materials_now AS used JOIN material_items ON material_items.id = item_id',
      )
      .pluck()
      .all(),
  );
}

/**
 * Judged runs whose load holds a part laid up from one of these items now, and whose cycle asks for its out-life, that
 * still went on at an instant: those that a line of the ledger may judge otherwise.
 */
export function readRunsTouched(db: Db, itemIds: readonly number[], sinceMs: number): number[] {
  return db
    .prepare<object, number>(
      `${TOUCHED} AND load_parts.part_id IN
         (SELECT part_id FROM part_materials_now WHERE item_id IN (SELECT value FROM json_each(@items)))
       ORDER BY runs.id`,
    )
    .pluck()
    .all({ items: JSON.stringify(itemIds), sinceMs });
}

/** Judged runs of a part whose cycle asks for its out-life. */
export function readRunsAsking(db: Db, partId: number): number[] {
  return db
    .prepare<object, number>(`${TOUCHED} AND load_parts.part_id = @partId ORDER BY runs.id`)
    .pluck()
    .all({ partId, sinceMs: 0 });
}

const TOUCHED = `
  SELECT DISTINCT runs.id FROM runs
  JOIN loads ON loads.id = (SELECT max(id) FROM loads WHERE run_id = runs.id)
  JOIN load_parts ON load_id = loads.id
  JOIN cycles ON cycles.id = cycle_id
  JOIN documents ON documents.sha256 = cycles.document_sha256
  WHERE until_ms >= @sinceMs AND json_extract(documents.text, '$.material.outLife') = 1`;

interface UseRow {
  readonly plies: number | null;
  readonly laidUpFrom: string | null;
  readonly laidUpUntil: string | null;
}

function present({ plies, laidUpFrom, laidUpUntil }: UseRow): Omit<PartMaterial, 'item'> {
  return {
    ...(plies === null ? {} : { plies }),
    ...(laidUpFrom === null ? {} : { laidUpFrom }),
    ...(laidUpUntil === null ? {} : { laidUpUntil }),
  };
}
