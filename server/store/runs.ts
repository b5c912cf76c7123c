import { DomainError } from '../../models/errors.ts';
import type { Db } from './database.ts';

export interface NewRun {
  readonly vesselId: number | null;
  readonly fromMs: number;
  readonly untilMs: number;
  readonly at: string;
  readonly by: string;
}

export function insertRun(db: Db, run: NewRun): number {
  const { lastInsertRowid } = db
    .prepare('INSERT INTO runs (vessel_id, from_ms, until_ms, at, by) VALUES (@vesselId, @fromMs, @untilMs, @at, @by)')
    .run(run);
  return Number(lastInsertRowid);
}

/** A run that was logged live spans at least from its beginning to its end, be there scans or not. */
export function setSpan(db: Db, run: number, fromMs: number, untilMs: number): void {
  db.prepare('UPDATE runs SET from_ms = ?, until_ms = ? WHERE id = ?').run(fromMs, untilMs, run);
}

export function requireRun(db: Db, run: number): void {
  if (db.prepare('SELECT 1 FROM runs WHERE id = ?').get(run) === undefined) {
    throw new DomainError('not-found', `There is no run ${run}`, { run });
  }
}

/** The first scan of a run that must be there, in ms. */
export function startOfRun(db: Db, run: number): number {
  requireRun(db, run);
  return db.prepare<[number], number>('SELECT from_ms FROM runs WHERE id = ?').pluck().get(run) ?? 0;
}

export function setVessel(db: Db, run: number, vesselId: number): void {
  db.prepare('UPDATE runs SET vessel_id = ? WHERE id = ?').run(vesselId, run);
}

/** The span of a run is that of the sources it is judged by, by the clock each is read by; without one it stays. */
export function refreshSpan(db: Db, run: number): void {
  db.prepare(
    `UPDATE runs SET (from_ms, until_ms) = (
       SELECT coalesce(min(run_sources.from_ms + coalesce(shift_ms, 0)), runs.from_ms),
              coalesce(max(run_sources.until_ms + coalesce(shift_ms, 0)), runs.until_ms)
       FROM run_sources LEFT JOIN source_joins ON source_joins.source_id = run_sources.id
       WHERE run_id = @run AND id NOT IN (SELECT replaces_id FROM run_sources WHERE replaces_id IS NOT NULL))
     WHERE id = @run`,
  ).run({ run });
}

/** The run a file belongs to already. */
export function findRunOfFile(db: Db, sha256: string): number | null {
  return (
    db
      .prepare<[string], number>(
        `SELECT run_id FROM files JOIN source_files ON file_id = files.id JOIN run_sources ON run_sources.id = source_id
         WHERE files.sha256 = ? LIMIT 1`,
      )
      .pluck()
      .get(sha256) ?? null
  );
}

/** Recorded files of a name: the run, and the bytes they are told by. */
export function findRecordedByName(db: Db, name: string): { run: number; bytes: number; sha256: string }[] {
  return db
    .prepare<[string], { run: number; bytes: number; sha256: string }>(
      `SELECT DISTINCT run_id AS run, files.bytes, files.sha256
       FROM source_files JOIN run_sources ON run_sources.id = source_id JOIN files ON files.id = file_id
       WHERE source_files.name = ?`,
    )
    .all(name);
}
