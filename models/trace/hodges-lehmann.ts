import { DomainError } from '../errors.ts';
import { type Interval, refuseConfidence } from './interval.ts';
import { normalQuantile } from './normal-quantile.ts';
import { nthDifference } from './nth-difference.ts';
import { rememberedTails, type Tails } from './rank-sum.ts';
import { workOfRankSumTails } from './rank-sum-tails.ts';

/** By how much the numbers of failed parts lie above those of sound ones, in the unit of the numbers. */
export interface Shift {
  readonly estimate: number;
  /** Null on both sides where so few parts allow no interval of that confidence. */
  readonly interval: Interval;
}

/**
 * Shift between failed and sound parts: Hodges and Lehmann's estimate with the interval that goes with the rank sum.
 *
 * The median of all differences failed − sound; the limits are the c-th smallest and c-th largest of them, c the largest
 * for which P(U < c) is at most half of what the confidence leaves.
 *
 * @param failed     Finite numbers, one or more.
 * @param sound      Finite numbers, one or more.
 * @param tails      Tables shared between calls.
 * @param confidence In (0, 1); default 0.95.
 * @returns Estimate and limits in the unit of the numbers.
 * @throws {DomainError} `option-out-of-range` when a side is empty, holds what is not a number, or for the confidence.
 *
 * Accuracy: exact order statistics; test/models/trace/hodges-lehmann.test.ts by forming all differences.
 * Limits: holds at least the confidence, also with ties (limits included); assumes the two differ by a shift. Where the
 *   table of U would take too long c comes from the normal approximation.
 * Source: Hodges & Lehmann, Ann Math Statist 34 (1963) 598–611; Hollander & Wolfe, Nonparametric Statistical Methods,
 *   2nd ed., §4.2, §4.3; ties: Noether, JASA 62 (1967) 184–188.
 */
export function hodgesLehmann(
  failed: ArrayLike<number>,
  sound: ArrayLike<number>,
  tails: Tails = rememberedTails(),
  confidence = 0.95,
): Shift {
  refuseConfidence(confidence);
  const x = Float64Array.from(failed).sort();
  const y = Float64Array.from(sound).sort();
  if (x.length === 0 || y.length === 0 || !x.every(Number.isFinite) || !y.every(Number.isFinite)) {
    throw new DomainError('option-out-of-range', 'A shift needs numbers of failed and of sound parts', {
      failed: x.length,
      sound: y.length,
    });
  }
  const pairs = x.length * y.length;
  const lower = nthDifference(x, y, Math.floor((pairs + 1) / 2));
  const estimate = pairs % 2 === 1 ? lower : (lower + nthDifference(x, y, pairs / 2 + 1)) / 2;
  const c = criticalCount(x.length, y.length, tails, (1 - confidence) / 2);
  const [low, high] = c < 1 ? [null, null] : [nthDifference(x, y, c), nthDifference(x, y, pairs + 1 - c)];
  return { estimate, interval: { low, high, confidence } };
}

/** Multiplications spent on the table of U at most; past them the normal approximation is within a few of c's thousands. */
const MOST_WORK = 1e6;
/** A tail that is the half itself counts so, whatever the rounding of either. */
const SAME_P = 1e-9;

/** The largest c with P(U ≤ c − 1) ≤ eachSide. */
function criticalCount(m: number, n: number, tails: Tails, eachSide: number): number {
  const table = workOfRankSumTails(m, n) <= MOST_WORK ? tails(m, n) : null;
  if (table === null) {
    const spread = Math.sqrt((m * n * (m + n + 1)) / 12);
    return Math.max(0, Math.floor((m * n) / 2 + normalQuantile(eachSide) * spread));
  }
  let c = 0;
  while (c < table.length && table[c]! <= eachSide * (1 + SAME_P)) c += 1;
  return c;
}
