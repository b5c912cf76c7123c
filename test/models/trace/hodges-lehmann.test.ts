import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { hodgesLehmann } from '../../../models/trace/hodges-lehmann.ts';
import { nthDifference } from '../../../models/trace/nth-difference.ts';
import { uniformNumbers } from '../../../models/trace/uniform-numbers.ts';

const row = fc.array(fc.oneof(fc.integer({ min: -5, max: 5 }), fc.double({ min: -9, max: 9, noNaN: true })), {
  minLength: 1,
  maxLength: 12,
});

describe('hodgesLehmann', () => {
  it('gives the shift between the membranes', () => {
    // Hollander & Wolfe, 2nd ed., examples 4.3 and 4.4: 0.305, (−0.15, 0.76); from memory.
    const term = [0.8, 0.83, 1.89, 1.04, 1.45, 1.38, 1.91, 1.64, 0.73, 1.46];
    const early = [1.15, 0.88, 0.9, 0.74, 1.21];
    const { estimate, interval } = hodgesLehmann(term, early);
    expect(estimate).toBeCloseTo(0.305, 12);
    expect(interval.low).toBeCloseTo(-0.15, 12);
    expect(interval.high).toBeCloseTo(0.76, 12);
  });

  it('has no interval where so few parts allow none', () => {
    // The least one-sided tail of 2 and 3 is 1/10.
    expect(hodgesLehmann([5, 6], [1, 2, 3]).interval).toEqual({ low: null, high: null, confidence: 0.95 });
    expect(hodgesLehmann([5, 6], [1, 2, 3], undefined, 0.8).interval).toEqual({ low: 2, high: 5, confidence: 0.8 });
  });

  it('covers a shift at least as often as it says', () => {
    const random = uniformNumbers(4);
    const draw = (n: number, shift: number) => Array.from({ length: n }, () => Math.round(20 * random() ** 2) + shift);
    let covered = 0;
    for (let trial = 0; trial < 600; trial += 1) {
      const { low, high } = hodgesLehmann(draw(6, 3), draw(15, 0)).interval;
      if (low! <= 3 && high! >= 3) covered += 1;
    }
    // Binomial: 0.95 − 3 √(0.95 · 0.05/600).
    expect(covered / 600).toBeGreaterThan(0.923);
  });

  it('falls back on the normal approximation near the exact count for large samples', () => {
    const random = uniformNumbers(9);
    const numbers = (n: number) => Array.from({ length: n }, random);
    const [failed, sound] = [numbers(40), numbers(400)];
    const exact = hodgesLehmann(failed, sound);
    const approximate = hodgesLehmann(failed, sound, () => null);
    expect(Math.abs(approximate.interval.low! - exact.interval.low!)).toBeLessThan(1e-3);
    expect(Math.abs(approximate.interval.high! - exact.interval.high!)).toBeLessThan(1e-3);
  });

  it('refuses an empty side and what is not a number', () => {
    expect(() => hodgesLehmann([], [1])).toThrow(DomainError);
    expect(() => hodgesLehmann([Number.POSITIVE_INFINITY], [1])).toThrow(DomainError);
  });
});

describe('nthDifference', () => {
  it('is the n-th of all differences', () => {
    fc.assert(
      fc.property(row, row, (a, b) => {
        const [x, y] = [Float64Array.from(a).sort(), Float64Array.from(b).sort()];
        const all = Float64Array.from(a.flatMap((p) => b.map((q) => p - q))).sort();
        for (const [i, difference] of all.entries()) expect(nthDifference(x, y, i + 1)).toBeCloseTo(difference, 14);
      }),
      { seed: 20260302 },
    );
  });
});
