import { DomainError } from '../errors.ts';
import { kelvinFromCelsius } from '../units.ts';
import { beginCure } from './cure-progress.ts';
import { glassTransitionK } from './glass-transition.ts';
import { type OutsideStretch, stretchesOutside } from './outside-stretches.ts';
import type { Resin } from './resin.ts';
import { type ViscosityHistory, viscosityAlong } from './viscosity-along.ts';

export interface TrialOptions {
  /** Default: the resin's `initialDegree`. */
  startDegree?: number;
  /** Figures are given at least this often, s; default 10. */
  stepS?: number;
}

/** A cure tried on a temperature history, at steps fine enough to draw. */
export interface TrialCure {
  /** [n], the corners of the history among them; ends early where the cure could not go on. */
  readonly timeS: Float64Array;
  readonly temperatureK: Float64Array;
  readonly alpha: Float64Array;
  /** [n] in K; null where the resin gives no Tg. */
  readonly tgK: Float64Array | null;
  /** Null where the resin gives no viscosity. */
  readonly viscosity: ViscosityHistory | null;
  /** s from the clock of the history; null where it did not come. */
  readonly gelS: number | null;
  readonly vitrifiesS: number | null;
  /** When the law of Lee, Loos and Springer changes its form; null for every other. */
  readonly switchesS: number | null;
  /** Where the temperature lies outside the resin's `validC`; null where the resin writes none. */
  readonly outside: readonly OutsideStretch[] | null;
  /** Why the cure ends before the history does; null where it does not. */
  readonly stopped: { readonly timeS: number; readonly because: string } | null;
}

/**
 * The cure of one resin along a temperature history given by its corners, by the same steps as a run's.
 *
 * @param cornersS Times of the corners: [m] in s, rising, m ≥ 2; straight between them.
 * @param cornersK Temperatures: [m] in K.
 * @param resin    A resin as `parseResin` returns it.
 * @param options  See {@link TrialOptions}.
 * @returns See {@link TrialCure}.
 * @throws {DomainError} as `beginCure` for the start degree. A law that stalls or cannot be integrated is an answer
 *   here, not a refusal: the course up to there is given, and why it ends.
 *
 * Accuracy: as `cureAlong`; test/models/cure/trial-cure.test.ts.
 */
export function trialCure(
  cornersS: Float64Array,
  cornersK: Float64Array,
  resin: Resin,
  { startDegree, stepS = 10 }: TrialOptions = {},
): TrialCure {
  const start = startDegree === undefined ? {} : { startDegree };
  const [timeS, temperatureK] = filledIn(cornersS, cornersK, stepS);
  const progress = beginCure(resin, start);
  const alpha = new Float64Array(timeS.length).fill(Number.NaN);
  let stopped: TrialCure['stopped'] = null;
  try {
    progress.acceptAll(timeS, temperatureK, alpha);
  } catch (error) {
    stopped = whyStopped(error);
  }
  const n = stopped === null ? timeS.length : alpha.findIndex(Number.isNaN);
  const course = { timeS: timeS.slice(0, n), temperatureK: temperatureK.slice(0, n), alpha: alpha.slice(0, n) };
  const { glassTransition, validC, viscosity } = resin;
  return {
    ...course,
    tgK: glassTransition === undefined ? null : course.alpha.map((degree) => glassTransitionK(degree, glassTransition)),
    viscosity: viscosity === undefined ? null : flowing(course, resin, viscosity.flowsBelow),
    gelS: progress.gelS,
    vitrifiesS: progress.vitrifiesS,
    switchesS: switchOf(cornersS, cornersK, resin, start),
    outside:
      validC === undefined
        ? null
        : stretchesOutside(cornersS, cornersK, kelvinFromCelsius(validC[0]), kelvinFromCelsius(validC[1])),
    stopped,
  };
}

/** Anything but a refusal that names its moment is a bug. */
function whyStopped(error: unknown): NonNullable<TrialCure['stopped']> {
  if (!(error instanceof DomainError) || typeof error.facts.timeS !== 'number') throw error;
  return { timeS: error.facts.timeS, because: error.message };
}

/** The switch is found as a gel would be: by the degree it comes at. */
function switchOf(
  cornersS: Float64Array,
  cornersK: Float64Array,
  resin: Resin,
  start: { readonly startDegree?: number },
): number | null {
  const { kinetics } = resin;
  if (kinetics.law !== 'lee-loos-springer') return null;
  const watch = beginCure({ ...resin, gel: { degree: kinetics.switchDegree } }, start);
  try {
    watch.acceptAll(cornersS, cornersK, new Float64Array(cornersS.length));
  } catch (error) {
    // That it cannot go on is told once, by the trial itself.
    whyStopped(error);
  }
  return watch.gelS;
}

function flowing(
  { timeS, temperatureK, alpha }: Pick<TrialCure, 'timeS' | 'temperatureK' | 'alpha'>,
  resin: Resin,
  flowsBelowPaS: number | undefined,
): ViscosityHistory {
  // Nothing is as thin as the least number above 0: a set that names no limit has no flow window.
  return viscosityAlong(timeS, temperatureK, alpha, resin, flowsBelowPaS ?? Number.MIN_VALUE);
}

/** Every piece between two corners in equal steps of at most `stepS`. */
function filledIn(cornersS: Float64Array, cornersK: Float64Array, stepS: number): [Float64Array, Float64Array] {
  const timeS = [cornersS[0]!];
  const temperatureK = [cornersK[0]!];
  for (let i = 1; i < cornersS.length; i += 1) {
    const spanS = cornersS[i]! - cornersS[i - 1]!;
    const steps = Math.max(1, Math.ceil(spanS / stepS - 1e-9));
    for (let k = 1; k <= steps; k += 1) {
      const share = k / steps;
      timeS.push(k === steps ? cornersS[i]! : cornersS[i - 1]! + share * spanS);
      temperatureK.push(cornersK[i - 1]! + share * (cornersK[i]! - cornersK[i - 1]!));
    }
  }
  return [Float64Array.from(timeS), Float64Array.from(temperatureK)];
}
