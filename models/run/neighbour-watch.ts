import type { RunChannel } from './channel.ts';
import type { Track } from './track.ts';

/** What one sensor looked like beside its neighbours (the channels of the same role), so far. Temperatures in °C. */
export interface Comparison {
  readonly channel: RunChannel;
  start: number | null;
  neighboursAtStart: number;
  /** Equal readings in a row, and how far the neighbours' median moved meanwhile. */
  equalSinceMs: number;
  equalReadings: number;
  equalMedianLow: number;
  equalMedianHigh: number;
  stuck: { fromMs: number; reading: number; readings: number; medianMoved: number } | null;
  /** Scans at which the neighbours had risen over 20 °C, and those at which this one was over 5 °C below its start. */
  scansNeighboursRose: number;
  scansFell: number;
  /** Scans at which the neighbours' median was over 4 °C from the air, and the squared distances to the air there. */
  scansOffAir: number;
  airSquares: number;
  offAirFromMs: number;
  /** Steps of over 10 °C that the neighbours' median did not make. */
  steps: number;
  firstStepMs: number;
  beforeMs: number;
  beforeReading: number;
  beforeMedian: number;
  /** Before heat-on, with at least two neighbours. */
  scansCold: number;
  coldDifferences: number;
  scansCompared: number;
  squares: number;
  squaresFromFahrenheit: number;
  squaresFromCelsius: number;
  furthestFromStart: number;
  highestMedian: number;
}

const HEAT_ON_RISE = 5;
const STUCK_READINGS = 6;
const STUCK_MOVED = 15;
const ROSE = 20;
const FELL = 5;
const OFF_AIR = 4;
const STEP = 10;
const STEP_WITHIN_MS = 3 * 60_000;

/** Compares each sensor of one role with the median of the others, scan by scan. */
export class NeighbourWatch {
  readonly comparisons: readonly Comparison[];
  readonly #air: readonly Track[];
  readonly #taken: Int32Array;
  readonly #airTaken: Int32Array;
  /** The readings of this scan, and which sensors have one, in rising order. */
  readonly #reading: Float64Array;
  readonly #rising: Int32Array;
  #isHeating = false;

  constructor(channels: readonly RunChannel[], air: readonly RunChannel[]) {
    this.comparisons = channels.map(newComparison);
    this.#air = air.map(({ track }) => track);
    this.#taken = new Int32Array(channels.length);
    this.#airTaken = new Int32Array(air.length);
    this.#reading = new Float64Array(channels.length);
    this.#rising = Int32Array.from(channels, (_, i) => i);
  }

  accept(timeMs: number, scan: number): void {
    const { comparisons } = this;
    const present = this.#takeScan();
    const air = this.#airAt(scan);
    if (present < 2) return;
    for (let rank = 0; rank < present; rank++) {
      const i = this.#rising[rank]!;
      const median = this.#medianWithout(rank, present);
      compare(comparisons[i]!, timeMs, this.#reading[i]!, median, air, present - 1, this.#isHeating);
    }
  }

  /** Takes each sensor's reading of this scan and puts them in order, the absent ones last. */
  #takeScan(): number {
    const { comparisons } = this;
    let present = 0;
    for (let i = 0; i < comparisons.length; i++) {
      const comparison = comparisons[i]!;
      const { track } = comparison.channel;
      const { length } = track;
      if (length === this.#taken[i]) {
        this.#reading[i] = Number.POSITIVE_INFINITY;
        comparison.equalReadings = 0;
        continue;
      }
      this.#taken[i] = length;
      const reading = track.reading(length - 1);
      this.#reading[i] = reading;
      comparison.start ??= reading;
      if (reading >= comparison.start + HEAT_ON_RISE) this.#isHeating = true;
      present++;
    }
    // The order of the scan before is nearly right already, so insertion is the quickest way to put it right.
    for (let k = 1; k < comparisons.length; k++) {
      const i = this.#rising[k]!;
      const reading = this.#reading[i]!;
      let at = k;
      for (; at > 0 && this.#reading[this.#rising[at - 1]!]! > reading; at--) this.#rising[at] = this.#rising[at - 1]!;
      this.#rising[at] = i;
    }
    return present;
  }

  /** Median of the present readings without the one of a rank. */
  #medianWithout(rank: number, present: number): number {
    const n = present - 1;
    const half = n >> 1;
    const upper = this.#readingAt(half < rank ? half : half + 1);
    if (n % 2 === 1) return upper;
    return (this.#readingAt(half - 1 < rank ? half - 1 : half) + upper) / 2;
  }

  #readingAt(rank: number): number {
    return this.#reading[this.#rising[rank]!]!;
  }

  /** Mean of the air channels that have a reading at this scan; null where none has. */
  #airAt(scan: number): number | null {
    let sum = 0;
    let count = 0;
    for (let i = 0; i < this.#air.length; i++) {
      const track = this.#air[i]!;
      if (track.length === this.#airTaken[i]) continue;
      this.#airTaken[i] = track.length;
      if (track.scan(track.length - 1) !== scan) continue;
      sum += track.reading(track.length - 1);
      count++;
    }
    return count === 0 ? null : sum / count;
  }
}

function compare(
  c: Comparison,
  timeMs: number,
  reading: number,
  median: number,
  air: number | null,
  neighbours: number,
  isHeating: boolean,
): void {
  if (c.scansCompared === 0) c.neighboursAtStart = median;
  watchForEqualReadings(c, timeMs, reading, median);
  if (median - c.neighboursAtStart > ROSE) {
    c.scansNeighboursRose++;
    if (reading < c.start! - FELL) c.scansFell++;
  }
  if (air !== null && Math.abs(median - air) > OFF_AIR) {
    if (c.scansOffAir++ === 0) c.offAirFromMs = timeMs;
    c.airSquares += (reading - air) ** 2;
  }
  if (c.scansCompared > 0 && timeMs - c.beforeMs <= STEP_WITHIN_MS) {
    const moved = reading - c.beforeReading;
    if (Math.abs(moved) > STEP && Math.abs(median - c.beforeMedian) <= STEP && c.steps++ === 0) {
      c.firstStepMs = timeMs;
    }
  }
  c.beforeMs = timeMs;
  c.beforeReading = reading;
  c.beforeMedian = median;
  if (!isHeating && neighbours >= 2) {
    c.scansCold++;
    c.coldDifferences += reading - median;
  }
  c.scansCompared++;
  c.squares += (reading - median) ** 2;
  c.squaresFromFahrenheit += (((reading - 32) * 5) / 9 - median) ** 2;
  c.squaresFromCelsius += ((reading * 9) / 5 + 32 - median) ** 2;
  c.furthestFromStart = Math.max(c.furthestFromStart, Math.abs(reading - c.start!));
  c.highestMedian = Math.max(c.highestMedian, median);
}

function watchForEqualReadings(c: Comparison, timeMs: number, reading: number, median: number): void {
  if (c.equalReadings > 0 && reading === c.beforeReading) {
    c.equalReadings++;
    c.equalMedianLow = Math.min(c.equalMedianLow, median);
    c.equalMedianHigh = Math.max(c.equalMedianHigh, median);
  } else {
    c.equalReadings = 1;
    c.equalSinceMs = timeMs;
    c.equalMedianLow = median;
    c.equalMedianHigh = median;
  }
  const medianMoved = c.equalMedianHigh - c.equalMedianLow;
  if (
    c.equalReadings >= STUCK_READINGS &&
    medianMoved > STUCK_MOVED &&
    (c.stuck === null || c.stuck.fromMs === c.equalSinceMs)
  ) {
    c.stuck = { fromMs: c.equalSinceMs, reading, readings: c.equalReadings, medianMoved };
  }
}

function newComparison(channel: RunChannel): Comparison {
  return {
    channel,
    start: null,
    neighboursAtStart: 0,
    equalSinceMs: 0,
    equalReadings: 0,
    equalMedianLow: 0,
    equalMedianHigh: 0,
    stuck: null,
    scansNeighboursRose: 0,
    scansFell: 0,
    scansOffAir: 0,
    airSquares: 0,
    offAirFromMs: 0,
    steps: 0,
    firstStepMs: 0,
    beforeMs: 0,
    beforeReading: 0,
    beforeMedian: 0,
    scansCold: 0,
    coldDifferences: 0,
    scansCompared: 0,
    squares: 0,
    squaresFromFahrenheit: 0,
    squaresFromCelsius: 0,
    furthestFromStart: 0,
    highestMedian: Number.NEGATIVE_INFINITY,
  };
}
