import { DomainError } from '../../models/errors.ts';
import type { LiveScan } from '../../models/log/live-source.ts';
import type { Pushed } from '../contract/live.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { type KeptBatch, keepScans } from '../store/live-scans.ts';
import type { LiveSettings } from '../store/live-sources.ts';
import type { SteadyClock } from './steady-clock.ts';
import { createTakingIn } from './taking-in.ts';
import { whyNotWritten } from './why-not-written.ts';

export interface JournalParts {
  readonly db: Db;
  readonly clock: SteadyClock;
  readonly tell: (notice: JournalNotice) => void;
  /** Most bytes of figures held in memory while nothing can be written. */
  readonly mostHeldBytes?: number;
}

/** What a person should know of the journal. */
export type JournalNotice =
  | { readonly kind: 'cannot-be-kept'; readonly because: string }
  /** It can be written again; `lost` scans had no room in memory meanwhile. */
  | { readonly kind: 'kept-again'; readonly lost: number }
  /** A sender's clock is far ahead of ours; what it sends is kept as it is stamped. */
  | { readonly kind: 'sender-ahead'; readonly sourceId: number; readonly byMs: number };

/** Scans that are on the disk since just now. */
export interface KeptEvent {
  readonly vesselId: number;
  readonly settings: LiveSettings;
  /** In order of time. */
  readonly scans: readonly LiveScan[];
  readonly arrivedMs: number;
}

export interface TakeOptions {
  /** Settings the figures were read by; default: those that hold now. */
  readonly settings?: LiveSettings;
  /** For what cannot be sent again: held in memory while it cannot be written. */
  readonly hold?: boolean;
}

export type JournalState =
  | { readonly keeps: true }
  | { readonly keeps: false; readonly since: string; readonly because: string; readonly held: number };

/** The one place that takes scans, whatever they come from. */
export interface Journal {
  /** Resolves once everything it says was kept is on the disk. */
  take(sourceId: number, scans: readonly LiveScan[], options?: TakeOptions): Promise<Pushed>;
  /** Calls the listener after each commit with what was new; the answer ends it. */
  onKept(listener: (event: KeptEvent) => void): () => void;
  state(): JournalState;
  /** Resolves when nothing waits to be written, or nothing can be. */
  settle(): Promise<void>;
  close(): Promise<void>;
}

/** Scans that wait to be written, all that came with one call. */
interface Waiting {
  readonly vesselId: number;
  readonly settings: LiveSettings;
  readonly scans: readonly LiveScan[];
  readonly arrivedMs: number;
  readonly hold: boolean;
  readonly bytes: number;
  readonly outcome: { kept: number; known: number; refused: Pushed['refused'] };
  readonly resolve: (pushed: Pushed) => void;
  readonly reject: (error: unknown) => void;
  /** Scans of it that are written. */
  done: number;
}

/** Of one source in one commit: a flood from one does not make the others wait. */
const SCANS_IN_TURN = 128;
const RETRY_MS = 1000;
const MOST_HELD_BYTES = 64 * 1024 * 1024;
/** Waiting scans of one source; a sender that goes on is told to wait. */
const MOST_WAITING = 50_000;

/** Writes what comes in the same turn of the loop in one commit, and answers after it. */
export function createJournal(parts: JournalParts): Journal {
  const { db, tell, mostHeldBytes = MOST_HELD_BYTES } = parts;
  const queues = new Map<number, Waiting[]>();
  const listeners = new Set<(event: KeptEvent) => void>();
  const settling: (() => void)[] = [];
  const takeIn = createTakingIn(parts);
  let turnIsDue = false;
  let isClosed = false;
  let retry: NodeJS.Timeout | undefined;
  let trouble: { since: string; because: string; lost: number } | null = null;

  const turnSoon = () => {
    if (turnIsDue || isClosed) return;
    turnIsDue = true;
    setImmediate(turn);
  };

  const turn = () => {
    turnIsDue = false;
    const portions = [...queues.values()].flatMap(portionOf);
    if (portions.length > 0) write(portions);
    for (const [sourceId, queue] of queues) if (queue.length === 0) queues.delete(sourceId);
    if (queues.size > 0 && trouble === null) return turnSoon();
    for (const settled of settling.splice(0)) settled();
  };

  const write = (portions: readonly Portion[]) => {
    try {
      const kept = keepScans(db, portions.map(batchOf));
      if (trouble !== null) endTrouble();
      portions.forEach((portion, n) => {
        const outcome = kept[n];
        if (outcome !== undefined) settle(portion, outcome);
      });
    } catch (error) {
      const because = whyNotWritten(error);
      if (because !== null) beginTrouble(because, error);
      else if (portions.length > 1) for (const portion of portions) write([portion]);
      else for (const { waiting } of portions) drop(waiting, error);
    }
  };

  const settle = ({ waiting, scans }: Portion, { fresh, known, refused }: KeptBatch) => {
    const { outcome, settings, vesselId, arrivedMs } = waiting;
    waiting.done += scans.length;
    outcome.kept += fresh.length;
    outcome.known += known;
    outcome.refused.push(...refused.map(({ timeMs, because }) => ({ at: isoFromMs(timeMs), because })));
    if (waiting.done === waiting.scans.length) {
      remove(waiting);
      waiting.resolve(outcome);
    }
    if (fresh.length === 0) return;
    for (const listener of listeners) listener({ vesselId, settings, scans: fresh, arrivedMs });
  };

  const remove = (waiting: Waiting) => {
    const queue = queues.get(waiting.settings.sourceId);
    queue?.splice(queue.indexOf(waiting), 1);
  };

  const drop = (waiting: Waiting, error: unknown) => {
    remove(waiting);
    waiting.reject(error);
  };

  const beginTrouble = (because: string, cause: unknown) => {
    if (trouble === null) {
      trouble = { since: isoFromMs(parts.clock.now(0)), because, lost: 0 };
      tell({ kind: 'cannot-be-kept', because });
    }
    for (const waiting of [...queues.values()].flat()) {
      if (!waiting.hold) drop(waiting, cannotBeKept(because, cause));
    }
    clearTimeout(retry);
    retry = setTimeout(turnSoon, RETRY_MS);
    retry.unref();
  };

  const endTrouble = () => {
    clearTimeout(retry);
    tell({ kind: 'kept-again', lost: trouble?.lost ?? 0 });
    trouble = null;
  };

  const refuseForWantOfRoom = (sourceId: number, scans: readonly LiveScan[], bytes: number) => {
    const queue = queues.get(sourceId) ?? [];
    if (trouble !== null && heldBytes(queues) + bytes > mostHeldBytes) {
      trouble.lost += scans.length;
      throw cannotBeKept(`${trouble.because}, and the memory set aside for scans is full too`);
    }
    if (countWaiting(queue) + scans.length <= MOST_WAITING) return;
    throw new DomainError('too-large', 'More scans wait to be written than are taken at once; send them again later');
  };

  return {
    take(sourceId, scans, { settings, hold = false } = {}) {
      return new Promise((resolve, reject) => {
        const taken = takeIn(sourceId, scans, settings);
        const bytes = taken.scans.length * taken.settings.document.channels.length * 8;
        refuseForWantOfRoom(sourceId, taken.scans, bytes);
        const outcome = { kept: 0, known: 0, refused: taken.refused };
        if (taken.scans.length === 0) return resolve(outcome);
        const queue = queues.get(sourceId) ?? [];
        queues.set(sourceId, queue);
        queue.push({ ...taken, hold, bytes, outcome, resolve, reject, done: 0 });
        turnSoon();
      });
    },
    onKept(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    state() {
      if (trouble === null) return { keeps: true };
      const held = [...queues.values()].reduce((sum, queue) => sum + countWaiting(queue), 0);
      return { keeps: false, since: trouble.since, because: trouble.because, held };
    },
    async settle() {
      if (queues.size === 0) return;
      await new Promise<void>((resolve) => {
        settling.push(resolve);
        turnSoon();
      });
    },
    async close() {
      await this.settle();
      isClosed = true;
      clearTimeout(retry);
      const error = new DomainError('state-conflict', 'The program is being stopped');
      for (const waiting of [...queues.values()].flat()) drop(waiting, error);
    },
  };
}

/** As much of a waiting call as goes into one commit. */
interface Portion {
  readonly waiting: Waiting;
  readonly scans: readonly LiveScan[];
}

/** The first of a source's waiting scans, in the order they came. */
function portionOf(queue: readonly Waiting[]): Portion[] {
  const portions: Portion[] = [];
  let left = SCANS_IN_TURN;
  for (const waiting of queue) {
    if (left === 0) break;
    const scans = waiting.scans.slice(waiting.done, waiting.done + left);
    portions.push({ waiting, scans });
    left -= scans.length;
  }
  return portions;
}

function batchOf({ waiting: { vesselId, settings, arrivedMs }, scans }: Portion) {
  return { vesselId, settings, arrivedMs, scans };
}

function countWaiting(queue: readonly Waiting[]): number {
  return queue.reduce((sum, { scans, done }) => sum + scans.length - done, 0);
}

function heldBytes(queues: ReadonlyMap<number, readonly Waiting[]>): number {
  let sum = 0;
  for (const queue of queues.values()) for (const { bytes } of queue) sum += bytes;
  return sum;
}

function cannotBeKept(because: string, cause?: unknown): DomainError {
  return new DomainError('disk-full', `Nothing was kept: ${because}; send it again later`, {}, { cause });
}
