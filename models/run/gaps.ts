import type { Interval } from './intervals.ts';
import type { Track } from './track.ts';

/** A stretch without readings on one channel. */
export interface Gap extends Interval {
  /** Value at each end; null where the record has no reading on that side. */
  readonly before: number | null;
  readonly after: number | null;
  /** Whether the log has scans inside: the sensor was silent, not the recorder. */
  readonly isTheSensors: boolean;
}

/** Stretches between readings longer than a bound, carried on as readings come. */
export class LongIntervals {
  readonly #track: Track;
  readonly #longestGapMs: number;
  readonly gaps: Gap[] = [];
  #done = 1;

  constructor(track: Track, longestGapMs: number) {
    this.#track = track;
    this.#longestGapMs = longestGapMs;
  }

  extend(): void {
    const track = this.#track;
    for (; this.#done < track.length; this.#done++) {
      const i = this.#done;
      const from = track.timeMs(i - 1);
      const until = track.timeMs(i);
      if (until - from <= this.#longestGapMs) continue;
      this.gaps.push({
        from,
        until,
        before: track.reading(i - 1),
        after: track.reading(i),
        isTheSensors: track.scan(i) > track.scan(i - 1) + 1,
      });
    }
  }
}

/** Gaps of a track in a log that runs from `log.from` to `log.until`: long intervals and missing ends. */
export function gapsOf(track: Track, longestGapMs: number, log: Interval): Gap[] {
  if (track.length === 0) return [{ ...log, before: null, after: null, isTheSensors: true }];
  const gaps = [...track.longIntervals(longestGapMs)];
  if (track.firstMs > log.from) {
    gaps.unshift({ from: log.from, until: track.firstMs, before: null, after: track.reading(0), isTheSensors: true });
  }
  if (track.lastMs < log.until) {
    const before = track.reading(track.length - 1);
    gaps.push({ from: track.lastMs, until: log.until, before, after: null, isTheSensors: true });
  }
  return gaps;
}

/** How fast a temperature may change where nothing was seen, in °C per ms; `Infinity`: anything is possible. */
export type ChangeBound = number;

/**
 * Where in a gap a track may have stood at or beyond a level (`sign` 1: at or above, −1: at or below).
 *
 * Time is credited only where an end of the gap stands there; from the other end the level is reached no sooner than
 * `changesAtMost` allows. Ends further apart than that are joined by a straight line.
 */
export function credited(gap: Gap, level: number, sign: 1 | -1, changesAtMost: ChangeBound): Interval | null {
  const before = gap.before === null ? Number.NEGATIVE_INFINITY : sign * (gap.before - level);
  const after = gap.after === null ? Number.NEGATIVE_INFINITY : sign * (gap.after - level);
  if (before < 0 && after < 0) return null;
  const lasts = gap.until - gap.from;
  const bound = isBeyondReach(gap, changesAtMost) ? Math.abs(gap.after! - gap.before!) / lasts : changesAtMost;
  const from = before >= 0 || gap.before === null ? gap.from : gap.from + -before / bound;
  const until = after >= 0 || gap.after === null ? gap.until : gap.until - -after / bound;
  return from <= until ? { from, until } : null;
}

/**
 * The furthest a temperature may have gone inside a gap, upwards (`sign` 1) or downwards (−1), between two instants.
 * Null where one end is missing and nothing bounds it.
 */
export function furthest(gap: Gap, sign: 1 | -1, changesAtMost: ChangeBound, stretch: Interval): number | null {
  const from = Math.max(gap.from, stretch.from);
  const until = Math.min(gap.until, stretch.until);
  if (from > until) return null;
  const lasts = gap.until - gap.from;
  const rate = isBeyondReach(gap, changesAtMost) ? null : changesAtMost;
  const at = (instantMs: number): number => {
    if (rate === null) return gap.before! + ((gap.after! - gap.before!) * (instantMs - gap.from)) / lasts;
    const onwards = gap.before === null ? Number.POSITIVE_INFINITY : sign * gap.before + rate * (instantMs - gap.from);
    const backwards = gap.after === null ? Number.POSITIVE_INFINITY : sign * gap.after + rate * (gap.until - instantMs);
    return sign * Math.min(onwards, backwards);
  };
  const instants = [from, until];
  if (rate !== null && gap.before !== null && gap.after !== null) {
    const peak = (gap.from + gap.until) / 2 + (sign * (gap.after - gap.before)) / (2 * rate);
    if (peak > from && peak < until) instants.push(peak);
  }
  return sign * Math.max(...instants.map((instant) => sign * at(instant)));
}

/** Whether the ends of a gap are further apart than the bound on change allows. */
function isBeyondReach({ from, until, before, after }: Gap, changesAtMost: ChangeBound): boolean {
  return before !== null && after !== null && Math.abs(after - before) > changesAtMost * (until - from);
}
