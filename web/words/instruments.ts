import type {
  AddCalibrationRequest,
  InstrumentLine,
  InstrumentPlace,
  PlaceInstrumentRequest,
  SetInstrumentRequest,
} from '../../server/contract/instruments.ts';
import { numberIn } from './typed.ts';

export const STANDING_WORDS: Readonly<Record<InstrumentLine['standing'], string>> = {
  'in-date': 'in date',
  'due-soon': 'due soon',
  'out-of-date': 'out of date',
  'not-on-record': 'no record',
  'out-of-use': 'out of use',
};

export const STANDING_MARKS = {
  'in-date': 'met',
  'due-soon': 'awaits',
  'out-of-date': 'not-met',
  'not-on-record': 'cannot-tell',
  'out-of-use': 'cannot-tell',
} as const;

export const KIND_WORDS: Readonly<Record<InstrumentLine['kind'], string>> = {
  thermocouple: 'Thermocouple',
  pressure: 'Pressure gauge',
  vacuum: 'Vacuum gauge',
};

/** `Thermocouple, type K`. */
export function whatItIs({ kind, type }: Pick<InstrumentLine, 'kind' | 'type'>): string {
  return type === null ? KIND_WORDS[kind] : `${KIND_WORDS[kind]}, type ${type}`;
}

export function placeWords({ on, channel }: Pick<InstrumentPlace, 'on' | 'channel'>): string {
  return `${channel} of ${on.name}${on.kind === 'vessel' ? '' : ` (${on.kind})`}`;
}

export interface InstrumentForm {
  readonly instrument: string;
  readonly kind: InstrumentLine['kind'];
  readonly type: string;
  readonly makerNumber: string;
}

export const EMPTY_INSTRUMENT: InstrumentForm = { instrument: '', kind: 'thermocouple', type: 'K', makerNumber: '' };

export function requestOfInstrument({ instrument, kind, type, makerNumber }: InstrumentForm): SetInstrumentRequest {
  const of = kind === 'thermocouple' && type !== '' ? { type: type as NonNullable<SetInstrumentRequest['type']> } : {};
  return { instrument: instrument.trim(), kind, ...of, makerNumber: makerNumber.trim() || null };
}

/** A calibration as it stands in a form: text everywhere, points a line each. */
export interface CalibrationForm {
  readonly done: string;
  readonly until: string;
  readonly by: string;
  readonly certificate: string;
  readonly unit: string;
  readonly points: string;
  readonly uncertainty: string;
  readonly found: '' | 'in' | 'out';
  readonly foundPoints: string;
  readonly replaces: string;
  readonly reason: string;
}

export function emptyCalibration(unit: string): CalibrationForm {
  const empty = { done: '', until: '', by: '', certificate: '', points: '', uncertainty: '' };
  return { ...empty, unit, found: '', foundPoints: '', replaces: '', reason: '' };
}

export function requestOfCalibration(form: CalibrationForm): AddCalibrationRequest {
  const asFound =
    form.found === ''
      ? null
      : form.found === 'in'
        ? { outOfTolerance: false as const }
        : { outOfTolerance: true as const, points: pointsIn(form.foundPoints) };
  return {
    done: form.done.trim(),
    until: form.until.trim(),
    by: form.by.trim(),
    certificate: form.certificate.trim() || null,
    unit: form.unit,
    points: pointsIn(form.points),
    uncertainty: form.uncertainty.trim() === '' ? null : numberIn(form.uncertainty),
    asFound,
    ...(form.replaces === '' ? {} : { replaces: Number(form.replaces), reason: form.reason.trim() }),
  };
}

/** Points of a text with a reading and a correction a line. What is no figure is sent as none, and refused by name. */
export function pointsIn(text: string): [number, number][] {
  return text
    .split('\n')
    .filter((line) => line.trim() !== '')
    .map((line) => {
      const [reading = '', correction = ''] = line.trim().split(/[\s;]+/);
      return [numberIn(reading) ?? Number.NaN, numberIn(correction) ?? Number.NaN];
    });
}

/** `−0.4 at 100, −0.6 at 180 °C`. */
export function pointsWords(points: readonly (readonly [number, number])[], unit: string): string {
  if (points.every(([, by]) => by === 0)) return 'needs no correction';
  return `${points.map(([reading, by]) => `${signed(by)} at ${reading}`).join(', ')} ${unit}`;
}

function signed(figure: number): string {
  return figure > 0 ? `+${figure}` : String(figure).replace('-', '−');
}

export interface PlaceForm {
  readonly kind: InstrumentPlace['on']['kind'];
  readonly name: string;
  readonly channel: string;
}

/** Placed now. */
export function requestOfPlace({ kind, name, channel }: PlaceForm, nowMs: number): PlaceInstrumentRequest {
  return { on: { kind, name: name.trim() }, channel: channel.trim(), from: new Date(nowMs).toISOString() };
}
