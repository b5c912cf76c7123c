/** What is on record of the instruments a run was read by (`dwellbook-instruments/1`). */

/** A calibration as it holds on a run's day: what corrects its readings, and how well they are known. */
export interface Calibration {
  /** Calendar days, `2026-03-02`, in the workshop's zone; it holds from the second through the third. */
  readonly done: string;
  readonly from: string;
  readonly until: string;
  readonly by: string;
  readonly certificate: string | null;
  readonly unit: string;
  /** Points [reading, correction] in `unit`, in rising order; none: it needs no correction. */
  readonly points: readonly (readonly [number, number])[];
  /** Expanded uncertainty U (k = 2) in `unit`; null where the certificate gives none. */
  readonly uncertainty: number | null;
}

export interface InstrumentOfChannel {
  readonly channel: string;
  /** Its code. */
  readonly instrument: string;
  /** The calibration that holds on the day of the first scan. */
  readonly calibration: Calibration | null;
  /** Where none holds: the day on which the last one before ran out. */
  readonly ranOut: string | null;
  /** Another instrument that took its place before the last scan. */
  readonly replacedBy: string | null;
}

export interface InstrumentRecords {
  readonly format: 'dwellbook-instruments/1';
  /** The days of the first and the last scan, in the workshop's zone. */
  readonly from: string;
  readonly until: string;
  /** Channels whose instrument is on record. */
  readonly channels: readonly InstrumentOfChannel[];
}
