import { roundTicks } from '../../models/chart/ticks.ts';
import { figureFrom, whyNotTemperature } from '../../models/cycle/read-programme.ts';
import { type TemperatureUnit, temperatureFromCelsius } from '../../models/units.ts';

/** More curves than this cannot be told apart. */
const MOST = 6;
/** Where a set writes no range: usual for its trade, and said on the page to be chosen here. */
const USUAL_C = [80, 180] as const;

/** Round temperatures in the upper three quarters of the range a set was fitted in: below, next to nothing reacts. */
export function firstRateTemperatures(validC: readonly [number, number] | undefined, unit: TemperatureUnit): number[] {
  const [lowC, highC] = validC ?? USUAL_C;
  const low = temperatureFromCelsius(lowC + (highC - lowC) / 4, unit);
  return roundTicks(low, temperatureFromCelsius(highC, unit), 4);
}

/** Temperatures typed one after another, or why they cannot stand. */
export function readRateTemperatures(
  text: string,
  unit: TemperatureUnit,
): { readonly temperatures: readonly number[]; readonly wrong: string | null } {
  const words = text.split(/[;\s]+|,\s*/).filter((word) => word !== '');
  const refused = (wrong: string) => ({ temperatures: [], wrong });
  if (words.length === 0) return refused('Expected a temperature; nothing is typed.');
  if (words.length > MOST) return refused(`Expected at most ${MOST} temperatures.`);
  const temperatures: number[] = [];
  for (const word of words) {
    const value = figureFrom(word);
    if (value === null) return refused(`"${word}" is no figure; expected temperatures in ${unit}, without the unit.`);
    const because = whyNotTemperature(value, unit);
    if (because !== null) return refused(`${word}: ${because}`);
    if (!temperatures.includes(value)) temperatures.push(value);
  }
  return { temperatures: temperatures.sort((a, b) => a - b), wrong: null };
}
