import type { Db } from './database.ts';
import { holdsNow, type PlaceRow, readPlaces } from './instrument-places.ts';

/** Runs, in order of time, that may have been read by an instrument: those of what it sat on while it sat there. */
export function readRunsNear(
  db: Db,
  instrumentId: number,
  { fromMs, untilMs }: { readonly fromMs: number; readonly untilMs: number },
): { readonly run: number; readonly beganMs: number }[] {
  const found = new Map<number, number>();
  for (const place of readPlaces(db, instrumentId).filter(holdsNow)) {
    const given = {
      id: place.holderId,
      fromMs: Math.max(fromMs, place.fromMs),
      untilMs: Math.min(untilMs, place.untilMs ?? Number.POSITIVE_INFINITY),
    };
    for (const { run, begun } of db.prepare<object, { run: number; begun: number }>(sqlOf(place)).all(given)) {
      found.set(run, begun);
    }
  }
  return [...found].sort(([a, one], [b, other]) => one - other || a - b).map(([run, beganMs]) => ({ run, beganMs }));
}

const OVERLAPS = 'runs.until_ms >= @fromMs AND runs.from_ms < @untilMs';

function sqlOf({ on }: PlaceRow): string {
  const select = 'SELECT DISTINCT runs.id AS run, runs.from_ms AS begun FROM runs';
  if (on.kind === 'vessel') return `${select} WHERE vessel_id = @id AND ${OVERLAPS}`;
  if (on.kind === 'recorder') {
    return `${select} JOIN run_sources ON run_id = runs.id
      WHERE recorder_id = @id AND ${OVERLAPS}`;
  }
  return `${select} JOIN live_sources ON live_sources.vessel_id = runs.vessel_id
    WHERE live_sources.id = @id AND ${OVERLAPS}`;
}
