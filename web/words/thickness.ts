import { celsiusFrom, temperatureFromCelsius } from '../../models/units.ts';
import type { PartView } from '../../server/contract/parts.ts';
import type { Thickness } from '../../server/contract/thickness.ts';
import { figure, plain } from './figures.ts';

type Unit = '°C' | '°F';

/** A record that has to be made before the middle of a part can be answered for, and where it is made. */
export interface MissingRecord {
  readonly what: string;
  readonly page: string;
  readonly todo: string;
}

/** What a cure through the thickness of this part lacks, first things first; empty where it can be asked for. */
export function missingForThickness(view: PartView): MissingRecord[] {
  const page = `/parts/${encodeURIComponent(view.serial)}/layup`;
  const todo = 'Write the lay-up down';
  if (view.layup === null) {
    return [{ what: 'How it was laid up: its thickness and what it is made of.', page, todo }];
  }
  const missing: MissingRecord[] = [];
  if (view.layup.thicknessMm === null) missing.push({ what: 'Its thickness when cured.', page, todo });
  if (view.layup.laminate === null) missing.push({ what: 'What its laminate is made of.', page, todo });
  return missing;
}

/** Where a record that the server names as missing is made. */
export function placeOfMissing(view: PartView, run: number, facts: Readonly<Record<string, unknown>>) {
  const { record, tool } = facts;
  if (record === 'tool' && typeof tool === 'string') {
    return { page: `/tools/${encodeURIComponent(tool)}`, todo: `Write down what ${tool} is` };
  }
  if (record === 'thermocouple') return { page: `/runs/${run}/load`, todo: 'Say which thermocouple was on it' };
  if (record === 'resin' || record === 'film') return null;
  return { page: `/parts/${encodeURIComponent(view.serial)}/layup`, todo: 'Write it in the lay-up' };
}

/** `198 °C`, or `195 to 201 °C` where suppositions differ. */
export function rangeWords([least, most]: readonly [number, number], unit: string, digits: number): string {
  const [from, to] = [plain(least, digits), plain(most, digits)];
  return from === to ? figure(least, unit, digits) : `${from} to ${figure(most, unit, digits)}`;
}

export function temperatureRange(rangeC: readonly [number, number], unit: Unit): string {
  const [least, most] = rangeC.map((one) => temperatureFromCelsius(one, unit));
  return rangeWords([least ?? Number.NaN, most ?? Number.NaN], unit, 0);
}

/** One sentence for what the cycle asks of the estimate. */
export function reachedWords(reached: Thickness['reached'][number], unit: Unit): string {
  const asked =
    reached.what === 'degree'
      ? `a degree of cure of at least ${reached.atLeast}`
      : `a Tg of at least ${figure(temperatureFromCelsius(celsiusFrom(reached.atLeast, unitOf(reached.unit)), unit), unit, 0)}`;
  return `The cycle asks for ${asked}: ${PLACE_WORDS[reached.middle]('the middle')}; ${PLACE_WORDS[reached.throughout]('the least cured place')}.`;
}

/** One sentence for the hottest place beside the cycle's ceiling. */
export function ceilingWords({ atMost, unit, stayed }: NonNullable<Thickness['ceiling']>, shown: Unit): string {
  const ceiling = figure(temperatureFromCelsius(celsiusFrom(atMost, unit), shown), shown, 0);
  return `${CEILING_WORDS[stayed]} the cycle’s ceiling of ${ceiling}, which limits the thermocouples.`;
}

const CEILING_WORDS = {
  below: 'Its hottest place is estimated to have stayed within',
  above: 'Its hottest place is estimated to have passed',
  'cannot-tell': 'It cannot be told whether its hottest place passed',
} as const;

export const CEILING_MARKS = { below: 'met', above: 'not-met', 'cannot-tell': 'cannot-tell' } as const;

const PLACE_WORDS = {
  reached: (place: string) => `${place} is estimated to have reached it`,
  'not-reached': (place: string) => `${place} is estimated to have stayed short of it`,
  'cannot-tell': (place: string) => `whether ${place} reached it cannot be told`,
} as const;

/** Outcome marks of a finding, for what is no finding. */
export const REACHED_MARKS = { reached: 'met', 'not-reached': 'not-met', 'cannot-tell': 'cannot-tell' } as const;

function unitOf(unit: string): Unit {
  return unit === '°F' ? '°F' : '°C';
}

/** `at the bag side`, `14 mm from the bag side`. */
export function depthWords(depthMm: number, thicknessMm: number): string {
  if (depthMm < thicknessMm * 0.01) return 'at the bag side';
  if (depthMm > thicknessMm * 0.99) return 'at the tool side';
  return `${plain(depthMm, 1)}\u00a0mm from the bag side`;
}
