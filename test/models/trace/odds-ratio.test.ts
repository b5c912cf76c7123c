import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { countOfFailedWith, exactP } from '../../../models/trace/fisher-exact.ts';
import { hypergeometric, sumOf } from '../../../models/trace/hypergeometric.ts';
import { oddsRatio } from '../../../models/trace/odds-ratio.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';
import { expectWithin } from './agree.ts';

const countOf = ([failedWith, failedWithout, soundWith, soundWithout]: readonly [number, number, number, number]) =>
  countOfFailedWith({ failedWith, failedWithout, soundWith, soundWithout });

describe('oddsRatio', () => {
  it('gives the odds of the tea and of the twins', () => {
    // R's help page of fisher.test, from memory: tea 6.408309, lower 0.3135693 one-sided at 95 %; twins 0.04693661,
    // upper 0.2849601 one-sided at 95 % (its root finder stops at 1e-4).
    const tea = oddsRatio(countOf([3, 1, 1, 3]), 3, 0.9);
    expect(tea.estimate).toBeCloseTo(6.408309, 4);
    expect(tea.interval.low).toBeCloseTo(0.3135693, 4);
    const twins = oddsRatio(countOf([2, 15, 10, 3]), 2, 0.9);
    expect(twins.estimate).toBeCloseTo(0.04693661, 6);
    expect(twins.interval.high).toBeCloseTo(0.2849601, 5);
  });

  it('gives the common odds of rabbits in strata', () => {
    // Mantel, JASA 58 (1963) 690–700, penicillin and rabbits: exact p 0.03994, odds 10.36102 (1.077401 to 529.8374), as
    // R's help page of mantelhaen.test prints them (from memory; its root finder stops at 1e-4 in 1/ψ).
    const strata = [
      [0, 0, 6, 5],
      [3, 0, 3, 6],
      [6, 2, 0, 4],
      [5, 6, 1, 0],
      [2, 5, 0, 0],
    ] as const;
    // No delay, then 1.5 h: cured and died.
    const count = sumOf(strata.map(([a, b, c, d]) => hypergeometric(a + c, b + d, a + b)));
    const seen = strata.reduce((sum, [a]) => sum + a, 0);
    expect(seen).toBe(16);
    expect(exactP(count, seen).twoSided).toBeCloseTo(0.03994, 5);
    const { estimate, interval } = oddsRatio(count, seen);
    expect(estimate).toBeCloseTo(10.36102, 4);
    expect(interval.low).toBeCloseTo(1.077401, 4);
    expectWithin(1e-2, interval.high, 529.8374);
  });

  it('agrees with SciPy', () => {
    interface Row {
      table: [number, number, number, number];
      odds: number | null;
      oddsLow: number;
      oddsHigh: number | null;
    }
    for (const row of readTraceReference<{ rows: Row[] }>('two-by-two.json').rows) {
      const { estimate, interval } = oddsRatio(countOf(row.table), row.table[0]);
      expectWithin(1e-6, estimate, row.odds);
      expectWithin(1e-6, interval.low, row.oddsLow);
      expectWithin(1e-6, interval.high, row.oddsHigh);
    }
  });

  it('turns over when the level is turned over', () => {
    const one = oddsRatio(countOf([6, 1, 4, 37]), 6);
    const other = oddsRatio(countOf([1, 6, 37, 4]), 1);
    expectWithin(1e-9, other.estimate, 1 / one.estimate!);
    expectWithin(1e-9, other.interval.low, 1 / one.interval.high!);
    expectWithin(1e-9, other.interval.high, 1 / one.interval.low!);
  });

  it('knows nothing of a count that cannot vary, and refuses a confidence that is none', () => {
    expect(oddsRatio(hypergeometric(0, 5, 2), 0)).toEqual({
      estimate: 1,
      interval: { low: 0, high: null, confidence: 0.95 },
    });
    expect(() => oddsRatio(countOf([1, 1, 1, 1]), 1, 1)).toThrow(DomainError);
  });
});
