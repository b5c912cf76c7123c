import { findRoot } from '../numerics/find-root.ts';
import type { CureStepper } from './cure-stepper.ts';
import { glassTransitionK } from './glass-transition.ts';
import { RecentTemperatures } from './recent-temperatures.ts';
import type { GlassTransition } from './resin.ts';

/** Temperature is looked at over the last 10 minutes, s. */
const LOOK_BACK_S = 600;
/** Its mean may fall by less than 0.1 °C/min, in K/s. */
const FALL_K_PER_S = 0.1 / 60;

/**
 * Looks out for vitrification: the first moment at which Tg(α) ≥ T while the mean of T over the last 10 minutes falls
 * by less than 0.1 °C/min.
 *
 * The running mean of T over a span s changes at the rate (T(t) − T(t − s))/s, so the second condition reads
 * T(t − 10 min) − T(t) < 1 °C; before 10 minutes have passed, the span since the first scan is taken. Without it every
 * resin would be said to vitrify on cooling. The moment is found as the root of Tg − T or of the fall, whichever comes
 * to hold last, each trial degree being integrated anew from the start of its step.
 */
export class VitrificationWatch {
  readonly #set: GlassTransition;
  readonly #firstS: number;
  #recent: RecentTemperatures;

  constructor(set: GlassTransition, firstS: number, firstK: number) {
    this.#set = set;
    this.#firstS = firstS;
    this.#recent = new RecentTemperatures(LOOK_BACK_S);
    this.#recent.push(firstS, firstK);
  }

  /** True where the very first scan finds the resin vitrified. */
  holdsAtFirst(alpha: number, temperatureK: number): boolean {
    return glassTransitionK(alpha, this.#set) >= temperatureK;
  }

  /** Takes note of a scan; call before stepping towards it. */
  accept(timeS: number, temperatureK: number): void {
    this.#recent.push(timeS, temperatureK);
  }

  /** As {@link accept}, for scans in a row; those too old for any later moment to look back to are left out. */
  acceptAll(timeS: Float64Array, temperatureK: Float64Array, from: number, to: number): void {
    let first = to - 1;
    while (first > from && timeS[first]! > timeS[to - 1]! - LOOK_BACK_S) first -= 1;
    for (let i = Math.max(from, first); i < to; i += 1) this.#recent.push(timeS[i]!, temperatureK[i]!);
  }

  /** False where the temperature falls throughout a piece that starts at the last scan, so that nothing vitrifies. */
  maySteady(fromS: number, fromK: number, toS: number, toK: number): boolean {
    if (toS - fromS >= LOOK_BACK_S) return true;
    const temperatureAt = (timeS: number) => fromK + ((toK - fromK) * (timeS - fromS)) / (toS - fromS);
    return this.#bends(fromS, toS).some((timeS) => this.#margin(timeS, temperatureAt(timeS)) > 0);
  }

  /** The moment of vitrification, in s from the piece's start `startS`, if it lies inside the step last taken. */
  within(step: CureStepper, startS: number): number | null {
    const coldest = Math.min(step.temperatureAt(step.fromS), step.temperatureAt(step.toS));
    if (glassTransitionK(step.toAlpha, this.#set) < coldest) return null;
    const excess = (elapsedS: number) =>
      glassTransitionK(step.alphaAt(elapsedS), this.#set) - step.temperatureAt(elapsedS);
    const fromS = startS + step.fromS;
    const toS = startS + step.toS;
    const ends = this.#bends(fromS, toS);
    for (let i = 1; i < ends.length; i += 1) {
      const [a, b] = this.#steady(ends[i - 1]! - startS, ends[i]! - startS, step, startS);
      if (a === null) continue;
      if (excess(a) >= 0) return a;
      if (excess(b) >= 0) return findRoot(excess, a, b, 1e-9 * (step.toS - step.fromS));
    }
    return null;
  }

  copy(): VitrificationWatch {
    const copied = new VitrificationWatch(this.#set, this.#firstS, 0);
    copied.#recent = this.#recent.copy();
    return copied;
  }

  /** The part of [a, b] (no bend inside) over which the temperature is not falling, as far as it is one stretch. */
  #steady(a: number, b: number, step: CureStepper, startS: number): [number, number] | [null, null] {
    const atA = this.#margin(startS + a, step.temperatureAt(a));
    const atB = this.#margin(startS + b, step.temperatureAt(b));
    if (atA <= 0 && atB <= 0) return [null, null];
    const turn = a + ((b - a) * atA) / (atA - atB);
    if (atA <= 0) return [turn, b];
    return atB <= 0 ? [a, turn] : [a, b];
  }

  /** How far the temperature is from falling too fast, K: > 0 where it is steady. Linear between two bends. */
  #margin(timeS: number, temperatureK: number): number {
    const sinceS = Math.min(LOOK_BACK_S, timeS - this.#firstS);
    return temperatureK - this.#recent.at(timeS - sinceS) + FALL_K_PER_S * sinceS;
  }

  /** The ends of a piece and, between them, where the temperature of 10 minutes before bends. */
  #bends(fromS: number, toS: number): number[] {
    const scans = this.#recent.scansBetween(fromS - LOOK_BACK_S, toS - LOOK_BACK_S);
    return [fromS, ...scans.map((scanS) => scanS + LOOK_BACK_S), toS];
  }
}
