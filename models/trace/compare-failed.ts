import { benjaminiHochberg, holm } from './adjusted-p.ts';
import { testLevels } from './compare-levels.ts';
import { testNumbers } from './compare-numbers.ts';
import type { ComparedFactor, Comparison, CorrectedP, Counts, Standing, UntestedFactor } from './comparison.ts';
import { describeFactor, type Tested, testsOf } from './describe-factor.ts';
import { type Factor, refuseIncomparable, type TracedPart } from './factor.ts';
import { probability } from './fisher-exact.ts';
import { refuseConfidence } from './interval.ts';
import { doubledMidranks } from './midranks.ts';
import type { PValue } from './p-value.ts';
import { rememberedTails, type Tails } from './rank-sum.ts';
import { classesOfLevels } from './strata.ts';
import { type Contrast, groupFactors } from './tied-factors.ts';
import { type UniformNumbers, uniformNumbers } from './uniform-numbers.ts';
import { sayComparison, sayUntested } from './words-of-comparison.ts';

export interface CompareFailedOptions {
  /** Confidence of the intervals. Default 0.95. */
  readonly confidence?: number;
  /** Seed of the random draws where a test is too large to enumerate. Default 1. */
  readonly seed?: number;
}

/**
 * What failed parts share that sound ones do not.
 *
 * Every factor on record is tested exactly (levels by Fisher, and Freeman and Halton; numbers by the rank sum), all tests
 * are corrected together (Holm; Benjamini and Hochberg), and factors that move together are grouped and tested with each
 * other held fixed. What is not on record counts for no level and no number.
 *
 * @param parts   At least one failed and one sound, each once.
 * @param factors One value a part, in the order of the parts.
 * @param options See {@link CompareFailedOptions}.
 * @returns Plain data: ranked factors, groups, what was not tested, and words. See {@link Comparison}.
 * @throws {DomainError} `option-out-of-range`, see {@link refuseIncomparable}, and for confidence or seed.
 *
 * Accuracy: that of the tests; planted data in test/models/trace/compare-failed.test.ts.
 * Limits: an association, never a reason; blind to what only two factors together bring about, and to numbers that harm
 *   on both sides of a good middle.
 */
export function compareFailed(
  parts: readonly TracedPart[],
  factors: readonly Factor[],
  { confidence = 0.95, seed = 1 }: CompareFailedOptions = {},
): Comparison {
  refuseIncomparable(parts, factors);
  refuseConfidence(confidence);
  const isFailed = Uint8Array.from(parts, ({ failed }) => (failed ? 1 : 0));
  const all = {
    failed: isFailed.reduce((sum, one) => sum + one, 0),
    sound: isFailed.filter((one) => one === 0).length,
  };
  const tails = rememberedTails();
  const tested: { found: Tested; row: Row }[] = [];
  const untested: UntestedFactor[] = [];
  for (const factor of factors) {
    const row = rowOf(factor, isFailed, all);
    // A generator of its own, so that no factor's p hangs on which others are compared.
    const found =
      whyUntestable(factor, row) ?? testFactor(factor, row, isFailed, confidence, uniformNumbers(seed), tails);
    if (typeof found === 'object') tested.push({ found, row });
    else untested.push(untestedFactor(factor.name, found, row.missing, all));
  }
  const corrected = correct(tested.flatMap(({ found }) => testsOf(found)));
  const compared = tested
    .map(({ found, row }) => {
      const factor = describeFactor(found, corrected, row, all, confidence);
      return { factor, contrast: contrastOf(found, row.places, parts.length, factor.standing) };
    })
    .sort((a, b) => byRank(a.factor, b.factor));
  const { order, groups } = groupFactors(
    compared.map(({ contrast }) => contrast),
    isFailed,
    () => uniformNumbers(seed),
  );
  const ranked = order.map((at) => compared[at]!.factor);
  const outline = { parts: all, tests: corrected.size, leastP: leastPOf(all), factors: ranked, untested };
  return { ...outline, words: sayComparison(outline), groups };
}

/** Places of the parts on record, and how many of each kind. */
interface Row {
  readonly places: Int32Array;
  readonly onRecord: Counts;
  readonly missing: Counts;
}

function rowOf(factor: Factor, isFailed: Uint8Array, all: Counts): Row {
  const places = Int32Array.from(isFailed, (_, part) => part).filter((part) => factor.values[part] !== null);
  const failed = places.reduce((sum, part) => sum + isFailed[part]!, 0);
  const onRecord = { failed, sound: places.length - failed };
  return { places, onRecord, missing: { failed: all.failed - failed, sound: all.sound - onRecord.sound } };
}

function whyUntestable(factor: Factor, { places, onRecord }: Row): UntestedFactor['why'] | null {
  if (onRecord.failed === 0) return 'no-failed-on-record';
  if (onRecord.sound === 0) return 'no-sound-on-record';
  const first = keyOf(factor.values[places[0]!]!);
  return places.every((part) => keyOf(factor.values[part]!) === first) ? 'same-in-all' : null;
}

function keyOf(value: string | readonly string[] | number): string | number {
  return typeof value === 'object' ? JSON.stringify([...new Set(value)].sort()) : value;
}

function testFactor(
  factor: Factor,
  { places }: Row,
  isFailed: Uint8Array,
  confidence: number,
  random: UniformNumbers,
  tails: Tails,
): Tested | 'none-shared' {
  if (factor.kind === 'number') return testNumbers(factor, places, isFailed, confidence, random, tails);
  const found = testLevels(factor, places, isFailed, random);
  return testsOf(found).length === 0 ? 'none-shared' : found;
}

function untestedFactor(name: string, why: UntestedFactor['why'], missing: Counts, all: Counts): UntestedFactor {
  return { name, why, missing, sentence: sayUntested({ why, name }, missing, all) };
}

function correct(values: readonly PValue[]): Map<PValue, CorrectedP> {
  const p = values.map((value) => value.p);
  const [byHolm, byBenjaminiHochberg] = [holm(p), benjaminiHochberg(p)];
  return new Map(
    values.map((value, i) => [value, { ...value, holm: byHolm[i]!, benjaminiHochberg: byBenjaminiHochberg[i]! }]),
  );
}

function byRank(a: ComparedFactor, b: ComparedFactor): number {
  return a.p.holm - b.p.holm || a.p.p - b.p.p || b.strength - a.strength;
}

/** What was found of a factor, as one score a part: whether it has the strongest level, or its midrank. */
function contrastOf(found: Tested, places: Int32Array, parts: number, standing: Standing): Contrast {
  const score = new Float64Array(parts).fill(Number.NaN);
  const { factor } = found;
  if (found.kind === 'number') {
    const ranks = doubledMidranks(Array.from(places, (part) => found.factor.values[part]!));
    for (const [at, part] of places.entries()) score[part] = ranks[at]!;
    return { factor, label: factor.name, score, classes: null, standing };
  }
  const { level } = found.levels[0]!;
  for (const part of places) {
    const value = found.factor.values[part]!;
    score[part] = value === level || (typeof value === 'object' && value.includes(level)) ? 1 : 0;
  }
  return { factor, label: `${factor.name} ${level}`, score, classes: classesOfLevels(found.factor), standing };
}

/** One over the ways to choose the failed parts. */
function leastPOf({ failed, sound }: Counts): number {
  let log = 0;
  for (let i = 1; i <= failed; i += 1) log += Math.log(i / (sound + i));
  return probability(Math.exp(log));
}
