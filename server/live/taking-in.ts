import type { LiveScan } from '../../models/log/live-source.ts';
import type { Pushed } from '../contract/live.ts';
import { isoFromMs } from '../store/instants.ts';
import { findSettings, type LiveSettings, requireLiveSource } from '../store/live-sources.ts';
import { believableFigures } from './believable-figures.ts';
import type { JournalParts } from './journal.ts';

/** Scans as they will be written, and those no row can be made of. */
export interface TakenIn {
  readonly vesselId: number;
  readonly settings: LiveSettings;
  readonly scans: readonly LiveScan[];
  readonly arrivedMs: number;
  readonly refused: Pushed['refused'];
}

/** A sender's clock further ahead than this, ms, is told; what it sends is kept as it is stamped. */
const AHEAD_MS = 5 * 60_000;

/** No scan of ours is from before, or from after; s, ms and µs taken for one another land outside. */
const FIRST_MS = Date.parse('2000-01-01T00:00:00Z');
const LAST_MS = Date.parse('2100-01-01T00:00:00Z');

/** Looks at scans at the door: instants that can be, figures that can be readings. */
export function createTakingIn({ db, clock, tell }: Pick<JournalParts, 'db' | 'clock' | 'tell'>) {
  const vesselOf = new Map<number, number>();
  const ahead = new Set<number>();
  const tellAhead = (sourceId: number, byMs: number) => {
    if (byMs <= AHEAD_MS) ahead.delete(sourceId);
    else if (!ahead.has(sourceId)) {
      ahead.add(sourceId);
      tell({ kind: 'sender-ahead', sourceId, byMs });
    }
  };
  return (sourceId: number, scans: readonly LiveScan[], given?: LiveSettings): TakenIn => {
    const vesselId = vesselOf.get(sourceId) ?? requireLiveSource(db, sourceId).vesselId;
    vesselOf.set(sourceId, vesselId);
    const settings = given ?? findSettings(db, sourceId) ?? requireLiveSource(db, sourceId).settings;
    const arrivedMs = clock.now(vesselId);
    const possible = scans.filter(isPossible);
    tellAhead(sourceId, possible.reduce((last, { timeMs }) => Math.max(last, timeMs), 0) - arrivedMs);
    return {
      vesselId,
      settings,
      arrivedMs,
      scans: possible.map((scan) => ({
        ...scan,
        figures: believableFigures(scan.figures, settings.document.channels),
      })),
      refused: scans.filter((scan) => !isPossible(scan)).map(refusalOf),
    };
  };
}

function isPossible({ timeMs }: LiveScan): boolean {
  return timeMs >= FIRST_MS && timeMs < LAST_MS;
}

function refusalOf({ timeMs }: LiveScan): Pushed['refused'][number] {
  const isDate = Math.abs(timeMs) <= 8.64e15;
  return { at: isoFromMs(isDate ? timeMs : 0), because: 'the instant lies outside 2000 to 2100' };
}
