import { DomainError } from '../../models/errors.ts';
import type { EndRunRequest } from '../contract/live.ts';
import { appendAudit } from '../store/audit.ts';
import { isoFromMs } from '../store/instants.ts';
import { growingSources } from '../store/live-readings.ts';
import { findLiveRun, markEnded, requireOpenRun } from '../store/live-runs.ts';
import { requireRun, setSpan } from '../store/runs.ts';
import { type ActionParts, deedOf } from './action-parts.ts';

/** Ends a run: scans up to the instant count, and those of them that come late, until it is closed. */
export function endRun(parts: ActionParts, run: number, { at, reason = undefined }: EndRunRequest): void {
  const { db, clock } = parts;
  db.transaction(() => {
    requireRun(db, run);
    const { begunMs, endedMs } = requireOpenRun(db, run);
    if (endedMs !== null) {
      throw new DomainError('state-conflict', `Run ${run} was ended at ${isoFromMs(endedMs)} already`, { run });
    }
    const untilMs = at === undefined ? clock() : Date.parse(at);
    if (untilMs < begunMs || untilMs > clock()) {
      const span = `from its beginning at ${isoFromMs(begunMs)} to now`;
      throw new DomainError('state-conflict', `Run ${run} can end at an instant ${span}`, { run });
    }
    markEnded(db, run, untilMs);
    const ended = findLiveRun(db, run);
    const sources = ended === undefined ? [] : growingSources(db, ended);
    setSpan(db, run, begunMs, Math.max(begunMs, ...sources.map(({ head }) => head.lastMs ?? begunMs)));
    const scans = sources.reduce((sum, { head }) => sum + head.scans, 0);
    const details = { ended: isoFromMs(untilMs), scans };
    appendAudit(db, { ...deedOf(parts), verb: 'end-run', subject: `run/${run}`, why: reason ?? null, details });
  }).immediate();
}
