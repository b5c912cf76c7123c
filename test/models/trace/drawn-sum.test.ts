import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawnSum } from '../../../models/trace/drawn-sum.ts';
import { choices } from './brute-force.ts';

describe('drawnSum', () => {
  it('counts every choice', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: -6, max: 9 }), { minLength: 1, maxLength: 9 }),
        fc.nat(),
        (scores, pick) => {
          const drawn = pick % (scores.length + 1);
          const sums = [...choices(scores.length, drawn)].map((places) =>
            places.reduce((sum, at) => sum + scores[at]!, 0),
          );
          const { low, p } = drawnSum(Int32Array.from(scores), drawn);
          for (const [i, each] of p.entries()) {
            expect(each).toBeCloseTo(sums.filter((sum) => sum === low + i).length / sums.length, 12);
          }
          expect(p.reduce((sum, each) => sum + each, 0)).toBeCloseTo(1, 12);
        },
      ),
      { seed: 20260302, numRuns: 60 },
    );
  });
});
