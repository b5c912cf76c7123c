import { drawnSum, type SumDistribution, workOfDrawnSum } from './drawn-sum.ts';
import { probability } from './fisher-exact.ts';
import { DRAWS, exactly, fromDraws, type PValue } from './p-value.ts';
import type { UniformNumbers } from './uniform-numbers.ts';

/** Parts among which "failed" may be dealt out anew: all of them, or those alike in what is held fixed. */
export interface ScoredStratum {
  /** Doubled midranks within the stratum, one a part. */
  readonly scores: Int32Array;
  /** Places of the failed parts in `scores`. */
  readonly failed: readonly number[];
}

/** What a permutation test says, and the least it could have said with these parts. */
export interface PermutedSum {
  readonly value: PValue;
  /** The least p any dealing out could have had. */
  readonly leastP: number;
  /** Ranks were rounded to this many steps, to keep the enumeration small; null where they stand as they are. */
  readonly rankSteps: number | null;
}

/** Multiplications of one exact test at most. */
const MOST_WORK = 1e7;
/** Rank steps tried, finest first; 16 steps lose less than half a percent of a rank test's strength. */
const STEPS = [96, 64, 48, 32, 24, 16];
const SAME_DISTANCE = 1e-7;

/**
 * Exact permutation test of a sum of midranks, failed against sound, within strata.
 *
 * Under "goes with nothing" every choice of the failed parts within each stratum is equally likely; p is the share of
 * choices whose rank sum lies at least as far from its mean as the one seen, by the shift algorithm and convolution over
 * strata. Ties need no correction: the midranks seen are the ones dealt out. Where that would take too long, midranks
 * are first rounded to steps of equal width about their middle (still an exact test, of the rounded ranks, since the
 * rounding does not look at who failed), and where even 16 steps take too long p comes from random draws.
 *
 * @param strata Doubled midranks and the places of the failed.
 * @param random Draws; not touched where p is exact.
 * @returns See {@link PermutedSum}.
 *
 * Accuracy: relative 1e-9 where exact, by enumeration; test/models/trace/rank-sum.test.ts.
 * Source: Pitman, J R Statist Soc Suppl 4 (1937) 119–130; Wilcoxon, Biometrics Bulletin 1 (1945) 80–83; strata:
 *   van Elteren, Bull Int Statist Inst 37 (1960) 351–361; loss by grouping: Agresti, Categorical Data Analysis, 2nd ed.,
 *   §3.4.
 */
export function permutedSum(strata: readonly ScoredStratum[], random: UniformNumbers): PermutedSum {
  const telling = strata.filter(({ scores, failed }) => failed.length > 0 && failed.length < scores.length);
  if (telling.length === 0) return { value: exactly(1), leastP: 1, rankSteps: null };
  for (const steps of telling.length === 1 ? [null, ...STEPS] : STEPS) {
    const scored = telling.map((stratum) => ({ ...stratum, scores: centred(stratum.scores, steps) }));
    const work = scored.reduce((sum, { scores, failed }) => sum + workOfDrawnSum(scores, failed.length), 0);
    if (work <= MOST_WORK) return { ...enumerated(scored), rankSteps: steps };
  }
  return { value: drawn(telling, random), leastP: 1 / (1 + DRAWS), rankSteps: null };
}

/** Ranks about their middle: as they are, or rounded to a fraction of all in so many steps; mirrored ranks stay mirrored. */
function centred(scores: Int32Array, steps: number | null): Int32Array {
  const middle = scores.length + 1;
  if (steps === null) {
    const isEven = scores.every((score) => (score - middle) % 2 === 0);
    return scores.map((score) => (score - middle) / (isEven ? 2 : 1));
  }
  return scores.map((score) => {
    const offset = score - middle;
    return Math.sign(offset) * Math.round((Math.abs(offset) / (2 * scores.length)) * steps);
  });
}

function enumerated(strata: readonly ScoredStratum[]): Omit<PermutedSum, 'rankSteps'> {
  const { low, p } = strata.map(({ scores, failed }) => drawnSum(scores, failed.length)).reduce(sumOfBoth);
  const mean = strata.reduce((sum, stratum) => sum + meanOf(stratum), 0);
  const seen = strata.reduce((sum, stratum) => sum + sumSeen(stratum), 0);
  const apart = Math.abs(seen - mean) - SAME_DISTANCE;
  let [asExtreme, furthest, least] = [0, 0, 1];
  for (let i = 0; i < p.length; i += 1) {
    const distance = Math.abs(low + i - mean);
    if (distance >= apart) asExtreme += p[i]!;
    if (p[i]! === 0 || distance < furthest - SAME_DISTANCE) continue;
    least = distance > furthest + SAME_DISTANCE ? p[i]! : least + p[i]!;
    furthest = distance;
  }
  return { value: exactly(probability(asExtreme)), leastP: probability(least) };
}

function sumOfBoth(a: SumDistribution, b: SumDistribution): SumDistribution {
  const p = new Float64Array(a.p.length + b.p.length - 1);
  for (let i = 0; i < a.p.length; i += 1) {
    if (a.p[i] === 0) continue;
    for (let j = 0; j < b.p.length; j += 1) p[i + j]! += a.p[i]! * b.p[j]!;
  }
  return { low: a.low + b.low, p };
}

function meanOf({ scores, failed }: ScoredStratum): number {
  return (failed.length * scores.reduce((sum, score) => sum + score, 0)) / scores.length;
}

function sumSeen({ scores, failed }: ScoredStratum): number {
  return failed.reduce((sum, at) => sum + scores[at]!, 0);
}

function drawn(strata: readonly ScoredStratum[], random: UniformNumbers): PValue {
  const mean = strata.reduce((sum, stratum) => sum + meanOf(stratum), 0);
  const apart = Math.abs(strata.reduce((sum, stratum) => sum + sumSeen(stratum), 0) - mean) - SAME_DISTANCE;
  const pools = strata.map(({ scores, failed }) => ({ pool: scores.slice(), some: failed.length }));
  return fromDraws(() => {
    let sum = 0;
    for (const { pool, some } of pools) {
      for (let i = 0; i < some; i += 1) {
        const at = i + Math.floor(random() * (pool.length - i));
        const score = pool[at]!;
        pool[at] = pool[i]!;
        pool[i] = score;
        sum += score;
      }
    }
    return Math.abs(sum - mean) >= apart;
  });
}
