import type { AgeingRate } from './ageing-rate.ts';
import type { Profile } from './stays.ts';

/** Pieces of Simpson's rule on each straight line: even. */
const PIECES = 20;

/**
 * Minutes of out-life that a freezer's record uses up above a temperature.
 *
 * ∫ rate(T(t)) dt where T(t) > aboveC, T straight between points, by Simpson's rule on each line's part above.
 *
 * @param profile Points [ms, °C] in rising time.
 * @param aboveC  Below and at it nothing ages.
 * @returns Minutes, and `beyondMinutes` where no rule reaches; those count at the rate of the warmest it reaches.
 *
 * Accuracy: exact where the rate is 1; otherwise 1e-9 of a line that spans 20 °C (test/models/material/profile.test.ts).
 */
export function timeAbove(
  profile: Profile,
  fromMs: number,
  untilMs: number,
  aboveC: number,
  rate: AgeingRate,
): { readonly minutes: number; readonly beyondMinutes: number } {
  let minutes = 0;
  let beyondMinutes = 0;
  for (let i = 1; i < profile.length; i++) {
    const [line, clipped] = [lineOf(profile, i), clip(profile, i, fromMs, untilMs)];
    if (clipped === null) continue;
    for (const [from, until] of above(line, clipped, aboveC)) {
      for (const [a, b] of above(line, [from, until], rate.atMostC)) beyondMinutes += (b - a) / 60_000;
      minutes += integral((ms) => rate.at(Math.min(line(ms), rate.atMostC)) ?? 1, from, until);
    }
  }
  return { minutes, beyondMinutes };
}

/** The same stretches as steps of even temperature, for an integrator of its own. */
export function stepsAbove(
  profile: Profile,
  fromMs: number,
  untilMs: number,
  aboveC: number,
): { readonly seconds: number; readonly temperatureC: number }[] {
  return profile.flatMap((_, i) => {
    const clipped = i === 0 ? null : clip(profile, i, fromMs, untilMs);
    if (clipped === null) return [];
    const line = lineOf(profile, i);
    return above(line, clipped, aboveC).flatMap(([from, until]) => {
      const step = (until - from) / PIECES;
      return Array.from({ length: PIECES }, (__, k) => ({
        seconds: step / 1000,
        temperatureC: line(from + (k + 0.5) * step),
      }));
    });
  });
}

type Line = (ms: number) => number;

function lineOf(profile: Profile, i: number): Line {
  const [[t0, c0], [t1, c1]] = [profile[i - 1]!, profile[i]!];
  return (ms) => c0 + ((c1 - c0) * (ms - t0)) / (t1 - t0);
}

function clip(profile: Profile, i: number, fromMs: number, untilMs: number): readonly [number, number] | null {
  const span = [Math.max(profile[i - 1]![0], fromMs), Math.min(profile[i]![0], untilMs)] as const;
  return span[0] < span[1] ? span : null;
}

/** The part of a stretch on which a straight line is above a level: one stretch or none. */
function above(line: Line, [from, until]: readonly [number, number], level: number): (readonly [number, number])[] {
  const [a, b] = [line(from) - level, line(until) - level];
  if (a <= 0 && b <= 0) return [];
  if (a > 0 && b > 0) return [[from, until]];
  const crossing = from + ((until - from) * a) / (a - b);
  return a > 0 ? [[from, crossing]] : [[crossing, until]];
}

/** ∫ f dt in minutes. */
function integral(f: Line, from: number, until: number): number {
  const step = (until - from) / PIECES;
  let sum = f(from) + f(until);
  for (let k = 1; k < PIECES; k++) sum += (k % 2 === 0 ? 2 : 4) * f(from + k * step);
  return (sum * step) / 3 / 60_000;
}
