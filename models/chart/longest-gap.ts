import type { Cycle } from '../cycle/cycle.ts';
import { MedianInterval } from '../run/median-interval.ts';

/** The longest stretch without readings that a line may bridge, ms: as the cycle writes it, else 5 median intervals, at least 60 s. */
export function longestGapMs(cycle: Cycle | null, timeMs: Float64Array): number {
  const written = cycle?.log?.longestGap;
  if (written !== undefined) return written * 60_000;
  const intervals = new MedianInterval();
  for (let i = 1; i < timeMs.length; i++) intervals.push(timeMs[i]! - timeMs[i - 1]!);
  return Math.max(5 * (intervals.medianMs() ?? 0), 60_000);
}
