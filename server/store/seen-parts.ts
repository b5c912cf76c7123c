import type { AskedParts } from '../contract/ask.ts';
import type { KinKind } from '../contract/trace.ts';
import type { Db } from './database.ts';
import { readHeldParts } from './held-parts.ts';
import { isoFromMs } from './instants.ts';
import { readKin, type Span } from './kin.ts';
import { prepared } from './prepared.ts';

/** A part, and a run of its between two instants. */
export interface PartInRun {
  readonly partId: number;
  readonly run: number;
  readonly fromMs: number;
}

/** Parts that have something of a kind, with their runs in the span; where the span is not bounded, also those in none. */
export function readSeen(db: Db, kind: KinKind, key: string, span: Span): Map<number, PartInRun[]> {
  const kin = readKin(db, kind, [key], span);
  const partIds = [...new Set(kin.map(({ partId }) => partId))];
  const ownRuns = new Set(kin.flatMap(({ partId, run }) => (run === null ? [] : [`${partId} ${run}`])));
  const isBounded = Number.isFinite(span.fromMs) || Number.isFinite(span.untilMs);
  const seen = new Map<number, PartInRun[]>(isBounded ? [] : partIds.map((id) => [id, []]));
  const given = { parts: JSON.stringify(partIds), ...span };
  for (const row of prepared<[object], PartInRun>(db, RUNS).all(given)) {
    if (ownRuns.size > 0 && !ownRuns.has(`${row.partId} ${row.run}`)) continue;
    const known = seen.get(row.partId);
    if (known === undefined) seen.set(row.partId, [row]);
    else known.push(row);
  }
  return seen;
}

/** Parts of runs whose load has a channel of theirs, or of none in particular: then every part of the run. */
export function readPartsAt(db: Db, channels: readonly { readonly run: number; readonly channel: string }[]) {
  const seen = new Map<number, PartInRun[]>();
  for (const { run, channel } of channels) {
    const given = { run, channel };
    const own = prepared<[object], PartInRun>(db, AT_CHANNEL).all(given);
    for (const row of own.length > 0 ? own : prepared<[object], PartInRun>(db, OF_RUN).all(given)) {
      const known = seen.get(row.partId) ?? [];
      if (!known.some((one) => one.run === run)) seen.set(row.partId, [...known, row]);
    }
  }
  return seen;
}

/** Seen parts as they are told, the latest cured first. */
export function tellSeen(db: Db, seen: ReadonlyMap<number, readonly PartInRun[]>, limit: number): AskedParts['parts'] {
  const lastOf = (runs: readonly PartInRun[]) => runs.at(-1)?.fromMs ?? Number.NEGATIVE_INFINITY;
  const order = [...seen].sort(([a, one], [b, other]) => lastOf(other) - lastOf(one) || b - a).slice(0, limit);
  const rows = readHeldParts(
    db,
    order.map(([partId]) => partId),
  );
  const byId = new Map(rows.map((row) => [row.partId, row]));
  return order.flatMap(([partId, runs]) => {
    const row = byId.get(partId);
    if (row === undefined) return [];
    const { serial, title, verdict, whereabouts } = row;
    const where = whereabouts === null ? null : { place: whereabouts.place, customer: whereabouts.customer };
    const last = runs.at(-1);
    const lastRunAt = last === undefined ? null : isoFromMs(last.fromMs);
    return [{ serial, title, runs: runs.map(({ run }) => run), lastRunAt, verdict, whereabouts: where }];
  });
}

const HOLDS = 'loads.id = (SELECT max(id) FROM loads AS later WHERE later.run_id = loads.run_id)';

const RUNS = `
  WITH named (part_id) AS (SELECT value FROM json_each(@parts))
  SELECT load_parts.part_id AS partId, runs.id AS run, from_ms AS fromMs
  FROM named CROSS JOIN load_parts ON load_parts.part_id = named.part_id
  JOIN loads ON loads.id = load_id AND ${HOLDS} JOIN runs ON runs.id = run_id
  WHERE from_ms >= @fromMs AND from_ms < @untilMs ORDER BY from_ms, runs.id`;

const OF_RUN = `
  SELECT load_parts.part_id AS partId, runs.id AS run, from_ms AS fromMs FROM runs
  JOIN loads ON loads.run_id = runs.id AND ${HOLDS} JOIN load_parts ON load_id = loads.id
  WHERE runs.id = @run AND @channel IS NOT NULL`;

const AT_CHANNEL = `
  SELECT DISTINCT load_places.part_id AS partId, runs.id AS run, from_ms AS fromMs FROM runs
  JOIN loads ON loads.run_id = runs.id AND ${HOLDS} JOIN load_places ON load_places.load_id = loads.id
  WHERE runs.id = @run AND channel = @channel`;
