import { DomainError } from '../../errors.ts';
import { branchAt, cureRate } from '../cure-rate.ts';
import { glassTransitionK } from '../glass-transition.ts';
import type { Resin } from '../resin.ts';
import { whyNotFrom } from '../start-degree.ts';
import { type Hottest, HottestWatch } from './hottest.ts';
import type { Face, Layer } from './layer.ts';
import { cutPieces, type Piece } from './pieces.ts';
import { type FaceLine, RosenbrockStep } from './rosenbrock-step.ts';
import { cutStack } from './stack.ts';

export interface HeatOptions {
  /** Degree of cure at the start; default: the resin's `initialDegree`. */
  startDegree?: number;
  /** Moments to report at, rising, in s; default none. */
  atS?: Float64Array;
  /** Length of history that need not be resolved, s; default 30. */
  resolveS?: number;
  /** Error estimate allowed in a step, in K (the degree's is a hundredth of it); default 0.02. */
  toleranceK?: number;
}

/** Temperature and degree of cure at every node, at one moment. */
export interface Profile {
  readonly timeS: number;
  /** [n] in K. */
  readonly temperatureK: Float64Array;
  /** [n]; NaN where nothing reacts. */
  readonly alpha: Float64Array;
}

export interface HeatHistory {
  /** [n] in m from the outer face of the first layer. */
  readonly positionM: Float64Array;
  readonly end: Profile;
  /** [n] in K; NaN where nothing reacts; null where the resin gives no Tg. */
  readonly endTgK: Float64Array | null;
  /** At the moments asked for. */
  readonly profiles: readonly Profile[];
  readonly hottest: Hottest;
  /** The same of the places where something reacts; null where nothing does. */
  readonly hottestReacting: Hottest | null;
  /** Least and most cured place at the end. */
  readonly leastCured: { readonly alpha: number; readonly positionM: number };
  readonly mostCured: { readonly alpha: number; readonly positionM: number };
  readonly steps: number;
}

/**
 * Temperature and cure through the thickness of a part on its tool.
 *
 * ρ c ∂T/∂t = ∂/∂x (k ∂T/∂x) + Q ∂α/∂t in each layer, ∂α/∂t = rate(T, α); perfect contact between layers, a gas film, a
 * thermocouple or insulation at the two faces. Nodes with half-intervals as control volumes, ROS2 in time with steps
 * chosen by its error estimate and ending where the outside history bends.
 *
 * @param layers Layers in order, the first face first.
 * @param faces  What the first and the last face meet.
 * @param timeS  Times of the faces' history: [m] in s, rising, m ≥ 2.
 * @param startK Temperature of the whole stack at the start, K.
 * @param resin  Resin of every layer that reacts.
 * @param options See {@link HeatOptions}.
 * @returns See {@link HeatHistory}.
 * @throws {DomainError} `option-out-of-range` for layers, faces or options that are none; `time-not-increasing`;
 *   `cure-stalls` where a rate is negative; `cure-out-of-bounds` where no step keeps the degree rising and within [0, 1].
 *
 * Accuracy: second order in the width of the intervals and in the step; at 80 intervals within 0.03 K of a converged
 *   solution for a 25 mm laminate that overshoots by 38 K, and 3e-4 in degree; test/models/cure/heat/heat-through.test.ts.
 * Limits: one dimension, no resin flow, properties that do not change with temperature or cure; the jump of the law of
 *   Lee, Loos & Springer is stepped over within the tolerance.
 * Source: Loos & Springer, J Compos Mater 17 (1983) 135–169; Bogetti & Gillespie, J Compos Mater 25 (1991) 239–273.
 */
export function heatThrough(
  layers: readonly Layer[],
  faces: readonly [Face, Face],
  timeS: Float64Array,
  startK: number,
  resin: Resin,
  { startDegree = resin.initialDegree, atS = new Float64Array(0), resolveS = 30, toleranceK = 0.02 }: HeatOptions = {},
): HeatHistory {
  refuseBadHistory(timeS, faces, startK);
  const expected = whyNotFrom(startDegree, resin.kinetics);
  if (expected !== null || !(resolveS >= 0) || !(toleranceK > 0)) {
    throw new DomainError(
      'option-out-of-range',
      `The start degree must be ${expected ?? 'as it is'}, resolveS at least 0 and toleranceK above 0`,
      { startDegree, resolveS, toleranceK },
    );
  }
  const stack = cutStack(layers);
  const rate = cureRate(resin);
  const step = new RosenbrockStep(stack, (t, a) => rate.rate(branchAt(rate, a), t, a));
  const temperatureK = new Float64Array(stack.positionM.length).fill(startK);
  temperatureK[0] = startOf(faces[0], startK);
  temperatureK[temperatureK.length - 1] = startOf(faces[1], startK);
  const alpha = Float64Array.from(stack.reactionHeat, (heat) => (heat === 0 ? 0 : startDegree));
  const profileAt = (at: number): Profile => ({
    timeS: at,
    temperatureK: temperatureK.slice(),
    alpha: alpha.map((degree, i) => (stack.reactionHeat[i] === 0 ? Number.NaN : degree)),
  });
  const profiles: Profile[] = [];
  const watch = new HottestWatch(stack.positionM);
  const reacting = reactingNodes(stack.reactionHeat);
  const reactingK = temperatureK.subarray(...reacting);
  const watchReacting = new HottestWatch(stack.positionM.subarray(...reacting));
  const look = (at: number) => {
    watch.accept(at, temperatureK);
    if (reactingK.length > 0) watchReacting.accept(at, reactingK);
  };
  look(timeS[0]!);
  let h = 1;
  let steps = 0;
  let wanted = 0;
  const report = (at: number) => {
    while (wanted < atS.length && atS[wanted]! <= at + 1e-9) {
      profiles.push(profileAt(at));
      wanted += 1;
    }
  };
  report(timeS[0]!);
  for (const piece of cutPieces(timeS, faces.map(historyOfFace), atS, resolveS)) {
    let at = piece.startS;
    while (at < piece.endS) {
      const isLast = at + h * 1.01 >= piece.endS;
      const taken = isLast ? piece.endS - at : h;
      step.take(temperatureK, alpha, taken, lineOf(faces[0], piece, 0, at), lineOf(faces[1], piece, 1, at));
      const excess = Math.max(step.errorK / toleranceK, (100 * step.errorAlpha) / toleranceK);
      if (!(excess <= 1) || !isSound(step.alpha, alpha)) {
        h = taken * (excess > 1 ? Math.max(0.2, 0.9 / Math.sqrt(excess)) : 0.2);
        if (!(h > 1e-6)) refuseStep(at, resin);
        step.renew();
        continue;
      }
      steps += 1;
      temperatureK.set(step.temperatureK);
      alpha.set(step.alpha);
      at = isLast ? piece.endS : at + taken;
      look(at);
      h = Math.max(isLast ? h : 0, taken * Math.min(3, 0.9 / Math.sqrt(excess)));
    }
    report(at);
  }
  const end = profileAt(timeS[timeS.length - 1]!);
  const { glassTransition } = resin;
  return {
    positionM: stack.positionM,
    end,
    endTgK: glassTransition === undefined ? null : end.alpha.map((degree) => glassTransitionK(degree, glassTransition)),
    profiles,
    hottest: watch.hottest()!,
    hottestReacting: watchReacting.hottest(),
    leastCured: placeOf(end.alpha, stack.positionM, (degree, best) => degree < best),
    mostCured: placeOf(end.alpha, stack.positionM, (degree, best) => degree > best),
    steps,
  };
}

/** A face under a thermocouple is as warm as that reads, from the first moment on. */
function startOf(face: Face, startK: number): number {
  return face.meets === 'thermocouple' ? face.temperatureK[0]! : startK;
}

function historyOfFace(face: Face): Float64Array {
  if (face.meets === 'gas') return face.gasK;
  return face.meets === 'thermocouple' ? face.temperatureK : new Float64Array(0);
}

/** From the first node that reacts to after the last. */
function reactingNodes(reactionHeat: Float64Array): [number, number] {
  const first = reactionHeat.findIndex((heat) => heat > 0);
  return first < 0 ? [0, 0] : [first, reactionHeat.findLastIndex((heat) => heat > 0) + 1];
}

/** What a face does from a moment of a piece on. */
function lineOf(face: Face, piece: Piece, which: 0 | 1, atS: number): FaceLine {
  const { startK, slopeKPerS } = piece.faces[which]!;
  const line = { startK: startK + slopeKPerS * (atS - piece.startS), slopeKPerS };
  if (face.meets === 'gas') return { ...line, coefficient: face.coefficientWM2K };
  return { ...line, coefficient: face.meets === 'thermocouple' ? Number.POSITIVE_INFINITY : 0 };
}

/** True where no degree falls, passes 1 or is no number. */
function isSound(to: Float64Array, from: Float64Array): boolean {
  for (let i = 0; i < to.length; i += 1) if (!(to[i]! >= from[i]! - 1e-9 && to[i]! <= 1 + 1e-12)) return false;
  return true;
}

function placeOf(alpha: Float64Array, positionM: Float64Array, isBetter: (degree: number, best: number) => boolean) {
  let best = -1;
  for (let i = 0; i < alpha.length; i += 1) {
    if (!Number.isNaN(alpha[i]!) && (best < 0 || isBetter(alpha[i]!, alpha[best]!))) best = i;
  }
  return { alpha: best < 0 ? Number.NaN : alpha[best]!, positionM: best < 0 ? Number.NaN : positionM[best]! };
}

function refuseBadHistory(timeS: Float64Array, faces: readonly Face[], startK: number): void {
  for (let i = 1; i < timeS.length; i += 1) {
    if (timeS[i]! > timeS[i - 1]!) continue;
    throw new DomainError('time-not-increasing', `Times must rise: ${timeS[i]} s follows ${timeS[i - 1]} s`, {
      index: i,
    });
  }
  const isGood = (k: number) => k >= 73.15 && k <= 1645.15;
  for (const face of faces) {
    const history = historyOfFace(face);
    const hasFilm = face.meets !== 'gas' || face.coefficientWM2K > 0;
    if (hasFilm && (face.meets === 'insulation' || (history.length === timeS.length && history.every(isGood))))
      continue;
    throw new DomainError('option-out-of-range', 'A face needs a temperature in K at every time, and a film above 0', {
      meets: face.meets,
      times: timeS.length,
      temperatures: history.length,
    });
  }
  if (timeS.length >= 2 && isGood(startK)) return;
  throw new DomainError('option-out-of-range', 'At least two times and a start temperature in K are needed', {
    times: timeS.length,
    startK,
  });
}

function refuseStep(timeS: number, { code }: Resin): never {
  throw new DomainError(
    'cure-out-of-bounds',
    `The set "${code}" gives no rising degree within [0, 1] through the thickness at ${timeS.toFixed(1)} s`,
    { timeS },
  );
}
