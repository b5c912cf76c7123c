import { DomainError } from '../../models/errors.ts';
import type { Db } from './database.ts';
import { lastArrival } from './live-arrivals.ts';
import { prepared } from './prepared.ts';

/** A run that is or was logged as it happened. */
export interface LiveRunRow {
  readonly run: number;
  readonly vesselId: number;
  readonly begunMs: number;
  /** The last arrival before it was begun. */
  readonly begunArrival: number;
  /** Scans up to here count; null while it runs. */
  readonly endedMs: number | null;
  readonly endedArrival: number | null;
  readonly closedAt: string | null;
  readonly closedArrival: number | null;
}

export function insertLiveRun(db: Db, run: number, vesselId: number, begunMs: number): void {
  const open = findOpenRunOf(db, vesselId);
  if (open !== undefined) {
    throw new DomainError('state-conflict', `Run ${open.run} is open in this vessel; end and close it first`, {
      run: open.run,
    });
  }
  db.prepare('INSERT INTO live_runs (run_id, vessel_id, begun_ms, begun_arrival) VALUES (?, ?, ?, ?)').run(
    run,
    vesselId,
    begunMs,
    lastArrival(db),
  );
}

export function findLiveRun(db: Db, run: number): LiveRunRow | undefined {
  return db.prepare<[number], LiveRunRow>(`${SELECT} WHERE run_id = ?`).get(run);
}

/** The run that is open, running or ended, in a vessel. */
export function findOpenRunOf(db: Db, vesselId: number): LiveRunRow | undefined {
  return prepared<[number], LiveRunRow>(db, `${SELECT} WHERE vessel_id = ? AND closed_at IS NULL`).get(vesselId);
}

export function findOpenRun(db: Db, run: number): LiveRunRow | undefined {
  return db.prepare<[number], LiveRunRow>(`${SELECT} WHERE run_id = ? AND closed_at IS NULL`).get(run);
}

export function listOpenRuns(db: Db): LiveRunRow[] {
  return db.prepare<[], LiveRunRow>(`${SELECT} WHERE closed_at IS NULL ORDER BY run_id`).all();
}

/** The open run of that number; one that was closed, or never logged live, is refused. */
export function requireOpenRun(db: Db, run: number): LiveRunRow {
  const row = findLiveRun(db, run);
  if (row !== undefined && row.closedAt === null) return row;
  const why = row === undefined ? 'was not logged as it happened' : 'is closed already';
  throw new DomainError('state-conflict', `Run ${run} ${why}`, { run });
}

/** Where the last run of a vessel ended, ms; null before the first. */
export function lastEndOf(db: Db, vesselId: number): number | null {
  return (
    db
      .prepare<[number], number | null>('SELECT max(ended_ms) FROM live_runs WHERE vessel_id = ?')
      .pluck()
      .get(vesselId) ?? null
  );
}

export function markEnded(db: Db, run: number, endedMs: number): void {
  db.prepare('UPDATE live_runs SET ended_ms = ?, ended_arrival = ? WHERE run_id = ?').run(
    endedMs,
    lastArrival(db),
    run,
  );
}

export function markClosed(db: Db, run: number, at: string): void {
  db.prepare('UPDATE live_runs SET closed_at = ?, closed_arrival = ? WHERE run_id = ?').run(at, lastArrival(db), run);
}

/** Closed runs whose live rows, merged and verified, are still there. */
export function listRunsToClear(db: Db): LiveRunRow[] {
  return db
    .prepare<[], LiveRunRow>(`${SELECT} WHERE cleared_at IS NULL AND closed_at IS NOT NULL ORDER BY run_id`)
    .all();
}

export function markCleared(db: Db, run: number, at: string): void {
  db.prepare('UPDATE live_runs SET cleared_at = ? WHERE run_id = ?').run(at, run);
}

const SELECT = `SELECT run_id AS run, vessel_id AS vesselId, begun_ms AS begunMs, begun_arrival AS begunArrival,
  ended_ms AS endedMs, ended_arrival AS endedArrival, closed_at AS closedAt, closed_arrival AS closedArrival
  FROM live_runs`;
