import type { Db } from './database.ts';

/** A part that two loads hold at one time in different vessels. */
export interface LoadClash {
  readonly part: string;
  readonly run: number;
  readonly vessel: string;
  readonly fromMs: number;
  /** Null while it goes on. */
  readonly untilMs: number | null;
}

/**
 * The first piece of a run's load that another run, in another vessel, held while this one went on. A lot of like pieces
 * may lie in two vessels at once; runs of which the vessel is not known are not compared.
 */
export function findLoadClash(db: Db, run: number): LoadClash | undefined {
  return db.prepare<object, LoadClash>(SELECT).get({ run });
}

/** An open run that has not ended lasts until further notice. */
const SPANS = `
  SELECT runs.id, runs.vessel_id, from_ms,
    CASE WHEN live_runs.run_id IS NOT NULL AND ended_ms IS NULL AND closed_at IS NULL THEN NULL
      ELSE max(until_ms, coalesce(ended_ms, until_ms)) END AS until_ms
  FROM runs LEFT JOIN live_runs ON live_runs.run_id = runs.id`;

const SELECT = `
  SELECT serial AS part, other.id AS run, vessels.name AS vessel, other.from_ms AS fromMs, other.until_ms AS untilMs
  FROM load_parts AS own
  JOIN (${SPANS} WHERE runs.id = @run) AS mine
  JOIN load_parts AS elsewhere ON elsewhere.part_id = own.part_id AND elsewhere.quantity = 1
  JOIN loads ON loads.id = elsewhere.load_id AND loads.run_id <> @run
    AND loads.id = (SELECT max(id) FROM loads AS later WHERE later.run_id = loads.run_id)
  JOIN (${SPANS}) AS other ON other.id = loads.run_id
  JOIN vessels ON vessels.id = other.vessel_id
  JOIN parts ON parts.id = own.part_id
  WHERE own.load_id = (SELECT max(id) FROM loads WHERE run_id = @run) AND own.quantity = 1
    AND other.vessel_id <> mine.vessel_id
    AND (mine.until_ms IS NULL OR other.from_ms < mine.until_ms)
    AND (other.until_ms IS NULL OR mine.from_ms < other.until_ms)
  ORDER BY own.n, other.id LIMIT 1`;
