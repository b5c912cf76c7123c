import { DomainError } from '../errors.ts';
import { type Distribution, hypergeometric } from './hypergeometric.ts';

/** Counts of failed and sound parts, with a level and without it. */
export interface TwoByTwo {
  readonly failedWith: number;
  readonly failedWithout: number;
  readonly soundWith: number;
  readonly soundWithout: number;
}

/** Probabilities of a count at least, at most, and no more probable than the one seen. */
export interface ExactP {
  readonly twoSided: number;
  readonly greater: number;
  readonly less: number;
}

/** Below this a probability is given as this: an upper bound, never zero. */
export const LEAST_P = 1e-300;
/** Tables count as equally probable when their probabilities agree to this; rounding is far below it. */
const SAME_LOG_P = 1e-7;

/**
 * Fisher's exact test of a 2×2 table.
 *
 * With all margins given, the number of failed parts with the level is hypergeometric. Two-sided: the sum over the
 * tables no more probable than the one seen. One-sided `greater`: as many failed parts with the level, or more.
 *
 * @param table Whole counts ≥ 0.
 * @returns Probabilities in [1e-300, 1].
 * @throws {DomainError} `option-out-of-range` when a count is not a whole number ≥ 0.
 *
 * Accuracy: relative 1e-10; test/models/trace/fisher-exact.test.ts against SciPy and by brute force.
 * Source: Fisher, The Design of Experiments (1935), ch. II; two-sided as Agresti, Categorical Data Analysis, 2nd ed.,
 *   §3.5.3.
 */
export function fisherExact(table: TwoByTwo): ExactP {
  return exactP(countOfFailedWith(table), table.failedWith);
}

/** The failed parts with the level, all margins of the table given. */
export function countOfFailedWith({ failedWith, failedWithout, soundWith, soundWithout }: TwoByTwo): Distribution {
  return hypergeometric(failedWith + soundWith, failedWithout + soundWithout, failedWith + failedWithout);
}

/**
 * Probabilities of a count seen under its distribution.
 *
 * @throws {DomainError} `option-out-of-range` when the count lies outside the distribution.
 */
export function exactP({ low, logP }: Distribution, seen: number): ExactP {
  const at = logP[seen - low];
  if (at === undefined) {
    throw new DomainError('option-out-of-range', 'The count seen lies outside its distribution', { seen, low });
  }
  let [twoSided, greater, less] = [0, 0, 0];
  for (let i = 0; i < logP.length; i += 1) {
    const p = Math.exp(logP[i]!);
    if (logP[i]! <= at + SAME_LOG_P) twoSided += p;
    if (low + i >= seen) greater += p;
    if (low + i <= seen) less += p;
  }
  return { twoSided: probability(twoSided), greater: probability(greater), less: probability(less) };
}

/** A sum of probabilities, free of rounding above one and of underflow. */
export function probability(sum: number): number {
  return Math.min(1, Math.max(LEAST_P, sum));
}
