/** One row of a run's log: a figure for each of its channels, `NaN` where none was read at that instant. */
export interface ScanRow {
  readonly timeMs: number;
  readonly figures: Float64Array;
}

/** What is known of a source that sends into a run. */
export interface SourceInOrder {
  readonly id: number;
  readonly intervalMs: number;
}

interface Following extends SourceInOrder {
  lastMs: number;
  arrivedMs: number;
}

/** A source that has sent nothing for so many intervals is not waited for. */
const WAITED_INTERVALS = 2;

/**
 * Puts the scans of several sources into one order of time.
 *
 * A row is given out once every source that is sending has passed its instant, so that what comes at the same instant
 * is one row. What comes for an instant that was given out already is late: the run must be folded again.
 */
export class ScanOrder {
  /** Whether something came too late for its place. */
  isLate = false;
  readonly #width: number;
  readonly #sources: Map<number, Following>;
  readonly #waiting = new Map<number, Float64Array>();
  #givenMs: number;

  constructor(width: number, sources: readonly SourceInOrder[], givenMs = Number.NEGATIVE_INFINITY) {
    this.#width = width;
    this.#sources = new Map(
      sources.map((source) => [source.id, { ...source, lastMs: givenMs, arrivedMs: Number.NEGATIVE_INFINITY }]),
    );
    this.#givenMs = givenMs;
  }

  /** Takes one scan of a source: `columns` says where in a row each of its figures goes. */
  put(
    sourceId: number,
    timeMs: number,
    figures: ArrayLike<number>,
    columns: readonly number[],
    arrivedMs: number,
  ): void {
    const source = this.#sources.get(sourceId);
    if (source !== undefined) {
      source.lastMs = Math.max(source.lastMs, timeMs);
      source.arrivedMs = Math.max(source.arrivedMs, arrivedMs);
    }
    if (timeMs <= this.#givenMs) {
      this.isLate = true;
      return;
    }
    let row = this.#waiting.get(timeMs);
    if (row === undefined) {
      row = new Float64Array(this.#width).fill(Number.NaN);
      this.#waiting.set(timeMs, row);
    }
    for (const [n, column] of columns.entries()) {
      const figure = figures[n] ?? Number.NaN;
      if (!Number.isNaN(figure)) row[column] = figure;
    }
  }

  /** The rows no source can still add to, in order of time. */
  take(nowMs: number): ScanRow[] {
    const upToMs = this.#passedMs(nowMs);
    const instants = [...this.#waiting.keys()].filter((timeMs) => timeMs <= upToMs).sort((a, b) => a - b);
    const rows = instants.map((timeMs) => ({ timeMs, figures: this.#waiting.get(timeMs) ?? new Float64Array() }));
    for (const timeMs of instants) this.#waiting.delete(timeMs);
    this.#givenMs = Math.max(this.#givenMs, instants.at(-1) ?? this.#givenMs);
    return rows;
  }

  /** The instant that every source that is sending has passed. */
  #passedMs(nowMs: number): number {
    const sending = [...this.#sources.values()].filter(
      ({ arrivedMs, intervalMs }) => nowMs - arrivedMs <= WAITED_INTERVALS * intervalMs,
    );
    if (sending.length === 0) return Number.POSITIVE_INFINITY;
    return Math.min(...sending.map(({ lastMs }) => lastMs));
  }
}
