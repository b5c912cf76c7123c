import { DomainError } from '../../models/errors.ts';
import type { LedgerEvent, LedgerItem } from '../../models/material/ledger.ts';
import type { LedgerLine } from '../contract/materials.ts';
import { requireBatchId } from './batches.ts';
import type { Db } from './database.ts';

export interface ItemRow {
  readonly id: number;
  readonly item: string;
  readonly kind: LedgerItem['kind'];
}

export function findItem(db: Db, item: string): ItemRow | undefined {
  return db.prepare<[string], ItemRow>('SELECT id, code AS item, kind FROM material_items WHERE code = ?').get(item);
}

export function requireItem(db: Db, item: string): ItemRow {
  const row = findItem(db, item);
  if (row !== undefined) return row;
  throw new DomainError('not-found', `There is no roll or kit "${item}"`, { item });
}

/** A new roll or kit; a code whose every line was taken back is free again. */
export function insertItem(db: Db, item: string, kind: LedgerItem['kind']): ItemRow {
  const known = findItem(db, item);
  if (known !== undefined) {
    if (known.kind === kind && readEvents(db, known.id).length === 0) return known;
    throw new DomainError('already-recorded', `There is a roll or kit "${item}" already`, { item });
  }
  const { lastInsertRowid } = db.prepare('INSERT INTO material_items (code, kind) VALUES (?, ?)').run(item, kind);
  return { id: Number(lastInsertRowid), item, kind };
}

export interface NewLine {
  readonly itemId: number;
  /** Null only takes the replaced line back. */
  readonly event: LedgerEvent | null;
  readonly lengthM?: number | null | undefined;
  readonly replaces?: { readonly id: number; readonly happenedAt: string } | undefined;
  readonly reason?: string | null | undefined;
  readonly at: string;
  readonly by: string;
}

/** Writes a line of an item's ledger. Whether it can be true is for the caller to have seen. */
export function insertLine(db: Db, { itemId, event, lengthM, replaces, reason, at, by }: NewLine): number {
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO material_events (item_id, kind, happened_at, batch_id, parent_id, length_m, line, replaces_id, reason, at, by)
       VALUES (@itemId, @kind, @happenedAt, @batchId, @parentId, @lengthM, @line, @replaces, @reason, @at, @by)`,
    )
    .run({
      itemId,
      kind: event?.kind ?? 'void',
      happenedAt: event?.at ?? replaces?.happenedAt ?? at,
      batchId: event?.kind === 'received' ? requireBatchId(db, event.batch) : null,
      parentId: event?.kind === 'cut' ? requireItem(db, event.from).id : null,
      lengthM: lengthM ?? null,
      line: JSON.stringify(event),
      replaces: replaces?.id ?? null,
      reason: reason ?? null,
      at,
      by,
    });
  return Number(lastInsertRowid);
}

/** Every line of an item's ledger as it was written, in that order. */
export function readLedger(db: Db, itemId: number): LedgerLine[] {
  return db
    .prepare<[number], LineRow>(
      `SELECT id, line, length_m AS lengthM, replaces_id AS replaces, reason, at, by,
         (SELECT id FROM material_events AS later WHERE later.replaces_id = material_events.id) AS replacedBy
       FROM material_events WHERE item_id = ? ORDER BY id`,
    )
    .all(itemId)
    .map(({ line, at, by, ...row }) => ({ ...row, event: JSON.parse(line) as LedgerEvent | null, deed: { at, by } }));
}

/** The lines of an item's ledger that hold. */
export function readEvents(db: Db, itemId: number): LedgerEvent[] {
  return db
    .prepare<[number], string>('SELECT line FROM material_events_now WHERE item_id = ? ORDER BY id')
    .pluck()
    .all(itemId)
    .map((line) => JSON.parse(line) as LedgerEvent);
}

/** Kits cut from an item, and when. */
export function readChildren(db: Db, itemId: number): { item: string; at: string; lengthM: number | null }[] {
  return db
    .prepare<[number], { item: string; at: string; lengthM: number | null }>(
      `SELECT code AS item, happened_at AS at, length_m AS lengthM
       FROM material_events_now AS event JOIN material_items ON material_items.id = item_id
       WHERE parent_id = ? ORDER BY happened_at, code`,
    )
    .all(itemId);
}

/** Rolls and kits that were received or cut. */
export function listItems(db: Db): ItemRow[] {
  return db
    .prepare<[], ItemRow>(
      `SELECT id, code AS item, kind FROM material_items
       WHERE id IN (SELECT item_id FROM material_events_now WHERE kind IN ('received', 'cut')) ORDER BY code`,
    )
    .all();
}

/** An item with everything it was cut from, and everything that was cut from it. */
export function readFamily(db: Db, itemIds: readonly number[]): ItemRow[] {
  return readItems(db, itemIds, 'both');
}

/** Items and everything they were cut from. */
export function readForebears(db: Db, itemIds: readonly number[]): ItemRow[] {
  return readItems(db, itemIds, 'above');
}

/** Items and everything cut from them. */
export function readDescendants(db: Db, itemIds: readonly number[]): ItemRow[] {
  return readItems(db, itemIds, 'below');
}

function readItems(db: Db, itemIds: readonly number[], way: 'above' | 'below' | 'both'): ItemRow[] {
  const above = way === 'below' ? 'WHERE false' : '';
  const below = way === 'above' ? 'WHERE false' : '';
  return db
    .prepare<[string], ItemRow>(
      `WITH RECURSIVE
         named (id) AS (SELECT value FROM json_each(?)),
         above (id) AS (
           SELECT id FROM named
           UNION SELECT parent_id FROM material_events_now AS event JOIN above ON event.item_id = above.id
             AND parent_id IS NOT NULL ${above}),
         below (id) AS (
           SELECT id FROM named
           UNION SELECT event.item_id FROM material_events_now AS event JOIN below ON event.parent_id = below.id ${below})
       SELECT id, code AS item, kind FROM material_items
       WHERE id IN (SELECT id FROM above UNION SELECT id FROM below) ORDER BY code`,
    )
    .all(JSON.stringify(itemIds));
}

interface LineRow {
  readonly id: number;
  readonly line: string;
  readonly lengthM: number | null;
  readonly replaces: number | null;
  readonly replacedBy: number | null;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}
