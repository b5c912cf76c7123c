import { type CureRate, cureRate } from './cure-rate.ts';
import type { Resin } from './resin.ts';

/** The rate of cure over degree at one temperature. */
export interface RateCurve {
  readonly temperatureK: number;
  /** [n], rising; the degree of a jump stands there twice. */
  readonly alpha: Float64Array;
  /** [n], dα/dt in 1/s as the law gives it, below 0 too. */
  readonly ratePerS: Float64Array;
  /** Degrees at which the rate jumps from one form of the law to the next. */
  readonly jumps: readonly number[];
  /** Degree that a cure at this temperature creeps up to and never passes; null where there is none. */
  readonly stallsAt: number | null;
  /** Degrees over which the law gives a rate below 0; null where it gives none. */
  readonly negative: readonly [number, number] | null;
}

/**
 * dα/dt over degree of cure at one temperature, as the integrator uses it.
 *
 * @param resin        A resin as `parseResin` returns it.
 * @param temperatureK Temperature in K.
 * @param points       Degrees in [first, 1] beside those where the law changes: at least 2; default 201.
 * @returns See {@link RateCurve}; begins at the first degree of an isoconversional table, else at 0.
 *
 * Accuracy: the law itself; test/models/cure/rate-curve.test.ts.
 * Source: the law's own, see models/cure/laws.
 */
export function rateCurve(resin: Resin, temperatureK: number, points = 201): RateCurve {
  const rate = cureRate(resin);
  const first = resin.kinetics.law === 'isoconversional' ? resin.kinetics.degree[0]! : 0;
  const alpha: number[] = [];
  const ratePerS: number[] = [];
  const jumps: number[] = [];
  let from = first;
  for (const [branch, branchEnd] of rate.branchEnds.entries()) {
    const to = Math.min(1, branchEnd);
    const before = ratePerS.at(-1);
    const begins = rate.rate(branch, temperatureK, from);
    if (before !== undefined && Math.abs(begins - before) > 1e-9 * Math.abs(before)) jumps.push(from);
    const pieces = Math.max(1, Math.round(((to - from) / (1 - first)) * (points - 1)));
    for (let i = 0; i <= pieces && to > from; i += 1) {
      const degree = i === pieces ? to : from + ((to - from) * i) / pieces;
      alpha.push(degree);
      ratePerS.push(rate.rate(branch, temperatureK, degree));
    }
    from = to;
  }
  return {
    temperatureK,
    alpha: Float64Array.from(alpha),
    ratePerS: Float64Array.from(ratePerS),
    jumps,
    stallsAt: stallOf(rate, temperatureK),
    negative: negativeOf(alpha, ratePerS),
  };
}

function stallOf(rate: CureRate, temperatureK: number): number | null {
  const stalls = rate.branchEnds.map((_, branch) => rate.stallsAt(branch, temperatureK));
  const least = Math.min(...stalls);
  return least < 1 ? least : null;
}

function negativeOf(alpha: readonly number[], ratePerS: readonly number[]): [number, number] | null {
  const first = ratePerS.findIndex((rate) => rate < 0);
  if (first < 0) return null;
  return [alpha[first]!, alpha[ratePerS.findLastIndex((rate) => rate < 0)]!];
}
