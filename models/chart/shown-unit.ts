import { isTemperatureUnit, parsePressureUnit } from '../units.ts';

/** How a figure in one unit is shown in another: figure · slope + intercept. */
export interface Conversion {
  readonly slope: number;
  readonly intercept: number;
}

export const AS_IT_STANDS: Conversion = { slope: 1, intercept: 0 };

/** Between temperatures; null where one of the units is none. */
export function temperatureConversion(from: string, to: string): Conversion | null {
  if (!isTemperatureUnit(from) || !isTemperatureUnit(to)) return null;
  if (from === to) return AS_IT_STANDS;
  return from === '°F' ? { slope: 5 / 9, intercept: -160 / 9 } : { slope: 9 / 5, intercept: 32 };
}

/** Between pressures or vacua; null where the zero points differ and there is no barometer. */
export function pressureConversion(
  quantity: 'pressure' | 'vacuum',
  from: string,
  to: string,
  barometerPa: number | null,
): Conversion | null {
  if (from === to) return AS_IT_STANDS;
  const [read, shown] = [parsePressureUnit(from), parsePressureUnit(to)];
  const slope = read.paPerUnit / shown.paPerUnit;
  if (read.absolute === shown.absolute) return { slope, intercept: 0 };
  if (barometerPa === null) return null;
  const barometer = barometerPa / shown.paPerUnit;
  // A vacuum below ambient counts down from the barometer, a gauge pressure counts up from it.
  if (quantity === 'vacuum') return { slope: -slope, intercept: barometer };
  return { slope, intercept: shown.absolute ? barometer : -barometer };
}

export function converted(figure: number, { slope, intercept }: Conversion): number {
  return slope === 1 && intercept === 0 ? figure : figure * slope + intercept;
}

/** A figure with no more digits than any recorder has, so that conversions leave no dust in what is drawn. */
export function drawn(value: number): number {
  return Math.round(value * 1e5) / 1e5;
}
