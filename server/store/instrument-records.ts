import type { Calibration, InstrumentOfChannel, InstrumentRecords } from '../../models/run/instrument-records.ts';
import type { CalibrationLine } from '../contract/instruments.ts';
import { readCalibrationsNow } from './calibrations.ts';
import type { Db } from './database.ts';
import { dayIn } from './instants.ts';
import { type PlaceRow, readPlacesOn } from './instrument-places.ts';
import { zoneOfWorkshop } from './workshop.ts';

/** A channel of a run, and the recorder or live source it came through. */
export interface RecordedChannel {
  readonly channel: string;
  readonly recorderId: number | null;
  /** Name of the live source. */
  readonly source: string | null;
}

/**
 * What is on record of the instruments a run was read by, as of the day it began; null where no channel's instrument
 * is known. What sat on a recorder's or source's channel goes before what sat on the vessel's.
 */
export function recordsOfInstruments(
  db: Db,
  run: { readonly vesselId: number | null; readonly fromMs: number; readonly untilMs: number },
  channels: readonly RecordedChannel[],
): InstrumentRecords | null {
  const zone = zoneOfWorkshop(db);
  const from = dayIn(zone, run.fromMs);
  const found: InstrumentOfChannel[] = [];
  for (const one of channels) {
    if (found.some(({ channel }) => channel === one.channel)) continue;
    const places = placesOf(db, run, one);
    const place = places.find(({ fromMs }) => fromMs <= run.fromMs);
    if (place === undefined) continue;
    const calibrations = readCalibrationsNow(db, place.instrumentId);
    found.push({
      channel: one.channel,
      instrument: place.instrument,
      ...onDay(calibrations, from),
      replacedBy: places.find(({ instrument }) => instrument !== place.instrument)?.instrument ?? null,
    });
  }
  if (found.length === 0) return null;
  return { format: 'dwellbook-instruments/1', from, until: dayIn(zone, run.untilMs), channels: found };
}

/** The places on a channel during a run, in order of time. */
export function placesOf(
  db: Db,
  {
    vesselId,
    fromMs,
    untilMs,
  }: { readonly vesselId: number | null; readonly fromMs: number; readonly untilMs: number },
  { channel, recorderId, source }: RecordedChannel,
): PlaceRow[] {
  const during = { fromMs, untilMs, channel };
  const sourceId = source === null ? null : findSourceId(db, source);
  for (const [kind, id] of [
    ['source', sourceId],
    ['recorder', recorderId],
    ['vessel', vesselId],
  ] as const) {
    const places = id === null ? [] : readPlacesOn(db, { kind, id }, during);
    if (places.some((place) => place.fromMs <= fromMs)) return places;
  }
  return [];
}

function findSourceId(db: Db, name: string): number | null {
  return db.prepare<[string], number>('SELECT id FROM live_sources WHERE name = ?').pluck().get(name) ?? null;
}

/** The calibration that holds on a day, the latest done of several; or when the last before ran out. */
export function onDay(
  calibrations: readonly CalibrationLine[],
  day: string,
): Pick<InstrumentOfChannel, 'calibration' | 'ranOut'> {
  const holding = calibrations.find(({ from, until }) => from <= day && day <= until);
  if (holding !== undefined) return { calibration: calibrationOf(holding), ranOut: null };
  const before = calibrations.filter(({ until }) => until < day).map(({ until }) => until);
  return { calibration: null, ranOut: before.sort().at(-1) ?? null };
}

function calibrationOf({
  done,
  from,
  until,
  by,
  certificate,
  unit,
  points,
  uncertainty,
}: CalibrationLine): Calibration {
  return { done, from, until, by, certificate, unit, points, uncertainty };
}
