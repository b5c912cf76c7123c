import type { Nonconformance } from '../contract/results.ts';
import type { Db } from './database.ts';

/** What does not conform of a part, as it is known now, by number. */
export function readNonconformances(db: Db, partId: number): Nonconformance[] {
  return db
    .prepare<[number], Row>(
      `SELECT number, text, decision, authority, because, conditions, decided_at AS decidedAt, reason, at, by
       FROM nonconformances AS one WHERE part_id = ?
         AND id = (SELECT max(id) FROM nonconformances AS later WHERE later.part_id = one.part_id AND later.number = one.number)
       ORDER BY id`,
    )
    .all(partId)
    .map(({ number, text, decision: word, authority, because, conditions, decidedAt, reason, at, by }) => ({
      number,
      text,
      decision:
        word === null || authority === null || because === null || decidedAt === null
          ? null
          : { word, authority, because, conditions, at: decidedAt },
      reason,
      deed: { at, by },
    }));
}

export function insertNonconformance(db: Db, partId: number, one: Nonconformance): void {
  const { number, text, decision, reason, deed } = one;
  db.prepare(
    `INSERT INTO nonconformances (part_id, number, text, decision, authority, because, conditions, decided_at, reason,
       at, by)
     VALUES (@partId, @number, @text, @word, @authority, @because, @conditions, @decidedAt, @reason, @at, @by)`,
  ).run({
    partId,
    number,
    text,
    word: decision?.word ?? null,
    authority: decision?.authority ?? null,
    because: decision?.because ?? null,
    conditions: decision?.conditions ?? null,
    decidedAt: decision?.at ?? null,
    reason,
    ...deed,
  });
}

interface Row {
  readonly number: string;
  readonly text: string;
  readonly decision: NonNullable<Nonconformance['decision']>['word'] | null;
  readonly authority: string | null;
  readonly because: string | null;
  readonly conditions: string | null;
  readonly decidedAt: string | null;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}
