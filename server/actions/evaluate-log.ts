import type { Evaluation } from '../../models/evaluation/evaluation.ts';
import type { JudgementInputs } from '../../models/evaluation/judge.ts';
import type { ReadLog } from '../../models/log/readings.ts';

/** Judges a log, here or in a worker. */
export type EvaluateLog = (log: ReadLog, inputs: JudgementInputs) => Promise<Evaluation>;
