import { glassTransitionK } from '../glass-transition.ts';
import type { Resin } from '../resin.ts';
import { heatThrough } from './heat-through.ts';
import type { Face, Layer } from './layer.ts';

/** A part between its two faces, and what is known of the temperatures there. */
export interface PartBetweenFaces {
  readonly laminate: Omit<Layer, 'intervals'>;
  /** Null where no case needs it. */
  readonly tool: Omit<Layer, 'intervals' | 'reactionHeatJM3'> | null;
  readonly resin: Resin;
  readonly startDegree: number;
  /** [m] in s, rising. */
  readonly timeS: Float64Array;
  readonly cases: readonly FacesCase[];
}

/** One supposition about the two faces; several of them bound what is not known. */
export interface FacesCase {
  readonly bag: Face;
  readonly tool: Face;
  /** Whether the tool lies between the laminate and what its side meets. */
  readonly withTool: boolean;
}

/** What one case comes to. Places are in m from the bag side of the laminate, temperatures in K. */
export interface ThroughPart {
  /** [k] in s: moments of the course, evenly spread over the history. */
  readonly atS: Float64Array;
  /** Of the laminate at those moments. */
  readonly hottestK: Float64Array;
  readonly coldestK: Float64Array;
  readonly middleK: Float64Array;
  /** The hottest place and moment of the laminate. */
  readonly peak: { readonly temperatureK: number; readonly positionM: number; readonly timeS: number };
  /** By how much, at most, the laminate was hotter than the hotter face, and its coldest place colder than the colder. */
  readonly overshootK: number;
  readonly lagK: number;
  /** Through the laminate at the end: [n]. */
  readonly positionM: Float64Array;
  readonly alpha: Float64Array;
  /** Null where the resin gives no Tg. */
  readonly tgK: Float64Array | null;
  /** Hottest moment of the middle. */
  readonly middlePeak: { readonly temperatureK: number; readonly timeS: number };
}

/** Intervals that the laminate and its tool are cut into; the figures of accuracy hold for these. */
const LAMINATE_INTERVALS = 80;
const TOOL_INTERVALS = 20;
/** Moments of a course: one or two to each pixel of a drawing would show no more. */
const MOMENTS = 240;

/**
 * Temperature and cure through a part for every supposition about its faces.
 *
 * @returns one {@link ThroughPart} for each case, in their order.
 * @throws {DomainError} as {@link heatThrough} does.
 *
 * Accuracy, limits, source: those of {@link heatThrough}; the overshoot and the lag are the greatest at the moments of
 *   the course, the peak is found between steps.
 */
export function throughPart({ laminate, tool, resin, startDegree, timeS, cases }: PartBetweenFaces): ThroughPart[] {
  const moments = spread(timeS.length);
  const atS = Float64Array.from(moments, (i) => timeS[i]!);
  return cases.map((one) => {
    const layers: Layer[] = [{ ...laminate, intervals: LAMINATE_INTERVALS }];
    if (one.withTool && tool !== null) layers.push({ ...tool, reactionHeatJM3: 0, intervals: TOOL_INTERVALS });
    const [bagK, toolK] = [one.bag, one.tool].map(historyOf);
    const startK = meanOf([bagK?.[0], toolK?.[0]]);
    const history = heatThrough(layers, [one.bag, one.tool], timeS, startK, resin, { startDegree, atS });
    const end = LAMINATE_INTERVALS + 1;
    const rows = history.profiles.map(({ temperatureK }) => temperatureK.subarray(0, end));
    const hottestK = Float64Array.from(rows, (row) => row.reduce((a, b) => Math.max(a, b)));
    const coldestK = Float64Array.from(rows, (row) => row.reduce((a, b) => Math.min(a, b)));
    const middleK = Float64Array.from(rows, (row) => row[LAMINATE_INTERVALS / 2]!);
    const alpha = history.end.alpha.slice(0, end);
    const { glassTransition } = resin;
    return {
      atS,
      hottestK,
      coldestK,
      middleK,
      peak: history.hottestReacting ?? history.hottest,
      overshootK: greatest(moments, (i, k) => hottestK[k]! - Math.max(...present([bagK?.[i], toolK?.[i]]))),
      lagK: greatest(moments, (i, k) => Math.min(...present([bagK?.[i], toolK?.[i]])) - coldestK[k]!),
      positionM: history.positionM.slice(0, end),
      alpha,
      tgK: glassTransition === undefined ? null : alpha.map((degree) => glassTransitionK(degree, glassTransition)),
      middlePeak: peakOf(atS, middleK),
    };
  });
}

/** Indices of at most `MOMENTS` of n, evenly spread, the first and the last among them. */
function spread(n: number): number[] {
  const count = Math.min(n, MOMENTS);
  return Array.from({ length: count }, (_, k) => Math.round((k * (n - 1)) / (count - 1)));
}

function historyOf(face: Face): Float64Array | null {
  if (face.meets === 'insulation') return null;
  return face.meets === 'gas' ? face.gasK : face.temperatureK;
}

function present(values: readonly (number | undefined)[]): number[] {
  return values.filter((value) => value !== undefined);
}

function meanOf(values: readonly (number | undefined)[]): number {
  const there = present(values);
  return there.reduce((sum, value) => sum + value, 0) / there.length;
}

function greatest(moments: readonly number[], difference: (i: number, k: number) => number): number {
  return moments.reduce((most, i, k) => Math.max(most, difference(i, k)), 0);
}

function peakOf(atS: Float64Array, temperatureK: Float64Array): ThroughPart['middlePeak'] {
  const k = temperatureK.indexOf(temperatureK.reduce((a, b) => Math.max(a, b)));
  return { temperatureK: temperatureK[k]!, timeS: atS[k]! };
}
