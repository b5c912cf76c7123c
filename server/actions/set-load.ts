import { DomainError } from '../../models/errors.ts';
import type { Load } from '../../models/run/load.ts';
import { parseLoad } from '../../models/run/parse-load.ts';
import type { SensorDecision, SetLoadRequest } from '../contract/runs.ts';
import { appendAudit } from '../store/audit.ts';
import { type CycleRow, requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { insertDecision } from '../store/decisions.ts';
import { findLoad, insertLoad } from '../store/loads.ts';
import { insertParticulars } from '../store/parts.ts';
import { requireRun, setVessel } from '../store/runs.ts';
import { readSources } from '../store/sources.ts';
import { requireVessel } from '../store/vessels.ts';
import { deedOf } from './action-parts.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';

/** Says what was in the vessel and by which cycle it was cured, and judges the run by it. */
export async function setLoad(parts: JudgingParts, run: number, request: SetLoadRequest): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  const { exclusions = [], ...load } = parseLoad(request.load);
  const cycle = request.cycle === null ? null : usableCycle(db, request.cycle.code, request.cycle.issue);
  const before = findLoad(db, run);
  if (before !== null && request.reason === undefined) {
    throw new DomainError('state-conflict', `Run ${run} has a load already; say why it is set again`, { run });
  }
  requireChannels(db, run, load);
  const deed = deedOf(parts);
  // A load document may bring exclusions along; in the database they are decisions like any other.
  const decisions = exclusions.map(
    ({ channel, from, reason, by }): SensorDecision => ({
      channel,
      decision: 'exclude',
      kind: null,
      from,
      reason,
      deed: { at: deed.at, by },
    }),
  );
  const because = before === null ? 'load set' : 'load set again';
  return changeAndJudge(parts, run, because, { load, cycle, decisions }, () => {
    const sha256 = insertLoad(db, {
      run,
      document: load,
      cycleId: cycle?.id ?? null,
      reason: request.reason ?? null,
      ...deed,
    });
    if (request.vessel != null) setVessel(db, run, requireVessel(db, request.vessel));
    for (const particulars of request.particulars ?? []) insertParticulars(db, particulars, deed.at, deed.by);
    for (const decision of decisions) insertDecision(db, run, decision);
    appendAudit(db, {
      ...deed,
      verb: 'set-load',
      subject: `run/${run}`,
      why: request.reason ?? null,
      details: {
        load: sha256,
        cycle: request.cycle === null ? null : `${request.cycle.code}/${request.cycle.issue}`,
        vessel: request.vessel ?? null,
        parts: load.parts.map(({ part }) => part).join(', '),
      },
    });
  });
}

function usableCycle(db: Db, code: string, issue: string): CycleRow {
  const cycle = requireCycle(db, code, issue);
  if (cycle.status !== 'withdrawn') return cycle;
  throw new DomainError('state-conflict', `Cycle ${code} issue ${issue} is withdrawn`, { cycle: code, issue });
}

/** Every channel a load names must be one of the run's. */
function requireChannels(db: Db, run: number, load: Load): void {
  const channels = readSources(db, run).flatMap(({ layout }) => layout.channels.map(({ name }) => name));
  const named = [
    ...load.sensors.map(({ channel }) => channel),
    ...load.parts.flatMap(({ bagLine }) => (bagLine === undefined ? [] : [bagLine])),
  ];
  for (const channel of named) {
    if (channels.includes(channel)) continue;
    throw new DomainError(
      'channel-unknown',
      `The load names channel "${channel}", which run ${run} has not; it has ${channels.join(', ')}`,
      { channel, run },
    );
  }
}
