import type { RunChart } from '../../models/chart/chart.ts';
import type { CureOfPart } from '../../models/chart/chart-inputs.ts';
import { chartOfRun } from '../../models/chart/chart-of-run.ts';
import { DomainError } from '../../models/errors.ts';
import type { PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import { gatherInputs, readRunLog, sourceInputs } from '../actions/run-inputs.ts';
import type { ChartQuery } from '../contract/chart.ts';
import type { Db } from '../store/database.ts';
import { findLoad } from '../store/loads.ts';
import { requireRun } from '../store/runs.ts';
import { zoneOfWorkshop } from '../store/workshop.ts';
import type { AppParts } from './app-parts.ts';
import { evaluationNow } from './evaluation-now.ts';
import { remember } from './remember.ts';

/** What is to be drawn of a run, or of a stretch of it, for one part. */
export async function readChart(
  { db, engine, estimateCure }: Pick<AppParts, 'db' | 'engine' | 'estimateCure'>,
  run: number,
  query: ChartQuery,
): Promise<RunChart> {
  requireRun(db, run);
  const inputs = gatherInputs(db, run);
  const evaluation = evaluationNow({ db, engine }, run);
  const part = partOf(evaluation?.parts ?? [], query.part);
  const { readings } = readLogOnce(db, run);
  const load = inputs?.load ?? findLoad(db, run)?.document ?? null;
  const cure = await remember<Promise<CureOfPart | null>>(
    db,
    `cure ${run} ${part?.part} ${JSON.stringify(inputs?.hashes)}`,
    () =>
      inputs === null || inputs.resin === null || part === null
        ? Promise.resolve(null)
        : estimateCure(readings, inputs.load, inputs.resin, part),
  );
  return chartOfRun({
    readings,
    cycle: inputs?.cycle ?? null,
    evaluation,
    part,
    load,
    ...(cure === null ? {} : { cure }),
    zone: zoneOfWorkshop(db),
    view: viewOf(query, readings.timeMs),
    points: query.points,
  });
}

/** Zooming asks for the same readings again and again; they never change while the run's sources do not. */
export function readLogOnce(db: Db, run: number): ReadLog {
  const sources = sourceInputs(db, run);
  const key = `log ${run} ${sources.map(({ chainSha256, layoutSha256 }) => `${chainSha256} ${layoutSha256}`).join(' ')}`;
  return remember(db, key, () => readRunLog(sources));
}

function partOf(parts: readonly PartEvaluation[], serial: string | undefined): PartEvaluation | null {
  if (serial === undefined) return parts[0] ?? null;
  const part = parts.find((one) => one.part === serial);
  if (part !== undefined) return part;
  throw new DomainError('not-found', `Part "${serial}" was not judged in this run`, { part: serial });
}

function viewOf({ from, until }: ChartQuery, timeMs: Float64Array) {
  if (from === undefined && until === undefined) return null;
  const fromMs = from === undefined ? (timeMs[0] ?? 0) : Date.parse(from);
  const untilMs = until === undefined ? (timeMs.at(-1) ?? 0) : Date.parse(until);
  if (fromMs < untilMs) return { fromMs, untilMs };
  throw new DomainError('invalid-request', 'The stretch to be drawn ends before it begins', { fromMs, untilMs });
}
