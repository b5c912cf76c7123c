import type { ActionParts } from '../actions/action-parts.ts';
import { beginRun } from '../actions/begin-run.ts';
import { closeRun } from '../actions/close-run.ts';
import { endRun } from '../actions/end-run.ts';
import { requireOpenRun } from '../store/live-runs.ts';
import { requireRun } from '../store/runs.ts';
import { requireVessel } from '../store/vessels.ts';
import type { AppParts } from './app-parts.ts';
import type { SomeHandlers } from './handler.ts';
import { numberIn } from './number-in.ts';
import { runView } from './run-view.ts';

export const liveRunHandlers: SomeHandlers<'beginRun' | 'endRun' | 'closeRun'> = {
  beginRun(parts, { params, body }) {
    const { vessel = '' } = params;
    return runView(parts.db, beginRun(inVessel(parts, requireVessel(parts.db, vessel)), vessel, body));
  },
  async endRun(parts, { params, body }) {
    const run = numberIn(params, 'run');
    requireRun(parts.db, run);
    await parts.live.journal.settle();
    endRun(inVessel(parts, requireOpenRun(parts.db, run).vesselId), run, body);
    return runView(parts.db, run);
  },
  async closeRun(parts, { params }) {
    const run = numberIn(params, 'run');
    await parts.live.journal.settle();
    await closeRun(parts, run);
    return runView(parts.db, run);
  },
};

/** "Now" in a vessel is what its scans are stamped by. */
function inVessel(parts: AppParts, vesselId: number): ActionParts {
  return { db: parts.db, actor: parts.actor, clock: () => parts.live.steadyClock.now(vesselId) };
}
