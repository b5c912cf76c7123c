import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solveTridiagonal } from '../../../models/numerics/tridiagonal.ts';

describe('solveTridiagonal', () => {
  it('solves the second difference with known eigenvectors', () => {
    // −x[i−1] + 2 x[i] − x[i+1] of sin(π i/(n+1)) is (2 − 2 cos(π/(n+1))) times it: textbook.
    const n = 50;
    const mode = Float64Array.from({ length: n }, (_, i) => Math.sin((Math.PI * (i + 1)) / (n + 1)));
    const right = mode.map((x) => (2 - 2 * Math.cos(Math.PI / (n + 1))) * x);
    const off = new Float64Array(n).fill(-1);
    solveTridiagonal(off, new Float64Array(n).fill(2), off, right);
    for (let i = 0; i < n; i += 1) expect(right[i]!).toBeCloseTo(mode[i]!, 11);
  });

  it('gives back the right-hand side of any diagonally dominant system', () => {
    const entry = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.array(fc.tuple(entry, entry, entry), { minLength: 1, maxLength: 30 }), (rows) => {
        const lower = Float64Array.from(rows, ([a]) => a);
        const upper = Float64Array.from(rows, ([, b]) => b);
        const right = Float64Array.from(rows, ([, , c]) => c);
        const x = right.slice();
        solveTridiagonal(lower, new Float64Array(rows.length).fill(3), upper, x);
        for (let i = 0; i < x.length; i += 1) {
          const before = i > 0 ? lower[i]! * x[i - 1]! : 0;
          const after = i < x.length - 1 ? upper[i]! * x[i + 1]! : 0;
          expect(before + 3 * x[i]! + after).toBeCloseTo(right[i]!, 12);
        }
      }),
      { seed: 20260302 },
    );
  });
});
