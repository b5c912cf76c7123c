import { scanAtOrAfter } from './scan-at.ts';

/** Scans to be looked at: those in the window and the present readings beside it. */
export interface Stretch {
  readonly first: number;
  readonly last: number;
}

export interface Window {
  readonly fromMs: number;
  readonly untilMs: number;
}

export function stretchToDraw(timeMs: Float64Array, value: Float64Array, { fromMs, untilMs }: Window): Stretch {
  const inside = scanAtOrAfter(timeMs, fromMs);
  let beyond = scanAtOrAfter(timeMs, untilMs);
  if (beyond < timeMs.length && timeMs[beyond]! <= untilMs) beyond += 1;
  let first = inside - 1;
  while (first >= 0 && Number.isNaN(value[first]!)) first -= 1;
  let last = beyond;
  while (last < timeMs.length && Number.isNaN(value[last]!)) last += 1;
  return { first: first < 0 ? inside : first, last: last === timeMs.length ? beyond - 1 : last };
}

/** How many readings a stretch holds, and the parts of the window in which there is none for too long. */
export interface Silences {
  readonly present: number;
  readonly gaps: readonly Window[];
}

export function silencesOf(
  timeMs: Float64Array,
  value: Float64Array,
  { first, last }: Stretch,
  { fromMs, untilMs, longestGapMs }: Window & { readonly longestGapMs: number },
): Silences {
  const gaps: Window[] = [];
  const add = (from: number, until: number) => {
    const clipped = { fromMs: Math.max(from, fromMs), untilMs: Math.min(until, untilMs) };
    if (clipped.untilMs > clipped.fromMs) gaps.push(clipped);
  };
  let present = 0;
  let previousMs = Number.NaN;
  for (let i = first; i <= last; i++) {
    if (Number.isNaN(value[i]!)) continue;
    const t = timeMs[i]!;
    if (t - previousMs > longestGapMs) add(previousMs, t);
    // A record that begins after the log misses that end.
    else if (present === 0 && !hasReading(value, 0, i)) add(timeMs[0]!, t);
    present += 1;
    previousMs = t;
  }
  const endMs = timeMs[timeMs.length - 1] ?? Number.NaN;
  if (present === 0) add(timeMs[0] ?? Number.NaN, endMs);
  else if (!hasReading(value, last + 1, value.length)) add(previousMs, endMs);
  return { present, gaps };
}

function hasReading(value: Float64Array, from: number, until: number): boolean {
  for (let i = from; i < until; i++) if (!Number.isNaN(value[i]!)) return true;
  return false;
}
