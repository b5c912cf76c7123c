import type { Whereabouts } from '../contract/trace.ts';
import type { Db } from './database.ts';

export function insertWhereabouts(db: Db, partId: number, { deed, ...where }: Whereabouts): void {
  db.prepare(
    `INSERT INTO part_whereabouts (part_id, place, customer, since, text, at, by)
     VALUES (@partId, @place, @customer, @since, @text, @at, @by)`,
  ).run({ partId, ...where, ...deed });
}

/** Where a part was said to be, latest first: the first of them holds. */
export function readWhereabouts(db: Db, partId: number): Whereabouts[] {
  return db
    .prepare<[number], Omit<Whereabouts, 'deed'> & { at: string; by: string }>(
      'SELECT place, customer, since, text, at, by FROM part_whereabouts WHERE part_id = ? ORDER BY id DESC',
    )
    .all(partId)
    .map(({ at, by, ...where }) => ({ ...where, deed: { at, by } }));
}
