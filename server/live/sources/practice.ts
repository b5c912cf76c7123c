import { DomainError } from '../../../models/errors.ts';
import type { LiveScan, LiveSource, SourceReads } from '../../../models/log/live-source.ts';
import type { InventedRun, InventVessel } from './invented-vessel.ts';
import type { KeptScans, OneScan, ReadOnceParts, RunningSource, SourceDriver, SourceParts } from './source.ts';

/**
 * An invented vessel whose time goes faster than the clock: its scans are stamped by its own time, which begins with the
 * clock's and runs ahead of it.
 */
export const practice: SourceDriver = { start, readOnce };

/** Scans are brought this often at most, ms, however fast the vessel's time goes. */
const SHORTEST_TURN_MS = 50;
const MOST_AT_ONCE = 500;

function start({ document, take, tell, now, kept, inventVessel }: SourceParts): RunningSource {
  const { speed } = placeOf(document);
  const intervalMs = document.intervalS * 1000;
  let run: InventedRun;
  try {
    run = invented(document, inventVessel);
  } catch (error) {
    tell('cannot-be-reached', (error as Error).message);
    return { close: async () => undefined };
  }
  const { anchorMs, firstMs } = beginning(kept, Math.round(now()), speed, intervalMs, run.scans * intervalMs);
  const beganMs = performance.now();
  let next = Math.max(0, Math.ceil((firstMs - anchorMs) / intervalMs));
  let pending: Promise<unknown> = Promise.resolve();

  const turn = () => {
    const vesselMs = firstMs + (performance.now() - beganMs) * speed;
    const scans: LiveScan[] = [];
    for (; scans.length < MOST_AT_ONCE && anchorMs + next * intervalMs <= vesselMs; next++) {
      const figures = run.figures(next % run.scans, Math.floor(next / run.scans));
      scans.push({ timeMs: Math.round(anchorMs + next * intervalMs), sequence: null, figures });
    }
    if (scans.length === 0) return;
    // A scan that cannot be kept is a gap, as it would be of any vessel.
    pending = take(scans).catch(() => undefined);
  };
  tell('reached', null);
  turn();
  const timer = setInterval(turn, Math.max(SHORTEST_TURN_MS, intervalMs / speed));
  return {
    async close() {
      clearInterval(timer);
      await pending;
    },
  };
}

/**
 * When the programme that is under way began, and the first scan from now on, ms of the vessel's time. It went on while
 * nobody listened, so that a gap shows; one longer than a whole programme is not caught up with.
 */
function beginning(kept: KeptScans | null, nowMs: number, speed: number, intervalMs: number, roundMs: number) {
  const afterLastMs = kept === null ? nowMs : Math.max(nowMs, kept.lastMs + intervalMs);
  if (kept === null || kept.firstMs === null) return { anchorMs: afterLastMs, firstMs: afterLastMs };
  const passedMs = (nowMs - kept.lastArrivedMs) * speed;
  const wentOn = passedMs >= 0 && passedMs <= roundMs;
  const firstMs = wentOn ? kept.lastMs + Math.max(intervalMs, passedMs) : afterLastMs;
  return { anchorMs: kept.firstMs, firstMs };
}

function invented({ name, channels, intervalS, reads }: LiveSource, inventVessel: InventVessel | null): InventedRun {
  if (inventVessel === null) {
    throw new DomainError('state-conflict', 'Only a practice workshop has invented vessels', { source: name });
  }
  const { cycle } = placeOf({ reads });
  return inventVessel({ cycle, channels, intervalS, seed: seedOf(name) });
}

/** FNV-1a, 32 bits: Fowler, Noll & Vo, draft-eastlake-fnv. */
function seedOf(name: string): number {
  let hash = 0x811c9dc5;
  for (const byte of Buffer.from(name)) hash = Math.imul(hash ^ byte, 0x01000193);
  return hash >>> 0;
}

function placeOf({ reads }: Pick<LiveSource, 'reads'>) {
  return reads as Extract<SourceReads, { readonly kind: 'practice' }>;
}

async function readOnce({ document, inventVessel }: ReadOnceParts): Promise<OneScan> {
  const figures = invented(document, inventVessel).figures(0, 0);
  return { figures, because: [...figures].map((figure) => (Number.isNaN(figure) ? 'absent' : null)) };
}
