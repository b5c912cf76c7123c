import type { Cycle } from '../cycle/cycle.ts';
import type { Evaluation, PartEvaluation } from '../evaluation/evaluation.ts';
import type { Readings } from '../log/readings.ts';
import type { Load } from '../run/load.ts';

/** Estimated cure along one channel, for the strips below the temperatures. */
export interface CureCourse {
  readonly channel: string;
  /** [n], ms, rising. */
  readonly timeMs: Float64Array;
  /** [n], degree of cure. */
  readonly degree: Float64Array;
  /** [n], °C; null where the resin gives no Tg. */
  readonly tgC: Float64Array | null;
}

export interface ChartInputs {
  readonly readings: Readings;
  /** Null before the run has a cycle: then only the courses are drawn. */
  readonly cycle: Cycle | null;
  readonly evaluation: Evaluation | null;
  /** The part whose judgement is drawn, one of the evaluation's. */
  readonly part: PartEvaluation | null;
  readonly load: Load | null;
  /** Pa; default: the load's, where it has one. */
  readonly barometerPa?: number | null;
  readonly cure?: readonly CureCourse[];
  /** IANA zone of the workshop's clock. */
  readonly zone: string;
  /** The stretch in view, ms; default: the whole log. */
  readonly view?: { readonly fromMs: number; readonly untilMs: number } | null;
  /** The most entries of a line; default 1500. */
  readonly points?: number;
}
