import { DomainError } from '../errors.ts';

/**
 * Probabilities corrected for how many were tried: Holm's step-down.
 *
 * Sorted p₁ ≤ … ≤ pₘ: the i-th becomes max over j ≤ i of (m − j + 1) pⱼ, at most 1. The chance that any of the true
 * nulls falls to α or below is at most α, whatever their dependence.
 *
 * @param p Each in [0, 1], of all tests made.
 * @returns Adjusted, in the order given; none below its own p, none above 1, in the same order of size.
 * @throws {DomainError} `option-out-of-range` when one is not within [0, 1].
 *
 * Source: Holm, Scand J Statist 6 (1979) 65–70; adjusted form Wright, Biometrics 48 (1992) 1005–1013.
 */
export function holm(p: readonly number[]): number[] {
  const order = rising(p);
  const adjusted = new Array<number>(p.length);
  let most = 0;
  for (const [i, at] of order.entries()) {
    most = Math.max(most, Math.min(1, (p.length - i) * p[at]!));
    adjusted[at] = most;
  }
  return adjusted;
}

/**
 * Probabilities corrected for how many were tried: Benjamini and Hochberg's step-up.
 *
 * Sorted p₁ ≤ … ≤ pₘ: the i-th becomes min over j ≥ i of m pⱼ / j. Calling all at α or below found holds the expected
 * share of false ones among them to α, for independent or positively dependent tests.
 *
 * @param p Each in [0, 1], of all tests made.
 * @returns Adjusted, in the order given; none below its own p, none above Holm's, in the same order of size.
 * @throws {DomainError} `option-out-of-range` when one is not within [0, 1].
 *
 * Source: Benjamini & Hochberg, J R Statist Soc B 57 (1995) 289–300.
 */
export function benjaminiHochberg(p: readonly number[]): number[] {
  const order = rising(p);
  const adjusted = new Array<number>(p.length);
  let least = 1;
  for (let i = order.length - 1; i >= 0; i -= 1) {
    const at = order[i]!;
    // Divided first: m / j ≥ 1 in floating point too, so that nothing falls below its own p.
    least = Math.min(least, p[at]! * (p.length / (i + 1)));
    adjusted[at] = least;
  }
  return adjusted;
}

function rising(p: readonly number[]): number[] {
  for (const [at, value] of p.entries()) {
    if (!(value >= 0 && value <= 1)) {
      throw new DomainError('option-out-of-range', 'A probability lies between 0 and 1', { at, p: value });
    }
  }
  return p.map((_, at) => at).sort((a, b) => p[a]! - p[b]!);
}
