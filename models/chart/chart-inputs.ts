import type { Softening } from '../cure/softening.ts';
import type { PressureAgainst } from '../cure/void-growth-along.ts';
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
  /** [n], Pa s; NaN where the law says nothing and from gel on; null where the resin gives none. */
  readonly viscosityPaS: Float64Array | null;
  /** The least viscosity at any scan before gel. */
  readonly thinnest: { readonly atMs: number; readonly viscosityPaS: number } | null;
  /** From softening to gel; null where either is not known or did not come. */
  readonly flow: FlowWindow | null;
}

export interface FlowWindow extends Pick<Softening, 'by' | 'isFromStart'> {
  readonly fromMs: number;
  /** Gel. */
  readonly untilMs: number;
}

/** Least resin pressure against void growth, from the hottest believed sensor whose resin has not gelled. */
export interface VoidGrowth {
  /** Relative humidity of the lay-up, %. */
  readonly humidityPercent: number;
  /** [m], ms, rising. */
  readonly timeMs: Float64Array;
  /** [m], absolute, Pa; NaN where nothing can be told, and from the last gel on. */
  readonly leastPa: Float64Array;
  /** The most that was needed at any scan. */
  readonly most: { readonly atMs: number; readonly leastPa: number };
  /** When the last of the sensors is estimated to gel; null where it had not by the end of the log. */
  readonly gelMs: number | null;
  /** How the vessel's pressure stood against it; null without a pressure on record, or the barometer it takes. */
  readonly vessel: PressureAgainst | null;
}

/** What is estimated of a part along its run. */
export interface CureOfPart {
  readonly courses: readonly CureCourse[];
  /** What the set says of its viscosity; null where it gives none. */
  readonly viscosity: { readonly validTo: number | null; readonly flowsBelowPaS: number | null } | null;
  /** Null without a humidity on record, or without a resin that says when it gels. */
  readonly voidGrowth: VoidGrowth | null;
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
  readonly cure?: CureOfPart;
  /** IANA zone of the workshop's clock. */
  readonly zone: string;
  /** The stretch in view, ms; default: the whole log. */
  readonly view?: { readonly fromMs: number; readonly untilMs: number } | null;
  /** The most entries of a line; default 1500. */
  readonly points?: number;
}
