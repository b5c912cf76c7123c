import { setImmediate as nextTurn } from 'node:timers/promises';
import type { Db } from '../store/database.ts';
import { clearClosedRun, countScansAfter, keptSpanOf, pruneScans } from '../store/live-rolling.ts';
import { type LiveSourceRow, listLiveSources } from '../store/live-sources.ts';
import type { Journal } from './journal.ts';
import type { SteadyClock } from './steady-clock.ts';
import { whyNotWritten } from './why-not-written.ts';

export interface RollingParts {
  readonly db: Db;
  readonly clock: SteadyClock;
  readonly journal: Journal;
  readonly log: { error(facts: object, message: string): void };
  /** Scans older than so many days go, unless they are of an open run. */
  readonly days?: number;
  /** Most bytes of figures kept; the oldest of the source that has most go first. */
  readonly mostBytes?: number;
}

/** What is kept of a source, by what is known yet: after a start its scans are counted in portions. */
export interface KeptOf {
  readonly scans: number;
  readonly fromMs: number | null;
}

export interface Rolling {
  keptOf(sourceId: number): KeptOf;
  /** Counts, takes away what is too old or too much, and clears what a closed run left; done every minute. */
  sweep(): Promise<void>;
  close(): Promise<void>;
}

interface Tally {
  scans: number;
  bytes: number;
  /** Counted so far; Infinity once all are. */
  untilMs: number;
}

const DAY_MS = 86_400_000;
const DAYS = 3;
const MOST_BYTES = 4 * 1024 ** 3;
const SWEEP_MS = 60_000;
/** Scans touched in one go: a few ms, so that what is to be acknowledged does not wait. */
const PORTION = 1000;

/** Keeps what every source sent in the last days, whether or not a run was open. */
export function startRolling(parts: RollingParts): Rolling {
  const { db, clock, journal, log, days = DAYS, mostBytes = MOST_BYTES } = parts;
  const tallies = new Map<number, Tally>();
  const tallyOf = (sourceId: number) => {
    const tally = tallies.get(sourceId) ?? { scans: 0, bytes: 0, untilMs: Number.NEGATIVE_INFINITY };
    tallies.set(sourceId, tally);
    return tally;
  };
  const endListening = journal.onKept(({ settings, scans }) => {
    const tally = tallyOf(settings.sourceId);
    for (const { timeMs, figures } of scans) {
      if (timeMs > tally.untilMs) continue;
      tally.scans += 1;
      tally.bytes += figures.length * 8;
    }
  });
  let isOver = false;

  const count = async ({ id }: LiveSourceRow) => {
    const tally = tallyOf(id);
    while (tally.untilMs < Number.POSITIVE_INFINITY && !isOver) {
      const { scans, bytes, untilMs } = countScansAfter(db, id, tally.untilMs, 10 * PORTION);
      tally.scans += scans;
      tally.bytes += bytes;
      tally.untilMs = scans < 10 * PORTION || untilMs === null ? Number.POSITIVE_INFINITY : untilMs;
      await nextTurn();
    }
  };

  const prune = async ({ id, vesselId }: LiveSourceRow, beforeMs: number, most: number) => {
    for (let left = most; left > 0 && !isOver; ) {
      const gone = pruneScans(db, { sourceId: id, vesselId, beforeMs, atMost: Math.min(PORTION, left) });
      if (gone.scans === 0) return;
      const tally = tallyOf(id);
      tally.scans -= gone.scans;
      tally.bytes -= gone.bytes;
      left -= gone.scans;
      await nextTurn();
    }
  };

  const clear = async () => {
    for (;;) {
      const cleared = isOver ? null : clearClosedRun(db, PORTION, new Date(clock.now(0)).toISOString());
      if (cleared === null) return;
      const tally = tallyOf(cleared.sourceId);
      tally.scans -= cleared.scans;
      tally.bytes -= cleared.bytes;
      await nextTurn();
    }
  };

  const shrink = async (sources: readonly LiveSourceRow[]) => {
    const all = sources.reduce((sum, { id }) => sum + tallyOf(id).bytes, 0);
    if (all <= mostBytes) return;
    const [largest] = sources.toSorted((a, b) => tallyOf(b.id).bytes - tallyOf(a.id).bytes);
    if (largest === undefined) return;
    const { scans, bytes } = tallyOf(largest.id);
    await prune(largest, Number.MAX_VALUE, Math.ceil(((all - mostBytes) * scans) / bytes));
  };

  const sweep = async () => {
    await clear();
    const sources = listLiveSources(db);
    for (const source of sources) {
      await count(source);
      await prune(source, clock.now(source.vesselId) - days * DAY_MS, Number.POSITIVE_INFINITY);
    }
    await shrink(sources);
  };

  let sweeping: Promise<void> = Promise.resolve();
  const sweepAgain = () => {
    sweeping = sweeping.then(sweep).catch((error: unknown) => {
      // What is not taken away today is taken away when the disk can be written again.
      if (whyNotWritten(error) === null) log.error({ err: error }, 'the rolling store could not be swept');
    });
    return sweeping;
  };
  const timer = setInterval(sweepAgain, SWEEP_MS);
  timer.unref();
  return {
    keptOf(sourceId) {
      return { scans: tallyOf(sourceId).scans, fromMs: keptSpanOf(db, sourceId)?.fromMs ?? null };
    },
    sweep: sweepAgain,
    async close() {
      isOver = true;
      clearInterval(timer);
      endListening();
      await sweeping;
    },
  };
}
