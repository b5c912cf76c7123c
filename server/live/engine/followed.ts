import type { LiveRun } from '../../contract/live.ts';
import type { SteadyClock } from '../steady-clock.ts';
import type { FollowedScan, LiveJudgement, RunFollower } from './run-follower.ts';

/** What a watcher of a run is told. */
export type RunNews =
  | { readonly kind: 'scans'; readonly scans: readonly FollowedScan[] }
  /** Scans are numbered afresh: everything is to be read again. */
  | { readonly kind: 'again' }
  | { readonly kind: 'state'; readonly state: LiveRun }
  | { readonly kind: 'closed' };

/** An open run, who watches it, and what it was judged to be last. */
export interface Followed {
  readonly follower: RunFollower;
  readonly watchers: Set<(news: RunNews) => void>;
  judged: LiveJudgement | null;
  judgedMs: number;
  begunMs: number;
  beginnings: number;
  changed: boolean;
  /** The latest figure of each channel as it is judged: °C, Pa. */
  readonly asJudged: Map<string, number>;
  /** Set while scans that just came wait to be told. */
  soon: ReturnType<typeof setTimeout> | null;
}

/** Scans that come within so long are told together. */
const SOON_MS = 15;

/** Tells who watches a run what came since: scans in their order, or that everything is to be read again. */
export function tellScans(one: Followed, nowMs: number): void {
  const scans = one.follower.advance(nowMs);
  if (one.follower.beginnings !== one.beginnings) {
    one.beginnings = one.follower.beginnings;
    one.changed = true;
    for (const tell of one.watchers) tell({ kind: 'again' });
  } else if (scans.length > 0) {
    one.changed = true;
    for (const tell of one.watchers) tell({ kind: 'scans', scans });
  }
  for (const { values } of scans) noteFigures(one, values);
}

function noteFigures({ follower, asJudged }: Followed, values: Float64Array): void {
  for (const [n, channel] of follower.channels.entries()) {
    const figure = values[n] ?? Number.NaN;
    if (!Number.isNaN(figure)) asJudged.set(channel, figure);
  }
}

/** Who watches a run sees its scans at once; what they make of it comes with the next turn. */
export function tellSoon(
  one: Followed,
  clock: SteadyClock,
  log: { error(facts: object, message: string): void },
): void {
  if (one.watchers.size === 0 || one.soon !== null) return;
  one.soon = setTimeout(() => {
    one.soon = null;
    const { row, mustBegin } = one.follower;
    if (mustBegin || one.watchers.size === 0) return;
    try {
      tellScans(one, clock.now(row.vesselId));
    } catch (error) {
      // The next turn tries again, and tells of it where it fails too.
      log.error({ err: error, run: row.run }, 'scans could not be told at once');
    }
  }, SOON_MS);
  one.soon.unref();
}

/** A run that is not followed any more tells nothing. */
export function stopTelling(one: Followed): void {
  if (one.soon !== null) clearTimeout(one.soon);
  one.soon = null;
}
