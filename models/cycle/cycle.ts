/** The cycle document (`dwellbook-cycle/1`): what was asked of a cure, as its author wrote it. Times are minutes. */

export type ClockOpening = 'lagging-enters' | 'leading-enters' | 'mean-enters' | 'air-enters';
export type ClockClosing = 'first-leaves' | 'last-leaves' | 'mean-leaves' | 'air-leaves';
export type Counting = 'contiguous' | 'accumulated' | 'each';
export type RateSubject = 'every' | 'leading' | 'lagging' | 'mean' | 'air';

/** At least one of the two is written. */
export interface Bounds {
  readonly atLeast?: number;
  readonly atMost?: number;
}

export interface Clock {
  readonly opens: ClockOpening;
  readonly closes: ClockClosing;
}

/** Excursions that count as if they had not happened: no deeper than `by`, no longer than `for`. */
export interface Forgiveness {
  readonly by: number;
  readonly for: number;
  /** How many at most; absent: any number. */
  readonly times?: number;
  /** Minutes altogether at most; absent: any. */
  readonly inTotal?: number;
}

export interface RateLimit extends Bounds {
  /** Two temperatures in the direction of travel. */
  readonly over: readonly [number, number];
  readonly average: 'window' | 'chord';
  /** Minutes; with `average: "window"`. */
  readonly window?: number;
  readonly of: RateSubject;
}

export interface HeatStage {
  readonly name: string;
  readonly kind: 'heat';
  readonly rate?: RateLimit;
}

export interface DwellStage {
  readonly name: string;
  readonly kind: 'dwell';
  readonly target: number;
  readonly plus: number;
  readonly minus: number;
  readonly time?: Bounds;
  readonly clock?: Clock;
  readonly counting?: Counting;
  /** What a dip does: default `stops-clock`. */
  readonly below?: 'stops-clock' | 'not-allowed';
  readonly longest?: { readonly atMost: number; readonly clock: Clock };
  readonly forgive?: { readonly below?: Forgiveness; readonly above?: Forgiveness };
}

export interface CoolStage {
  readonly name: string;
  readonly kind: 'cool';
  readonly rate?: RateLimit;
  readonly until?: number;
}

export type Stage = HeatStage | DwellStage | CoolStage;

export type CycleEvent =
  | { readonly at: 'start' | 'end' | 'heat-on' | 'gel'; readonly plus?: number }
  | {
      readonly at: 'first-reaches' | 'all-reach' | 'first-cools-to' | 'all-cool-to';
      readonly value: number;
      readonly plus?: number;
    }
  | { readonly at: 'opens' | 'closes'; readonly stage: string; readonly plus?: number }
  | {
      readonly at: 'pressure-reaches' | 'vacuum-reaches' | 'pressure-falls-to' | 'vacuum-falls-to';
      readonly value: number;
      readonly plus?: number;
    };

export interface WindowLimit extends Bounds {
  readonly name: string;
  readonly quantity: 'pressure' | 'vacuum';
  readonly from: CycleEvent;
  readonly until: CycleEvent;
  readonly forgive?: Forgiveness;
}

export interface Cycle {
  readonly format: 'dwellbook-cycle/1';
  readonly code: string;
  readonly issue: string;
  readonly title: string;
  readonly origin?: { readonly document: string; readonly issue?: string; readonly clause?: string };
  readonly units: {
    readonly temperature: '°C' | '°F';
    /** Where rates are not temperature per minute. */
    readonly rate?: '°C/min' | '°F/min' | '°C/h' | '°F/h';
    readonly pressure?: string;
    readonly vacuum?: string;
  };
  readonly judgedBy: 'part' | 'tool' | 'air';
  readonly stages: readonly Stage[];
  readonly windows?: readonly WindowLimit[];
  readonly ceiling?: number;
  readonly spread?: {
    readonly atMost: number;
    readonly during: 'heating' | 'dwells' | 'run';
    /** Minutes after each opening; with `during: "dwells"`. */
    readonly after?: number;
  };
  readonly sensors?: {
    readonly workingAtLeast?: number;
    readonly own?: boolean;
    readonly mustWork?: readonly string[];
  };
  readonly log?: { readonly longestGap?: number; readonly changesAtMost?: number };
  readonly leakTest?: { readonly startAtLeast?: number; readonly over: number; readonly lossAtMost: number };
  readonly cure?: {
    readonly resin: string;
    readonly degreeAtLeast?: number;
    readonly tgAtLeast?: number;
    readonly pressureBeforeGel?: number;
  };
  readonly material?: { readonly outLife?: boolean };
  readonly instruments?: { readonly calibration?: boolean };
  readonly decision?: { readonly rule: 'as-indicated' | 'guarded' };
}
