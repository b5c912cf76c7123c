import type { Db } from './database.ts';
import { findOpenRunOf, type LiveRunRow, listRunsToClear, markCleared } from './live-runs.ts';
import { listLiveSources } from './live-sources.ts';

/** First and last scan kept of a source, ms; null where none is. */
export function keptSpanOf(db: Db, sourceId: number): { readonly fromMs: number; readonly untilMs: number } | null {
  const [fromMs, untilMs] = ['ASC', 'DESC'].map((order) =>
    db
      .prepare<[number], number>(`SELECT time_ms FROM live_scans WHERE source_id = ? ORDER BY time_ms ${order} LIMIT 1`)
      .pluck()
      .get(sourceId),
  );
  return fromMs === undefined || untilMs === undefined ? null : { fromMs, untilMs };
}

/** Scans of a source after an instant, at most so many, and where they end; null where there are no more. */
export function countScansAfter(
  db: Db,
  sourceId: number,
  afterMs: number,
  atMost: number,
): { readonly scans: number; readonly bytes: number; readonly untilMs: number | null } {
  const row = db
    .prepare<object, { scans: number; bytes: number | null; untilMs: number | null }>(
      `SELECT count(*) AS scans, sum(length(packed)) AS bytes, max(time_ms) AS untilMs FROM
         (SELECT time_ms, packed FROM live_scans WHERE source_id = @sourceId AND time_ms > @afterMs
          ORDER BY time_ms LIMIT @atMost)`,
    )
    .get({ sourceId, afterMs, atMost });
  return { scans: row?.scans ?? 0, bytes: row?.bytes ?? 0, untilMs: row?.untilMs ?? null };
}

export interface Pruning {
  readonly sourceId: number;
  readonly vesselId: number;
  /** Scans before it go. */
  readonly beforeMs: number;
  readonly atMost: number;
}

/** Takes away the oldest scans of a source; those of an open run stay. Says how many went, and their bytes. */
export function pruneScans(
  db: Db,
  { sourceId, vesselId, beforeMs, atMost }: Pruning,
): { scans: number; bytes: number } {
  return db
    .transaction(() => {
      const run = findOpenRunOf(db, vesselId);
      const limitMs = Math.min(beforeMs, run?.begunMs ?? Number.MAX_VALUE);
      const gone = db
        .prepare<object, { scans: number; bytes: number | null; lastMs: number | null }>(
          `SELECT count(*) AS scans, sum(length(packed)) AS bytes, max(time_ms) AS lastMs FROM
             (SELECT time_ms, packed FROM live_scans WHERE source_id = @sourceId AND time_ms < @limitMs
              ORDER BY time_ms LIMIT @atMost)`,
        )
        .get({ sourceId, limitMs, atMost });
      if (gone === undefined || gone.lastMs === null) return { scans: 0, bytes: 0 };
      db.prepare('DELETE FROM live_scans WHERE source_id = ? AND time_ms <= ?').run(sourceId, gone.lastMs);
      return { scans: gone.scans, bytes: gone.bytes ?? 0 };
    })
    .immediate();
}

/**
 * Takes away live rows of a closed run, at most so many: they were merged into its blocks and compared with them.
 * What came after it was closed stays in the rolling store. Null where no closed run has any left.
 */
export function clearClosedRun(db: Db, atMost: number, at: string): ClearedScans | null {
  const [closed] = listRunsToClear(db);
  if (closed === undefined) return null;
  return db
    .transaction(() => {
      const cleared = listLiveSources(db, closed.vesselId)
        .map(({ id }) => clearScans(db, closed, id, atMost))
        .find(({ scans }) => scans > 0);
      if (cleared === undefined) markCleared(db, closed.run, at);
      return cleared ?? { sourceId: 0, scans: 0, bytes: 0 };
    })
    .immediate();
}

export interface ClearedScans {
  readonly sourceId: number;
  readonly scans: number;
  readonly bytes: number;
}

function clearScans(db: Db, closed: LiveRunRow, sourceId: number, atMost: number): ClearedScans {
  const { begunMs, endedMs, closedArrival } = closed;
  const gone = db
    .prepare<object, number>(
      `DELETE FROM live_scans WHERE (source_id, time_ms) IN
         (SELECT source_id, time_ms FROM live_scans WHERE source_id = @sourceId
            AND time_ms BETWEEN @begunMs AND @endedMs AND arrival <= @closedArrival LIMIT @atMost)
       RETURNING length(packed)`,
    )
    .pluck()
    .all({ sourceId, begunMs, endedMs, closedArrival, atMost });
  return { sourceId, scans: gone.length, bytes: gone.reduce((sum, bytes) => sum + bytes, 0) };
}
