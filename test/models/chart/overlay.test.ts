import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type OverlaidCourse, overlayOf } from '../../../models/chart/overlay.ts';
import { percentile } from '../../../models/chart/percentile.ts';
import { DomainError } from '../../../models/errors.ts';

const MINUTE = 60_000;

function course(part: string, failed: boolean, values: readonly number[], eventMin = 0, startMs = 0): OverlaidCourse {
  return {
    part,
    run: 1,
    failed,
    timeMs: Float64Array.from(values, (_, i) => startMs + i * MINUTE),
    values: Float64Array.from(values),
    eventMs: startMs + eventMin * MINUTE,
    longestGapMs: 2 * MINUTE,
  };
}

describe('a percentile', () => {
  it('is that of Hyndman & Fan’s definition 7, the default of R and of NumPy', () => {
    // By hand: 1 + 0.4 · 2, the middle one, 8 + 0.6 · 7.
    const sample = [1, 3, 4, 8, 15];
    expect(percentile(sample, 0.1)).toBeCloseTo(1.8, 12);
    expect(percentile(sample, 0.5)).toBe(4);
    expect(percentile(sample, 0.9)).toBeCloseTo(12.2, 12);
    expect(percentile([7], 0.9)).toBe(7);
    expect(percentile([], 0.5)).toBeNaN();
  });

  it('rises with its share and stays within the sample', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -99, max: 99 }), { minLength: 1 }), (figures) => {
        const sorted = figures.toSorted((a, b) => a - b);
        const found = [0, 0.1, 0.5, 0.9, 1].map((share) => percentile(sorted, share));
        expect(found).toEqual(found.toSorted((a, b) => a - b));
        expect([found[0], found[4]]).toEqual([sorted[0], sorted.at(-1)]);
      }),
    );
  });
});

describe('an overlay', () => {
  it('lays courses over each other by their event, whatever the clock said', () => {
    const ramp = [0, 10, 20, 30, 40];
    const { minutes, failed, band, difference } = overlayOf(
      [course('P-1', true, ramp, 1), course('P-2', false, ramp, 1, 9e9), course('P-3', false, [5, ...ramp], 2, 3e9)],
      5,
    );
    expect(minutes).toEqual([-1, 0, 1, 2, 3]);
    expect(failed).toEqual([{ part: 'P-1', run: 1, values: ramp }]);
    expect(band.middle).toEqual(ramp);
    expect(band.runs).toEqual([2, 2, 2, 2, 2]);
    expect(difference[0]?.values).toEqual([0, 0, 0, 0, 0]);
  });

  it('gives the 10th, 50th and 90th percentile of the sound ones at every instant', () => {
    const level = [1, 3, 4, 8, 15];
    const { band, difference } = overlayOf(
      [course('P-0', true, [2, 2, 2]), ...level.map((at) => course(`P-${at}`, false, [at, at, at]))],
      3,
    );
    expect(band.low).toEqual([1.8, 1.8, 1.8]);
    expect(band.high).toEqual([12.2, 12.2, 12.2]);
    expect(difference[0]?.values).toEqual([-2, -2, -2]);
  });

  it('bridges no gap, and has no middle where no sound run reads', () => {
    const { failed, band, difference } = overlayOf(
      [course('P-1', true, [0, Number.NaN, Number.NaN, Number.NaN, 40]), course('P-2', false, [1, 1])],
      9,
    );
    expect(failed[0]?.values).toEqual([0, null, null, null, null, null, null, null, 40]);
    expect(band.middle).toEqual([1, 1, 1, null, null, null, null, null, null]);
    expect(band.runs).toEqual([1, 1, 1, 0, 0, 0, 0, 0, 0]);
    expect(difference[0]?.values).toEqual([-1, null, null, null, null, null, null, null, null]);
  });

  it('reads a failed course off exactly where the grid meets its readings', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: -500, max: 500 }), { minLength: 2, maxLength: 30 }), (figures) => {
        const { failed } = overlayOf([course('P-1', true, figures)], figures.length);
        expect(failed[0]?.values).toEqual(figures);
      }),
    );
  });

  it('refuses more points than a line may have, and sound courses alone', () => {
    expect(() => overlayOf([course('P-1', true, [1, 2])], 2001)).toThrow(DomainError);
    expect(() => overlayOf([course('P-1', false, [1, 2])])).toThrow(/needs a failed course/);
  });
});
