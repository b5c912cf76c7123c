/** The load document (`dwellbook-load/1`): who was where in one run. */

export interface LeakTestRecord {
  /** Vacuum at the start and the end, in the cycle's vacuum unit. */
  readonly start: number;
  readonly end: number;
  readonly minutes: number;
}

export interface LoadPart {
  readonly part: string;
  readonly quantity?: number;
  /** Name of the vacuum channel at this part's bag. */
  readonly bagLine?: string;
  /** Degree of cure at the first scan, where the roll had aged; default: the resin set's own. */
  readonly startDegree?: number;
  /** Relative humidity of the room it was laid up in, %. */
  readonly humidity?: number;
  readonly leakTest?: LeakTestRecord;
}

export interface LoadSensor {
  readonly channel: string;
  readonly parts?: readonly string[];
  readonly place?: string;
  /** Expanded uncertainty U (k = 2) in the channel's unit. */
  readonly uncertainty?: number;
  /** Points [reading, correction] in the channel's unit, in rising order. */
  readonly corrections?: readonly (readonly [number, number])[];
}

/** A person's decision that a sensor is not to be believed from an instant on. */
export interface Exclusion {
  readonly channel: string;
  /** ISO 8601 instant. */
  readonly from: string;
  readonly reason: string;
  readonly by: string;
}

export interface Load {
  readonly format: 'dwellbook-load/1';
  readonly workOrder?: string;
  /** Ambient pressure during the run, as written: `1009 mbar`. */
  readonly barometer?: string;
  readonly parts: readonly LoadPart[];
  readonly sensors: readonly LoadSensor[];
  readonly exclusions?: readonly Exclusion[];
}
