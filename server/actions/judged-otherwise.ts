import { setImmediate as nextTurn } from 'node:timers/promises';
import { DomainError } from '../../models/errors.ts';
import type { Evaluation, Finding } from '../../models/evaluation/evaluation.ts';
import { channelsOf } from '../../models/log/source-channels.ts';
import { asTemperature } from '../../models/log/temperatures-of-emf.ts';
import { calibrationIn } from '../../models/run/calibration-in.ts';
import type { Load } from '../../models/run/load.ts';
import type { AskVerdictsQuery, VerdictChange, VerdictProgress } from '../contract/ask.ts';
import { requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { findLatestEvaluation } from '../store/evaluations.ts';
import { findLoad } from '../store/loads.ts';
import { findRunLine, listJudgedRuns } from '../store/run-lines.ts';
import { deedOf } from './action-parts.ts';
import { evaluateInputs, type JudgingParts } from './judge-run.ts';
import { type Changes, gatherInputs, sourceInputs } from './run-inputs.ts';
import { runsFoundOut, runsReadBy, type TouchedRun } from './touched-runs.ts';

/** A run and what it is judged by instead. */
interface Otherwise {
  readonly run: number;
  readonly changes: () => Changes;
}

/**
 * Judges runs by something else than they were judged by, one after another, and tells after each what would change.
 * Nothing is written. Between two runs everything else has its turn.
 */
export async function* judgeOtherwise(
  parts: JudgingParts,
  query: AskVerdictsQuery,
): AsyncGenerator<VerdictProgress, void> {
  const asked = runsAsked(parts, query);
  yield { done: 0, of: asked.length, change: null, refused: null };
  let done = 0;
  for (const { run, changes } of asked) {
    await nextTurn();
    done += 1;
    try {
      yield { done, of: asked.length, change: await changeOf(parts, run, changes()), refused: null };
    } catch (error) {
      // A run that cannot be judged so is told by name, and the others go on.
      if (!(error instanceof DomainError)) throw error;
      yield { done, of: asked.length, change: null, refused: { run, because: error.message } };
    }
  }
}

function runsAsked(parts: JudgingParts, query: AskVerdictsQuery): Otherwise[] {
  const { db } = parts;
  switch (query.by) {
    case 'issue': {
      const [cycle, issue, other] = [needed(query, 'cycle'), needed(query, 'issue'), needed(query, 'other')];
      requireCycle(db, cycle, issue);
      const row = requireCycle(db, cycle, other);
      return listJudgedRuns(db, cycle, issue).map((run) => ({ run, changes: () => ({ cycle: row }) }));
    }
    case 'exclusion': {
      const [run, channel, from] = [needed(query, 'run'), needed(query, 'channel'), needed(query, 'from')];
      const deed = deedOf(parts);
      const decision = { channel, decision: 'exclude', kind: null, from, reason: 'asked for', deed } as const;
      return [{ run, changes: () => ({ decisions: [decision] }) }];
    }
    case 'calibration': {
      const found = runsFoundOut(db, needed(query, 'instrument'), needed(query, 'calibration'));
      const { unit, asFound } = found.calibration;
      const correction = { unit, points: asFound?.points ?? [] };
      return found.runs.map((touched) => ({
        run: touched.run,
        changes: () => ({ load: correctedLoad(db, touched, correction) }),
      }));
    }
    case 'records':
      return runsReadBy(db, needed(query, 'instrument'), () => true).map(({ run }) => ({ run, changes: () => ({}) }));
  }
}

function needed<K extends keyof AskVerdictsQuery>(query: AskVerdictsQuery, key: K): NonNullable<AskVerdictsQuery[K]> {
  const value = query[key];
  if (value === undefined)
    throw new DomainError('invalid-request', `A question by ${query.by} names its ${key}`, { key });
  return value as NonNullable<AskVerdictsQuery[K]>;
}

/** The load with what would have corrected an instrument in the place of every other correction of its channels. */
function correctedLoad(
  db: Db,
  { run, channels }: TouchedRun,
  { unit, points }: { readonly unit: string; readonly points: readonly (readonly [number, number])[] },
): Load {
  const load = findLoad(db, run)?.document;
  if (load === undefined) throw new DomainError('record-missing', `Run ${run} has no load`, { run });
  const layouts = sourceInputs(db, run)
    .flatMap(({ layout }) => channelsOf(layout))
    .map(asTemperature);
  const found = { done: '', from: '', until: '', by: '', certificate: null, unit, points, uncertainty: null };
  const sensors = new Map(load.sensors.map((sensor) => [sensor.channel, sensor]));
  for (const channel of channels) {
    const layout = layouts.find((one) => one.name === channel);
    const figures = layout === undefined ? null : calibrationIn(found, layout.unit);
    if (figures?.corrections === undefined) {
      throw new DomainError('unit-unknown', `A correction in ${unit} cannot be applied to ${channel} of run ${run}`, {
        run,
        channel,
      });
    }
    sensors.set(channel, { ...(sensors.get(channel) ?? { channel }), corrections: figures.corrections });
  }
  return { ...load, sensors: [...sensors.values()] };
}

async function changeOf(parts: JudgingParts, run: number, changes: Changes): Promise<VerdictChange | null> {
  const { db } = parts;
  const before = findLatestEvaluation(db, run)?.document;
  const line = findRunLine(db, run);
  const inputs = gatherInputs(db, run, changes);
  if (before === undefined || line === undefined || inputs === null) {
    throw new DomainError('record-missing', `Run ${run} was never judged, so there is nothing to compare with`, {
      run,
    });
  }
  const after = await evaluateInputs(parts, inputs);
  const limits = after.parts.flatMap(({ part, findings }) =>
    findings
      .filter((finding) => isOther(finding, before, part))
      .map(({ limit, because }) => ({ part, limit, because })),
  );
  const ofParts = after.parts.map(({ part, verdict }) => ({ part, was: verdictIn(before, part), becomes: verdict }));
  if (limits.length === 0 && ofParts.every(({ was, becomes }) => was === becomes)) return null;
  const { from, vessel } = line;
  return { run, from, vessel, was: before.verdict, becomes: after.verdict, parts: ofParts, limits };
}

function verdictIn(evaluation: Evaluation, part: string | null) {
  return evaluation.parts.find((one) => one.part === part)?.verdict ?? null;
}

function isOther({ limit, outcome }: Finding, before: Evaluation, part: string | null): boolean {
  const findings = before.parts.find((one) => one.part === part)?.findings ?? [];
  return findings.find((finding) => finding.limit === limit)?.outcome !== outcome;
}
