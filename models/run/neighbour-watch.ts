import type { RunChannel } from './channel.ts';
import type { Track } from './track.ts';

/** What one sensor looked like beside its neighbours (the channels of the same role), so far. Temperatures in °C. */
export interface Comparison {
  readonly track: Track;
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
  readonly #present: number[] = [];
  #isHeating = false;

  constructor(channels: readonly RunChannel[], air: readonly RunChannel[]) {
    this.comparisons = channels.map(({ track }) => newComparison(track));
    this.#air = air.map(({ track }) => track);
    this.#taken = new Int32Array(channels.length);
    this.#airTaken = new Int32Array(air.length);
  }

  accept(timeMs: number, scan: number): void {
    const { comparisons } = this;
    const present = this.#present;
    present.length = 0;
    for (let i = 0; i < comparisons.length; i++) {
      const { track } = comparisons[i]!;
      if (track.length > this.#taken[i]!) present.push(track.reading(track.length - 1));
    }
    present.sort((a, b) => a - b);
    const air = this.#airAt(scan);
    if (!this.#isHeating) this.#isHeating = comparisons.some((c) => hasRisen(c));
    for (let i = 0; i < comparisons.length; i++) {
      const comparison = comparisons[i]!;
      const { track } = comparison;
      if (track.length === this.#taken[i]) {
        comparison.equalReadings = 0;
        continue;
      }
      this.#taken[i] = track.length;
      const reading = track.reading(track.length - 1);
      comparison.start ??= reading;
      if (present.length < 2) continue;
      compare(comparison, timeMs, reading, medianWithout(present, reading), air, present.length - 1, this.#isHeating);
    }
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

function hasRisen({ track, start }: Comparison): boolean {
  return start !== null && track.reading(track.length - 1) >= start + HEAT_ON_RISE;
}

/** Median of a rising list without one of its elements. */
function medianWithout(rising: readonly number[], one: number): number {
  const left = rising.indexOf(one);
  const at = (i: number): number => rising[i < left ? i : i + 1]!;
  const n = rising.length - 1;
  return n % 2 === 1 ? at((n - 1) / 2) : (at(n / 2 - 1) + at(n / 2)) / 2;
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
    if (Math.abs(moved) > STEP && Math.abs(moved - (median - c.beforeMedian)) > STEP && c.steps++ === 0) {
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

function newComparison(track: Track): Comparison {
  return {
    track,
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
