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
  channel: DrawnChannel,
  [from, to]: readonly [number, number],
  sinceMs: number,
): RunOverRange | null {
  const { timeMs, figures, isFalling } = channel;
  // Figures are turned so that the way always leads up.
  const up = to > from !== isFalling ? 1 : -1;
  const start = up * levelOf(channel, from, up);
  const end = up * levelOf(channel, to, up);
  if (start === Number.POSITIVE_INFINITY) return null;
  let previous = -1;
  let before = Number.NaN;
  let startMs = Number.NaN;
  for (let i = scanAtOrAfter(timeMs, sinceMs); i < timeMs.length; i++) {
    const height = up * figures[i]!;
    if (height >= start && before < start) startMs = crossing(timeMs, previous, before, i, height, start);
    if (height >= end && !Number.isNaN(startMs)) {
      return { startMs, endMs: before < end ? crossing(timeMs, previous, before, i, height, end) : timeMs[previous]! };
    }
    if (Number.isNaN(height)) continue;
    previous = i;
    before = height;
  }
  return Number.isNaN(startMs) ? null : { startMs, endMs: timeMs[previous]! };
}

/** Instant at which the straight line between two readings meets a level. */
function crossing(timeMs: Float64Array, i0: number, h0: number, i1: number, h1: number, level: number): number {
  return timeMs[i0]! + ((level - h0) / (h1 - h0)) * (timeMs[i1]! - timeMs[i0]!);
}

/**
 * The figure at which a channel shows a value, found by halving between its least and greatest figure and given a
 * hair's breadth on the near side, so that a reading of exactly that value is there; infinite where it never is.
 */
function levelOf({ range, shown, isFalling }: DrawnChannel, value: number, up: 1 | -1): number {
  if (range === null) return up * Number.POSITIVE_INFINITY;
  let [low, high] = range;
  const above = (figure: number) => (isFalling ? value - shown(figure) : shown(figure) - value);
  if (above(high) < -1e-9) return Number.POSITIVE_INFINITY;
  if (above(low) > 1e-9) return Number.NEGATIVE_INFINITY;
  const hair = 1e-9 * (high - low);
  for (let halvings = 0; halvings < 60; halvings++) {
    const middle = (low + high) / 2;
    if (above(middle) < 0) low = middle;
    else high = middle;
  }
  return up > 0 ? high - hair : high + hair;
}
