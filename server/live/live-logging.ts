import { setImmediate as nextTurn } from 'node:timers/promises';
import type { Db } from '../store/database.ts';
import { findLastScan } from '../store/live-readings.ts';
import { findOpenRunOf, listOpenRuns } from '../store/live-runs.ts';
import { listLiveSources } from '../store/live-sources.ts';
import { holdsLiveChain } from '../store/live-verify.ts';
import { createJournal, type Journal, type JournalNotice } from './journal.ts';
import { type Rolling, startRolling } from './rolling.ts';
import { type ClockJump, createSteadyClock, type SteadyClock } from './steady-clock.ts';

export interface LiveLoggingParts {
  readonly db: Db;
  /** The wall clock, ms since 1970-01-01T00:00:00Z. */
  readonly clock: () => number;
  /** Ms since some instant; never set. */
  readonly monotonic?: () => number;
  readonly log: { info(facts: object, message: string): void; error(facts: object, message: string): void };
}

/** Something a person should know of how scans are kept. */
export type LiveNotice =
  | JournalNotice
  | ClockJump
  /** Scans of an open run no longer have the hash they were kept with. */
  | { readonly kind: 'damaged'; readonly run: number; readonly sourceId: number };

/** What takes scans and keeps them. */
export interface LiveLogging {
  readonly journal: Journal;
  readonly steadyClock: SteadyClock;
  readonly rolling: Rolling;
  /** Calls the listener with every notice from now on, and with those so far; the answer ends it. */
  onNotice(listener: (notice: LiveNotice) => void): () => void;
  /** Looks once whether open runs are as they were kept, and sweeps; in portions. */
  lookAfterStart(): Promise<void>;
  close(): Promise<void>;
}

/** Most notices kept for who listens later. */
const MOST_NOTICES = 100;

export function startLiveLogging({ db, clock, monotonic, log }: LiveLoggingParts): LiveLogging {
  const notices: LiveNotice[] = [];
  const listeners = new Set<(notice: LiveNotice) => void>();
  const tell = (notice: LiveNotice) => {
    log.info(notice, 'live logging');
    notices.push(notice);
    if (notices.length > MOST_NOTICES) notices.shift();
    for (const listener of listeners) listener(notice);
  };
  const steadyClock = createSteadyClock({
    wall: clock,
    monotonic: monotonic ?? (() => performance.now()),
    hasOpenRun: (vesselId) => findOpenRunOf(db, vesselId) !== undefined,
    lastOf: (vesselId) => lastOf(db, vesselId),
    tell,
  });
  const journal = createJournal({ db, clock: steadyClock, tell });
  const rolling = startRolling({ db, clock: steadyClock, journal, log });
  return {
    journal,
    steadyClock,
    rolling,
    onNotice(listener) {
      for (const notice of notices) listener(notice);
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    async lookAfterStart() {
      for (const run of listOpenRuns(db)) {
        for (const { id } of listLiveSources(db, run.vesselId)) {
          await nextTurn();
          if (!holdsLiveChain(db, run, id)) tell({ kind: 'damaged', run: run.run, sourceId: id });
        }
      }
      await rolling.sweep();
    },
    async close() {
      await journal.close();
      await rolling.close();
    },
  };
}

/** The scan that came last into a vessel, and when the next was due by the source's interval. */
function lastOf(db: Db, vesselId: number): { arrivedMs: number; dueMs: number } | null {
  const all = listLiveSources(db, vesselId).flatMap(({ id, settings }) => {
    const last = findLastScan(db, id);
    if (last === undefined) return [];
    return [{ arrivedMs: last.arrivedMs, dueMs: last.arrivedMs + 1000 * settings.document.intervalS }];
  });
  return all.toSorted((a, b) => b.arrivedMs - a.arrivedMs)[0] ?? null;
}
