import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import { findLatestEvaluation } from '../store/evaluations.ts';
import { findOpenRun } from '../store/live-runs.ts';
import type { AppParts } from './app-parts.ts';

/** What a run was judged to be last; an open one, as it stands now. Null where it cannot be judged yet. */
export function evaluationNow({ db, engine }: Pick<AppParts, 'db' | 'engine'>, run: number): Evaluation | null {
  if (findOpenRun(db, run) !== undefined) return engine.run(run).evaluation;
  return findLatestEvaluation(db, run)?.document ?? null;
}
