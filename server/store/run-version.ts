import type { Db } from './database.ts';
import { prepared } from './prepared.ts';

/** Changes whenever what a run is judged by, other than its scans, was written to. */
export type RunVersion = string;

/** The latest rows a run's judgement rests on besides its readings, as one text to compare. */
export function versionOfRun(db: Db, run: number): RunVersion {
  const row = prepared<[number, number, number], { version: string }>(
    db,
    `SELECT coalesce((SELECT max(id) FROM loads WHERE run_id = ?), 0) || ' ' ||
            coalesce((SELECT max(id) FROM sensor_decisions WHERE run_id = ?), 0) || ' ' ||
            coalesce((SELECT max(live_source_settings.id) FROM live_source_settings
                      JOIN live_sources ON live_sources.id = source_id
                      JOIN live_runs ON live_runs.vessel_id = live_sources.vessel_id WHERE run_id = ?), 0) || ' ' ||
            coalesce((SELECT max(id) FROM calibrations), 0) || ' ' ||
            coalesce((SELECT max(id) FROM instrument_places), 0) AS version`,
  ).get(run, run, run);
  return row?.version ?? '';
}
