import type { Track } from '../run/track.ts';

const WINDOW_MS = 5 * 60_000;
const MOST_MS = 15 * 60_000;
const FEWEST = 5;

/**
 * How fast a track goes now, per minute: least-squares slope over its last 5 min, or its last 5 readings where those
 * reach further back, up to 15 min.
 *
 * @returns null where fewer than three readings lie in that stretch.
 *
 * Source: ordinary least squares, NIST/SEMATECH e-Handbook of Statistical Methods §4.4.3.1.
 */
export function rateNow(track: Track, untilMs: number): number | null {
  const last = track.indexUntil(untilMs);
  if (last < 2) return null;
  const endMs = track.timeMs(last);
  let first = Math.min(track.indexFrom(endMs - WINDOW_MS), Math.max(0, last - FEWEST + 1));
  first = Math.max(first, track.indexFrom(endMs - MOST_MS));
  const n = last - first + 1;
  if (n < 3) return null;
  let meanT = 0;
  let meanV = 0;
  for (let i = first; i <= last; i++) {
    meanT += (track.timeMs(i) - endMs) / n;
    meanV += track.reading(i) / n;
  }
  let sumTt = 0;
  let sumTv = 0;
  for (let i = first; i <= last; i++) {
    const t = track.timeMs(i) - endMs - meanT;
    sumTt += t * t;
    sumTv += t * (track.reading(i) - meanV);
  }
  return (sumTv / sumTt) * 60_000;
}
