import type { SensorDecision } from '../contract/runs.ts';
import type { Db } from './database.ts';

export function insertDecision(db: Db, run: number, { deed, from, ...decision }: SensorDecision): void {
  db.prepare(
    `INSERT INTO sensor_decisions (run_id, channel, decision, kind, since, reason, at, by)
     VALUES (@run, @channel, @decision, @kind, @from, @reason, @at, @by)`,
  ).run({ run, from, ...decision, ...deed });
}

/** Every decision of a run in the order they were taken. */
export function readDecisions(db: Db, run: number): SensorDecision[] {
  return db
    .prepare<[number], Omit<SensorDecision, 'deed'> & { at: string; by: string }>(
      `SELECT channel, decision, kind, since AS "from", reason, at, by FROM sensor_decisions
       WHERE run_id = ? ORDER BY id`,
    )
    .all(run)
    .map(({ at, by, ...decision }) => ({ ...decision, deed: { at, by } }));
}
