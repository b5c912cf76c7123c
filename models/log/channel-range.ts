import { isTemperatureUnit, temperatureFromCelsius } from '../units.ts';
import type { ChannelLayout } from './layout.ts';

/** What no thermocouple of the usual types can read lies outside: type K ends at 1372 °C, IEC 60584-1:2013, table 1. */
const BELIEVABLE_C: readonly [number, number] = [-200, 1372];

/** Least and greatest believable value of a channel in its own unit. */
export function believableRange({ range, unit }: ChannelLayout): readonly [number, number] {
  if (range) return range;
  if (!isTemperatureUnit(unit)) return [-Infinity, Infinity];
  return [temperatureFromCelsius(BELIEVABLE_C[0], unit), temperatureFromCelsius(BELIEVABLE_C[1], unit)];
}
