import type { ThermocoupleType } from '../layout.ts';

/** What a new thermocouple of a type may be off by at a temperature. */
export interface NewWire {
  readonly standardC: number;
  readonly specialC: number;
  readonly atC: number;
  readonly source: string;
}

/**
 * Initial tolerance of new wire: the greater of a temperature and a share of the reading, in °C.
 *
 * @param type         Of the thermocouple.
 * @param temperatureC  From 0 °C up, where the classes are given.
 * @returns ± in °C of standard and of special limits.
 *
 * Limits: unused wire only, above 0 °C; the special limits of type N and E are those of the table's own rows.
 * Source: ASTM E230/E230M, table of initial tolerances: K, J and N ±2.2 °C or 0.75 % and ±1.1 °C or 0.4 %; T ±1.0 °C
 * or 0.75 % and ±0.5 °C or 0.4 %; E ±1.7 °C or 0.5 % and ±1.0 °C or 0.4 % (N and E from memory).
 */
export function newWire(type: ThermocoupleType, temperatureC: number): NewWire {
  const [standardC, standardShare, specialC, specialShare] = TOLERANCES[type];
  return {
    standardC: Math.max(standardC, standardShare * temperatureC),
    specialC: Math.max(specialC, specialShare * temperatureC),
    atC: temperatureC,
    source: type === 'N' || type === 'E' ? 'ASTM E230, from memory' : 'ASTM E230',
  };
}

const TOLERANCES: Readonly<Record<ThermocoupleType, readonly [number, number, number, number]>> = {
  K: [2.2, 0.0075, 1.1, 0.004],
  J: [2.2, 0.0075, 1.1, 0.004],
  N: [2.2, 0.0075, 1.1, 0.004],
  T: [1, 0.0075, 0.5, 0.004],
  E: [1.7, 0.005, 1, 0.004],
};
