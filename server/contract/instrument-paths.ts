import { type Query, RUNS_PATH, VESSELS_PATH, withQuery } from './paths.ts';

export const INSTRUMENTS_PATH = '/api/instruments';

export function instrumentPath(code: string): string {
  return `${INSTRUMENTS_PATH}/${encodeURIComponent(code)}`;
}

export function instrumentCalibrationsPath(code: string): string {
  return `${instrumentPath(code)}/calibrations`;
}

export function instrumentPlacesPath(code: string): string {
  return `${instrumentPath(code)}/places`;
}

/** Where an instrument is taken off a place; `place` is its `id`. */
export function instrumentTakeOffPath(code: string, place: number): string {
  return `${instrumentPlacesPath(code)}/${place}/take-off`;
}

export function vesselSurveysPath(vessel: string): string {
  return `${VESSELS_PATH}/${encodeURIComponent(vessel)}/surveys`;
}

export function vesselAccuracyTestsPath(vessel: string): string {
  return `${VESSELS_PATH}/${encodeURIComponent(vessel)}/accuracy-tests`;
}

export function vesselRangePath(vessel: string): string {
  return `${VESSELS_PATH}/${encodeURIComponent(vessel)}/qualified-range`;
}

/** Runs a calibration casts doubt on; `calibration` is its `id`. */
export function instrumentTouchedPath(code: string, calibration: number): string {
  return `${instrumentCalibrationsPath(code)}/${calibration}/touched`;
}

/** Which parts saw something: `kind` and `code`, a thermocouple's `vessel`, `from` and `until` as instants. */
export function askPartsPath(query: Query): string {
  return withQuery('/api/ask/parts', query);
}

export const WITHOUT_RECORD_PATH = '/api/ask/without-record';

/** Events of runs judged otherwise: by what, `by` says. */
export function askVerdictsPath(query: Query): string {
  return withQuery('/api/ask/verdicts/events', query);
}

export function runInstrumentsPath(run: number): string {
  return `${RUNS_PATH}/${run}/instruments`;
}
