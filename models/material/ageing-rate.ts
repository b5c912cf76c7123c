import { equivalentSeconds } from '../cure/aged-degree.ts';
import { celsiusFrom, kelvinFromCelsius } from '../units.ts';
import type { Material } from './material.ts';

const GAS_CONSTANT = 8.314462618;

/** How fast a temperature uses up the out-life of a material. */
export interface AgeingRate {
  /** Minutes of out-life for a minute at a temperature; null where no rule reaches so far. */
  readonly at: (temperatureC: number) => number | null;
  /** The least a minute out can count, whatever its temperature. */
  readonly least: number;
  /** Warmest temperature it is good for, °C. */
  readonly atMostC: number;
}

/**
 * The rate a material's out-life is used up at.
 *
 * Without an approved rule a minute is a minute up to the temperature the out-life is stated at, and nothing is known
 * above it. With one, Arrhenius: exp(−E/R (1/T − 1/T_out)), E from two stated lives: E = R ln(t1/t2)/(1/T1 − 1/T2).
 * Colder than stated counts in full unless the rule says otherwise.
 *
 * Limits: never beyond the warmer of two lives, or the rule's `atMost`: null there.
 * Source: Arrhenius, Z phys Chem 4 (1889) 226–248.
 */
export function ageingRate({ out, equivalent, units }: Material): AgeingRate {
  const statedC = celsiusFrom(out.atMost, units.temperature);
  if (equivalent === undefined) {
    return { at: (temperatureC) => (temperatureC <= statedC ? 1 : null), least: 1, atMostC: statedC };
  }
  const isTwoLives = equivalent.rule === 'two-lives';
  const atMostC = celsiusFrom(isTwoLives ? equivalent.lives[1][0] : equivalent.atMost, units.temperature);
  const E = isTwoLives ? activationEnergy(out.lifeDays / equivalent.lives[1][1], statedC, atMostC) : equivalent.E;
  const countsLess = equivalent.colderCountsLess === true;
  const rate = (temperatureC: number) =>
    equivalentSeconds([{ seconds: 1, temperatureK: kelvinFromCelsius(temperatureC) }], kelvinFromCelsius(statedC), E);
  return {
    at(temperatureC) {
      if (temperatureC > atMostC) return null;
      return temperatureC <= statedC && !countsLess ? 1 : rate(temperatureC);
    },
    least: countsLess ? 0 : 1,
    atMostC,
  };
}

/** J/mol, of an ageing `ratio` times as fast at `warmC` as at `coolC`. */
function activationEnergy(ratio: number, coolC: number, warmC: number): number {
  return (GAS_CONSTANT * Math.log(ratio)) / (1 / kelvinFromCelsius(coolC) - 1 / kelvinFromCelsius(warmC));
}
