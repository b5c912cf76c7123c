import { type TemperatureUnit, temperatureDifferenceFromCelsius, temperatureFromCelsius } from '../../models/units.ts';
import type { LiveReading } from '../../server/contract/live.ts';
import { clock } from './clock.ts';
import { digitsOf, figure, plain } from './figures.ts';

/** What is said wherever a run is watched. */
export const ADVISORY =
  'Advisory only. Dwellbook reads; it controls nothing, and nothing here says that a vessel is safe to open.';

/** Without any news for so long, all figures are told as old. */
export const NO_NEWS_MS = 20_000;

const MINUTE_MS = 60_000;

/** `14:32`: a minute is told only once it has wholly passed, so that "not before" never comes too early. */
export function clockRoundedUp(at: string, zone: string): string {
  return clock(Math.ceil(Date.parse(at) / MINUTE_MS) * MINUTE_MS, zone);
}

/** Whole minutes still to go, rounded up. */
export function minutesLeft(minutes: number): number {
  return Math.ceil(minutes - 1e-9);
}

/** `182.1 °C` in the unit this person reads. */
export function temperatureWords(valueC: number, unit: TemperatureUnit): string {
  return figure(temperatureFromCelsius(valueC, unit), unit);
}

/** `+1.42 °C/min`, `−0.30 °C/min`, `0.00 °C/min`. */
export function rateWords(rateCPerMin: number | null, unit: TemperatureUnit): string {
  if (rateCPerMin === null) return 'rate not known yet';
  const said = plain(temperatureDifferenceFromCelsius(rateCPerMin, unit), digitsOf(`${unit}/min`));
  return `${/[1-9]/.test(said) && !said.startsWith('−') ? '+' : ''}${said}\u00a0${unit}/min`;
}

/** `12 s ago`, `4 min ago`, `2 h 10 min ago`. */
export function ageWords(ms: number): string {
  const seconds = Math.max(0, Math.floor(ms / 1000));
  if (seconds < 60) return `${seconds} s ago`;
  const minutes = Math.floor(seconds / 60);
  if (minutes < 60) return `${minutes} min ago`;
  return `${Math.floor(minutes / 60)} h ${minutes % 60} min ago`;
}

/** The latest figure of a channel in its unit. */
export function readingWords({ value, unit }: LiveReading): string {
  return value === null ? 'no reading' : figure(value, unit);
}

export const SOURCE_STATE_WORDS = {
  sending: 'sending',
  silent: 'silent',
  'cannot-be-reached': 'cannot be reached',
  'cannot-be-kept': 'cannot be kept',
  resting: 'rests',
} as const;

export const SOURCE_KIND_WORDS = {
  push: 'pushed by a sender',
  'modbus-tcp': 'Modbus TCP',
  'modbus-rtu': 'Modbus RTU',
  mqtt: 'MQTT',
  'growing-files': 'files that grow',
  gauge: 'read off a gauge',
  practice: 'invented, for practice',
} as const;
