import { DomainError } from '../../models/errors.ts';
import type { PartResult } from '../contract/results.ts';
import type { Db } from './database.ts';

export interface NewPartResult extends Omit<PartResult, 'id'> {
  readonly partId: number;
  readonly replaces: number | null;
}

export function insertPartResult(db: Db, result: NewPartResult): void {
  const { partId, at: testedAt, measured, replaces, deed, ...rest } = result;
  if (replaces !== null) requireReplaceable(db, partId, replaces);
  db.prepare(
    `INSERT INTO part_results (part_id, tested_at, test, outcome, figure, unit, text, kind, measured, replaces_id, reason,
       at, by)
     VALUES (@partId, @testedAt, @test, @outcome, @figure, @unit, @text, @kind, @measured, @replaces, @reason, @at, @by)`,
  ).run({
    ...rest,
    partId,
    testedAt,
    kind: measured?.kind ?? null,
    measured: measured === null ? null : JSON.stringify(measured),
    replaces,
    ...deed,
  });
}

/** Results of a part in the order they were written; without those that another replaces. */
export function readPartResults(db: Db, partId: number): PartResult[] {
  return db
    .prepare<[number], Row>(
      `SELECT id, tested_at AS testedAt, test, outcome, figure, unit, text, measured, reason, at, by
       FROM part_results_now WHERE part_id = ? ORDER BY id`,
    )
    .all(partId)
    .map(({ testedAt, measured, at, by, ...row }) => ({
      ...row,
      at: testedAt,
      measured: measured === null ? null : (JSON.parse(measured) as PartResult['measured']),
      deed: { at, by },
    }));
}

type Row = Omit<PartResult, 'at' | 'deed' | 'measured'> & {
  readonly testedAt: string;
  readonly measured: string | null;
  readonly at: string;
  readonly by: string;
};

function requireReplaceable(db: Db, partId: number, id: number): void {
  const isThere = db.prepare('SELECT 1 FROM part_results WHERE id = ? AND part_id = ?').get(id, partId) !== undefined;
  if (!isThere) throw new DomainError('not-found', `The part has no result numbered ${id}`, { replaces: id });
  if (db.prepare('SELECT 1 FROM part_results WHERE replaces_id = ?').get(id) === undefined) return;
  throw new DomainError('state-conflict', `Result ${id} is replaced already; replace the one that holds`, {
    replaces: id,
  });
}
