import { DomainError } from '../errors.ts';
import { Kept } from './kept-readings.ts';
import { type Stretch, silencesOf, stretchToDraw } from './silences.ts';

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
  const stretch = stretchToDraw(timeMs, value, options);
  const { present, gaps } = silencesOf(timeMs, value, stretch, options);
  const room = Math.floor(points);
  const kept = new Kept(timeMs, value, room);
  if (present + gaps.length + 2 <= room) keepAll(timeMs, value, stretch, options, kept);
  else keepExtremes(timeMs, value, stretch, options, kept);
  return { ...kept.entries(), gaps };
}

function keepAll(
  timeMs: Float64Array,
  value: Float64Array,
  { first, last }: Stretch,
  { longestGapMs }: DecimateOptions,
  kept: Kept,
): void {
  let previousMs = Number.NaN;
  for (let i = first; i <= last; i++) {
    if (Number.isNaN(value[i]!)) continue;
    const t = timeMs[i]!;
    if (t - previousMs > longestGapMs) kept.breakLine((previousMs + t) / 2);
    kept.put(i);
    previousMs = t;
  }
}

function keepExtremes(
  timeMs: Float64Array,
  value: Float64Array,
  { first, last }: Stretch,
  { fromMs, untilMs, points, longestGapMs }: DecimateOptions,
  kept: Kept,
): void {
  const buckets = Math.floor(points / 6);
  const bucketMs = (untilMs - fromMs) / buckets;
  // Four readings and one break a bucket, one reading and one break on either side; the rest is for gaps inside buckets.
  let spare = Math.floor(points) - 5 * buckets - 4;
  let bucket = -1;
  let bucketEndMs = Number.NEGATIVE_INFINITY;
  let previousMs = Number.NaN;
  for (let i = first; i <= last; i++) {
    const reading = value[i]!;
    if (Number.isNaN(reading)) continue;
    const t = timeMs[i]!;
    const isBreak = t - previousMs > longestGapMs;
    if (t >= bucketEndMs || (isBreak && spare >= 5)) {
      kept.flush();
      if (isBreak) kept.breakLine((previousMs + t) / 2);
      if (t < bucketEndMs) spare -= 5;
      else bucketEndMs = endOfBucket(t);
    }
    kept.take(i, reading);
    previousMs = t;
  }
  kept.flush();

  function endOfBucket(t: number): number {
    if (t < fromMs) return fromMs;
    if (t > untilMs) return Number.POSITIVE_INFINITY;
    // Rounding must not put a reading back into the bucket that has just ended.
    bucket = Math.max(bucket + 1, Math.min(buckets - 1, Math.floor((t - fromMs) / bucketMs)));
    return bucket >= buckets - 1 ? untilMs + 1e-3 : fromMs + (bucket + 1) * bucketMs;
  }
}
