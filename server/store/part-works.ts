import { DomainError } from '../../models/errors.ts';
import type { PartWork } from '../contract/layups.ts';
import type { Db } from './database.ts';

/** What was done to a part after cure, in order of time; without those that another replaces. */
export function readPartWorks(db: Db, partId: number): PartWork[] {
  return db
    .prepare<[number], Omit<PartWork, 'at' | 'deed'> & { doneAt: string; at: string; by: string }>(
      `SELECT id, work, text, done_at AS doneAt, reason, at, by FROM part_works
       WHERE part_id = ? AND id NOT IN (SELECT replaces_id FROM part_works WHERE replaces_id IS NOT NULL)
       ORDER BY done_at, id`,
    )
    .all(partId)
    .map(({ doneAt, at, by, ...work }) => ({ ...work, at: doneAt, deed: { at, by } }));
}

export interface NewPartWork {
  readonly partId: number;
  readonly replaces: number | null;
  readonly work: PartWork['work'];
  readonly text: string;
  readonly doneAt: string;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

export function insertPartWork(db: Db, work: NewPartWork): void {
  if (work.replaces !== null) requireReplaceable(db, work.partId, work.replaces);
  db.prepare(
    `INSERT INTO part_works (part_id, replaces_id, work, text, done_at, reason, at, by)
     VALUES (@partId, @replaces, @work, @text, @doneAt, @reason, @at, @by)`,
  ).run(work);
}

function requireReplaceable(db: Db, partId: number, id: number): void {
  const isThere = db.prepare('SELECT 1 FROM part_works WHERE id = ? AND part_id = ?').get(id, partId) !== undefined;
  if (!isThere) throw new DomainError('not-found', `The part has no work numbered ${id}`, { replaces: id });
  if (db.prepare('SELECT 1 FROM part_works WHERE replaces_id = ?').get(id) === undefined) return;
  throw new DomainError('state-conflict', `Work ${id} is replaced already; replace the one that holds`, {
    replaces: id,
  });
}
