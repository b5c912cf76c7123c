import { accountedFor, association } from './association.ts';
import type { FactorGroup, Standing, Tie, TiedFactor } from './comparison.ts';
import type { Factor } from './factor.ts';
import { TELLING_P } from './p-value.ts';
import { classesOfNumbers } from './strata.ts';
import { type HeldFixed, levelHeldFixed, numberHeldFixed } from './stratified-test.ts';
import type { UniformNumbers } from './uniform-numbers.ts';
import { sayTie } from './words-of-ties.ts';

/** A factor as one score a part, NaN where nothing is on record. */
export interface Contrast {
  readonly factor: Factor;
  /** What was found of it, by name: the factor, and its strongest level if it has levels. */
  readonly label: string;
  /** 1 or 0 for having the strongest level or not; midranks of a number. */
  readonly score: Float64Array;
  /** Class of each part by all levels, −1 where nothing is on record; null of a number. */
  readonly classes: Int32Array | null;
  readonly standing: Standing;
}

/** Factors associated by this much or more are shown together: a large association in Cohen's sense. */
export const TIED_ASSOCIATION = 0.5;
/** A medium one may tie a factor that goes with failure. */
const MEDIUM_ASSOCIATION = 0.3;
/**
 * A medium association, or any of a factor that stands out, ties it only if holding either fixed shows that not both go with
 * failure, and if the association lies this many standard errors 1/√(n − 1) from none: a level that holds within a much
 * commoner one has a small φ.
 */
const TIED_STANDARD_ERRORS = 3;

/** Factors in their final order, and grouped. */
export interface Grouping {
  /** Places in the order given, in the order to be shown. */
  readonly order: readonly number[];
  readonly groups: readonly FactorGroup[];
}

/**
 * Groups of factors that move together, each with its strongest first.
 *
 * In order of rank a factor joins the first group to whose first it is tied, or begins one of its own; ties are to the
 * first, not from member to member, so that no chain of weak links makes one group of all. A factor that still goes with
 * failure when the first is held fixed, while the first no longer does when it is (the first may be on record for more
 * parts), is moved before the first, at most once, and the grouping begun anew.
 *
 * @param ranked    Strongest first.
 * @param newRandom Draws for one test; see {@link numberHeldFixed}.
 *
 * Source: thresholds, Cohen, Statistical Power Analysis for the Behavioral Sciences, 2nd ed. (1988), §3.2; standard error of
 *   ρ without association, Kendall, Rank Correlation Methods, 4th ed. (1970), §5.
 */
export function groupFactors(
  ranked: readonly Contrast[],
  isFailed: Uint8Array,
  newRandom: () => UniformNumbers,
): Grouping {
  const known = new Map<string, TiedFactor | null>();
  const tieBetween = (first: number, other: number): TiedFactor | null => {
    const key = `${first} ${other}`;
    const tie = known.has(key) ? known.get(key)! : tieOf(ranked[first]!, ranked[other]!, isFailed, newRandom);
    known.set(key, tie);
    return tie;
  };
  const moved = new Set<number>();
  let order = ranked.map((_, at) => at);
  for (;;) {
    const { groups, leading } = groupInOrder(order, moved, tieBetween);
    if (leading === null) {
      return { order, groups: groups.map(({ first, tied }) => ({ first: ranked[first]!.factor.name, tied })) };
    }
    const { other, first } = leading;
    moved.add(other);
    order = order.filter((at) => at !== other).flatMap((at) => (at === first ? [other, at] : [at]));
  }
}

function groupInOrder(
  order: readonly number[],
  moved: ReadonlySet<number>,
  tieBetween: (first: number, other: number) => TiedFactor | null,
): { groups: { first: number; tied: TiedFactor[] }[]; leading: { first: number; other: number } | null } {
  const groups: { first: number; tied: TiedFactor[] }[] = [];
  for (const other of order) {
    let isTied = false;
    for (const { first, tied } of groups) {
      const tie = tieBetween(first, other);
      if (tie === null) continue;
      if (tie.tie === 'leads' && !moved.has(other)) return { groups, leading: { first, other } };
      tied.push(tie);
      isTied = true;
      break;
    }
    if (!isTied) groups.push({ first: other, tied: [] });
  }
  return { groups, leading: null };
}

function tieOf(
  first: Contrast,
  other: Contrast,
  isFailed: Uint8Array,
  newRandom: () => UniformNumbers,
): TiedFactor | null {
  const r = strongest(first, other);
  const isClose = Math.abs(r) >= TIED_ASSOCIATION;
  if (!isTelling(first)) {
    if (!isClose) return null;
    return described(first, other, {
      association: r,
      tie: 'moves-with',
      withFirstFixed: null,
      firstWithThisFixed: null,
    });
  }
  if (!isClose && !mayFollow(other, r)) return null;
  const both = commonParts(first, other);
  if (!isClose && Math.abs(r) * Math.sqrt(both.length - 1) < TIED_STANDARD_ERRORS) return null;
  const withFirstFixed = heldFixed(other, first, both, isFailed, newRandom());
  const firstWithThisFixed = heldFixed(first, other, both, isFailed, newRandom());
  const tie = tieFrom(withFirstFixed.value.p <= TELLING_P, firstWithThisFixed.value.p <= TELLING_P);
  if (!isClose && tie === 'each') return null;
  return described(first, other, { association: r, tie, withFirstFixed, firstWithThisFixed });
}

/** Of what was found of both, or of what was found of the first and all levels of the other, whichever is closer. */
function strongest(first: Contrast, other: Contrast): number {
  const r = association(first.score, other.score);
  if (other.classes === null) return r;
  const byLevels = accountedFor(first.score, other.classes);
  return byLevels > Math.abs(r) ? byLevels : r;
}

function isTelling({ standing }: Contrast): boolean {
  return standing === 'stands-out' || standing === 'may-be-chance';
}

/** Whether a factor less than closely associated may yet only follow the first. */
function mayFollow(other: Contrast, r: number): boolean {
  return other.standing === 'stands-out' || (isTelling(other) && Math.abs(r) >= MEDIUM_ASSOCIATION);
}

function tieFrom(otherStillGoes: boolean, firstStillGoes: boolean): Tie {
  if (otherStillGoes) return firstStillGoes ? 'each' : 'leads';
  return firstStillGoes ? 'follows' : 'cannot-tell-apart';
}

function described(first: Contrast, other: Contrast, tie: Omit<TiedFactor, 'name' | 'sentence'>): TiedFactor {
  const name = other.factor.name;
  return { name, ...tie, sentence: sayTie(first, other, tie) };
}

/** Places of the parts on record in both. */
function commonParts(a: Contrast, b: Contrast): Int32Array {
  const places: number[] = [];
  for (let part = 0; part < a.score.length; part += 1) {
    if (!Number.isNaN(a.score[part]! + b.score[part]!)) places.push(part);
  }
  return Int32Array.from(places);
}

/** Whether a factor still goes with failure among parts alike in another. */
function heldFixed(
  { factor, score }: Contrast,
  fixed: Contrast,
  parts: Int32Array,
  isFailed: Uint8Array,
  random: UniformNumbers,
): HeldFixed {
  const strata =
    fixed.classes === null
      ? classesOfNumbers(Float64Array.from(parts, (part) => fixed.score[part]!))
      : parts.map((part) => fixed.classes![part]!);
  const failed = Uint8Array.from(parts, (part) => isFailed[part]!);
  return factor.kind === 'level'
    ? levelHeldFixed(
        Uint8Array.from(parts, (part) => score[part]!),
        failed,
        strata,
      )
    : numberHeldFixed(
        Float64Array.from(parts, (part) => score[part]!),
        failed,
        strata,
        random,
      );
}
