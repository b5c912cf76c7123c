import type { ChannelLayout } from './layout.ts';

/** One channel's readings, scan by scan. */
export interface ChannelReadings {
  readonly channel: ChannelLayout;
  /**
   * [n], one figure a scan, as it stands in the file: before `scale`, `offset` and any correction.
   * `NaN` is an absent reading (missing code, empty cell, or outside the channel's range), never a temperature.
   */
  readonly value: Float64Array;
}

/** What a log says after the time repairs: scans in strictly rising time. */
export interface Readings {
  /** [n], scan instants in ms since 1970-01-01T00:00:00Z, strictly rising. */
  readonly timeMs: Float64Array;
  readonly channels: readonly ChannelReadings[];
}

/** The five repairs of the time column, in the order they are tried. */
export const REPAIR_KINDS = [
  'repeated-hour',
  'scan-left-out',
  'pieces-put-in-order',
  'clock-set-back',
  'stamps-spread',
  'stamp-kept-first',
] as const;
export type RepairKind = (typeof REPAIR_KINDS)[number];

/** Something done to the time column, by kind, with the lines it touched. */
export interface Repair {
  readonly kind: RepairKind;
  /** First and last line touched, counted from 1, in the file named. */
  readonly lines: readonly [number, number];
  readonly file: number;
  /** How many scans it touched. */
  readonly scans: number;
  /** One sentence a workshop would understand. */
  readonly because: string;
}

export const PASSED_OVER_KINDS = ['blank', 'repeated-header', 'truncated-last-line', 'after-last-reading'] as const;

/** A line that was read past because it holds no reading. */
export interface PassedOver {
  readonly kind: (typeof PASSED_OVER_KINDS)[number];
  readonly file: number;
  readonly lines: readonly [number, number];
}

export interface ReadLog {
  readonly readings: Readings;
  readonly repairs: readonly Repair[];
  readonly passedOver: readonly PassedOver[];
}

/**
 * What a channel read, in its own unit: `scale` then `offset` applied to the figure in the file.
 *
 * A scale that is one over a whole number divides instead of multiplying, so that 1753 tenths are exactly 175.3.
 */
export function scaledReading(value: number, channel: ChannelLayout): number {
  const { scale = 1, offset = 0 } = channel;
  if (scale === 1 && offset === 0) return value;
  const divisor = 1 / scale;
  const whole = Math.round(divisor);
  const scaled = Math.abs(divisor - whole) < 1e-9 * Math.abs(divisor) && whole !== 0 ? value / whole : value * scale;
  return offset === 0 ? scaled : Math.round((scaled + offset) * 1e9) / 1e9;
}
