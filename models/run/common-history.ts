/** Readings of one channel, absent ones as NaN. */
export interface ReadingsInTime {
  /** [n] in ms, rising. */
  readonly timeMs: Float64Array;
  /** [n] */
  readonly value: Float64Array;
}

/** Several channels on one clock. */
export interface CommonHistory {
  readonly beginsMs: number;
  /** [m] in s since `beginsMs`, rising. */
  readonly timeS: Float64Array;
  /** [m] for each channel, in the order they were given. */
  readonly values: readonly Float64Array[];
  /** Longest stretch without a reading of each channel, in ms, and when it began. */
  readonly longestGaps: readonly { readonly fromMs: number; readonly lastsMs: number }[];
}

/**
 * Channels over the stretch that all of them cover, at every scan at which one of them was read; straight lines between.
 *
 * Returns null where there is no such stretch of two scans.
 */
export function commonHistory(channels: readonly ReadingsInTime[]): CommonHistory | null {
  const there = channels.map(presentOf);
  if (there.length === 0 || there.some(({ timeMs }) => timeMs.length === 0)) return null;
  const fromMs = Math.max(...there.map(({ timeMs }) => timeMs[0]!));
  const untilMs = Math.min(...there.map(({ timeMs }) => timeMs[timeMs.length - 1]!));
  const all = new Set<number>();
  for (const { timeMs } of there) for (const at of timeMs) if (at >= fromMs && at <= untilMs) all.add(at);
  const commonMs = Float64Array.from(all).sort();
  if (commonMs.length < 2) return null;
  return {
    beginsMs: fromMs,
    timeS: commonMs.map((at) => (at - fromMs) / 1000),
    values: there.map((channel) => alongLines(channel, commonMs)),
    longestGaps: there.map(({ timeMs }) => longestGap(timeMs, fromMs, untilMs)),
  };
}

function presentOf({ timeMs, value }: ReadingsInTime): ReadingsInTime {
  const keep = value.map((figure) => (Number.isNaN(figure) ? 0 : 1));
  return { timeMs: timeMs.filter((_, i) => keep[i] === 1), value: value.filter((_, i) => keep[i] === 1) };
}

function alongLines({ timeMs, value }: ReadingsInTime, atMs: Float64Array): Float64Array {
  let after = 1;
  return atMs.map((at) => {
    while (after < timeMs.length - 1 && timeMs[after]! < at) after += 1;
    if (timeMs.length === 1) return value[0]!;
    const [t0, t1] = [timeMs[after - 1]!, timeMs[after]!];
    return value[after - 1]! + ((value[after]! - value[after - 1]!) * (at - t0)) / (t1 - t0);
  });
}

function longestGap(timeMs: Float64Array, fromMs: number, untilMs: number) {
  let longest = { fromMs, lastsMs: 0 };
  for (let i = 1; i < timeMs.length; i += 1) {
    const [t0, t1] = [timeMs[i - 1]!, timeMs[i]!];
    if (t1 <= fromMs || t0 >= untilMs || t1 - t0 <= longest.lastsMs) continue;
    longest = { fromMs: t0, lastsMs: t1 - t0 };
  }
  return longest;
}
