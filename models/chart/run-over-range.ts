import type { DrawnChannel } from './drawn-channel.ts';
import { scanAtOrAfter } from './scan-at.ts';

/** When a channel ran from one value to another; `endMs` is its last reading where it never got there. */
export interface RunOverRange {
  readonly startMs: number;
  readonly endMs: number;
}

/**
 * When a channel ran over a range, in the direction of travel: to the first time after `sinceMs` that the second
 * value is reached, from the last crossing of the first before it. Null where it never crossed the first.
 */
export function runOverRange(
  { timeMs, figures, shown, isFalling }: DrawnChannel,
  [from, to]: readonly [number, number],
  sinceMs: number,
): RunOverRange | null {
  const isRise = to > from !== isFalling;
  const start = levelOf(figures, shown, from, isRise);
  const end = levelOf(figures, shown, to, isRise);
  const isPast = (figure: number, level: number) => (isRise ? figure >= level : figure <= level);
  let previous = -1;
  let startMs = Number.NaN;
  for (let i = scanAtOrAfter(timeMs, sinceMs); i < timeMs.length; i++) {
    const figure = figures[i]!;
    if (Number.isNaN(figure)) continue;
    const t = timeMs[i]!;
    if (previous >= 0) {
      const [t0, f0] = [timeMs[previous]!, figures[previous]!];
      const crossing = (level: number) => t0 + ((level - f0) / (figure - f0)) * (t - t0);
      if (!isPast(f0, start) && isPast(figure, start)) startMs = crossing(start);
      if (!Number.isNaN(startMs) && isPast(figure, end)) {
        return { startMs, endMs: isPast(f0, end) ? t0 : crossing(end) };
      }
    }
    previous = i;
  }
  return Number.isNaN(startMs) ? null : { startMs, endMs: timeMs[previous]! };
}

/**
 * The figure at which a channel shows a value, found by halving between its least and greatest figure and given a
 * hair's breadth on the near side, so that a reading of exactly that value is there; infinite where it never is.
 */
function levelOf(figures: Float64Array, shown: (figure: number) => number, value: number, isRise: boolean): number {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const figure of figures) {
    if (figure < low) low = figure;
    if (figure > high) high = figure;
  }
  const direction = shown(high) >= shown(low) ? 1 : -1;
  const above = (figure: number) => direction * (shown(figure) - value);
  if (above(high) < -1e-9) return Number.POSITIVE_INFINITY;
  if (above(low) > 1e-9) return Number.NEGATIVE_INFINITY;
  const hair = 1e-9 * (high - low);
  for (let halvings = 0; halvings < 60; halvings++) {
    const middle = (low + high) / 2;
    if (above(middle) < 0) low = middle;
    else high = middle;
  }
  return isRise ? high - hair : high + hair;
}
