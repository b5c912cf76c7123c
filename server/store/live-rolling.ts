import type { Db } from './database.ts';
import { findOpenRunOf, listRunsToClear, markCleared } from './live-runs.ts';

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
 * What came after it was closed stays in the rolling store.
 */
export function clearClosedRun(db: Db, atMost: number, at: string): { sourceId: number; scans: number } | null {
  const [closed] = listRunsToClear(db);
  if (closed === undefined) return null;
  const { vesselId, begunMs, endedMs, closedArrival } = closed;
  const sources = db.prepare<[number], number>('SELECT id FROM live_sources WHERE vessel_id = ?').pluck().all(vesselId);
  return db
    .transaction(() => {
      for (const sourceId of sources) {
        const { changes } = db
          .prepare(
            `DELETE FROM live_scans WHERE (source_id, time_ms) IN
               (SELECT source_id, time_ms FROM live_scans WHERE source_id = @sourceId
                  AND time_ms BETWEEN @begunMs AND @endedMs AND arrival <= @closedArrival LIMIT @atMost)`,
          )
          .run({ sourceId, begunMs, endedMs, closedArrival, atMost });
        if (changes > 0) return { sourceId, scans: changes };
      }
      markCleared(db, closed.run, at);
      return { sourceId: 0, scans: 0 };
    })
    .immediate();
}
