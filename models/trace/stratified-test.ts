import { exactP } from './fisher-exact.ts';
import { hypergeometric, sumOf } from './hypergeometric.ts';
import { doubledMidranks } from './midranks.ts';
import { exactly, type PValue } from './p-value.ts';
import { permutedSum } from './permuted-sum.ts';
import type { UniformNumbers } from './uniform-numbers.ts';

/** Whether something still goes with failure among parts that are alike in something else. */
export interface HeldFixed {
  readonly value: PValue;
  /** The least p these parts could have given; near 1, they tell nothing. */
  readonly leastP: number;
}

/**
 * Exact test of a level against failure within strata: exact Cochran–Mantel–Haenszel.
 *
 * Given the margins of every stratum the failed parts with the level add up as independent hypergeometric counts; their
 * distribution by convolution, p two-sided over the sums no more probable than the one seen.
 *
 * @param hasLevel 1 or 0 a part; parts without a record are left out by the caller.
 * @param isFailed 1 or 0 a part.
 * @param stratum  Number of each part's stratum, from 0.
 * @returns p, and the least possible one.
 *
 * Accuracy: relative 1e-9; test/models/trace/stratified-test.test.ts by enumeration and published strata.
 * Source: Mantel & Haenszel, J Natl Cancer Inst 22 (1959) 719–748; exact: Birch, J R Statist Soc B 26 (1964) 313–324;
 *   Agresti, Categorical Data Analysis, 2nd ed., §6.7.
 */
export function levelHeldFixed(hasLevel: Uint8Array, isFailed: Uint8Array, stratum: Int32Array): HeldFixed {
  const size = stratum.reduce((most, each) => Math.max(most, each + 1), 0);
  const having = new Int32Array(size);
  const all = new Int32Array(size);
  const failed = new Int32Array(size);
  let seen = 0;
  for (let i = 0; i < stratum.length; i += 1) {
    const at = stratum[i]!;
    all[at]! += 1;
    having[at]! += hasLevel[i]!;
    failed[at]! += isFailed[i]!;
    seen += hasLevel[i]! & isFailed[i]!;
  }
  const count = sumOf(Array.from(all, (n, at) => hypergeometric(having[at]!, n - having[at]!, failed[at]!)));
  const ends = [count.low, count.low + count.logP.length - 1].map((end) => exactP(count, end).twoSided);
  return { value: exactly(exactP(count, seen).twoSided), leastP: Math.min(...ends) };
}

/**
 * Exact test of a number against failure within strata: the sum of midranks within each stratum, as fractions of the
 * stratum, against all ways to deal out failure within the strata; see {@link permutedSum}.
 *
 * @param value    Finite numbers; parts without a record are left out by the caller.
 * @param isFailed 1 or 0 a part.
 * @param stratum  Number of each part's stratum, from 0.
 * @param random   Draws; not touched where p is exact.
 */
export function numberHeldFixed(
  value: Float64Array,
  isFailed: Uint8Array,
  stratum: Int32Array,
  random: UniformNumbers,
): HeldFixed {
  const places = new Map<number, number[]>();
  for (let i = 0; i < stratum.length; i += 1) {
    const known = places.get(stratum[i]!);
    if (known) known.push(i);
    else places.set(stratum[i]!, [i]);
  }
  const strata = [...places.values()].map((of) => ({
    scores: doubledMidranks(of.map((i) => value[i]!)),
    failed: of.flatMap((i, at) => (isFailed[i] === 1 ? [at] : [])),
  }));
  const { value: p, leastP } = permutedSum(strata, random);
  return { value: p, leastP };
}
