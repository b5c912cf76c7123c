import { VESSELS_PATH } from './paths.ts';

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
