import { gatherInputs, readRunLog, sourceInputs } from '../actions/run-inputs.ts';
import type { LiveRun, ScanEvent } from '../contract/live.ts';
import { foldedRows } from '../live/engine/folded-run.ts';
import type { FollowedScan } from '../live/engine/run-follower.ts';
import { findLoad } from '../store/loads.ts';
import type { AppParts } from './app-parts.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';

export const liveHandlers: SomeHandlers<'readLive' | 'watchLive' | 'readLiveRun' | 'watchLiveRun'> = {
  readLive: ({ engine }) => engine.vessels(),
  watchLive: ({ engine }) => ({
    open(send) {
      send({ event: 'vessels', data: engine.vessels() });
      return engine.watchVessels((vessels) => send({ event: 'vessels', data: vessels }));
    },
  }),
  readLiveRun: ({ engine }, { params }) => engine.run(numberIn(params, 'run')),
  watchLiveRun(parts, { params, lastEventId }) {
    const run = numberIn(params, 'run');
    // A run that is not being logged is refused before the stream begins.
    parts.engine.run(run);
    return {
      open(send, end) {
        const stop = parts.engine.watchRun(run, (news) => {
          if (news.kind === 'scans') sendScans(news.scans);
          else if (news.kind === 'state') send({ event: 'state', data: news.state });
          else if (news.kind === 'again') send({ event: 'again', data: {} });
          else {
            send({ event: 'closed', data: {} });
            end();
          }
        });
        const sendScans = (scans: readonly FollowedScan[]) => {
          const last = scans.at(-1)?.n;
          if (last !== undefined) send({ event: 'scans', id: last, data: scans.map(scanEvent) });
        };
        const state = parts.engine.run(run);
        sendScans(scansSince(parts, run, lastEventId, state));
        send({ event: 'state', data: state });
        return stop;
      },
    };
  },
};

/** What a reader missed: the scans after the one it names, as they are followed. */
function scansSince({ db }: AppParts, run: number, lastEventId: string | null, { scans }: LiveRun): FollowedScan[] {
  const after = Number(lastEventId ?? scans);
  if (!Number.isInteger(after) || after < 0 || after >= scans) return [];
  const load = gatherInputs(db, run)?.load ?? findLoad(db, run)?.document ?? null;
  return foldedRows(readRunLog(sourceInputs(db, run)), load, after, scans);
}

function scanEvent({ n, timeMs, values }: FollowedScan): ScanEvent {
  return { n, timeMs, values: Array.from(values, (value) => (Number.isNaN(value) ? null : value)) };
}
