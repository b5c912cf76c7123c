import { DomainError } from '../../models/errors.ts';
import type { BeginRunRequest } from '../contract/live.ts';
import { appendAudit } from '../store/audit.ts';
import type { Db } from '../store/database.ts';
import { isoFromMs } from '../store/instants.ts';
import { keptSpanOf } from '../store/live-rolling.ts';
import { insertLiveRun, lastEndOf } from '../store/live-runs.ts';
import { listLiveSources } from '../store/live-sources.ts';
import { insertParticulars } from '../store/parts.ts';
import { insertRun } from '../store/runs.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { refuseUnjoinable } from './refuse-unjoinable.ts';
import { readLoad, requireChannels, writeLoad } from './set-load.ts';

/**
 * Begins a run in a vessel: from now on what its sources send is the run's; or from an instant whose scans are still
 * kept. The load may be said at once or later. Returns the run.
 */
export function beginRun(parts: ActionParts, vessel: string, request: BeginRunRequest): number {
  const { db, clock } = parts;
  const { load, cycle, from } = request;
  if (load === null && cycle !== null) {
    throw new DomainError('invalid-request', 'A cycle is said of a load; say what is in the vessel, or say both later');
  }
  const said = load === null ? null : readLoad(parts, { load, cycle });
  return db
    .transaction(() => {
      const deed = deedOf(parts);
      const vesselId = requireVessel(db, vessel);
      const begunMs = from === undefined ? clock() : Date.parse(from);
      refuseImpossible(db, vesselId, begunMs, clock());
      const run = insertRun(db, { vesselId, fromMs: begunMs, untilMs: begunMs, ...deed });
      insertLiveRun(db, run, vesselId, begunMs);
      refuseUnjoinable(db, run);
      const details = { vessel, from: isoFromMs(begunMs) };
      appendAudit(db, { ...deed, verb: 'begin-run', subject: `run/${run}`, details });
      if (said === null) {
        for (const particulars of request.particulars ?? []) insertParticulars(db, particulars, deed.at, deed.by);
        return run;
      }
      requireChannels(db, run, said.load);
      writeLoad(parts, run, { cycle, particulars: request.particulars }, said);
      return run;
    })
    .immediate();
}

function refuseImpossible(db: Db, vesselId: number, begunMs: number, nowMs: number): void {
  const sources = listLiveSources(db, vesselId);
  if (sources.length === 0) {
    throw new DomainError('state-conflict', 'Nothing is set up to send readings from this vessel yet');
  }
  if (begunMs > nowMs) {
    throw new DomainError('state-conflict', `${isoFromMs(begunMs)} is still to come`, { from: isoFromMs(begunMs) });
  }
  const lastEndMs = lastEndOf(db, vesselId);
  if (lastEndMs !== null && begunMs <= lastEndMs) {
    throw new DomainError('state-conflict', `The run before it in this vessel ended at ${isoFromMs(lastEndMs)}`, {
      from: isoFromMs(begunMs),
      ended: isoFromMs(lastEndMs),
    });
  }
  if (begunMs === nowMs) return;
  const keptMs = Math.min(...sources.map(({ id }) => keptSpanOf(db, id)?.fromMs ?? Number.POSITIVE_INFINITY));
  if (keptMs <= begunMs) return;
  const kept = keptMs === Number.POSITIVE_INFINITY ? 'nothing is kept' : `scans are kept from ${isoFromMs(keptMs)} on`;
  throw new DomainError('state-conflict', `A run cannot begin at ${isoFromMs(begunMs)}: ${kept}`, {
    from: isoFromMs(begunMs),
  });
}
