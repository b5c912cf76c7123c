import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { HottestWatch, parabolaTop } from '../../../../models/cure/heat/hottest.ts';

describe('parabolaTop', () => {
  it('finds the top of any parabola through three unequally spaced points', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -0.4, max: 0.4, noNaN: true }),
        fc.double({ min: 0.1, max: 5, noNaN: true }),
        (topX, curvature) => {
          const y = (x: number) => 7 - curvature * (x - topX) ** 2;
          const [x, top] = parabolaTop([-1, 0, 1.7], [y(-1), y(0), y(1.7)]);
          expect(x).toBeCloseTo(topX, 9);
          expect(top).toBeCloseTo(7, 9);
        },
      ),
      { seed: 20260302 },
    );
  });

  it('stays at the middle point where that is not the greatest', () => {
    expect(parabolaTop([0, 1, 2], [3, 2, 5])).toEqual([1, 2]);
    expect(parabolaTop([0, 1, 2], [1, 2, 3])).toEqual([1, 2]);
  });
});

describe('HottestWatch', () => {
  it('keeps the hottest of all steps, between nodes and between steps', () => {
    const watch = new HottestWatch(Float64Array.of(0, 1, 2));
    // T = 10 − (t − 3.3)² − (x − 1.2)².
    for (const t of [2, 3, 4, 5]) {
      watch.accept(
        t,
        Float64Array.from([0, 1, 2], (x) => 10 - (t - 3.3) ** 2 - (x - 1.2) ** 2),
      );
    }
    const { temperatureK, positionM, timeS } = watch.hottest()!;
    expect([temperatureK, positionM, timeS].map((value) => Math.round(value * 1e9) / 1e9)).toEqual([10, 1.2, 3.3]);
  });
});
