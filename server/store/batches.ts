import { DomainError } from '../../models/errors.ts';
import type { BatchLine } from '../contract/materials.ts';
import type { Db } from './database.ts';

export interface NewBatch {
  readonly batch: string;
  readonly materialId: number;
  readonly made: string | null;
  readonly expires: string | null;
  readonly certificate: string | null;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

/** Writes what is known of a maker's lot from now on; makes the lot where it is new. */
export function insertBatch(db: Db, { batch, ...particulars }: NewBatch): void {
  const known = findBatchId(db, batch);
  const batchId = known ?? Number(db.prepare('INSERT INTO batches (code) VALUES (?)').run(batch).lastInsertRowid);
  db.prepare(
    `INSERT INTO batch_particulars (batch_id, material_id, made, expires, certificate, reason, at, by)
     VALUES (@batchId, @materialId, @made, @expires, @certificate, @reason, @at, @by)`,
  ).run({ batchId, ...particulars });
}

export function findBatchId(db: Db, batch: string): number | undefined {
  return db.prepare<[string], number>('SELECT id FROM batches WHERE code = ?').pluck().get(batch);
}

export function requireBatchId(db: Db, batch: string): number {
  const id = findBatchId(db, batch);
  if (id !== undefined) return id;
  throw new DomainError('not-found', `There is no batch "${batch}"; record it first`, { batch });
}

/** Batches as they are known now; those of one material where its code is given. */
export function listBatches(db: Db, material?: string): BatchLine[] {
  return db
    .prepare<object, BatchRow>(`${SELECT} WHERE @material IS NULL OR materials.code = @material ORDER BY batches.code`)
    .all({ material: material ?? null })
    .map((row) => lineOf(db, row));
}

export function findBatch(db: Db, batch: string): BatchLine | undefined {
  const row = db.prepare<object, BatchRow>(`${SELECT} WHERE batches.code = @batch`).get({ batch });
  return row === undefined ? undefined : lineOf(db, row);
}

export function requireBatch(db: Db, batch: string): BatchLine {
  const line = findBatch(db, batch);
  if (line === undefined) throw new DomainError('not-found', `There is no batch "${batch}"`, { batch });
  return line;
}

/** Batches that expire on a day or before, of which a roll is still here: neither scrapped nor laid up. */
export function listBatchesThatEnd(
  db: Db,
  day: string,
): { readonly batch: string; readonly material: string; readonly expires: string }[] {
  return db
    .prepare<object, { batch: string; material: string; expires: string }>(
      `SELECT batches.code AS batch, materials.code AS material, expires FROM batches
       JOIN batch_particulars AS about ON about.id = (SELECT max(id) FROM batch_particulars WHERE batch_id = batches.id)
       JOIN materials ON materials.id = material_id
       WHERE expires <= @day AND EXISTS (
         SELECT 1 FROM material_events_now AS event WHERE event.batch_id = batches.id
           AND NOT EXISTS (SELECT 1 FROM material_events_now AS later WHERE later.item_id = event.item_id AND later.kind = 'scrapped')
           AND NOT EXISTS (SELECT 1 FROM part_materials_now AS used WHERE used.item_id = event.item_id))
       ORDER BY expires, batches.code`,
    )
    .all({ day });
}

interface BatchRow {
  readonly id: number;
  readonly batch: string;
  readonly code: string;
  readonly issue: string;
  readonly made: string | null;
  readonly expires: string | null;
  readonly certificate: string | null;
  readonly at: string;
  readonly by: string;
}

const SELECT = `
  SELECT batches.id, batches.code AS batch, materials.code, issue, made, expires, certificate, about.at, about.by
  FROM batches
  JOIN batch_particulars AS about ON about.id = (SELECT max(id) FROM batch_particulars WHERE batch_id = batches.id)
  JOIN materials ON materials.id = material_id`;

function lineOf(db: Db, { id, code, issue, at, by, ...row }: BatchRow): BatchLine {
  const rolls = db
    .prepare<[number], string>(
      `SELECT material_items.code FROM material_events_now AS event JOIN material_items ON material_items.id = item_id
       WHERE batch_id = ? ORDER BY material_items.code`,
    )
    .pluck()
    .all(id);
  return { ...row, material: { code, issue }, rolls, recorded: { at, by } };
}
