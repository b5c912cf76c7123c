import { DomainError } from '../errors.ts';
import { probability } from './fisher-exact.ts';
import { normalised } from './hypergeometric.ts';
import { DRAWS, exactly, fromDraws, type PValue } from './p-value.ts';
import type { UniformNumbers } from './uniform-numbers.ts';

/** Counts of one level. */
export interface LevelCount {
  readonly failed: number;
  readonly sound: number;
}

export interface FreemanHaltonOptions {
  /** Tables enumerated at most; where there are more, random draws. Default 20 000. */
  readonly mostTables?: number;
  /** Random draws where there are more tables. Default 10 000. */
  readonly draws?: number;
}

/** Tables are equally probable when their log probabilities agree to this; rounding is far below it. */
const SAME_LOG_P = 1e-7;

/**
 * Exact test of failure against a factor of several levels (r × 2 table).
 *
 * With all margins given the failed counts xᵢ have probability Π C(nᵢ, xᵢ) / C(N, k). p is the sum over all tables no
 * more probable than the one seen, by enumeration; where there are more than `mostTables`, the share of such tables
 * among random draws of k parts without replacement ({@link fromDraws}).
 *
 * @param levels  Whole counts ≥ 0, one a level.
 * @param random  Draws for the Monte Carlo estimate; not touched where p is exact.
 * @param options See {@link FreemanHaltonOptions}.
 * @returns p in (0, 1], with its standard error where it was drawn.
 * @throws {DomainError} `option-out-of-range` when a count is not a whole number ≥ 0 or `draws` < 1.
 *
 * Accuracy: relative 1e-9 where exact, by brute force and SciPy; test/models/trace/freeman-halton.test.ts.
 * Source: Freeman & Halton, Biometrika 38 (1951) 141–149; draws: Agresti, Wackerly & Boyett, Psychometrika 44 (1979)
 *   75–83.
 */
export function freemanHalton(
  levels: readonly LevelCount[],
  random: UniformNumbers,
  { mostTables = 20_000, draws = DRAWS }: FreemanHaltonOptions = {},
): PValue {
  for (const { failed, sound } of levels) {
    if (Number.isInteger(failed) && Number.isInteger(sound) && failed >= 0 && sound >= 0) continue;
    throw new DomainError('option-out-of-range', 'A count of parts is a whole number', { failed, sound });
  }
  if (!(draws >= 1)) throw new DomainError('option-out-of-range', 'At least one draw is needed', { draws });
  // In one order whatever the names of the levels, so that equal tables draw the same numbers.
  const sorted = levels
    .filter(({ failed, sound }) => failed + sound > 0)
    .sort((a, b) => b.failed + b.sound - (a.failed + a.sound) || b.failed - a.failed);
  const size = sorted.map(({ failed, sound }) => failed + sound);
  const failed = sorted.map((level) => level.failed);
  const drawn = failed.reduce((sum, x) => sum + x, 0);
  const logWays = size.map((n) => logChoices(n, Math.min(n, drawn)));
  const seen = failed.reduce((sum, x, i) => sum + logWays[i]![x]!, 0) + SAME_LOG_P;
  if (countTables(size, drawn) <= mostTables) return exactly(enumerated(logWays, size, drawn, seen));
  const drawTable = tableDraws(logWays, size, drawn, random);
  return fromDraws(() => drawTable() <= seen, draws);
}

/** ln C(n, x) for x = 0 … most. */
function logChoices(n: number, most: number): Float64Array {
  const log = new Float64Array(most + 1);
  for (let x = 1; x <= most; x += 1) log[x] = log[x - 1]! + Math.log((n - x + 1) / x);
  return log;
}

/** Ways to share `drawn` failures among levels of these sizes; a double, since it may be very large. */
function countTables(size: readonly number[], drawn: number): number {
  let ways = new Float64Array(drawn + 1);
  ways[0] = 1;
  for (const n of size) {
    const next = new Float64Array(drawn + 1);
    for (let x = 0, window = 0; x <= drawn; x += 1) {
      window += ways[x]! - (x > n ? ways[x - n - 1]! : 0);
      next[x] = window;
    }
    ways = next;
  }
  return ways[drawn]!;
}

/** Share of the probability that lies in tables of log weight at most `seen`. */
function enumerated(logWays: readonly Float64Array[], size: readonly number[], drawn: number, seen: number): number {
  const roomAfter = size.map((_, i) => size.slice(i + 1).reduce((sum, n) => sum + n, 0));
  const weights: number[] = [];
  const share = (level: number, left: number, log: number): void => {
    if (level === size.length) {
      weights.push(log);
      return;
    }
    const most = Math.min(size[level]!, left);
    for (let x = Math.max(0, left - roomAfter[level]!); x <= most; x += 1) {
      share(level + 1, left - x, log + logWays[level]![x]!);
    }
  };
  share(0, drawn, 0);
  const logP = normalised(Float64Array.from(weights));
  return probability(logP.reduce((sum, log, i) => sum + (weights[i]! <= seen ? Math.exp(log) : 0), 0));
}

/** Log weights of random tables: `drawn` of the parts fail, without replacement. */
function tableDraws(
  logWays: readonly Float64Array[],
  size: readonly number[],
  drawn: number,
  random: UniformNumbers,
): () => number {
  const levelOf = Int32Array.from(size.flatMap((n, level) => new Array<number>(n).fill(level)));
  const count = new Int32Array(size.length);
  return () => {
    count.fill(0);
    let log = 0;
    for (let i = 0; i < drawn; i += 1) {
      const at = i + Math.floor(random() * (levelOf.length - i));
      const level = levelOf[at]!;
      levelOf[at] = levelOf[i]!;
      levelOf[i] = level;
      const x = count[level]!;
      count[level] = x + 1;
      log += logWays[level]![x + 1]! - logWays[level]![x]!;
    }
    return log;
  };
}
