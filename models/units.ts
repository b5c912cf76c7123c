import { DomainError } from './errors.ts';

/**
 * Units as they are written, and the one unit each quantity is compared in.
 *
 * Temperatures are compared in °C, pressures and vacua in Pa. A figure written in another unit is converted once, by
 * the same function for limits and readings, and rounded to 1e-9 °C or 1e-6 Pa: two figures that are equal as written
 * stay equal, whatever unit each was written in.
 */

export const TEMPERATURE_UNITS = ['°C', '°F'] as const;
export type TemperatureUnit = (typeof TEMPERATURE_UNITS)[number];

/** Pa in one unit of pressure. inHg and mmHg at 0 °C, psi from the pound-force and inch: NIST SP 811 (2008), app. B.8. */
export const PA_PER_UNIT: Readonly<Record<string, number>> = {
  Pa: 1,
  hPa: 100,
  mbar: 100,
  kPa: 1000,
  bar: 1e5,
  MPa: 1e6,
  psi: 6894.757293168361,
  inHg: 3386.389,
  mmHg: 133.3224,
  torr: 101325 / 760,
};

/** A pressure-like unit taken apart: its size in Pa and whether it counts from perfect vacuum. */
export interface PressureUnit {
  readonly paPerUnit: number;
  readonly absolute: boolean;
}

/** Reads `bar`, `psi abs`, `inHg`, `torr abs` …; throws `unit-unknown` with the name as it was written. */
export function parsePressureUnit(unit: string): PressureUnit {
  const absolute = unit.endsWith(' abs');
  const bare = absolute ? unit.slice(0, -4) : unit;
  const paPerUnit = Object.hasOwn(PA_PER_UNIT, bare) ? PA_PER_UNIT[bare] : undefined;
  if (paPerUnit === undefined) {
    throw new DomainError('unit-unknown', `"${unit}" is not a unit of pressure or vacuum`, { unit });
  }
  return { paPerUnit, absolute };
}

export function isTemperatureUnit(unit: string): unit is TemperatureUnit {
  return unit === '°C' || unit === '°F';
}

/** Temperature in °C from one written in `unit`. */
export function celsiusFrom(temperature: number, unit: TemperatureUnit): number {
  return unit === '°C' ? temperature : round9(((temperature - 32) * 5) / 9);
}

/** Temperature in `unit` from °C. */
export function temperatureFromCelsius(temperatureC: number, unit: TemperatureUnit): number {
  return unit === '°C' ? temperatureC : (temperatureC * 9) / 5 + 32;
}

/** A temperature difference (or rate) in °C from one written in `unit`: no offset, ±10 °F is ±5.56 °C. */
export function celsiusDifferenceFrom(difference: number, unit: TemperatureUnit): number {
  return unit === '°C' ? difference : (difference * 5) / 9;
}

/** A temperature difference in `unit` from one in °C. */
export function temperatureDifferenceFromCelsius(differenceC: number, unit: TemperatureUnit): number {
  return unit === '°C' ? differenceC : (differenceC * 9) / 5;
}

/** Pressure in Pa from one written in a unit; the zero point stays as written. */
export function pascalFrom(pressure: number, unit: PressureUnit): number {
  return Math.round(pressure * unit.paPerUnit * 1e6) / 1e6;
}

export function kelvinFromCelsius(temperatureC: number): number {
  return temperatureC + 273.15;
}

export function celsiusFromKelvin(temperatureK: number): number {
  return temperatureK - 273.15;
}

/** The nearest figure with nine decimals: takes the dust of binary arithmetic off a sum of decimal figures. */
export function round9(value: number): number {
  return Math.round(value * 1e9) / 1e9;
}
