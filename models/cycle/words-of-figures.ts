import { round9 } from '../units.ts';
import type { Bounds, Cycle, DwellStage } from './cycle.ts';

/** A figure as it was written: no more digits than it has, a true minus sign. */
export function figure(value: number): string {
  return String(round9(value)).replace('-', '−');
}

/** `175 to 185 °C`, `at least 60 min`, `at most 3 °C/min`. */
export function bandWords({ atLeast, atMost }: Bounds, unit: string): string {
  const tail = unit === '' ? '' : ` ${unit}`;
  if (atLeast !== undefined && atMost !== undefined) return `${figure(atLeast)} to ${figure(atMost)}${tail}`;
  return atLeast !== undefined
    ? `at least ${figure(atLeast)}${tail}`
    : `at most ${figure(atMost ?? Number.NaN)}${tail}`;
}

/** Lower end of a dwell's band, formed in the unit it is written in. */
export function lowerOf(dwell: DwellStage): number {
  return round9(dwell.target - dwell.minus);
}

/** Upper end of a dwell's band, formed in the unit it is written in. */
export function upperOf(dwell: DwellStage): number {
  return round9(dwell.target + dwell.plus);
}

/** Unit of the cycle's rates, as written or else temperature per minute. */
export function rateUnitOf(cycle: Cycle): string {
  return cycle.units.rate ?? `${cycle.units.temperature}/min`;
}

/** Whether a dwell is colder than the dwell before it: then it is entered from above. */
export function isStepDown(cycle: Cycle, dwell: DwellStage): boolean {
  const dwells = cycle.stages.filter((stage) => stage.kind === 'dwell');
  const before = dwells[dwells.findIndex((stage) => stage.name === dwell.name) - 1];
  return before !== undefined && dwell.target < before.target;
}

/** A fixed difference of the rules in the cycle's unit: `5 °C` or `9 °F`. */
export function differenceWords(cycle: Cycle, celsius: number, fahrenheit: number): string {
  return cycle.units.temperature === '°C' ? `${celsius} °C` : `${fahrenheit} °F`;
}

/** First letter large: `dwell 1` to `Dwell 1`. */
export function sentenceCase(text: string): string {
  return text.charAt(0).toLocaleUpperCase('en') + text.slice(1);
}

/** `a`, `a and b`, `a, b and c`. */
export function listWords(items: readonly string[]): string {
  return items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;
}
