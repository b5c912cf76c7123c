import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { benjaminiHochberg, holm } from '../../../models/trace/adjusted-p.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';
import { expectWithin } from './agree.ts';

// Benjamini & Hochberg, J R Statist Soc B 57 (1995), §4.1: fifteen tests of a trial on thrombolysis.
const thrombolysis = [
  0.0001, 0.0004, 0.0019, 0.0095, 0.0201, 0.0278, 0.0298, 0.0344, 0.0459, 0.324, 0.4262, 0.5719, 0.6528, 0.759, 1,
];
const anyP = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { maxLength: 40 });

describe('holm', () => {
  it('adjusts the four tests of the textbook example', () => {
    // 0.01, 0.04, 0.03, 0.005 at 0.05: the last and the first fall, the others stand; common example, from memory.
    const expected = [0.03, 0.06, 0.06, 0.02];
    for (const [i, p] of holm([0.01, 0.04, 0.03, 0.005]).entries()) expect(p).toBeCloseTo(expected[i]!, 14);
  });

  it('finds three of the fifteen', () => {
    // The same §4.1: Bonferroni's kind of control rejects the first three.
    expect(holm(thrombolysis).filter((p) => p <= 0.05)).toHaveLength(3);
    expect(holm(thrombolysis)[2]).toBeCloseTo(13 * 0.0019, 14);
  });
});

describe('benjaminiHochberg', () => {
  it('finds four of the fifteen', () => {
    // The same §4.1: "rejects the four smallest".
    expect(benjaminiHochberg(thrombolysis).filter((p) => p <= 0.05)).toHaveLength(4);
  });

  it('agrees with SciPy', () => {
    const { rows } = readTraceReference<{ rows: { p: number[]; benjaminiHochberg: number[] }[] }>('adjusted-p.json');
    for (const row of rows) {
      for (const [i, p] of benjaminiHochberg(row.p).entries()) expectWithin(1e-14, p, row.benjaminiHochberg[i]!);
    }
  });
});

describe('both corrections', () => {
  it('keep order, raise every p, and Holm’s is the stricter', () => {
    fc.assert(
      fc.property(anyP, (p) => {
        const [byHolm, byRate] = [holm(p), benjaminiHochberg(p)];
        const order = p.map((_, i) => i).sort((a, b) => p[a]! - p[b]!);
        for (const [at, i] of order.entries()) {
          expect(byRate[i]).toBeGreaterThanOrEqual(p[i]!);
          expect(byHolm[i]).toBeGreaterThanOrEqual(byRate[i]! * (1 - 1e-15));
          expect(byHolm[i]).toBeLessThanOrEqual(1);
          const before = order[at - 1];
          if (before === undefined) continue;
          expect(byHolm[i]).toBeGreaterThanOrEqual(byHolm[before]!);
          expect(byRate[i]).toBeGreaterThanOrEqual(byRate[before]!);
        }
      }),
      { seed: 20260302 },
    );
  });

  it('only grow when more is tried', () => {
    fc.assert(
      fc.property(anyP, fc.double({ min: 0, max: 1, noNaN: true }), (p, more) => {
        const longer = holm([...p, more]);
        for (const [i, each] of holm(p).entries()) expect(longer[i]).toBeGreaterThanOrEqual(each);
      }),
      { seed: 20260302 },
    );
  });

  it('leave a single test as it is, and refuse what is no probability', () => {
    expect([holm([0.2]), benjaminiHochberg([0.2]), holm([])]).toEqual([[0.2], [0.2], []]);
    for (const wrong of [-0.1, 1.1, Number.NaN]) {
      expect(() => holm([wrong])).toThrow(DomainError);
      expect(() => benjaminiHochberg([wrong])).toThrow(DomainError);
    }
  });
});
