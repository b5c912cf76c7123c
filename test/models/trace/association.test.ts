import { describe, expect, it } from 'vitest';
import { accountedFor, association } from '../../../models/trace/association.ts';
import { doubledMidranks } from '../../../models/trace/midranks.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';

const row = (values: ArrayLike<number>) => Float64Array.from(values);

describe('association', () => {
  it('is Spearman’s of midranks and Cramér’s of levels', () => {
    interface Reference {
      x: number[];
      y: number[];
      spearman: number;
      f: number[];
      g: number[];
      cramer: number;
    }
    const { x, y, spearman, f, g, cramer } = readTraceReference<Reference>('association.json');
    expect(association(row(doubledMidranks(x)), row(doubledMidranks(y)))).toBeCloseTo(spearman, 12);
    expect(Math.abs(association(row(f), row(g)))).toBeCloseTo(cramer, 12);
  });

  it('gives the trend of malformations with alcohol', () => {
    // Agresti, Categorical Data Analysis, 2nd ed., table 3.7 and §3.4.5 (Graubard & Korn 1987): (n − 1) r² is 0.35 with
    // midranks, 6.57 with the scores 0, 0.5, 1.5, 4, 7; from memory.
    const drinks = [0, 0.5, 1.5, 4, 7];
    const counts: readonly (readonly [number, number])[] = [
      [17066, 48],
      [14464, 38],
      [788, 5],
      [126, 1],
      [37, 1],
    ];
    const score = counts.flatMap(([absent, present], i) => new Array<number>(absent + present).fill(drinks[i]!));
    const present = counts.flatMap(([absent, some]) =>
      Array.from({ length: absent + some }, (_, i) => (i < some ? 1 : 0)),
    );
    const trend = (of: ArrayLike<number>) => (score.length - 1) * association(row(of), row(present)) ** 2;
    expect(trend(doubledMidranks(score))).toBeCloseTo(0.35, 2);
    expect(trend(score)).toBeCloseTo(6.57, 2);
  });

  it('leaves out what is not on record, and is 0 where nothing varies', () => {
    expect(association(row([1, 2, 3, Number.NaN]), row([2, 4, 6, 0]))).toBe(1);
    expect(association(row([1, 1]), row([1, 2]))).toBe(0);
    expect(association(row([]), row([]))).toBe(0);
  });
});

describe('accountedFor', () => {
  it('is η without the bias of many classes', () => {
    // Two classes of two: η² = 0.8 (between 4 of 5), ε² = 1 − 0.2 · 3/2 = 0.7; by hand.
    expect(accountedFor(row([1, 2, 3, 4]), Int32Array.of(0, 0, 1, 1)) ** 2).toBeCloseTo(0.7, 14);
    expect(accountedFor(row([1, 2, 3, 4, Number.NaN, 9]), Int32Array.of(0, 0, 1, 1, 1, -1)) ** 2).toBeCloseTo(0.7, 14);
  });

  it('is nothing where every part is a class of its own, nothing varies or classes say nothing', () => {
    expect(accountedFor(row([1, 2, 3]), Int32Array.of(0, 1, 2))).toBe(0);
    expect(accountedFor(row([1, 1, 1]), Int32Array.of(0, 0, 1))).toBe(0);
    expect(accountedFor(row([1, 2, 1, 2]), Int32Array.of(0, 0, 1, 1))).toBe(0);
  });
});
