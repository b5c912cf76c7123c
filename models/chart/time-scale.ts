/** From instants to hours along the chart. */
export interface TimeScale {
  readonly zeroMs: number;
  readonly isFromHeatOn: boolean;
  readonly logFromMs: number;
  readonly logUntilMs: number;
  readonly fromMs: number;
  readonly untilMs: number;
}

const HOUR_MS = 3_600_000;

/** Hours from hour 0, to the nearest hundredth of a second. */
export function hoursAt(scale: Pick<TimeScale, 'zeroMs'>, ms: number): number {
  return Math.round(((ms - scale.zeroMs) / HOUR_MS) * 360_000) / 360_000;
}

/** Hours of the readings of a line, to a millionth (4 ms): few digits, for there are tens of thousands of them. */
export function lineHours(scale: Pick<TimeScale, 'zeroMs'>, timeMs: Float64Array): number[] {
  return Array.from(timeMs, (ms) => Math.round(((ms - scale.zeroMs) / HOUR_MS) * 1e6) / 1e6);
}

/** Hours of an ISO instant; null where it did not come. */
export function hoursOf(scale: Pick<TimeScale, 'zeroMs'>, instant: string | null): number | null {
  return instant === null ? null : hoursAt(scale, Date.parse(instant));
}

/** Hours of an ISO instant, or of the log's end where it has not come. */
export function hoursOrEnd(scale: TimeScale, instant: string | null): number {
  return hoursOf(scale, instant) ?? hoursAt(scale, scale.logUntilMs);
}
