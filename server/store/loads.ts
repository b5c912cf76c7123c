import type { Load } from '../../models/run/load.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';
import { keepPart } from './parts.ts';

export interface LoadRow {
  readonly id: number;
  readonly sha256: string;
  readonly document: Load;
  readonly cycle: { readonly code: string; readonly issue: string } | null;
  readonly at: string;
  readonly by: string;
}

/** The load that holds for a run: the latest. */
export function findLoad(db: Db, run: number): LoadRow | null {
  const row = db
    .prepare<
      [number],
      { id: number; sha256: string; code: string | null; issue: string | null; at: string; by: string }
    >(
      `SELECT loads.id, loads.document_sha256 AS sha256, code, issue, loads.at, loads.by
       FROM loads LEFT JOIN cycles ON cycles.id = cycle_id WHERE run_id = ? ORDER BY loads.id DESC LIMIT 1`,
    )
    .get(run);
  if (row === undefined) return null;
  const { id, sha256, code, issue, at, by } = row;
  const cycle = code === null || issue === null ? null : { code, issue };
  return { id, sha256, document: readDocument<Load>(db, sha256), cycle, at, by };
}

export interface NewLoad {
  readonly run: number;
  readonly document: Load;
  readonly cycleId: number | null;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

/** Writes a load and makes the parts it names that are not known yet. */
export function insertLoad(db: Db, { run, document, cycleId, reason, at, by }: NewLoad): string {
  const sha256 = keepDocument(db, document);
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO loads (run_id, document_sha256, work_order, cycle_id, reason, at, by)
       VALUES (@run, @sha256, @workOrder, @cycleId, @reason, @at, @by)`,
    )
    .run({ run, sha256, workOrder: document.workOrder ?? null, cycleId, reason, at, by });
  const insert = db.prepare('INSERT INTO load_parts (load_id, part_id, n, quantity) VALUES (?, ?, ?, ?)');
  document.parts.forEach(({ part, quantity = 1 }, n) => {
    insert.run(lastInsertRowid, keepPart(db, part), n, quantity);
  });
  insertPlaces(db, Number(lastInsertRowid), document);
  return sha256;
}

/** The bag line each part hung on and the thermocouples on it, so that parts can be found by them. */
function insertPlaces(db: Db, loadId: number, { parts, sensors }: Load): void {
  const known = new Set(parts.map(({ part }) => part));
  const insert = db.prepare(
    `INSERT OR IGNORE INTO load_places (load_id, kind, channel, part_id)
     SELECT ?, ?, ?, id FROM parts WHERE serial = ?`,
  );
  for (const { part, bagLine } of parts) if (bagLine) insert.run(loadId, 'bag-line', bagLine, part);
  for (const { channel, parts: on = [] } of sensors) {
    for (const part of on) if (known.has(part)) insert.run(loadId, 'thermocouple', channel, part);
  }
}
