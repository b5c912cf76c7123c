import type { Evaluation } from '../../../models/evaluation/evaluation.ts';
import { type JudgementInputs, judge } from '../../../models/evaluation/judge.ts';
import type { Forecast } from '../../../models/forecast/forecast.ts';
import { forecastsOf } from '../../../models/forecast/forecasts-of.ts';
import type { ReadLog } from '../../../models/log/readings.ts';
import { channelsOfSource } from '../../../models/log/source-channels.ts';
import { scanOfEmf } from '../../../models/log/temperatures-of-emf.ts';
import { gatherInputs, type RunInputs, readRunLog, sourceInputs } from '../../actions/run-inputs.ts';
import type { Db } from '../../store/database.ts';
import { growingSources } from '../../store/live-readings.ts';
import type { LiveRunRow } from '../../store/live-runs.ts';
import { findLoad } from '../../store/loads.ts';
import { type RunVersion, versionOfRun } from '../../store/run-version.ts';
import type { KeptEvent } from '../journal.ts';
import { beginFolding, type FoldedRun, foldKept } from './folded-run.ts';
import { ScanOrder } from './scan-order.ts';

/** A scan of the run as it is judged, numbered from 1. */
export interface FollowedScan {
  readonly n: number;
  readonly timeMs: number;
  readonly values: Float64Array;
}

export interface LiveJudgement {
  readonly evaluation: Evaluation;
  readonly forecasts: readonly Forecast[];
}

interface Standing {
  readonly folded: FoldedRun;
  readonly order: ScanOrder;
  readonly columnOf: ReadonlyMap<string, number>;
  readonly version: RunVersion;
  readonly inputs: RunInputs | null;
}

/**
 * Follows an open run as its scans are kept: folds each into the digest, and judges when it is asked to.
 *
 * It begins from the store, and begins anew where something came late or what the run is judged by was changed.
 */
export class RunFollower {
  readonly row: LiveRunRow;
  readonly #db: Db;
  #standing: Standing | null = null;
  #begun: Promise<void> | null = null;
  #came: KeptEvent[] = [];
  /** How often it began anew: scans are numbered afresh each time. */
  beginnings = 0;

  constructor(db: Db, row: LiveRunRow) {
    this.#db = db;
    this.row = row;
  }

  /** Scans folded so far. */
  get scans(): number {
    return this.#standing?.folded.digest.scanMs.length ?? 0;
  }

  /** Channels of a followed scan, in order; none before it has begun. */
  get channels(): readonly string[] {
    return this.#standing?.folded.channels ?? [];
  }

  /** Whether it has to begin, or to begin anew. */
  get mustBegin(): boolean {
    const standing = this.#standing;
    if (this.#begun !== null) return false;
    return standing === null || standing.order.isLate || standing.version !== versionOfRun(this.#db, this.row.run);
  }

  /** Reads what is kept and folds it; resolves when it is up to date. */
  begin(): Promise<void> {
    this.#begun ??= this.#fold().finally(() => {
      this.#begun = null;
    });
    return this.#begun;
  }

  /** Notes what was kept; it is folded with the next `advance`. */
  take(event: KeptEvent): void {
    this.#came.push(event);
  }

  /** Folds what came, and answers it as judged. Empty while it is beginning. */
  advance(nowMs: number): FollowedScan[] {
    const standing = this.#standing;
    if (standing === null || this.#begun !== null) return [];
    this.#putInOrder(standing, this.#came.splice(0));
    const { folded, order } = standing;
    return order.take(nowMs).map((row) => {
      const values = folded.accept(row);
      return { n: folded.digest.scanMs.length, timeMs: row.timeMs, values };
    });
  }

  /** What the run comes to so far; null without a load, a cycle or a scan. */
  judge(): LiveJudgement | null {
    const standing = this.#standing;
    if (standing === null || standing.inputs === null || this.scans === 0) return null;
    const { digest } = standing.folded;
    const inputs = judgementInputsOf(standing.inputs);
    const evaluation = judge(digest, inputs);
    return { evaluation, forecasts: forecastsOf(digest, inputs, evaluation) };
  }

  async #fold(): Promise<void> {
    this.#standing = null;
    const db = this.#db;
    const version = versionOfRun(db, this.row.run);
    const inputs = gatherInputs(db, this.row.run);
    const load = inputs?.load ?? findLoad(db, this.row.run)?.document ?? null;
    const log = readRunLog(sourceInputs(db, this.row.run));
    // What was told until here is in what was read just now; what comes from here on is noted meanwhile.
    this.#came = [];
    const folded = beginFolding(log, load);
    const sources = growingSources(db, this.row);
    const foldedToMs = passedByAll(sources.flatMap(({ head }) => head.lastMs ?? []));
    await foldKept(folded, log, foldedToMs);
    const intervals = sources.map(({ sourceId, settings }) => ({
      id: sourceId,
      intervalMs: 1000 * settings.document.intervalS,
    }));
    const order = new ScanOrder(log.readings.channels.length, intervals, foldedToMs);
    putRest(order, log, foldedToMs);
    const columnOf = new Map(folded.channels.map((name, column) => [name, column]));
    this.#standing = { folded, order, columnOf, version, inputs };
    this.beginnings += 1;
  }

  #putInOrder({ order, columnOf }: Standing, events: readonly KeptEvent[]): void {
    for (const { settings, scans, arrivedMs } of events) {
      const channels = channelsOfSource(settings.document);
      const columns = channels.map(({ name }) => columnOf.get(name) ?? -1);
      const asTemperatures = scanOfEmf(channels);
      // A channel that was not there when the run was folded: it has to be folded again.
      if (columns.includes(-1)) order.isLate = true;
      for (const { timeMs, figures } of scans) {
        if (timeMs < this.row.begunMs || timeMs > (this.row.endedMs ?? Number.POSITIVE_INFINITY)) continue;
        order.put(settings.sourceId, timeMs, asTemperatures(figures), columns, arrivedMs);
      }
    }
  }
}

/** The instant up to which every source that has sent anything has sent. */
function passedByAll(lastMs: readonly number[]): number {
  return lastMs.length === 0 ? Number.NEGATIVE_INFINITY : Math.min(...lastMs);
}

/** What sources had sent beyond the instant all of them had passed. */
function putRest(order: ScanOrder, { readings }: ReadLog, afterMs: number): void {
  const columns = readings.channels.map((_, n) => n);
  readings.timeMs.forEach((timeMs, scan) => {
    if (timeMs <= afterMs) return;
    const figures = readings.channels.map(({ value }) => value[scan] ?? Number.NaN);
    order.put(0, timeMs, figures, columns, Number.NEGATIVE_INFINITY);
  });
}

/** The inputs of a judgement while its run goes on. */
function judgementInputsOf({ cycle, load, resin, materials, instruments, decisions }: RunInputs): JudgementInputs {
  const { exclusions, believed } = decisions;
  return { cycle, load, resin, materials, instruments, exclusions, believed, barometer: null, open: true };
}
