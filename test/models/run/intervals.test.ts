import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { holdsAt, type Interval, intersection, remainder, totalMs, union } from '../../../models/run/intervals.ts';

const intervals = fc
  .array(fc.tuple(fc.integer({ min: 0, max: 500 }), fc.integer({ min: 1, max: 60 })), { maxLength: 12 })
  .map((pairs) =>
    union(
      pairs.map(([from, lasts]) => ({ from, until: from + lasts })),
      [],
    ),
  );

/** Instants between whole numbers, so that no end is hit. */
const PROBES = Array.from({ length: 570 }, (_, i) => i + 0.5);

describe('intervals', () => {
  it('intersect and unite as sets of instants do', () => {
    fc.assert(
      fc.property(intervals, intervals, (a, b) => {
        for (const instant of PROBES) {
          expect(holdsAt(intersection(a, b), instant)).toBe(holdsAt(a, instant) && holdsAt(b, instant));
          expect(holdsAt(union(a, b), instant)).toBe(holdsAt(a, instant) || holdsAt(b, instant));
        }
      }),
      { numRuns: 60 },
    );
  });

  it('leave a remainder that completes them', () => {
    fc.assert(
      fc.property(intervals, (a) => {
        const stretch: Interval = { from: 50, until: 450 };
        const inside = intersection(a, [stretch]);
        expect(totalMs(inside) + totalMs(remainder(stretch, a))).toBeCloseTo(400, 9);
        for (const rest of remainder(stretch, a)) expect(holdsAt(a, (rest.from + rest.until) / 2)).toBe(false);
      }),
    );
  });
});
