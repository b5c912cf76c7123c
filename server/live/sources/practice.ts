import { DomainError } from '../../../models/errors.ts';
import type { LiveScan, LiveSource, SourceReads } from '../../../models/log/live-source.ts';
import type { InventedRun, InventVessel } from './invented-vessel.ts';
import type { OneScan, ReadOnceParts, RunningSource, SourceDriver, SourceParts } from './source.ts';

/** An invented vessel. Its time, by which `now` tells, goes faster than the clock. */
export const practice: SourceDriver = { start, readOnce };

/** Scans are brought this often at most, ms, however fast the vessel's time goes. */
const SHORTEST_TURN_MS = 50;
const MOST_AT_ONCE = 500;

function start({ document, take, tell, fault, now, kept, inventVessel }: SourceParts): RunningSource {
  const { speed } = placeOf(document);
  const intervalMs = document.intervalS * 1000;
  let run: InventedRun;
  try {
    run = invented(document, inventVessel);
  } catch (error) {
    tell('cannot-be-reached', (error as Error).message);
    return { close: async () => undefined };
  }
  const firstMs = Math.max(Math.round(now()), (kept?.lastMs ?? -Infinity) + intervalMs);
  const anchorMs = kept?.firstMs ?? firstMs;
  let next = Math.ceil((firstMs - anchorMs) / intervalMs);
  let pending: Promise<unknown> = Promise.resolve();

  const turn = () => {
    const vesselMs = now();
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
  const timer = setInterval(
    () => {
      try {
        turn();
      } catch (error) {
        fault(error);
      }
    },
    Math.max(SHORTEST_TURN_MS, intervalMs / speed),
  );
  return {
    async close() {
      clearInterval(timer);
      await pending;
    },
  };
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
