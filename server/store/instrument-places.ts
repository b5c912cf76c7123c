import { DomainError } from '../../models/errors.ts';
import type { InstrumentPlace } from '../contract/instruments.ts';
import type { Db } from './database.ts';
import { isoFromMs } from './instants.ts';
import { prepared } from './prepared.ts';
import { requireRecorder } from './recorders.ts';
import { requireVessel } from './vessels.ts';

export type PlaceKind = InstrumentPlace['on']['kind'];

export interface NewPlace {
  readonly instrumentId: number;
  readonly on: { readonly kind: PlaceKind; readonly id: number };
  readonly channel: string;
  readonly fromMs: number;
  readonly untilMs: number | null;
  readonly isVoid: boolean;
  readonly replaces: number | null;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

/** A place as it is stored, with the instrument that sat there. */
export interface PlaceRow extends InstrumentPlace {
  readonly instrumentId: number;
  readonly instrument: string;
  readonly holderId: number;
  readonly fromMs: number;
  readonly untilMs: number | null;
}

export function insertPlace(db: Db, { on, isVoid, ...row }: NewPlace): number {
  const { lastInsertRowid } = db
    .prepare(
      `INSERT INTO instrument_places (instrument_id, vessel_id, recorder_id, source_id, channel, from_ms, until_ms, void,
         replaces_id, reason, at, by)
       VALUES (@instrumentId, @vessel, @recorder, @source, @channel, @fromMs, @untilMs, @isVoid, @replaces, @reason, @at,
         @by)`,
    )
    .run({ vessel: null, recorder: null, source: null, ...row, [on.kind]: on.id, isVoid: isVoid ? 1 : 0 });
  return Number(lastInsertRowid);
}

/** The row of what a channel is a channel of; it must be there. */
export function requireHolder(db: Db, { kind, name }: InstrumentPlace['on']): number {
  if (kind === 'vessel') return requireVessel(db, name);
  if (kind === 'recorder') return requireRecorder(db, name).id;
  const id = db.prepare<[string], number>('SELECT id FROM live_sources WHERE name = ?').pluck().get(name);
  if (id === undefined) throw new DomainError('not-found', `There is no source called "${name}"`, { source: name });
  return id;
}

/** Every place of an instrument, the latest first, those that were replaced among them. */
export function readPlaces(db: Db, instrumentId: number): PlaceRow[] {
  return prepared<[number], StoredRow>(db, `${SELECT} WHERE instrument_id = ? ORDER BY from_ms DESC, place.id DESC`)
    .all(instrumentId)
    .map(rowOf);
}

/** Places on what a channel is a channel of that hold now and overlap a stretch; of one channel where it is named. */
export function readPlacesOn(
  db: Db,
  { kind, id }: NewPlace['on'],
  { fromMs, untilMs, channel = null }: { fromMs: number; untilMs: number | null; channel?: string | null },
): PlaceRow[] {
  return prepared<object, StoredRow>(
    db,
    `${SELECT} WHERE place.${kind}_id = @id AND ${HOLDS} AND (@channel IS NULL OR channel = @channel)
       AND (@untilMs IS NULL OR from_ms <= @untilMs) AND (until_ms IS NULL OR until_ms > @fromMs)
     ORDER BY from_ms, place.id`,
  )
    .all({ id, channel, fromMs, untilMs })
    .map(rowOf);
}

export function holdsNow({ replacedBy, void: isVoid }: InstrumentPlace): boolean {
  return replacedBy === null && !isVoid;
}

const HOLDS = `void = 0 AND NOT EXISTS (SELECT 1 FROM instrument_places AS later WHERE later.replaces_id = place.id)`;

interface StoredRow {
  readonly id: number;
  readonly instrumentId: number;
  readonly instrument: string;
  readonly kind: PlaceKind;
  readonly holder: string;
  readonly holderId: number;
  readonly channel: string;
  readonly fromMs: number;
  readonly untilMs: number | null;
  readonly isVoid: number;
  readonly replaces: number | null;
  readonly replacedBy: number | null;
  readonly reason: string | null;
  readonly at: string;
  readonly by: string;
}

const SELECT = `
  SELECT place.id, instrument_id AS instrumentId, instruments.code AS instrument,
    CASE WHEN place.vessel_id IS NOT NULL THEN 'vessel' WHEN recorder_id IS NOT NULL THEN 'recorder' ELSE 'source' END AS kind,
    coalesce(vessels.name, recorders.name, live_sources.name) AS holder,
    coalesce(place.vessel_id, recorder_id, source_id) AS holderId,
    channel, from_ms AS fromMs, until_ms AS untilMs, void AS isVoid, replaces_id AS replaces,
    (SELECT id FROM instrument_places AS later WHERE later.replaces_id = place.id) AS replacedBy, reason, place.at, place.by
  FROM instrument_places AS place JOIN instruments ON instruments.id = instrument_id
  LEFT JOIN vessels ON vessels.id = place.vessel_id
  LEFT JOIN recorders ON recorders.id = place.recorder_id
  LEFT JOIN live_sources ON live_sources.id = place.source_id`;

function rowOf({ kind, holder, isVoid, at, by, ...row }: StoredRow): PlaceRow {
  return {
    ...row,
    on: { kind, name: holder },
    from: isoFromMs(row.fromMs),
    until: row.untilMs === null ? null : isoFromMs(row.untilMs),
    void: isVoid === 1,
    deed: { at, by },
  };
}
