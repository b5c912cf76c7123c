import { DomainError } from '../errors.ts';
import { scanAtOrAfter } from './scan-at.ts';

export interface DecimateOptions {
  /** Window to be drawn, ms; the readings just outside are kept so that the line reaches its edges. */
  readonly fromMs: number;
  readonly untilMs: number;
  /** The most entries of the result, breaks included; at least 20. */
  readonly points: number;
  /** Readings further apart than this, in ms, are not joined by a line. */
  readonly longestGapMs: number;
}

/** A channel reduced to what a screen can show. */
export interface DecimatedChannel {
  /** [m], ms, rising. */
  readonly timeMs: Float64Array;
  /** [m], readings as they stand; `NaN` where the line breaks. */
  readonly value: Float64Array;
  /** Stretches of the window without readings, to be hatched. */
  readonly gaps: readonly { readonly fromMs: number; readonly untilMs: number }[];
}

/**
 * One channel reduced to at most `points` entries without losing any extreme.
 *
 * The window is cut into equal buckets; of each, the first, lowest, highest and last reading are kept where they stand
 * (the M4 selection, which draws the same pixels as all readings where a bucket is no wider than a pixel). Where all
 * readings fit, all are kept. A gap breaks the line; only gaps inside one bucket, once there are more of them than
 * the entries set aside, are left to the hatching alone.
 *
 * @param timeMs  Scan instants: [n] in ms, strictly rising.
 * @param value   Readings: [n], `NaN` where absent.
 * @param options See {@link DecimateOptions}.
 * @returns See {@link DecimatedChannel}; every entry but a break is one of the readings.
 * @throws {DomainError} `option-out-of-range` when `points` < 20 or the window is empty.
 *
 * Source: Jugel, Jerzak, Hackenbroich & Markl, M4: A Visualization-Oriented Time Series Data Aggregation,
 *   Proc. VLDB Endowment 7 (2014) 797, §4.
 */
export function decimate(timeMs: Float64Array, value: Float64Array, options: DecimateOptions): DecimatedChannel {
  const { fromMs, untilMs, points } = options;
  if (!(points >= 20 && Number.isFinite(points))) {
    throw new DomainError('option-out-of-range', `A series needs room for at least 20 points, not ${points}`, {
      points,
    });
  }
  if (!(untilMs > fromMs)) {
    throw new DomainError('option-out-of-range', 'The window to be drawn is empty', { fromMs, untilMs });
  }
  const stretch = presentStretch(timeMs, value, options);
  const gaps = gapsIn(timeMs, value, stretch, options);
  const room = stretch.present + gaps.length + 2;
  const buckets = room <= Math.floor(points) ? Number.POSITIVE_INFINITY : Math.floor(points / 6);
  const kept = new Kept(timeMs, value, Math.floor(points));
  select(timeMs, value, stretch, buckets, options, kept);
  return { ...kept.entries(), gaps };
}

interface Stretch {
  /** First and last scan to be looked at: those in the window and the present readings beside it. */
  readonly first: number;
  readonly last: number;
  /** How many readings are present there. */
  readonly present: number;
}

function presentStretch(timeMs: Float64Array, value: Float64Array, { fromMs, untilMs }: DecimateOptions): Stretch {
  let first = scanAtOrAfter(timeMs, fromMs);
  let last = scanAtOrAfter(timeMs, untilMs);
  if (last === timeMs.length || timeMs[last]! > untilMs) last -= 1;
  let present = 0;
  for (let i = first; i <= last; i++) if (!Number.isNaN(value[i]!)) present += 1;
  for (let i = first - 1; i >= 0; i--) {
    if (Number.isNaN(value[i]!)) continue;
    first = i;
    present += 1;
    break;
  }
  for (let i = last + 1; i < timeMs.length; i++) {
    if (Number.isNaN(value[i]!)) continue;
    last = i;
    present += 1;
    break;
  }
  return { first, last, present };
}

function gapsIn(
  timeMs: Float64Array,
  value: Float64Array,
  { first, last }: Stretch,
  { fromMs, untilMs, longestGapMs }: DecimateOptions,
): { fromMs: number; untilMs: number }[] {
  const gaps: { fromMs: number; untilMs: number }[] = [];
  const add = (from: number, until: number) => {
    const clipped = { fromMs: Math.max(from, fromMs), untilMs: Math.min(until, untilMs) };
    if (clipped.untilMs > clipped.fromMs) gaps.push(clipped);
  };
  let previousMs = Number.NaN;
  for (let i = first; i <= last; i++) {
    if (Number.isNaN(value[i]!)) continue;
    const t = timeMs[i]!;
    // The record of a sensor that begins after the log, or ends before it, misses that end.
    if (Number.isNaN(previousMs)) add(isFirstPresent(value, i) ? timeMs[0]! : t, t);
    else if (t - previousMs > longestGapMs) add(previousMs, t);
    previousMs = t;
  }
  const endMs = timeMs[timeMs.length - 1] ?? Number.NaN;
  if (Number.isNaN(previousMs)) add(timeMs[0] ?? Number.NaN, endMs);
  else if (previousMs < untilMs) add(previousMs, isLastPresent(value, last) ? endMs : previousMs);
  return gaps;
}

function isFirstPresent(value: Float64Array, at: number): boolean {
  for (let i = at - 1; i >= 0; i--) if (!Number.isNaN(value[i]!)) return false;
  return true;
}

function isLastPresent(value: Float64Array, from: number): boolean {
  for (let i = from + 1; i < value.length; i++) if (!Number.isNaN(value[i]!)) return false;
  return true;
}

function select(
  timeMs: Float64Array,
  value: Float64Array,
  { first, last }: Stretch,
  buckets: number,
  { fromMs, untilMs, points, longestGapMs }: DecimateOptions,
  kept: Kept,
): void {
  const bucketMs = (untilMs - fromMs) / buckets;
  // Four readings and one break a bucket, one reading and one break on either side; the rest is for gaps inside buckets.
  let spare = Number.isFinite(buckets) ? Math.floor(points) - 5 * buckets - 4 : 0;
  let bucket = Number.NaN;
  let previous = -1;
  for (let i = first; i <= last; i++) {
    if (Number.isNaN(value[i]!)) continue;
    const t = timeMs[i]!;
    const own = bucketOf(t, i);
    const isBreak = previous >= 0 && t - timeMs[previous]! > longestGapMs;
    const opensGroup = own !== bucket || (isBreak && spare >= 5);
    if (opensGroup) {
      if (own === bucket) spare -= 5;
      kept.flush();
      if (isBreak) kept.breakLine((timeMs[previous]! + t) / 2);
      bucket = own;
    }
    kept.take(i);
    previous = i;
  }
  kept.flush();

  function bucketOf(t: number, i: number): number {
    if (!Number.isFinite(buckets)) return i;
    if (t < fromMs) return -1;
    if (t > untilMs) return buckets;
    return Math.min(buckets - 1, Math.floor((t - fromMs) / bucketMs));
  }
}

/** The entries kept so far, and the group that is being gathered. */
class Kept {
  readonly #timeMs: Float64Array;
  readonly #value: Float64Array;
  readonly #keptMs: Float64Array;
  readonly #kept: Float64Array;
  #count = 0;
  #first = -1;
  #lowest = -1;
  #highest = -1;
  #last = -1;

  constructor(timeMs: Float64Array, value: Float64Array, points: number) {
    this.#timeMs = timeMs;
    this.#value = value;
    this.#keptMs = new Float64Array(points);
    this.#kept = new Float64Array(points);
  }

  take(i: number): void {
    if (this.#first < 0) {
      this.#first = i;
      this.#lowest = i;
      this.#highest = i;
    } else if (this.#value[i]! < this.#value[this.#lowest]!) this.#lowest = i;
    else if (this.#value[i]! > this.#value[this.#highest]!) this.#highest = i;
    this.#last = i;
  }

  flush(): void {
    if (this.#first < 0) return;
    const inner = this.#lowest < this.#highest ? [this.#lowest, this.#highest] : [this.#highest, this.#lowest];
    let previous = -1;
    for (const i of [this.#first, ...inner, this.#last]) {
      if (i !== previous) this.#put(this.#timeMs[i]!, this.#value[i]!);
      previous = i;
    }
    this.#first = -1;
  }

  breakLine(timeMs: number): void {
    this.#put(timeMs, Number.NaN);
  }

  entries(): { timeMs: Float64Array; value: Float64Array } {
    return { timeMs: this.#keptMs.subarray(0, this.#count), value: this.#kept.subarray(0, this.#count) };
  }

  #put(timeMs: number, value: number): void {
    this.#keptMs[this.#count] = timeMs;
    this.#kept[this.#count] = value;
    this.#count += 1;
  }
}
