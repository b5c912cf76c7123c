import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { fisherExact } from '../../../models/trace/fisher-exact.ts';
import { freemanHalton } from '../../../models/trace/freeman-halton.ts';
import { fromState, uniformNumbers } from '../../../models/trace/uniform-numbers.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';
import { expectWithin } from './agree.ts';

const untouched = () => {
  throw new Error('an exact test draws nothing');
};
const levelsOf = (rows: readonly (readonly number[])[]) =>
  rows.map(([failed, sound]) => ({ failed: failed!, sound: sound! }));
const { rows } = readTraceReference<{ rows: { levels: number[][]; p: number }[] }>('r-by-two.json');

describe('freemanHalton', () => {
  it('agrees with enumeration in whole numbers', () => {
    for (const { levels, p } of rows) {
      const found = freemanHalton(levelsOf(levels), untouched);
      expect(found).toMatchObject({ method: 'exact', standardError: null });
      expectWithin(1e-12, found.p, p);
    }
  });

  it('is Fisher’s test where there are two levels, whatever their order and however many are empty', () => {
    const count = fc.nat({ max: 15 });
    fc.assert(
      fc.property(count, count, count, count, (a, b, c, d) => {
        const { twoSided } = fisherExact({ failedWith: a, failedWithout: b, soundWith: c, soundWithout: d });
        const levels = levelsOf([
          [b, d],
          [0, 0],
          [a, c],
        ]);
        expectWithin(1e-10, freemanHalton(levels, untouched).p, twoSided);
      }),
      { seed: 20260302 },
    );
  });

  it('estimates within three standard errors where there are too many tables', () => {
    for (const { levels, p } of rows) {
      const drawn = freemanHalton(levelsOf(levels), uniformNumbers(3), { mostTables: 1 });
      expect(drawn.method).toBe('random-draws');
      expect(Math.abs(drawn.p - p)).toBeLessThanOrEqual(3 * Math.max(drawn.standardError!, 1e-4));
    }
  });

  it('repeats its draws whatever the order of the levels', () => {
    const levels = levelsOf([
      [3, 30],
      [9, 20],
      [1, 25],
      [2, 8],
    ]);
    const p = (of: typeof levels) => freemanHalton(of, uniformNumbers(7), { mostTables: 1 });
    expect(p(levels.toReversed())).toEqual(p(levels));
    expect(p(levels)).not.toEqual(freemanHalton(levels, uniformNumbers(8), { mostTables: 1 }));
  });

  it('never estimates zero', () => {
    const apart = levelsOf([
      [30, 0],
      [0, 300],
      [0, 300],
    ]);
    expect(freemanHalton(apart, uniformNumbers(1), { mostTables: 1, draws: 500 }).p).toBeCloseTo(1 / 501, 15);
  });

  it('refuses counts and draws that are none', () => {
    expect(() => freemanHalton([{ failed: -1, sound: 2 }], untouched)).toThrow(DomainError);
    expect(() => freemanHalton([{ failed: 1, sound: 2 }], untouched, { draws: 0 })).toThrow(DomainError);
  });
});

describe('uniformNumbers', () => {
  it('are those of xoshiro128**', () => {
    const next = fromState(1, 2, 3, 4);
    const { words } = readTraceReference<{ words: number[] }>('xoshiro128.json');
    expect(words.map(() => next() * 2 ** 32)).toEqual(words);
  });

  it('refuse a seed that is none', () => {
    for (const seed of [-1, 0.5, 2 ** 32, Number.NaN]) expect(() => uniformNumbers(seed)).toThrow(DomainError);
  });
});
