import { newWire } from '../../models/log/thermocouple/new-wire.ts';
import type { CalibrationLine, InstrumentLine, Instruments, InstrumentView } from '../contract/instruments.ts';
import type { VesselSurveys } from '../contract/surveys.ts';
import { readAudit } from '../store/audit.ts';
import { readCalibrations } from '../store/calibrations.ts';
import type { Db } from '../store/database.ts';
import { dayIn } from '../store/instants.ts';
import { holdsNow, type PlaceRow, readPlaces } from '../store/instrument-places.ts';
import { type InstrumentRow, listInstruments, requireInstrument } from '../store/instruments.ts';
import { readAccuracyTests, readRanges, readSurveys } from '../store/vessel-surveys.ts';
import { requireVessel } from '../store/vessels.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';

/** Days ahead of which something counts as due soon. */
export const DUE_SOON_DAYS = 14;

/** Every instrument, due soonest first, those out of use last. */
export function instrumentsView(db: Db, nowMs: number): Instruments {
  const today = todayOf(db, nowMs);
  const lines = listInstruments(db).map((row) =>
    lineOf(row, readCalibrations(db, row.id), readPlaces(db, row.id), today),
  );
  const order = ({ standing, due }: InstrumentLine) => `${standing === 'out-of-use' ? 1 : 0} ${due ?? ''}`;
  return { today, instruments: lines.sort((a, b) => (order(a) < order(b) ? -1 : order(a) > order(b) ? 1 : 0)) };
}

export function instrumentView(db: Db, instrument: string, nowMs: number): InstrumentView {
  const row = requireInstrument(db, instrument);
  const today = todayOf(db, nowMs);
  const calibrations = readCalibrations(db, row.id);
  const places = readPlaces(db, row.id);
  return {
    ...lineOf(row, calibrations, places, today),
    today,
    calibrations,
    allPlaces: places.map(placeOf),
    newWire: row.type === null ? null : newWire(row.type, 180),
    audit: readAudit(db, { subject: `instrument/${instrument}`, limit: 100 }).lines,
  };
}

export function vesselSurveysView(db: Db, vessel: string, nowMs: number): VesselSurveys {
  const id = requireVessel(db, vessel);
  const today = todayOf(db, nowMs);
  const surveys = readSurveys(db, id);
  const accuracyTests = readAccuracyTests(db, id);
  return {
    vessel,
    today,
    survey: standingOf(surveys, today),
    accuracy: standingOf(accuracyTests, today),
    surveys,
    accuracyTests,
    ranges: readRanges(db, id),
  };
}

export function todayOf(db: Db, nowMs: number): string {
  return dayIn(zoneOfWorkshop(db), nowMs);
}

function lineOf(
  { instrument, kind, type, makerNumber, outOfUse, at, by }: InstrumentRow,
  calibrations: readonly CalibrationLine[],
  places: readonly PlaceRow[],
  today: string,
): InstrumentLine {
  const { standing, due } = standingOf(calibrations, today);
  return {
    instrument,
    kind,
    type,
    makerNumber,
    standing: outOfUse ? 'out-of-use' : standing,
    due,
    places: places.filter((place) => holdsNow(place) && place.until === null).map(placeOf),
    recorded: { at, by },
  };
}

/** How long records of validity hold, those that were replaced left out. */
export function standingOf(
  records: readonly { readonly until: string; readonly replacedBy: number | null }[],
  today: string,
): VesselSurveys['survey'] {
  const due = records
    .flatMap(({ until, replacedBy }) => (replacedBy === null ? [until] : []))
    .sort()
    .at(-1);
  if (due === undefined) return { standing: 'not-on-record', due: null };
  if (due < today) return { standing: 'out-of-date', due };
  return { standing: due <= addDays(today, DUE_SOON_DAYS) ? 'due-soon' : 'in-date', due };
}

export function addDays(day: string, days: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + days * 86_400_000).toISOString().slice(0, 10);
}

function placeOf({
  instrumentId: _id,
  instrument: _code,
  holderId: _holder,
  fromMs: _from,
  untilMs: _until,
  ...place
}: PlaceRow) {
  return place;
}
