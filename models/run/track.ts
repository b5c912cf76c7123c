import { Crossings, type Side } from './crossings.ts';
import { Extremes } from './extremes.ts';
import { type Gap, LongIntervals } from './gaps.ts';
import { GrowingRow } from './growing-row.ts';
import { Slopes } from './slopes.ts';

/**
 * The present readings of one channel (or of something worked out from several), in rising time.
 *
 * Temperatures in °C, pressures and vacua in Pa, corrected. What is asked of it is worked out once and carried on as
 * readings come, so that one more scan costs the same late in a run as early.
 */
export class Track {
  readonly name: string;
  readonly #times = new GrowingRow();
  readonly readings = new Extremes();
  /** Number of the scan each reading belongs to. */
  readonly #scans = new GrowingRow();
  readonly #crossings: Readonly<Record<Side, Map<number, Crossings>>> = {
    '>=': new Map(),
    '>': new Map(),
    '<=': new Map(),
    '<': new Map(),
  };
  readonly #slopes = new Map<string, Slopes>();
  readonly #longIntervals = new Map<number, LongIntervals>();

  constructor(name: string) {
    this.name = name;
  }

  push(timeMs: number, value: number, scan: number): void {
    this.#times.push(timeMs);
    this.readings.push(value);
    this.#scans.push(scan);
  }

  get length(): number {
    return this.readings.length;
  }

  timeMs(i: number): number {
    return this.#times.value[i]!;
  }

  reading(i: number): number {
    return this.readings.value[i]!;
  }

  scan(i: number): number {
    return this.#scans.value[i]!;
  }

  get firstMs(): number {
    return this.timeMs(0);
  }

  get lastMs(): number {
    return this.timeMs(this.length - 1);
  }

  /** Index of the first reading at or after an instant; `length` where there is none. */
  indexFrom(instantMs: number): number {
    let low = 0;
    let high = this.length;
    while (low < high) {
      const mid = (low + high) >> 1;
      if (this.timeMs(mid) < instantMs) low = mid + 1;
      else high = mid;
    }
    return low;
  }

  /** Index of the last reading at or before an instant; −1 where there is none. */
  indexUntil(instantMs: number): number {
    const i = this.indexFrom(instantMs);
    return i < this.length && this.timeMs(i) === instantMs ? i : i - 1;
  }

  /** Value at an instant on the straight line between readings; held beyond the ends. */
  valueAt(instantMs: number): number {
    const after = this.indexFrom(instantMs);
    if (after === 0) return this.reading(0);
    if (after === this.length) return this.reading(this.length - 1);
    const t0 = this.timeMs(after - 1);
    const v0 = this.reading(after - 1);
    const t1 = this.timeMs(after);
    return v0 + ((this.reading(after) - v0) * (instantMs - t0)) / (t1 - t0);
  }

  /** Index of the highest reading between two instants, ends included; −1 where there is no reading. */
  highestBetween(fromMs: number, untilMs: number): number {
    return this.readings.indexOfHighest(this.indexFrom(fromMs), this.indexUntil(untilMs));
  }

  lowestBetween(fromMs: number, untilMs: number): number {
    return this.readings.indexOfLowest(this.indexFrom(fromMs), this.indexUntil(untilMs));
  }

  /** Where the track stands on one side of a level, brought up to the last reading. */
  crossings(level: number, side: Side): Crossings {
    const bySide = this.#crossings[side];
    let crossings = bySide.get(level);
    if (crossings === undefined) {
      crossings = new Crossings(this, level, side);
      bySide.set(level, crossings);
    }
    crossings.extend();
    return crossings;
  }

  /** Least-squares slopes over every window of a length, brought up to the last reading. */
  slopes(windowMs: number, longestGapMs: number): Slopes {
    const key = `${windowMs}/${longestGapMs}`;
    let slopes = this.#slopes.get(key);
    if (slopes === undefined) {
      slopes = new Slopes(this, windowMs, longestGapMs);
      this.#slopes.set(key, slopes);
    }
    slopes.extend();
    return slopes;
  }

  /** Stretches between readings longer than a bound, brought up to the last reading. */
  longIntervals(longestGapMs: number): readonly Gap[] {
    let long = this.#longIntervals.get(longestGapMs);
    if (long === undefined) {
      long = new LongIntervals(this, longestGapMs);
      this.#longIntervals.set(longestGapMs, long);
    }
    long.extend();
    return long.gaps;
  }
}
