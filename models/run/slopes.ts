import { Extremes } from './extremes.ts';
import type { Track } from './track.ts';

/** Readings between two fresh sums: keeps what rounding adds up far below 1e-9 of a slope. */
const FRESH_EVERY = 512;
/** Part of a window by which an end may miss a reading through binary rounding. */
const ALLOWANCE = 1e-9;

/**
 * Least-squares slopes over every window of one length that starts at a reading, in units per minute.
 *
 * slope = Σ(t − t̄)(v − v̄) / Σ(t − t̄)², over the readings in [t_k, t_k + window]. A window with fewer than three
 * readings has the slope of its chord; one that touches a gap has none (`NaN`).
 * Source: ordinary least squares, e.g. NIST/SEMATECH e-Handbook of Statistical Methods §4.4.3.1.
 */
export class Slopes {
  readonly #track: Track;
  readonly #windowMs: number;
  readonly #longestGapMs: number;
  /** One slope for each window that lies wholly in the record, in order of its first reading. */
  readonly perMin = new Extremes();
  #end = 0;
  #gapAfter = -1;
  #originMs = 0;
  #n = 0;
  #sumT = 0;
  #sumV = 0;
  #sumTt = 0;
  #sumTv = 0;

  constructor(track: Track, windowMs: number, longestGapMs: number) {
    this.#track = track;
    this.#windowMs = windowMs;
    this.#longestGapMs = longestGapMs;
  }

  extend(): void {
    const track = this.#track;
    for (let k = this.perMin.length; k < track.length; k++) {
      const endMs = track.timeMs(k) + this.#windowMs;
      if (track.lastMs < endMs - ALLOWANCE * this.#windowMs) return;
      this.#slide(k, endMs + ALLOWANCE * this.#windowMs);
      this.perMin.push(this.#slopeFrom(k, endMs));
    }
  }

  #slide(k: number, endMs: number): void {
    const track = this.#track;
    if (k % FRESH_EVERY === 0) {
      this.#end = k;
      this.#originMs = track.timeMs(k);
      this.#n = this.#sumT = this.#sumV = this.#sumTt = this.#sumTv = 0;
    } else {
      this.#add(k - 1, -1);
    }
    while (this.#end < track.length && track.timeMs(this.#end) <= endMs) {
      const i = this.#end++;
      this.#add(i, 1);
      if (i > k && track.timeMs(i) - track.timeMs(i - 1) > this.#longestGapMs) this.#gapAfter = i - 1;
    }
  }

  #add(i: number, sign: 1 | -1): void {
    const t = (this.#track.timeMs(i) - this.#originMs) / 60_000;
    const v = this.#track.reading(i);
    this.#n += sign;
    this.#sumT += sign * t;
    this.#sumV += sign * v;
    this.#sumTt += sign * t * t;
    this.#sumTv += sign * t * v;
  }

  #slopeFrom(k: number, endMs: number): number {
    const track = this.#track;
    const next = this.#end;
    const runsIntoGap =
      next < track.length &&
      track.timeMs(next) - track.timeMs(next - 1) > this.#longestGapMs &&
      track.timeMs(next - 1) < endMs - ALLOWANCE * this.#windowMs;
    if (this.#gapAfter >= k || runsIntoGap) return Number.NaN;
    if (this.#n < 3) return (track.valueAt(endMs) - track.reading(k)) / (this.#windowMs / 60_000);
    const n = this.#n;
    return (n * this.#sumTv - this.#sumT * this.#sumV) / (n * this.#sumTt - this.#sumT * this.#sumT);
  }
}
