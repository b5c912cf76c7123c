import type { GrowingRow } from './growing-row.ts';
import { Track } from './track.ts';

export type Statistic = 'mean' | 'highest' | 'lowest' | 'spread';

/** A track that counts until an instant: `Infinity`, or that of its exclusion. */
export interface Member {
  readonly track: Track;
  readonly untilMs: number;
}

/**
 * A track worked out from several, carried on as scans come. A scan at which one of them is absent has no value, save
 * for the spread: that is of those present, two at least.
 */
export function derivedTrack(
  statistic: Statistic,
  members: readonly Member[],
  scanMs: GrowingRow,
): { extend(): Track } {
  const derived = new Track(statistic);
  const next = members.map(() => 0);
  let scan = 0;
  return {
    extend() {
      for (; scan < scanMs.length; scan++) {
        const timeMs = scanMs.value[scan]!;
        const value = valueAtScan(statistic, members, next, scan, timeMs);
        if (value !== null) derived.push(timeMs, value, scan);
      }
      return derived;
    },
  };
}

function valueAtScan(
  statistic: Statistic,
  members: readonly Member[],
  next: number[],
  scan: number,
  timeMs: number,
): number | null {
  let count = 0;
  let sum = 0;
  let lowest = Number.POSITIVE_INFINITY;
  let highest = Number.NEGATIVE_INFINITY;
  let isComplete = true;
  for (let m = 0; m < members.length; m++) {
    const { track, untilMs } = members[m]!;
    const at = next[m]!;
    const isPresent = at < track.length && track.scan(at) === scan;
    if (isPresent) next[m] = at + 1;
    if (timeMs >= untilMs) continue;
    if (!isPresent) {
      isComplete = false;
      continue;
    }
    const reading = track.reading(at);
    count++;
    sum += reading;
    if (reading < lowest) lowest = reading;
    if (reading > highest) highest = reading;
  }
  if (statistic === 'spread') return count < 2 ? null : Math.round((highest - lowest) * 1e9) / 1e9;
  if (!isComplete || count === 0) return null;
  if (statistic === 'mean') return Math.round((sum / count) * 1e9) / 1e9;
  return statistic === 'lowest' ? lowest : highest;
}
