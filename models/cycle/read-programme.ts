import { celsiusFrom, round9, type TemperatureUnit, temperatureFromCelsius } from '../units.ts';
import type { Programme, ProgrammeStep } from './programme.ts';
import { figure } from './words-of-figures.ts';

/** A programme as a person types it: figures are still text. */
export interface TypedProgramme {
  readonly unit: TemperatureUnit;
  readonly start: string;
  readonly steps: readonly TypedStep[];
}

export type TypedStep =
  | { readonly kind: 'ramp'; readonly rate: string; readonly to: string }
  | { readonly kind: 'hold'; readonly minutes: string };

export type ProgrammeField = 'start' | 'rate' | 'to' | 'minutes' | 'steps';

/** Why one field cannot stand; `step` counts from 0 and is null for the start and the programme as a whole. */
export interface ProgrammeRefusal {
  readonly step: number | null;
  readonly field: ProgrammeField;
  readonly because: string;
}

export interface ReadProgramme {
  /** Null where anything is refused. */
  readonly programme: Programme | null;
  readonly refusals: readonly ProgrammeRefusal[];
}

/** Longest programme that is tried, min: 30 days. */
const LONGEST_MIN = 43_200;
/** What a thermoset may be held at, °C: the range a resin's `validC` may be written in. */
const COLDEST_C = -100;
const HOTTEST_C = 450;
/** No oven starts hotter; room temperature in K looks like this. */
const HOTTEST_START_C = 250;

/** The programme that was typed, or why it cannot be, field by field. */
export function readProgramme(typed: TypedProgramme): ReadProgramme {
  const refusals: ProgrammeRefusal[] = [];
  const read = (step: number | null, field: ProgrammeField, text: string, whyNot: (value: number) => string | null) => {
    const value = figureFrom(text);
    const because = value === null ? whyNoFigure(text, field, typed.unit) : whyNot(value);
    if (because !== null) refusals.push({ step, field, because });
    return value ?? Number.NaN;
  };
  const { unit } = typed;
  const start = read(null, 'start', typed.start, (value) => whyNotStart(value, unit));
  let temperature = start;
  let minutes = 0;
  const steps = typed.steps.map((step, n): ProgrammeStep => {
    if (step.kind === 'hold') {
      const held = read(n, 'minutes', step.minutes, (value) => (value > 0 ? null : 'Expected more than 0 min.'));
      minutes += held;
      return { kind: 'hold', minutes: held };
    }
    const from = temperature;
    const rate = read(n, 'rate', step.rate, (value) => whyNotRate(value, unit));
    const to = read(n, 'to', step.to, (value) => whyNotTarget(value, from, unit));
    minutes += Math.abs(to - from) / rate;
    temperature = to;
    return { kind: 'ramp', rate, to };
  });
  if (steps.length === 0) {
    refusals.push({ step: null, field: 'steps', because: 'The programme is empty: add a ramp or a hold.' });
  } else if (refusals.length === 0 && minutes > LONGEST_MIN) {
    const because = `The programme takes ${Math.round(minutes)} min; expected at most ${LONGEST_MIN} min, 30 days.`;
    refusals.push({ step: null, field: 'steps', because });
  }
  return { programme: refusals.length === 0 ? { unit, start, steps } : null, refusals };
}

/** A programme as text to be edited. */
export function typedFrom({ unit, start, steps }: Programme): TypedProgramme {
  return {
    unit,
    start: textOf(start),
    steps: steps.map((step) =>
      step.kind === 'hold'
        ? { kind: 'hold', minutes: textOf(step.minutes) }
        : { kind: 'ramp', rate: textOf(step.rate), to: textOf(step.to) },
    ),
  };
}

/** The figure in a text: a point or a comma before its decimals; null where it is none. */
export function figureFrom(text: string): number | null {
  const plain = text.trim().replace('\u2212', '-').replace(',', '.');
  return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null;
}

/** Why a temperature cannot be one of a cure; null where it can. */
export function whyNotTemperature(temperature: number, unit: TemperatureUnit): string | null {
  const temperatureC = celsiusFrom(temperature, unit);
  if (temperatureC < -273.15) return `Below absolute zero, ${inUnit(-273.15, unit)}.`;
  if (temperatureC < COLDEST_C || temperatureC > HOTTEST_C) {
    return `Expected ${inUnit(COLDEST_C, unit)} to ${inUnit(HOTTEST_C, unit)}. Is it in ${others(unit)}?`;
  }
  return null;
}

function whyNotStart(start: number, unit: TemperatureUnit): string | null {
  const because = whyNotTemperature(start, unit);
  if (because !== null || celsiusFrom(start, unit) <= HOTTEST_START_C) return because;
  return `Expected a start of at most ${inUnit(HOTTEST_START_C, unit)}. Is it in ${others(unit)}?`;
}

function whyNotTarget(to: number, from: number, unit: TemperatureUnit): string | null {
  const because = whyNotTemperature(to, unit);
  if (because !== null) return because;
  return to === from ? `It is at ${figure(to)} ${unit} already: a ramp goes to another temperature.` : null;
}

function whyNotRate(rate: number, unit: TemperatureUnit): string | null {
  if (rate > 0) return null;
  const sign = 'The temperature it goes to says whether it heats or cools.';
  return `Expected a rate above 0 ${unit}/min. ${sign}`;
}

function whyNoFigure(text: string, field: ProgrammeField, unit: TemperatureUnit): string {
  if (text.trim() === '') return 'Expected a figure; nothing is typed.';
  const wanted = { start: unit, to: unit, rate: `${unit}/min`, minutes: 'min', steps: '' }[field];
  return `"${text.trim()}" is no figure; expected one in ${wanted}, without the unit.`;
}

function others(unit: TemperatureUnit): string {
  return unit === '°C' ? 'K or °F' : 'K';
}

function inUnit(temperatureC: number, unit: TemperatureUnit): string {
  return `${figure(temperatureFromCelsius(temperatureC, unit))} ${unit}`;
}

function textOf(value: number): string {
  return String(round9(value));
}
