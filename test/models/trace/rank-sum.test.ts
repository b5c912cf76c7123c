import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { doubledMidranks } from '../../../models/trace/midranks.ts';
import { permutedSum } from '../../../models/trace/permuted-sum.ts';
import { rankSumTest } from '../../../models/trace/rank-sum.ts';
import { rankSumTails } from '../../../models/trace/rank-sum-tails.ts';
import { uniformNumbers } from '../../../models/trace/uniform-numbers.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';
import { expectWithin } from './agree.ts';
import { choices } from './brute-force.ts';

const untouched = () => {
  throw new Error('an exact test draws nothing');
};
const row = (max: number) => fc.array(fc.nat({ max }), { minLength: 1, maxLength: 6 });

describe('rankSumTails', () => {
  it.each([
    // Largest U with one-sided probability ≤ 0.025: the tables after Mann & Whitney (1947) and Auble (1953), as
    // reprinted in Siegel, Nonparametric Statistics (1956), table K; from memory.
    [4, 4, 0],
    [5, 5, 2],
    [6, 6, 5],
    [7, 7, 8],
    [8, 8, 13],
    [9, 9, 17],
    [8, 10, 17],
    [10, 10, 23],
    [10, 20, 55],
    [20, 20, 127],
  ])('puts the critical value of %i and %i at %i', (m, n, critical) => {
    const tails = rankSumTails(m, n);
    expect(tails[critical]).toBeLessThanOrEqual(0.025);
    expect(tails[critical + 1]).toBeGreaterThan(0.025);
  });

  it('keeps its digits for 40 and 1960', () => {
    const { first, second, tails } = readTraceReference<{ first: number; second: number; tails: [number, number][] }>(
      'rank-sum-tails.json',
    );
    const found = rankSumTails(first, second);
    for (const [u, p] of tails) expectWithin(1e-9, found[u]!, p);
  });
});

describe('rankSumTest', () => {
  it('judges the permeability of membranes', () => {
    // Hollander & Wolfe, Nonparametric Statistical Methods, 2nd ed., example 4.1: W = 35 in R's counting, one-sided
    // 0.1272 (R's help page of wilcox.test, from memory).
    const term = [0.8, 0.83, 1.89, 1.04, 1.45, 1.38, 1.91, 1.64, 0.73, 1.46];
    const early = [1.15, 0.88, 0.9, 0.74, 1.21];
    const { value, superiority } = rankSumTest(term, early, untouched);
    expect(superiority).toBe(35 / 50);
    expect(value.p / 2).toBeCloseTo(0.1272, 4);
  });

  it('agrees with SciPy, with ties and without', () => {
    interface Row {
      failed: number[];
      sound: number[];
      p: number;
      superiority: number;
    }
    const { rows } = readTraceReference<{ rows: Row[] }>('rank-sum.json');
    expect(rows).toHaveLength(10);
    for (const { failed, sound, p, superiority } of rows) {
      const found = rankSumTest(failed, sound, untouched);
      expectWithin(1e-9, found.value.p, p);
      expect(found.superiority).toBeCloseTo(superiority, 14);
      expect(found.rankSteps).toBeNull();
    }
  });

  it('counts every choice of the failed, ties or not', () => {
    fc.assert(
      fc.property(row(9), row(9), (failed, sound) => {
        const ranks = doubledMidranks([...failed, ...sound]);
        const all = ranks.length;
        const distance = (places: readonly number[]) =>
          Math.abs(2 * places.reduce((sum, at) => sum + ranks[at]!, 0) - 2 * failed.length * (all + 1));
        const seen = distance(failed.map((_, at) => at));
        const distances = [...choices(all, failed.length)].map(distance);
        const share = distances.filter((each) => each >= seen).length / distances.length;
        expectWithin(1e-11, rankSumTest(failed, sound, untouched).value.p, share);
      }),
      { seed: 20260302, numRuns: 60 },
    );
  });

  it('does not care for scale, sign or which side is called failed', () => {
    fc.assert(
      fc.property(row(30), row(30), (failed, sound) => {
        const { value, superiority } = rankSumTest(failed, sound, untouched);
        const stretched = rankSumTest(failed.map(Math.exp), sound.map(Math.exp), untouched);
        const mirrored = rankSumTest(
          failed.map((x) => -x),
          sound.map((x) => -x),
          untouched,
        );
        const swapped = rankSumTest(sound, failed, untouched);
        for (const other of [stretched, mirrored, swapped]) expectWithin(1e-10, other.value.p, value.p);
        expect(mirrored.superiority).toBeCloseTo(1 - superiority, 13);
        expect(value.p).toBeGreaterThan(0);
        expect(value.p).toBeLessThanOrEqual(1);
      }),
      { seed: 20260302 },
    );
  });

  it('rounds the ranks of very many tied numbers, and says so', () => {
    const random = uniformNumbers(11);
    const values = Array.from({ length: 2000 }, () => Math.floor(random() * 150) / 10);
    const mirrored = values.map((value) => -value);
    const [one, other] = [values, mirrored].map((all) => rankSumTest(all.slice(0, 40), all.slice(40), untouched));
    expect(one!.value.method).toBe('exact');
    expect(one!.rankSteps).toBeGreaterThanOrEqual(24);
    expectWithin(1e-9, other!.value.p, one!.value.p);
    // The unrounded ranks, by draws. 24 steps of 2000/24 ranks move a sum of 40 by some 150, 0.04 of its standard deviation:
    // p by less than 3 · 0.04 · 0.4.
    const scores = doubledMidranks(values);
    const mean = 40 * 2001;
    const seen = Math.abs(scores.subarray(0, 40).reduce((sum, score) => sum + score, 0) - mean);
    let asExtreme = 0;
    const draws = 20_000;
    for (let draw = 0; draw < draws; draw += 1) {
      let sum = 0;
      for (let i = 0; i < 40; i += 1) {
        const at = i + Math.floor(random() * (2000 - i));
        [scores[i], scores[at]] = [scores[at]!, scores[i]!];
        sum += scores[i]!;
      }
      if (Math.abs(sum - mean) >= seen) asExtreme += 1;
    }
    expect(Math.abs(one!.value.p - asExtreme / draws)).toBeLessThan(0.05);
  });

  it('draws where even rounded ranks take too long', () => {
    const random = uniformNumbers(12);
    const values = Array.from({ length: 1200 }, () => Math.floor(random() * 40));
    const { value } = rankSumTest(values.slice(0, 500), values.slice(500), uniformNumbers(1));
    expect(value.method).toBe('random-draws');
    expect(value.standardError).toBeGreaterThan(0);
    const apart = rankSumTest(
      values.slice(0, 500),
      values.slice(500).map((x) => x + 9),
      uniformNumbers(1),
    );
    expect(apart.value.p).toBeCloseTo(1 / 10_001, 12);
  });

  it('refuses an empty side and what is not a number', () => {
    expect(() => rankSumTest([], [1], untouched)).toThrow(DomainError);
    expect(() => rankSumTest([1], [Number.NaN], untouched)).toThrow(DomainError);
  });
});

describe('permutedSum', () => {
  it('says the least p the parts allow', () => {
    const scores = doubledMidranks([1, 2, 3, 4, 5, 6, 7]);
    expectWithin(1e-12, permutedSum([{ scores, failed: [3, 4] }], untouched).leastP, 2 / 21);
    expect(permutedSum([{ scores, failed: [] }], untouched)).toMatchObject({ value: { p: 1 }, leastP: 1 });
  });
});
