import type { TwoByTwo } from './fisher-exact.ts';
import type { Shift } from './hodges-lehmann.ts';
import type { OddsRatio } from './odds-ratio.ts';
import type { PValue } from './p-value.ts';
import type { RiskDifference } from './risk-difference.ts';
import type { HeldFixed } from './stratified-test.ts';

/** A probability with what is left of it after correction for all tests of the comparison. */
export interface CorrectedP extends PValue {
  readonly holm: number;
  readonly benjaminiHochberg: number;
}

/** Failed and sound parts. */
export interface Counts {
  readonly failed: number;
  readonly sound: number;
}

/**
 * `stands-out`: Holm's p is 0.05 or less. `may-be-chance`: only p by itself is. `nothing-shown`: neither.
 * `too-few`: one failed part, or one sound one, on record: nothing can be told.
 */
export type Standing = 'stands-out' | 'may-be-chance' | 'nothing-shown' | 'too-few';

/** One level against all others. */
export interface LevelRow {
  readonly level: string;
  readonly table: TwoByTwo;
  /** Null where the level was not tested: all parts have it, or a single one. */
  readonly test: LevelTest | null;
  readonly sentence: string;
}

export interface LevelTest {
  readonly p: CorrectedP;
  readonly oddsRatio: OddsRatio;
  /** Share that failed with the level, less the share that failed without it. */
  readonly riskDifference: RiskDifference;
}

interface Compared {
  readonly name: string;
  readonly onRecord: Counts;
  readonly missing: Counts;
  /** The smallest of the factor's tests. */
  readonly p: CorrectedP;
  readonly standing: Standing;
  /**
   * 0 … 1: of a level, its share among failed parts less that among sound ones; of a number, |2 superiority − 1|. Both are
   * Cliff's δ (Psychol Bull 114 (1993) 494–509), so that levels and numbers stand on one scale.
   */
  readonly strength: number;
  /** What was counted or measured. */
  readonly sentence: string;
  /** How far that can be trusted. */
  readonly evidence: string;
}

export interface ComparedLevels extends Compared {
  readonly kind: 'level';
  /** Strongest first. */
  readonly levels: readonly LevelRow[];
  /** All levels at once, where there are three or more and each part has one; else null. */
  readonly overall: CorrectedP | null;
}

export interface ComparedNumbers extends Compared {
  readonly kind: 'number';
  readonly unit: string;
  readonly medianFailed: number;
  readonly medianSound: number;
  readonly shift: Shift;
  /** Share of failed–sound pairs in which the failed part has the larger number, equal ones counted half. */
  readonly superiority: number;
  readonly rankSteps: number | null;
}

export type ComparedFactor = ComparedLevels | ComparedNumbers;

/** A factor that was not tested, and why. */
export interface UntestedFactor {
  readonly name: string;
  readonly why: 'same-in-all' | 'none-shared' | 'no-failed-on-record' | 'no-sound-on-record';
  readonly missing: Counts;
  readonly sentence: string;
}

/**
 * `cannot-tell-apart`: with either held fixed the other no longer goes with failure, or these parts cannot show it.
 * `follows`: it no longer does with the group's first held fixed. `leads`: the group's first no longer does with it held
 * fixed, though it stands first. `each`: both still do. `moves-with`: the group's first does not go with failure, so nothing is to be told apart.
 */
export type Tie = 'cannot-tell-apart' | 'follows' | 'leads' | 'each' | 'moves-with';

/** A factor that moves together with the first of its group. */
export interface TiedFactor {
  readonly name: string;
  /** φ, Spearman's ρ, or η or ε of what was found of the first over the levels of this one: see `association`. */
  readonly association: number;
  readonly tie: Tie;
  /** This factor with the group's first held fixed; null where nothing is to be told apart. */
  readonly withFirstFixed: HeldFixed | null;
  /** The group's first with this factor held fixed. */
  readonly firstWithThisFixed: HeldFixed | null;
  readonly sentence: string;
}

export interface FactorGroup {
  readonly first: string;
  readonly tied: readonly TiedFactor[];
}

/** What failed parts share that sound ones do not. */
export interface Comparison {
  readonly parts: Counts;
  /** Tests the corrections count. */
  readonly tests: number;
  /** The least p any one test of these parts could have: one choice among all. */
  readonly leastP: number;
  readonly words: readonly string[];
  /** Ranked: by Holm's p, then p, then strength; one that leads another stands before it. */
  readonly factors: readonly ComparedFactor[];
  /** Factors that move together, in the order of their first; a factor tied to none is alone in its group. */
  readonly groups: readonly FactorGroup[];
  readonly untested: readonly UntestedFactor[];
}
