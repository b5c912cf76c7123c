import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Extremes } from '../../../models/run/extremes.ts';

describe('Extremes', () => {
  it('finds what looking at every figure finds, blocks or not', () => {
    const figures = Array.from({ length: 10_000 }, (_, i) => Math.sin(i * 0.37) * ((i * 7919) % 101));
    const extremes = new Extremes();
    for (const figure of figures) extremes.push(figure);
    fc.assert(
      fc.property(fc.nat(9_999), fc.nat(9_999), (a, b) => {
        const [from, until] = a < b ? [a, b] : [b, a];
        const slice = figures.slice(from, until + 1);
        expect(extremes.indexOfHighest(from, until)).toBe(from + slice.indexOf(Math.max(...slice)));
        expect(extremes.indexOfLowest(from, until)).toBe(from + slice.indexOf(Math.min(...slice)));
      }),
      { numRuns: 300 },
    );
  });

  it('passes over NaN and says so where nothing is left', () => {
    const extremes = new Extremes();
    for (const figure of [Number.NaN, 3, Number.NaN, 1, Number.NaN]) extremes.push(figure);
    expect(extremes.indexOfHighest(0, 4)).toBe(1);
    expect(extremes.indexOfLowest(0, 4)).toBe(3);
    expect(extremes.indexOfHighest(4, 4)).toBe(-1);
    expect(extremes.indexOfHighest(3, 2)).toBe(-1);
  });
});
