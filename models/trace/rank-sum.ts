import { DomainError } from '../errors.ts';
import { probability } from './fisher-exact.ts';
import { doubledMidranks } from './midranks.ts';
import { exactly, type PValue } from './p-value.ts';
import { permutedSum } from './permuted-sum.ts';
import { rankSumTails, workOfRankSumTails } from './rank-sum-tails.ts';
import type { UniformNumbers } from './uniform-numbers.ts';

/** What the rank sum test says of a number. */
export interface RankSum {
  readonly value: PValue;
  /** Ranks were rounded to this many steps, to keep the enumeration small; null where they stand as they are. */
  readonly rankSteps: number | null;
  /** Share of failed–sound pairs in which the failed part has the larger number, equal ones counted half. */
  readonly superiority: number;
}

/** Lower tails of U for two counts; null where they would take too long. */
export type Tails = (first: number, second: number) => Float64Array | null;

/** Multiplications spent on one table of tails at most. */
const MOST_WORK = 5e7;

/** Tables of tails, each worked out once. */
export function rememberedTails(): Tails {
  const known = new Map<string, Float64Array>();
  return (first, second) => {
    if (workOfRankSumTails(first, second) > MOST_WORK) return null;
    const key = `${Math.min(first, second)} ${Math.max(first, second)}`;
    const tails = known.get(key) ?? rankSumTails(first, second);
    known.set(key, tails);
    return tails;
  };
}

/**
 * Exact two-sample test of a number, failed parts against sound: Wilcoxon, Mann and Whitney's rank sum on midranks.
 *
 * Ranks rather than means: a wild reading moves a rank by little, no unit or scale of a feature matters, and the exact
 * distribution is one of whole numbers. p is two-sided, the share of all C(N, k) choices of the failed parts whose rank
 * sum lies at least as far from its mean. Without ties the distribution of U is a table ({@link rankSumTails}); with
 * ties the midranks themselves are dealt out ({@link permutedSum}).
 *
 * @param failed Finite numbers, one or more.
 * @param sound  Finite numbers, one or more.
 * @param random Draws; not touched where p is exact.
 * @param tails  Tables shared between calls.
 * @returns See {@link RankSum}.
 * @throws {DomainError} `option-out-of-range` when a side is empty or holds what is not a number.
 *
 * Accuracy: relative 1e-9 where exact; test/models/trace/rank-sum.test.ts against SciPy, tables and enumeration.
 * Source: Wilcoxon, Biometrics Bulletin 1 (1945) 80–83; Mann & Whitney, Ann Math Statist 18 (1947) 50–60; Lehmann,
 *   Nonparametrics: Statistical Methods Based on Ranks (1975), §1.2, §1.4.
 */
export function rankSumTest(
  failed: ArrayLike<number>,
  sound: ArrayLike<number>,
  random: UniformNumbers,
  tails: Tails = rememberedTails(),
): RankSum {
  const all = Float64Array.from([...Array.from(failed), ...Array.from(sound)]);
  if (failed.length === 0 || sound.length === 0 || !all.every(Number.isFinite)) {
    throw new DomainError('option-out-of-range', 'Ranks need numbers of failed and of sound parts', {
      failed: failed.length,
      sound: sound.length,
    });
  }
  const scores = doubledMidranks(all);
  let doubledSum = 0;
  for (let i = 0; i < failed.length; i += 1) doubledSum += scores[i]!;
  const doubledU = doubledSum - failed.length * (failed.length + 1);
  const pairs = failed.length * sound.length;
  const superiority = doubledU / (2 * pairs);
  const isUntied = new Set(scores).size === scores.length;
  const table = isUntied ? tails(failed.length, sound.length) : null;
  if (table === null) {
    const places = Array.from(failed, (_, i) => i);
    const { value, rankSteps } = permutedSum([{ scores, failed: places }], random);
    return { value, rankSteps, superiority };
  }
  const u = doubledU / 2;
  const tail = table[Math.min(u, pairs - u)]!;
  return { value: exactly(probability(2 * tail)), rankSteps: null, superiority };
}
