import type { Cycle } from '../../models/cycle/cycle.ts';
import { DomainError } from '../../models/errors.ts';
import type { CycleLine, CycleView } from '../contract/cycles.ts';
import type { Db } from './database.ts';
import { keepDocument, readDocument } from './documents.ts';

export type CycleStatus = CycleLine['status'];

export interface CycleRow extends CycleLine {
  readonly id: number;
}

export function listCycles(db: Db, code?: string): CycleRow[] {
  return db
    .prepare<object, SelectedRow>(`${SELECT} WHERE @code IS NULL OR code = @code ORDER BY code, cycles.id DESC`)
    .all({ code: code ?? null })
    .map(rowOf);
}

export function findCycle(db: Db, code: string, issue: string): CycleRow | undefined {
  const row = db.prepare<object, SelectedRow>(`${SELECT} WHERE code = @code AND issue = @issue`).get({ code, issue });
  return row === undefined ? undefined : rowOf(row);
}

/** An issue that must be there. */
export function requireCycle(db: Db, code: string, issue: string): CycleRow {
  const cycle = findCycle(db, code, issue);
  if (cycle !== undefined) return cycle;
  throw new DomainError('not-found', `There is no cycle ${code} issue ${issue}`, { cycle: code, issue });
}

export function readCycleDocument(db: Db, cycle: CycleRow): Cycle {
  return readDocument<Cycle>(db, cycle.sha256);
}

export function readCycleHistory(db: Db, cycleId: number): CycleView['history'] {
  return db
    .prepare<[number], { status: CycleStatus; reason: string | null; at: string; by: string }>(
      'SELECT status, reason, at, by FROM cycle_statuses WHERE cycle_id = ? ORDER BY id',
    )
    .all(cycleId)
    .map(({ status, reason, at, by }) => ({ status, reason, deed: { at, by } }));
}

export function insertCycle(db: Db, document: Cycle, at: string, by: string): number {
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO cycles (code, issue, title, document_sha256, resin, at, by)
       VALUES (@code, @issue, @title, @sha256, @resin, @at, @by)`,
    )
    .run({ ...columnsOf(db, document), code: document.code, issue: document.issue, at, by });
  return Number(lastInsertRowid);
}

/** Puts another document in a draft's place. A released issue is frozen: the database itself refuses. */
export function replaceDraft(db: Db, cycleId: number, document: Cycle, at: string, by: string): void {
  db.prepare(
    'UPDATE cycles SET title = @title, document_sha256 = @sha256, resin = @resin, at = @at, by = @by WHERE id = @id',
  ).run({ ...columnsOf(db, document), id: cycleId, at, by });
}

export function insertCycleStatus(
  db: Db,
  cycleId: number,
  status: CycleStatus,
  reason: string | null,
  at: string,
  by: string,
): void {
  db.prepare('INSERT INTO cycle_statuses (cycle_id, status, reason, at, by) VALUES (?, ?, ?, ?, ?)').run(
    cycleId,
    status,
    reason,
    at,
    by,
  );
}

function columnsOf(db: Db, document: Cycle): { title: string; sha256: string; resin: string | null } {
  return { title: document.title, sha256: keepDocument(db, document), resin: document.cure?.resin ?? null };
}

type SelectedRow = Omit<CycleRow, 'imported'> & { readonly at: string; readonly by: string };

const SELECT = `
  SELECT cycles.id, code, issue, title, document_sha256 AS sha256, cycles.at, cycles.by,
         (SELECT status FROM cycle_statuses WHERE cycle_id = cycles.id ORDER BY id DESC LIMIT 1) AS status,
         (SELECT count(*) FROM loads WHERE cycle_id = cycles.id
            AND id = (SELECT max(id) FROM loads AS latest WHERE latest.run_id = loads.run_id)) AS runs
  FROM cycles`;

function rowOf({ at, by, ...row }: SelectedRow): CycleRow {
  return { ...row, imported: { at, by } };
}
