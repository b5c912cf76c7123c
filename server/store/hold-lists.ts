import { DomainError } from '../../models/errors.ts';
import type { HoldDocument, Holds, HoldView, PartDanger } from '../contract/trace.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';

/** Keeps a hold list for good. */
export function insertHoldList(
  db: Db,
  document: HoldDocument,
  partIds: readonly number[],
  deed: HoldView['deed'],
): { readonly hold: number; readonly sha256: string } {
  const sha256 = keepDocument(db, document);
  const { lastInsertRowid } = db
    .prepare('INSERT INTO hold_lists (document_sha256, why, parts, at, by) VALUES (?, ?, ?, ?, ?)')
    .run(sha256, document.why, partIds.length, deed.at, deed.by);
  db.prepare('INSERT INTO hold_list_parts (hold_list_id, part_id) SELECT ?, value FROM json_each(?)').run(
    lastInsertRowid,
    JSON.stringify(partIds),
  );
  return { hold: Number(lastInsertRowid), sha256 };
}

/** A hold list as it was kept. */
export function requireHoldList(db: Db, hold: number): HoldView {
  const row = db
    .prepare<[number], { sha256: string; at: string; by: string }>(
      'SELECT document_sha256 AS sha256, at, by FROM hold_lists WHERE id = ?',
    )
    .get(hold);
  if (row === undefined) throw new DomainError('not-found', `There is no hold list ${hold}`, { hold });
  const { sha256, at, by } = row;
  return { hold, sha256, deed: { at, by }, document: readDocument<HoldDocument>(db, sha256) };
}

/** Hold lists on one line each, latest first. */
export function listHoldLists(db: Db): Holds['holds'] {
  return db
    .prepare<[], { hold: number; why: string; parts: number; at: string; by: string }>(
      'SELECT id AS hold, why, parts, at, by FROM hold_lists ORDER BY id DESC',
    )
    .all()
    .map(({ at, by, ...line }) => ({ ...line, deed: { at, by } }));
}

/** The hold lists a part is on, latest first. */
export function listHoldsOfPart(db: Db, partId: number): PartDanger['holds'] {
  return db
    .prepare<[number], { hold: number; why: string; at: string; by: string }>(
      `SELECT hold_lists.id AS hold, why, at, by FROM hold_list_parts JOIN hold_lists ON hold_lists.id = hold_list_id
       WHERE part_id = ? ORDER BY hold_lists.id DESC`,
    )
    .all(partId)
    .map(({ at, by, ...line }) => ({ ...line, deed: { at, by } }));
}
