import type { ChannelRole } from '../log/layout.ts';
import type { PassedOver, Repair } from '../log/readings.ts';
import type { FaultKind } from '../run/fault-kinds.ts';

/** What `check` says (`dwellbook-evaluation/1`): findings and verdict of one run against one issue of a cycle. */

export type Outcome = 'met' | 'not-met' | 'cannot-tell' | 'pending';
export type Verdict = 'conforms' | 'does-not-conform' | 'cannot-tell' | 'pending';

/** A suspected sensor fault, with its evidence. A person decides. */
export interface Fault {
  readonly kind: FaultKind;
  /** ISO instant the fault holds from. */
  readonly from: string;
  readonly because: string;
}

export interface SensorState {
  readonly channel: string;
  readonly role: ChannelRole;
  readonly state: 'working' | 'suspect' | 'excluded';
  readonly faults: readonly Fault[];
  /** The decision, where one was taken. */
  readonly exclusion: { readonly from: string; readonly reason: string; readonly by: string } | null;
}

/** One decision that a person still has to take, and the findings that hang on it. */
export interface OpenDecision {
  readonly channel: string;
  readonly kind: FaultKind;
  readonly from: string;
  readonly because: string;
  /** Names of the limits that would change. */
  readonly changes: readonly string[];
}

export interface Finding {
  /** `dwell 1/time`, `window/cure pressure`, `ceiling` … */
  readonly limit: string;
  readonly outcome: Outcome;
  /** What was seen, in the cycle's unit; null where nothing was. */
  readonly observed: number | null;
  /** The greatest (for an upper limit the least) that gaps allow; null where unbounded. */
  readonly possible: number | null;
  readonly atLeast: number | null;
  readonly atMost: number | null;
  readonly unit: string;
  /** Distance to the nearest limit, negative when broken. */
  readonly margin: number | null;
  /** Expanded uncertainty (k = 2), in `unit`, where known. */
  readonly uncertainty: number | null;
  readonly sensor: string | null;
  /** ISO instants of the stretch the finding looks at or breaks in. */
  readonly from: string | null;
  readonly until: string | null;
  /** Present and true where an excursion was forgiven. */
  readonly forgiven?: true;
  /** Channel of the open decision this finding hangs on. */
  readonly awaits?: string;
  readonly because: string;
}

export interface Dip {
  readonly from: string;
  readonly until: string;
  readonly minutes: number;
  /** How far below the band, in the cycle's temperature unit. */
  readonly depth: number;
  readonly forgiven: boolean;
  readonly sensor: string | null;
}

/** When one judged sensor was in a dwell; null where it did not enter, or has not left for good. */
export interface SensorInDwell {
  readonly channel: string;
  readonly entered: string | null;
  readonly left: string | null;
}

/** What happened in one stage, for one part. Instants are null where they did not come. */
export interface StageRecord {
  readonly name: string;
  readonly kind: 'heat' | 'dwell' | 'cool';
  readonly opens: string | null;
  readonly closes: string | null;
  readonly minutes: number | null;
  readonly openedBy: string | null;
  readonly closedBy: string | null;
  readonly dips: readonly Dip[];
  /** Of a dwell: every judged sensor, in the order of `judgedBy`. */
  readonly sensors?: readonly SensorInDwell[];
}

/** Where a window's bounds fell, for the chart. */
export interface WindowRecord {
  readonly name: string;
  readonly from: string | null;
  readonly until: string | null;
  readonly channels: readonly string[];
}

/** Estimated cure of one judged sensor at the end of the log. */
export interface CureEstimate {
  readonly channel: string;
  readonly degree: number;
  readonly tgC: number | null;
  readonly gelAt: string | null;
  readonly vitrifiesAt: string | null;
  /**
   * Coverage intervals (k = 2) from the thermocouple's uncertainty and, where the set has it, the covariance of its
   * constants; null where the first is not on record. Absent in what was judged before they were reckoned.
   */
  readonly degreeInterval?: Interval | null;
  readonly tgIntervalC?: Interval | null;
  /** ISO instants. */
  readonly gelInterval?: readonly [string, string] | null;
}

/** From the least to the greatest, in the unit of the figure. */
export type Interval = readonly [number, number];

export interface PartEvaluation {
  readonly part: string | null;
  readonly verdict: Verdict;
  readonly withoutEstimates: Verdict;
  readonly judgedBy: readonly string[];
  readonly ownSensors: boolean;
  readonly stages: readonly StageRecord[];
  readonly windows: readonly WindowRecord[];
  readonly heatOn: string | null;
  readonly findings: readonly Finding[];
  readonly cure: readonly CureEstimate[];
  /** Judged sensors that the resin set gives no estimate along, and why: it stalls there, or runs backwards. */
  readonly notEstimated?: readonly { readonly channel: string; readonly because: string }[];
}

/** A stretch without readings on a channel. */
export interface GapRecord {
  readonly channel: string;
  readonly from: string;
  readonly until: string;
}

export interface Evaluation {
  readonly format: 'dwellbook-evaluation/1';
  readonly verdict: Verdict;
  readonly log: {
    /** Of the bytes as they came; filled by the caller, who hashes. */
    readonly sha256: string | null;
    readonly from: string;
    readonly until: string;
    readonly scans: number;
    readonly repairs: readonly Repair[];
    readonly passedOver: readonly PassedOver[];
    readonly gaps: readonly GapRecord[];
  };
  readonly cycle: { readonly code: string; readonly issue: string; readonly sha256: string | null };
  readonly resin: { readonly code: string; readonly status: string; readonly citation: string } | null;
  /** Rules that the documents left to a default, as sentences. */
  readonly assumptions: readonly string[];
  readonly sensors: readonly SensorState[];
  readonly decisions: readonly OpenDecision[];
  readonly parts: readonly PartEvaluation[];
}
