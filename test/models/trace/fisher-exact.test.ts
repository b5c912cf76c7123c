import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { countOfFailedWith, exactP, fisherExact, type TwoByTwo } from '../../../models/trace/fisher-exact.ts';
import { hypergeometric } from '../../../models/trace/hypergeometric.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';
import { expectWithin } from './agree.ts';
import { choices } from './brute-force.ts';

const table = (failedWith: number, failedWithout: number, soundWith: number, soundWithout: number): TwoByTwo => ({
  failedWith,
  failedWithout,
  soundWith,
  soundWithout,
});
const count = fc.nat({ max: 25 });
const anyTable = fc.tuple(count, count, count, count).map((counts) => table(...counts));

describe('fisherExact', () => {
  it('judges the lady tasting tea', () => {
    // Fisher, The Design of Experiments (1935), ch. II: 1 in 70 for all eight cups right, 17 in 70 for six or more.
    expect(fisherExact(table(4, 0, 0, 4)).greater).toBeCloseTo(1 / 70, 15);
    expect(fisherExact(table(3, 1, 1, 3)).greater).toBeCloseTo(17 / 70, 14);
    // Agresti, Categorical Data Analysis, 2nd ed., §3.5.2: two-sided 0.486.
    expect(fisherExact(table(3, 1, 1, 3)).twoSided).toBeCloseTo(34 / 70, 14);
  });

  it('judges the twins of convicts', () => {
    // Fisher (1962, 1970), 10 of 13 monozygotic and 2 of 17 dizygotic twins convicted: one-sided 0.0004652, as R's
    // help page of fisher.test prints it (from memory).
    expect(fisherExact(table(2, 15, 10, 3)).less).toBeCloseTo(0.0004652, 7);
  });

  it('agrees with SciPy and with whole numbers', () => {
    interface Row {
      table: [number, number, number, number];
      twoSided: number;
      greater: number;
      less: number;
    }
    const { rows } = readTraceReference<{ rows: Row[] }>('two-by-two.json');
    expect(rows.length).toBeGreaterThan(40);
    for (const row of rows) {
      const found = fisherExact(table(...row.table));
      expectWithin(1e-10, found.twoSided, row.twoSided);
      expectWithin(1e-10, found.greater, row.greater);
      expectWithin(1e-10, found.less, row.less);
    }
  });

  it('counts choices, for small tables', () => {
    for (const [a, b, c, d] of [
      [3, 1, 2, 5],
      [1, 3, 4, 2],
      [2, 2, 2, 2],
    ] as const) {
      const failedWith = [...choices(a + b + c + d, a + b)].map((failed) => failed.filter((at) => at < a + c).length);
      const ways = (x: number) => failedWith.filter((each) => each === x).length;
      const { twoSided, greater, less } = fisherExact(table(a, b, c, d));
      const share = (holds: (x: number) => boolean) => failedWith.filter(holds).length / failedWith.length;
      expect(twoSided).toBeCloseTo(
        share((x) => ways(x) <= ways(a)),
        13,
      );
      expect(greater).toBeCloseTo(
        share((x) => x >= a),
        13,
      );
      expect(less).toBeCloseTo(
        share((x) => x <= a),
        13,
      );
    }
  });

  it('does not depend on the names of rows and columns', () => {
    fc.assert(
      fc.property(anyTable, (t) => {
        const { failedWith: a, failedWithout: b, soundWith: c, soundWithout: d } = t;
        const p = fisherExact(t);
        for (const other of [table(b, a, d, c), table(c, d, a, b), table(a, c, b, d)]) {
          expectWithin(1e-10, fisherExact(other).twoSided, p.twoSided);
        }
        expectWithin(1e-10, fisherExact(table(b, a, d, c)).less, p.greater);
        for (const each of Object.values(p)) {
          expect(each).toBeGreaterThan(0);
          expect(each).toBeLessThanOrEqual(1);
        }
      }),
      { seed: 20260302 },
    );
  });

  it('never falls to zero', () => {
    expect(fisherExact(table(5000, 0, 0, 5000)).twoSided).toBe(1e-300);
  });

  it('refuses counts that are none', () => {
    for (const wrong of [table(-1, 2, 3, 4), table(1.5, 2, 3, 4), table(Number.NaN, 1, 1, 1)]) {
      expect(() => fisherExact(wrong)).toThrow(DomainError);
    }
    expect(() => hypergeometric(2, 3, 6)).toThrow(DomainError);
    expect(() => exactP(countOfFailedWith(table(1, 1, 1, 1)), 3)).toThrow(DomainError);
  });
});
