import { DomainError } from '../../models/errors.ts';
import type { Load } from '../../models/run/load.ts';
import { parseLoad } from '../../models/run/parse-load.ts';
import type { SensorDecision, SetLoadRequest } from '../contract/runs.ts';
import { appendAudit } from '../store/audit.ts';
import { type CycleRow, requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { insertDecision } from '../store/decisions.ts';
import { findLiveRun } from '../store/live-runs.ts';
import { findLoad, insertLoad } from '../store/loads.ts';
import { insertParticulars } from '../store/parts.ts';
import { requireRun, setVessel } from '../store/runs.ts';
import { readSources } from '../store/sources.ts';
import { requireVessel } from '../store/vessels.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import { changeAndJudge, type JudgingParts } from './judge-run.ts';
import { refuseTwoPlaces } from './refuse-two-places.ts';

/** Says what was in the vessel and by which cycle it was cured, and judges the run by it. */
export async function setLoad(parts: JudgingParts, run: number, request: SetLoadRequest): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  const before = findLoad(db, run);
  if (before !== null && request.reason === undefined) {
    throw new DomainError('state-conflict', `Run ${run} has a load already; say why it is set again`, { run });
  }
  refuseOtherVessel(db, run, request.vessel ?? null);
  const said = readLoad(parts, request);
  requireChannels(db, run, said.load);
  const because = before === null ? 'load set' : 'load set again';
  const changes = request.vessel == null ? said : { ...said, vesselId: requireVessel(db, request.vessel) };
  return changeAndJudge(parts, run, because, changes, () => writeLoad(parts, run, request, said));
}

/** What a request says of a load, looked up and taken apart. */
export interface SaidLoad {
  readonly load: Load;
  readonly cycle: CycleRow | null;
  readonly decisions: readonly SensorDecision[];
}

export function readLoad(parts: ActionParts, request: Pick<SetLoadRequest, 'load' | 'cycle'>): SaidLoad {
  const { exclusions = [], ...load } = parseLoad(request.load);
  const { at } = deedOf(parts);
  return {
    load,
    cycle: request.cycle === null ? null : usableCycle(parts.db, request.cycle.code, request.cycle.issue),
    // A load document may bring exclusions along; in the database they are decisions like any other.
    decisions: exclusions.map(({ channel, from, reason, by }) => ({
      channel,
      decision: 'exclude',
      kind: null,
      from,
      reason,
      deed: { at, by },
    })),
  };
}

/** Writes a load with what came along; part of a larger write. */
export function writeLoad(
  parts: ActionParts,
  run: number,
  request: Omit<SetLoadRequest, 'load'>,
  { load, cycle, decisions }: SaidLoad,
): void {
  const { db } = parts;
  const deed = deedOf(parts);
  const reason = request.reason ?? null;
  const sha256 = insertLoad(db, { run, document: load, cycleId: cycle?.id ?? null, reason, ...deed });
  if (request.vessel != null) setVessel(db, run, requireVessel(db, request.vessel));
  refuseTwoPlaces(db, run);
  for (const particulars of request.particulars ?? []) insertParticulars(db, particulars, deed.at, deed.by);
  for (const decision of decisions) insertDecision(db, run, decision);
  appendAudit(db, {
    ...deed,
    verb: 'set-load',
    subject: `run/${run}`,
    why: reason,
    details: {
      load: sha256,
      cycle: request.cycle === null ? null : `${request.cycle.code}/${request.cycle.issue}`,
      vessel: request.vessel ?? null,
      parts: load.parts.map(({ part }) => part).join(', '),
    },
  });
}

/** What is logged live is logged in the vessel its sources are bound to. */
function refuseOtherVessel(db: Db, run: number, vessel: string | null): void {
  const live = findLiveRun(db, run);
  if (live === undefined || vessel === null || requireVessel(db, vessel) === live.vesselId) return;
  throw new DomainError('state-conflict', `Run ${run} was logged in another vessel than "${vessel}"`, { run, vessel });
}

function usableCycle(db: Db, code: string, issue: string): CycleRow {
  const cycle = requireCycle(db, code, issue);
  if (cycle.status !== 'withdrawn') return cycle;
  throw new DomainError('state-conflict', `Cycle ${code} issue ${issue} is withdrawn`, { cycle: code, issue });
}

/** Every channel a load names must be one of the run's. */
export function requireChannels(db: Db, run: number, load: Load): void {
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
