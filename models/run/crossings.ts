import type { Interval } from './intervals.ts';
import type { Track } from './track.ts';

/** Which side of a level is asked about: at or above, above, at or below, below. */
export type Side = '>=' | '>' | '<=' | '<';

/**
 * When a track stands on one side of a level, with straight lines between readings.
 *
 * Crossings fall where the line meets the level, so they do not depend on where the recorder's clock fell.
 */
export class Crossings {
  readonly #track: Track;
  readonly #level: number;
  readonly #side: Side;
  /** Starts and ends by turns; the stretch is open where there is one start more. */
  readonly startMs: number[] = [];
  readonly endMs: number[] = [];
  #done = 0;

  constructor(track: Track, level: number, side: Side) {
    this.#track = track;
    this.#level = level;
    this.#side = side;
  }

  /** Takes in the readings that came since. */
  extend(): void {
    const track = this.#track;
    const { length } = track;
    if (this.#done === length) return;
    const { value } = track.readings;
    // Seen from below or from above, with or without the level itself: one comparison for all four sides.
    const sign = this.#side === '>=' || this.#side === '>' ? 1 : -1;
    const level = sign * this.#level;
    const countsLevel = this.#side === '>=' || this.#side === '<=';
    let wasOn = this.startMs.length > this.endMs.length;
    for (let i = this.#done; i < length; i++) {
      const reading = sign * value[i]!;
      const isOn = reading > level || (countsLevel && reading === level);
      if (isOn === wasOn) continue;
      wasOn = isOn;
      (isOn ? this.startMs : this.endMs).push(i === 0 ? track.timeMs(0) : meets(track, i, this.#level));
    }
    this.#done = length;
  }

  /** Stretches on this side, the last one up to the last reading. */
  intervals(): Interval[] {
    return this.startMs.map((from, i) => ({ from, until: this.endMs[i] ?? this.#track.lastMs }));
  }

  /** First instant at or after `fromMs` on this side. */
  firstOn(fromMs: number): number | null {
    for (let i = firstAbove(this.endMs, fromMs); i < this.startMs.length; i++) {
      const until = this.endMs[i] ?? this.#track.lastMs;
      if (until >= fromMs) return Math.max(this.startMs[i]!, fromMs);
    }
    return null;
  }

  /** First crossing onto this side after `fromMs`. */
  firstStartAfter(fromMs: number): number | null {
    return this.startMs[firstAbove(this.startMs, fromMs)] ?? null;
  }

  /** Last crossing onto this side at or before `untilMs`. */
  lastStartUntil(untilMs: number): number | null {
    return this.startMs[firstAbove(this.startMs, untilMs) - 1] ?? null;
  }

  /** Last crossing off this side at or before `untilMs`. */
  lastEndUntil(untilMs: number): number | null {
    return this.endMs[firstAbove(this.endMs, untilMs) - 1] ?? null;
  }

  /** First crossing off this side after `fromMs`. */
  firstEndAfter(fromMs: number): number | null {
    return this.endMs[firstAbove(this.endMs, fromMs)] ?? null;
  }
}

function meets(track: Track, i: number, level: number): number {
  const t0 = track.timeMs(i - 1);
  const v0 = track.reading(i - 1);
  return t0 + ((level - v0) * (track.timeMs(i) - t0)) / (track.reading(i) - v0);
}

/** Index of the first element above `bound` in a rising list. */
function firstAbove(list: readonly number[], bound: number): number {
  let low = 0;
  let high = list.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (list[mid]! <= bound) low = mid + 1;
    else high = mid;
  }
  return low;
}
