import type { Outcome } from '../evaluation/evaluation.ts';

/** What is to be drawn of a run: plain geometry for screen and paper. Hours count from hour 0; values are in `units`. */

/** Strips from top to bottom; all share one axis of hours. */
export const STRIPS = ['temperature', 'pressure', 'vacuum', 'cure', 'viscosity', 'tg'] as const;
export type Strip = (typeof STRIPS)[number];

export type LineRole =
  | 'leading'
  | 'lagging'
  | 'judged'
  | 'air'
  | 'setpoint'
  | 'pressure'
  | 'vacuum'
  | 'source'
  | 'guide'
  | 'other';

/** A point of the picture: hours along, the strip's unit upwards. */
export type Corner = readonly [hours: number, value: number];

/** A course. Where `value` is null the line breaks. */
export interface Line {
  readonly channel: string;
  readonly strip: Strip;
  readonly role: LineRole;
  readonly state: 'working' | 'suspect' | 'excluded';
  /** From here on a person's decision holds; null: believed to the end. */
  readonly excludedFromH: number | null;
  /** At the line's end: `TC3 lagging`. */
  readonly label: string;
  /** Where the label stands, in the strip's unit, moved apart from the others; null where the line is not in view. */
  readonly labelAt: number | null;
  readonly hours: readonly number[];
  readonly value: readonly (number | null)[];
}

/** Where a limit applies, and nowhere else; a null side is open, or cannot be drawn without a barometer. */
export interface Band {
  readonly strip: Strip;
  readonly kind: 'dwell' | 'window' | 'ceiling';
  readonly fromH: number;
  readonly untilH: number;
  readonly low: number | null;
  readonly high: number | null;
  readonly text: string;
  readonly limit: string;
  readonly outcome: Outcome;
}

/** A rate over the temperatures and times it covers: where a sensor that keeps to it can be. */
export interface Wedge {
  readonly stage: string;
  /** Corners in order: the first sensor's start, the end of the fastest way, then back along the slowest. */
  readonly corners: readonly Corner[];
  readonly text: string;
  readonly limits: readonly string[];
  readonly outcome: Outcome;
}

/** An instant that opens or closes something. */
export interface Mark {
  readonly kind: 'heat-on' | 'opens' | 'closes';
  readonly atH: number;
  readonly strip: Strip;
  /** Where the named sensor stood; null where no single sensor did it. */
  readonly value: number | null;
  /** `dwell 1 opens, TC3` */
  readonly text: string;
  readonly sensor: string | null;
  readonly limit: string | null;
}

export interface DipArc {
  readonly stage: string;
  readonly fromH: number;
  readonly untilH: number;
  readonly level: number;
  readonly depth: number;
  readonly isForgiven: boolean;
  readonly sensor: string | null;
  readonly text: string;
}

/** A stretch that breaks a limit, to be underlined with its minutes. */
export interface Breach {
  readonly strip: Strip;
  readonly fromH: number;
  readonly untilH: number;
  readonly level: number;
  readonly text: string;
  readonly limit: string;
  readonly sensor: string | null;
}

/** A stretch without readings. */
export interface Hatch {
  readonly strip: Strip;
  readonly fromH: number;
  readonly untilH: number;
  readonly channels: readonly string[];
  /** Whether every judged channel of the strip is silent there. */
  readonly isOfAll: boolean;
}

/** A mark on a course: estimated gel or vitrification, or where the resin is thinnest. */
export interface Dot {
  readonly kind: 'gel' | 'vitrification' | 'thinnest';
  readonly strip: Strip;
  readonly atH: number;
  readonly value: number;
  readonly channel: string;
  /** `TC3 gels 11:29`; empty where another of its kind says it. */
  readonly text: string;
}

/** The stretch in which the resin at a sensor is estimated to flow: from softening to gel. */
export interface Flow {
  readonly strip: Extract<Strip, 'viscosity' | 'cure'>;
  readonly channel: string;
  readonly role: LineRole;
  readonly fromH: number;
  readonly untilH: number;
  /** `TC3 flows 125 min` */
  readonly text: string;
}

/** The stretch a finding looks at, to be lit when it is pointed at. */
export interface Stretch {
  readonly limit: string;
  readonly outcome: Outcome;
  readonly strip: Strip;
  readonly fromH: number;
  readonly untilH: number;
  readonly sensor: string | null;
}

export interface StripAxis {
  readonly strip: Strip;
  readonly title: string;
  readonly unit: string;
  readonly scale: 'linear' | 'log';
  readonly low: number;
  readonly high: number;
  readonly ticks: readonly number[];
}

export interface TimeTick {
  readonly atH: number;
  /** `2 h 30` */
  readonly hours: string;
  /** `11:34`, in the workshop's zone. */
  readonly clock: string;
  /** `3 March 2026` at the first tick and where the day changes. */
  readonly day: string | null;
}

/** The run in rows, for whoever cannot see the picture. */
export interface RunTable {
  readonly instants: readonly { readonly atH: number; readonly clock: string; readonly what: string }[];
  readonly sensors: readonly SensorRow[];
}

export interface SensorRow {
  readonly channel: string;
  readonly role: LineRole;
  readonly unit: string;
  readonly highest: ValueAt | null;
  readonly lowest: ValueAt | null;
  readonly dwells: readonly SensorDwell[];
  /** Estimates as the log ends. */
  readonly degree: number | null;
  readonly tg: number | null;
}

export interface ValueAt {
  readonly value: number;
  readonly clock: string;
}

/** Clock times, and extremes between them; null where it did not come. */
export interface SensorDwell {
  readonly stage: string;
  readonly entered: string | null;
  readonly left: string | null;
  readonly highest: number | null;
  readonly lowest: number | null;
}

export interface RunChart {
  /** Instant of hour 0, ms since 1970. */
  readonly zeroMs: number;
  /** Whether hour 0 is heat-on; else it is the log's start. */
  readonly isFromHeatOn: boolean;
  /** The stretch in view. */
  readonly fromH: number;
  readonly untilH: number;
  readonly logFromH: number;
  readonly logUntilH: number;
  readonly zone: string;
  readonly part: string | null;
  readonly strips: readonly StripAxis[];
  readonly timeTicks: readonly TimeTick[];
  readonly lines: readonly Line[];
  readonly bands: readonly Band[];
  readonly wedges: readonly Wedge[];
  readonly marks: readonly Mark[];
  readonly dips: readonly DipArc[];
  readonly breaches: readonly Breach[];
  readonly hatches: readonly Hatch[];
  readonly dots: readonly Dot[];
  readonly flows: readonly Flow[];
  readonly stretches: readonly Stretch[];
  readonly table: RunTable;
  /** What is estimated over the whole run, in sentences. */
  readonly estimates: readonly string[];
  /** Channels that could not be drawn, and why. */
  readonly notDrawn: readonly { readonly channel: string; readonly because: string }[];
}
