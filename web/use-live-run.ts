import { useEffect, useState } from 'preact/hooks';
import type { LiveRun, ScanEvent } from '../server/contract/live.ts';
import { runLiveEventsPath } from '../server/contract/paths.ts';
import { listenTo } from './event-feed.ts';

/** What was heard of an open run. */
export interface HeardRun {
  readonly state: LiveRun | null;
  /** Scans since the page began to listen, in order; the oldest go once the chart has long been drawn with them. */
  readonly scans: readonly ScanEvent[];
  readonly heardMs: number;
  readonly isHeard: boolean;
}

const MOST_SCANS = 4000;
const NOTHING: HeardRun = { state: null, scans: [], heardMs: 0, isHeard: false };
/** The page is drawn anew no more often than this, however fast news come. */
const DRAWN_MS = 200;

/** Follows an open run; `again` is called when everything is to be read again, and when the run was closed. */
export function useLiveRun(run: number, again: () => void): HeardRun {
  const [heard, setHeard] = useState<HeardRun>(NOTHING);
  useEffect(() => {
    let now = NOTHING;
    let drawnMs = 0;
    let timer: ReturnType<typeof setTimeout> | null = null;
    const draw = () => {
      timer = null;
      drawnMs = performance.now();
      setHeard(now);
    };
    const hear = (change: Partial<HeardRun>) => {
      now = { ...now, ...change };
      // The first of several is drawn at once; those that follow on its heels are drawn together.
      timer ??= setTimeout(draw, Math.max(0, drawnMs + DRAWN_MS - performance.now()));
    };
    const close = listenTo(runLiveEventsPath(run), {
      events: {
        scans: (scans: readonly ScanEvent[]) => hear({ scans: joined(now.scans, scans), ...heardNow() }),
        state: (state: LiveRun) => hear({ state, ...heardNow() }),
        again: () => {
          hear({ scans: [] });
          again();
        },
        closed: again,
      },
      onLine: (isHeard) => hear({ isHeard }),
      onLost: again,
    });
    return () => {
      if (timer !== null) clearTimeout(timer);
      close();
    };
  }, [run]);
  return heard;
}

function heardNow() {
  return { heardMs: Date.now(), isHeard: true };
}

/** What comes again after a dropped line is known already. */
function joined(before: readonly ScanEvent[], scans: readonly ScanEvent[]): readonly ScanEvent[] {
  const last = before.at(-1)?.n ?? 0;
  const fresh = scans.filter(({ n }) => n > last);
  if (fresh.length === 0) return before;
  const all = [...before, ...fresh];
  return all.length > MOST_SCANS ? all.slice(-MOST_SCANS) : all;
}
