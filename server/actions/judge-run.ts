import { DomainError } from '../../models/errors.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { VERSION } from '../contract/version.ts';
import { appendAudit } from '../store/audit.ts';
import { keepDocument } from '../store/documents.ts';
import { insertEvaluation } from '../store/evaluations.ts';
import { requireRun } from '../store/runs.ts';
import { type ActionParts, deedOf } from './action-parts.ts';
import type { EvaluateLog } from './evaluate-log.ts';
import { type Changes, gatherInputs, type RunInputs } from './run-inputs.ts';
import type { StoredRuns } from './stored-runs.ts';

/** Parts of an action that ends in a judgement. */
export interface JudgingParts extends ActionParts {
  readonly evaluate: EvaluateLog;
  /** For long runs; where there is none they are read and judged like short ones. */
  readonly stored?: StoredRuns | undefined;
}

/**
 * Judges a run as it would stand after `changes`, then writes the change and the judgement in one transaction.
 *
 * `write` makes the change itself. Where the run cannot be judged yet, only `write` happens. Nothing is written where
 * the judgement is refused, or where an input changed while it was made.
 *
 * @returns the evaluation's number, or null where there was nothing to judge by.
 */
export async function changeAndJudge(
  parts: JudgingParts,
  run: number,
  because: string,
  changes: Changes,
  write: () => void,
): Promise<number | null> {
  const { db } = parts;
  requireRun(db, run);
  const inputs = gatherInputs(db, run, changes);
  const document = inputs === null || inputs.scans === 0 ? null : await evaluateInputs(parts, inputs);
  return db
    .transaction(() => {
      write();
      return inputs === null || document === null ? null : writeEvaluation(parts, run, because, inputs, document);
    })
    .immediate();
}

/** Judges a run again by what is written now. */
export async function judgeRun(parts: JudgingParts, run: number, because = 'judged again'): Promise<number> {
  const evaluation = await changeAndJudge(parts, run, because, {}, () => undefined);
  if (evaluation !== null) return evaluation;
  throw new DomainError(
    'state-conflict',
    `Run ${run} has no load or no cycle yet, so there is nothing to judge it by`,
    {
      run,
    },
  );
}

type Judges = Pick<JudgingParts, 'evaluate' | 'stored'>;

/** Up to here reading a run takes a few ms. */
const SCANS_READ_HERE = 5000;

/** Judges by inputs; nothing is written. */
export async function evaluateInputs({ evaluate, stored }: Judges, inputs: RunInputs): Promise<Evaluation> {
  const { cycle, load, resin, materials, instruments, decisions } = inputs;
  const { exclusions, believed } = decisions;
  const by = {
    cycle,
    load,
    resin,
    materials,
    instruments,
    exclusions,
    believed,
    barometer: null,
    open: inputs.open,
  };
  const { storedRun, scans } = inputs;
  const isLong = scans > SCANS_READ_HERE && storedRun !== null;
  const evaluation =
    isLong && stored !== undefined ? await stored.evaluate(storedRun, by) : await evaluate(inputs.readLog(), by);
  return {
    ...evaluation,
    log: { ...evaluation.log, sha256: inputs.logSha256 },
    cycle: { ...evaluation.cycle, sha256: inputs.hashes.cycle },
  };
}

/** Writes a judgement, unless its run was changed since its inputs were gathered; part of a larger write. */
export function writeEvaluation(
  parts: ActionParts,
  run: number,
  because: string,
  inputs: RunInputs,
  document: Evaluation,
): number {
  const { db } = parts;
  const now = gatherInputs(db, run);
  if (now === null || changedInputs(inputs, now).length > 0) {
    throw new DomainError('state-conflict', `Run ${run} was changed while it was being judged; judge it again`, {
      run,
    });
  }
  keepDocument(db, inputs.decisions);
  if (inputs.materials !== null) keepDocument(db, inputs.materials);
  if (inputs.instruments !== null) keepDocument(db, inputs.instruments);
  const { at, by } = deedOf(parts);
  const { hashes } = inputs;
  const id = insertEvaluation(db, { run, because, engine: VERSION, inputs: hashes, document, at, by });
  appendAudit(db, {
    at,
    by,
    verb: 'judge-run',
    subject: `run/${run}`,
    why: because,
    details: { evaluation: id, verdict: document.verdict, engine: VERSION, ...hashes },
  });
  return id;
}

/** What a run is judged by now and was not when its inputs were gathered. Of an open run readings go on coming. */
function changedInputs({ hashes, open }: RunInputs, now: RunInputs): string[] {
  const grows: readonly string[] = open ? ['readings', 'layout', 'materials', 'instruments'] : [];
  return Object.entries(hashes).flatMap(([key, hash]) =>
    Object(now.hashes)[key] === hash || grows.includes(key) ? [] : [key],
  );
}
