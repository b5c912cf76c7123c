import { DomainError } from '../errors.ts';

/**
 * Where a function passes through zero between two points of opposite sign.
 *
 * Chandrupatla's method: inverse quadratic interpolation where it can be trusted, bisection elsewhere. Of the last
 * bracket the end that lies past the crossing (`to`'s side) is returned.
 *
 * @param f         Continuous on [from, to].
 * @param from      One end; f(from) and f(to) differ in sign or one is zero.
 * @param to        Other end.
 * @param tolerance Width of the last bracket, in the unit of `from`.
 * @returns A point within `tolerance` of a zero; there f is zero or has the sign of f(to).
 * @throws {DomainError} `option-out-of-range` when f has one sign at both ends, or is not a number there.
 *
 * Accuracy: |error| ≤ tolerance, at least one bit per two calls; test/models/numerics/find-root.test.ts.
 * Source: Chandrupatla, Adv Eng Software 28 (1997) 145–149.
 */
export function findRoot(f: (x: number) => number, from: number, to: number, tolerance: number): number {
  const fFrom = f(from);
  const fTo = f(to);
  if (fTo === 0) return to;
  if (fFrom === 0) return from;
  if (!(fFrom * fTo < 0)) {
    throw new DomainError('option-out-of-range', 'A root is sought where the function does not change sign', {
      from,
      to,
      fFrom,
      fTo,
    });
  }
  let [a, fa, b, fb] = [to, fTo, from, fFrom]; // a: newest; b: other side
  let fraction = 0.5;
  for (;;) {
    const next = a + fraction * (b - a);
    const fNext = f(next);
    let [c, fc] = [b, fb];
    if (Math.sign(fNext) === Math.sign(fa)) {
      [c, fc] = [a, fa];
    } else {
      [c, fc, b, fb] = [b, fb, a, fa];
    }
    a = next;
    fa = fNext;
    if (fa === 0) return a;
    const width = Math.abs(b - a);
    const least = Math.max(tolerance, 4 * Number.EPSILON * Math.max(Math.abs(a), Math.abs(b)));
    if (width <= least) return Math.sign(fa) === Math.sign(fTo) ? a : b;
    fraction = Math.min(1 - least / width / 2, Math.max(least / width / 2, nextFraction(a, fa, b, fb, c, fc)));
  }
}

/** Fraction of the bracket at which to look next: interpolated where inverse quadratic is monotone, else the middle. */
function nextFraction(a: number, fa: number, b: number, fb: number, c: number, fc: number): number {
  const xi = (a - b) / (c - b);
  const phi = (fa - fb) / (fc - fb);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  return ((fa / (fb - fa)) * fc) / (fb - fc) + (((c - a) / (b - a)) * (fa / (fc - fa)) * fb) / (fc - fb);
}
