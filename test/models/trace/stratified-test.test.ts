import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { doubledMidranks } from '../../../models/trace/midranks.ts';
import { classesOfLevels, classesOfNumbers } from '../../../models/trace/strata.ts';
import { levelHeldFixed, numberHeldFixed } from '../../../models/trace/stratified-test.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';
import { expectWithin } from './agree.ts';
import { shareOfChoices } from './brute-force.ts';

type Table = readonly [number, number, number, number];
const untouched = () => {
  throw new Error('an exact test draws nothing');
};

/** Parts of 2×2 tables, one a stratum. */
function partsOf(tables: readonly Table[]): [Uint8Array, Uint8Array, Int32Array] {
  const parts = tables.flatMap((table, stratum) =>
    table.flatMap((n, cell) =>
      Array.from({ length: n }, () => [cell % 2 === 0 ? 1 : 0, cell < 2 ? 1 : 0, stratum] as const),
    ),
  );
  return [
    Uint8Array.from(parts, ([having]) => having),
    Uint8Array.from(parts, ([, failed]) => failed),
    Int32Array.from(parts, ([, , stratum]) => stratum),
  ];
}

describe('levelHeldFixed', () => {
  it('judges rabbits and penicillin', () => {
    // Mantel, JASA 58 (1963) 690–700; exact p 0.03994 as R's help page of mantelhaen.test prints it (from memory).
    const { value } = levelHeldFixed(
      ...partsOf([
        [0, 0, 6, 5],
        [3, 0, 3, 6],
        [6, 2, 0, 4],
        [5, 6, 1, 0],
        [2, 5, 0, 0],
      ]),
    );
    expect(value.p).toBeCloseTo(0.03994, 5);
  });

  it('agrees with whole numbers', () => {
    for (const { tables, p } of readTraceReference<{ rows: { tables: Table[]; p: number }[] }>('strata.json').rows) {
      expectWithin(1e-11, levelHeldFixed(...partsOf(tables)).value.p, p);
    }
  });

  it('tells nothing where each stratum is all with or all without', () => {
    const held = levelHeldFixed(
      ...partsOf([
        [3, 0, 4, 0],
        [0, 1, 0, 9],
      ]),
    );
    expect(held).toMatchObject({ value: { p: 1 }, leastP: 1 });
  });

  it('is not taken in by strata that differ in both (Simpson)', () => {
    // Within each stratum failed and sound parts have the level alike; pooled, failed parts have it far more often.
    const tables: Table[] = [
      [27, 3, 9, 1],
      [1, 9, 3, 27],
    ];
    expect(levelHeldFixed(...partsOf(tables)).value.p).toBeGreaterThan(0.9);
    const [having, failed, stratum] = partsOf(tables);
    expect(
      levelHeldFixed(
        having,
        failed,
        stratum.map(() => 0),
      ).value.p,
    ).toBeLessThan(0.05);
  });
});

/** Midranks within each stratum; as fractions of it in 96 steps where more than one stratum tells anything. */
function scoresWithin(value: readonly number[], isFailed: readonly number[], stratum: readonly number[]): number[] {
  const kinds = (each: number) => new Set(isFailed.filter((_, i) => stratum[i] === each)).size;
  const isAlone = [0, 1].filter((each) => kinds(each) === 2).length < 2;
  const score = new Array<number>(value.length).fill(0);
  for (const each of [0, 1]) {
    const places = stratum.flatMap((s, i) => (s === each ? [i] : []));
    const ranks = doubledMidranks(places.map((i) => value[i]!));
    for (const [at, i] of places.entries()) {
      const offset = ranks[at]! - (places.length + 1);
      const steps = Math.sign(offset) * Math.round((Math.abs(offset) / (2 * places.length)) * 96);
      score[i] = isAlone ? offset : steps;
    }
  }
  return score;
}

function shareFailed(isFailed: readonly number[], stratum: readonly number[], part: number): number {
  const failed = isFailed.filter((_, i) => stratum[i] === stratum[part]);
  return failed.reduce((sum, one) => sum + one, 0) / failed.length;
}

describe('numberHeldFixed', () => {
  it('counts every choice within the strata', () => {
    const part = fc.record({ value: fc.nat({ max: 4 }), failed: fc.nat({ max: 1 }), stratum: fc.nat({ max: 1 }) });
    fc.assert(
      fc.property(fc.array(part, { minLength: 2, maxLength: 9 }), (parts) => {
        const value = parts.map((p) => p.value);
        const isFailed = parts.map((p) => p.failed);
        const stratum = parts.map((p) => p.stratum);
        const scores = scoresWithin(value, isFailed, stratum);
        const distance = (dealt: readonly number[]) =>
          Math.abs(dealt.reduce((sum, one, i) => sum + (one - shareFailed(isFailed, stratum, i)) * scores[i]!, 0));
        const seen = distance(isFailed);
        const share = shareOfChoices(stratum, isFailed, (dealt) => distance(dealt) >= seen - 1e-9);
        const found = numberHeldFixed(
          Float64Array.from(value),
          Uint8Array.from(isFailed),
          Int32Array.from(stratum),
          untouched,
        );
        expectWithin(1e-10, found.value.p, share);
        expect(found.leastP).toBeLessThanOrEqual(found.value.p * (1 + 1e-12));
      }),
      { seed: 20260302, numRuns: 80 },
    );
  });
});

describe('classesOfLevels', () => {
  it('puts like levels and like sets of levels together', () => {
    const values = ['V1', ['V2', 'V3'], ['V3', 'V2'], 'V1', null, ['V1']];
    expect([...classesOfLevels({ kind: 'level', name: 'line', values })]).toEqual([0, 1, 1, 0, -1, 0]);
  });
});

describe('classesOfNumbers', () => {
  it('cuts into classes of ten or more and never parts equal ones', () => {
    const classes = classesOfNumbers(Float64Array.from({ length: 35 }, (_, i) => (i < 8 ? i : i < 20 ? 8 : i)));
    expect(new Set(classes.subarray(8, 20)).size).toBe(1);
    expect([0, 1, 2].map((each) => classes.filter((s) => s === each).length)).toEqual([20, 10, 5]);
  });
});
