import { celsiusFrom, kelvinFromCelsius, type TemperatureUnit } from '../units.ts';

/** A step of a programme. Rates are positive, heating and cooling alike, in the programme's unit per minute. */
export type ProgrammeStep =
  | { readonly kind: 'ramp'; readonly rate: number; readonly to: number }
  | { readonly kind: 'hold'; readonly minutes: number };

/** A temperature programme to try a cure with: straight ramps and holds, in the unit it is written in. */
export interface Programme {
  readonly unit: TemperatureUnit;
  readonly start: number;
  readonly steps: readonly ProgrammeStep[];
}

/**
 * The temperature history a programme describes, by its corners.
 *
 * @param programme As `readProgramme` returns it: every step takes time.
 * @returns `timeS` [n + 1] in s from its start and `temperatureK` [n + 1] in K for n steps; straight between them.
 *
 * Accuracy: rounding of doubles; test/models/cycle/programme.test.ts.
 */
export function programmeCorners({ unit, start, steps }: Programme): {
  readonly timeS: Float64Array;
  readonly temperatureK: Float64Array;
} {
  const timeS = new Float64Array(steps.length + 1);
  const temperatureK = new Float64Array(steps.length + 1);
  let temperature = start;
  temperatureK[0] = kelvinFromCelsius(celsiusFrom(start, unit));
  for (const [i, step] of steps.entries()) {
    const minutes = step.kind === 'hold' ? step.minutes : Math.abs(step.to - temperature) / step.rate;
    if (step.kind === 'ramp') temperature = step.to;
    timeS[i + 1] = timeS[i]! + minutes * 60;
    temperatureK[i + 1] = kelvinFromCelsius(celsiusFrom(temperature, unit));
  }
  return { timeS, temperatureK };
}
