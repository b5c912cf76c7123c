import { leastVoidPressurePa } from './void-pressure.ts';

/** A point of the part at which resin may still flow. */
export interface FlowingPoint {
  /** [n] in K; NaN where absent. */
  readonly temperatureK: Float64Array;
  /** Instant from which on it flows no more; null: it flows to the end. */
  readonly gelMs: number | null;
}

/** Where the law stops saying anything, K: see {@link leastVoidPressurePa}. */
const TOLD_K = [273.15, 473.15] as const;

/**
 * Least resin pressure against void growth along a run, set by the hottest point whose resin has not gelled.
 *
 * @param timeMs                  Scan instants: [n] in ms, rising.
 * @param points                  See {@link FlowingPoint}; each with [n] temperatures.
 * @param relativeHumidityPercent As {@link leastVoidPressurePa}.
 * @returns [n], absolute pressure in Pa; NaN where no point that flows has a reading, or the hottest lies outside 0 to 200 °C.
 *
 * Limits: as {@link leastVoidPressurePa}; a point without a reading is passed over in that scan.
 * Source: as {@link leastVoidPressurePa}.
 */
export function voidGrowthAlong(
  timeMs: Float64Array,
  points: readonly FlowingPoint[],
  relativeHumidityPercent: number,
): Float64Array {
  const leastPa = new Float64Array(timeMs.length).fill(Number.NaN);
  for (let i = 0; i < timeMs.length; i += 1) {
    let hottestK = Number.NEGATIVE_INFINITY;
    for (const { temperatureK, gelMs } of points) {
      if (gelMs !== null && timeMs[i]! > gelMs) continue;
      if (temperatureK[i]! > hottestK) hottestK = temperatureK[i]!;
    }
    if (hottestK < TOLD_K[0] || hottestK > TOLD_K[1]) continue;
    leastPa[i] = leastVoidPressurePa(hottestK, relativeHumidityPercent);
  }
  return leastPa;
}

/** How a pressure stood against the least one that was needed. */
export interface PressureAgainst {
  /** The scans at which both are known: first and last, ms. */
  readonly fromMs: number;
  readonly untilMs: number;
  /** Stretches in which the pressure lay below, ms. */
  readonly below: readonly { readonly fromMs: number; readonly untilMs: number }[];
}

/**
 * Where a pressure lay below the least that was needed, between scans by a straight line.
 *
 * @param timeMs     Scan instants: [n] in ms, rising.
 * @param pressurePa [n], absolute, in Pa; NaN where absent.
 * @param leastPa    [n], as {@link voidGrowthAlong} gives it.
 * @returns See {@link PressureAgainst}; null where no scan knows both.
 */
export function pressureAgainst(
  timeMs: Float64Array,
  pressurePa: Float64Array,
  leastPa: Float64Array,
): PressureAgainst | null {
  const below: { fromMs: number; untilMs: number }[] = [];
  let first = -1;
  let last = -1;
  let beforePa = Number.NaN;
  for (let i = 0; i < timeMs.length; i += 1) {
    const sparePa = pressurePa[i]! - leastPa[i]!;
    if (Number.isNaN(sparePa)) continue;
    if (first < 0) first = i;
    const isBelow = sparePa < 0;
    const wasBelow = beforePa < 0;
    const turnMs = () => timeMs[last]! + (beforePa / (beforePa - sparePa)) * (timeMs[i]! - timeMs[last]!);
    if (isBelow && !wasBelow) below.push({ fromMs: last < 0 ? timeMs[i]! : turnMs(), untilMs: timeMs[i]! });
    const open = below.at(-1);
    if (open !== undefined && (isBelow || wasBelow)) open.untilMs = isBelow ? timeMs[i]! : turnMs();
    beforePa = sparePa;
    last = i;
  }
  return first < 0 ? null : { fromMs: timeMs[first]!, untilMs: timeMs[last]!, below };
}
