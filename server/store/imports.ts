import { DomainError, type ErrorCode, type Facts } from '../../models/errors.ts';
import type { ImportLine } from '../contract/imports.ts';
import type { Db } from './database.ts';

/** Why a file could not become a run by itself. */
export interface Refusal {
  readonly code: ErrorCode;
  readonly message: string;
  readonly facts: Facts;
}

export interface ImportRow extends Omit<ImportLine, 'problem'> {
  readonly fileId: number | null;
  readonly refusal: Refusal | null;
}

export interface NewImport {
  readonly sha256: string;
  readonly bytes: number;
  /** Null where the bytes are no log at all and are not kept. */
  readonly fileId: number | null;
  readonly name: string;
  readonly origin: ImportLine['origin'];
  readonly recorderId: number | null;
  readonly run: number | null;
  readonly refusal: Refusal | null;
  readonly at: string;
  readonly by: string;
}

export function insertImport(db: Db, { run, refusal, ...row }: NewImport): number {
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO imports (sha256, bytes, file_id, name, origin, recorder_id, state, run_id, refusal, at, by)
       VALUES (@sha256, @bytes, @fileId, @name, @origin, @recorderId, @state, @run, @refusal, @at, @by)`,
    )
    .run({
      ...row,
      run,
      state: run === null ? 'waiting' : 'recorded',
      refusal: refusal === null ? null : JSON.stringify(refusal),
    });
  return Number(lastInsertRowid);
}

export function markImportRecorded(db: Db, id: number, run: number): void {
  db.prepare("UPDATE imports SET state = 'recorded', run_id = ? WHERE id = ?").run(run, id);
}

export function markImportDiscarded(db: Db, id: number): void {
  db.prepare("UPDATE imports SET state = 'discarded' WHERE id = ?").run(id);
}

/** Files that wait for someone, latest first. */
export function listWaitingImports(db: Db): ImportRow[] {
  return db.prepare<[], SelectedRow>(`${SELECT} WHERE state = 'waiting' ORDER BY imports.id DESC`).all().map(rowOf);
}

export function requireImport(db: Db, id: number): ImportRow {
  const row = db.prepare<[number], SelectedRow>(`${SELECT} WHERE imports.id = ?`).get(id);
  if (row === undefined) throw new DomainError('not-found', `There is no import ${id}`, { import: id });
  return rowOf(row);
}

/** The import that waits with these very bytes. */
export function findWaitingImport(db: Db, sha256: string): ImportRow | undefined {
  const row = db
    .prepare<[string], SelectedRow>(`${SELECT} WHERE state = 'waiting' AND imports.sha256 = ? LIMIT 1`)
    .get(sha256);
  return row === undefined ? undefined : rowOf(row);
}

type SelectedRow = Omit<ImportRow, 'received' | 'refusal'> & {
  readonly refusal: string | null;
  readonly at: string;
  readonly by: string;
};

const SELECT = `
  SELECT imports.id, imports.name, bytes, sha256, origin, recorders.name AS recorder, state, run_id AS run, refusal,
         file_id AS fileId, at, by
  FROM imports LEFT JOIN recorders ON recorders.id = recorder_id`;

function rowOf({ at, by, refusal, ...row }: SelectedRow): ImportRow {
  return { ...row, refusal: refusal === null ? null : (JSON.parse(refusal) as Refusal), received: { at, by } };
}
