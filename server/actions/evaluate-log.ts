import type { CureOfPart } from '../../models/chart/chart-inputs.ts';
import type { Resin } from '../../models/cure/resin.ts';
import type { Evaluation, PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { JudgementInputs } from '../../models/evaluation/judge.ts';
import type { Readings, ReadLog } from '../../models/log/readings.ts';
import type { Load } from '../../models/run/load.ts';

/** Judges a log, here or in a thread. */
export type EvaluateLog = (log: ReadLog, inputs: JudgementInputs) => Promise<Evaluation>;

/** Estimates the cure along every sensor a part is judged by, here or in a thread. */
export type EstimateCure = (readings: Readings, load: Load, resin: Resin, part: PartEvaluation) => Promise<CureOfPart>;
