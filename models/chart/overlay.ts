import { DomainError } from '../errors.ts';
import { percentile } from './percentile.ts';

/** What one part's run read, and the instant it is laid over the others by. */
export interface OverlaidCourse {
  readonly part: string;
  readonly run: number;
  readonly failed: boolean;
  /** [n], ms, rising. */
  readonly timeMs: Float64Array;
  /** [n], NaN where nothing was read. */
  readonly values: Float64Array;
  readonly eventMs: number;
  /** A stretch without readings longer than this is not bridged. */
  readonly longestGapMs: number;
}

export interface OverlaidLine {
  readonly part: string;
  readonly run: number;
  /** At every instant of the grid; null where nothing was read. */
  readonly values: readonly (number | null)[];
}

/** Failed runs as lines, sound ones as a band, on one grid of minutes from the event. */
export interface Overlay {
  readonly minutes: readonly number[];
  readonly failed: readonly OverlaidLine[];
  /** 10th, 50th and 90th percentile of the sound runs, and how many there are at each instant. */
  readonly band: {
    readonly low: readonly (number | null)[];
    readonly middle: readonly (number | null)[];
    readonly high: readonly (number | null)[];
    readonly runs: readonly number[];
  };
  /** Each failed line less the middle of the sound ones. */
  readonly difference: readonly OverlaidLine[];
}

/**
 * Lays courses over each other by an event of each.
 *
 * All are read off at the same minutes from their event, straight between readings; the grid spans the failed courses.
 *
 * @param courses At least one failed one.
 * @param points  Instants of the grid, 2 to 2000; default 600.
 * @returns Plain data; null where a course has no reading, or no sound one has.
 * @throws {DomainError} `option-out-of-range` for `points`, or where no failed course has a reading.
 *
 * Limits: what happens between two instants of the grid is not seen; ten hours at 600 points are a minute apart.
 */
export function overlayOf(courses: readonly OverlaidCourse[], points = 600): Overlay {
  if (!(points >= 2 && points <= 2000)) {
    throw new DomainError('option-out-of-range', 'An overlay has 2 to 2000 points', { points });
  }
  const failed = courses.filter((course) => course.failed && course.timeMs.length > 0);
  if (failed.length === 0) throw new DomainError('option-out-of-range', 'An overlay needs a failed course', {});
  const fromMs = Math.min(...failed.map(({ timeMs, eventMs }) => timeMs[0]! - eventMs));
  const untilMs = Math.max(...failed.map(({ timeMs, eventMs }) => timeMs[timeMs.length - 1]! - eventMs));
  const gridMs = Float64Array.from({ length: points }, (_, i) => fromMs + ((untilMs - fromMs) * i) / (points - 1));
  const sound = courses.filter((course) => !course.failed).map((course) => readOff(course, gridMs));
  const [low, middle, high, runs] = [new Array(points), new Array(points), new Array(points), new Array(points)];
  for (let i = 0; i < points; i += 1) {
    const present = sound.map((values) => values[i]!).filter((value) => !Number.isNaN(value));
    present.sort((a, b) => a - b);
    runs[i] = present.length;
    low[i] = orNull(percentile(present, 0.1));
    middle[i] = orNull(percentile(present, 0.5));
    high[i] = orNull(percentile(present, 0.9));
  }
  const lines = failed.map((course) => ({ course, values: readOff(course, gridMs) }));
  return {
    minutes: Array.from(gridMs, (ms) => ms / 60_000),
    failed: lines.map(({ course, values }) => lineOf(course, values)),
    band: { low, middle, high, runs },
    difference: lines.map(({ course, values }) =>
      lineOf(
        course,
        values.map((value, i) => (middle[i] === null ? Number.NaN : value - middle[i])),
      ),
    ),
  };
}

function lineOf({ part, run }: OverlaidCourse, values: Float64Array): OverlaidLine {
  return { part, run, values: Array.from(values, orNull) };
}

/** Six figures are more than a screen shows. */
function orNull(value: number): number | null {
  return Number.isNaN(value) ? null : Number(value.toPrecision(6));
}

/** A course at instants counted from its event. */
function readOff({ timeMs, values, eventMs, longestGapMs }: OverlaidCourse, gridMs: Float64Array): Float64Array {
  const found = new Float64Array(gridMs.length).fill(Number.NaN);
  let [before, after] = [-1, nextPresent(values, 0)];
  for (let i = 0; i < gridMs.length; i += 1) {
    const atMs = eventMs + gridMs[i]!;
    while (after < timeMs.length && timeMs[after]! < atMs) {
      before = after;
      after = nextPresent(values, after + 1);
    }
    if (after >= timeMs.length) break;
    if (timeMs[after] === atMs) found[i] = values[after]!;
    else if (before >= 0 && timeMs[after]! - timeMs[before]! <= longestGapMs) {
      const share = (atMs - timeMs[before]!) / (timeMs[after]! - timeMs[before]!);
      found[i] = values[before]! + share * (values[after]! - values[before]!);
    }
  }
  return found;
}

function nextPresent(values: Float64Array, from: number): number {
  let at = from;
  while (at < values.length && Number.isNaN(values[at]!)) at += 1;
  return at;
}
