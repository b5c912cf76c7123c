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

/** Follows an open run; `again` is called when everything is to be read again, and when the run was closed. */
export function useLiveRun(run: number, again: () => void): HeardRun {
  const [heard, setHeard] = useState<HeardRun>(NOTHING);
  useEffect(
    () =>
      listenTo(runLiveEventsPath(run), {
        events: {
          scans: (scans: readonly ScanEvent[]) =>
            setHeard((before) => ({
              ...before,
              scans: joined(before.scans, scans),
              heardMs: Date.now(),
              isHeard: true,
            })),
          state: (state: LiveRun) => setHeard((before) => ({ ...before, state, heardMs: Date.now(), isHeard: true })),
          again: () => {
            setHeard((before) => ({ ...before, scans: [] }));
            again();
          },
          closed: again,
        },
        onLine: (isHeard) => setHeard((before) => ({ ...before, isHeard })),
        onLost: again,
      }),
    [run],
  );
  return heard;
}

/** What comes again after a dropped line is known already. */
function joined(before: readonly ScanEvent[], scans: readonly ScanEvent[]): readonly ScanEvent[] {
  const last = before.at(-1)?.n ?? 0;
  const fresh = scans.filter(({ n }) => n > last);
  if (fresh.length === 0) return before;
  const all = [...before, ...fresh];
  return all.length > MOST_SCANS ? all.slice(-MOST_SCANS) : all;
}
