import type { Resin } from '../../models/cure/resin.ts';
import type { Cycle } from '../../models/cycle/cycle.ts';
import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import type { Exclusion, Load } from '../../models/run/load.ts';

/** What goes into one judgement. Plain data: it can be handed to another thread. */
export interface EvaluationRequest {
  readonly cycle: Cycle;
  readonly load: Load | null;
  readonly resin: Resin | null;
  readonly exclusions: readonly Exclusion[];
  readonly kept: readonly string[];
}

/** Judges a log, here or in a worker. */
export type EvaluateLog = (log: ReadLog, request: EvaluationRequest) => Promise<Evaluation>;
