import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { findRoot } from '../../../models/numerics/find-root.ts';

describe('findRoot', () => {
  it('finds the root of x³ − 2x − 5, Wallis’s example', () => {
    // 2.0945514815423265…: Wallis 1685; OEIS A007493.
    expect(findRoot((x) => x ** 3 - 2 * x - 5, 2, 3, 1e-14)).toBeCloseTo(2.0945514815423265, 14);
  });

  it('stays within the tolerance and ends on the far side of the crossing', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 0.99, noNaN: true }), fc.integer({ min: 1, max: 9 }), (root, power) => {
        const f = (x: number) => Math.sign(x - root) * Math.abs(x - root) ** power;
        const found = findRoot(f, 0, 1, 1e-9);
        expect(Math.abs(found - root)).toBeLessThanOrEqual(1e-9);
        expect(f(found)).toBeGreaterThanOrEqual(0);
      }),
      { seed: 20260302 },
    );
  });

  it('needs few calls where the function is smooth', () => {
    let calls = 0;
    findRoot(
      (x) => {
        calls += 1;
        return Math.exp(x) - 3;
      },
      0,
      5,
      1e-12,
    );
    expect(calls).toBeLessThan(16);
  });

  it('refuses ends of one sign and ends that are no numbers', () => {
    expect(() => findRoot((x) => x * x + 1, -1, 1, 1e-9)).toThrow(DomainError);
    expect(() => findRoot(() => Number.NaN, -1, 1, 1e-9)).toThrow(DomainError);
  });
});
