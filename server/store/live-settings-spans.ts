import type { Db } from './database.ts';

/** The first scan kept of a source under some settings, ms; null where none is. */
export function firstScanUnder(db: Db, sourceId: number, settingsId: number): number | null {
  return (
    db
      .prepare<[number, number], number>(
        'SELECT time_ms FROM live_scans WHERE source_id = ? AND settings_id = ? ORDER BY time_ms LIMIT 1',
      )
      .pluck()
      .get(sourceId, settingsId) ?? null
  );
}
