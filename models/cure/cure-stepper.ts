import { DomainError } from '../errors.ts';
import { dormandPrinceStep, type EmbeddedStep } from '../numerics/dormand-prince.ts';
import type { CureRate } from './cure-rate.ts';
import { type CureState, NOTHING_LEFT } from './cure-state.ts';

/** A cure within this fraction of the degree it can never pass has stalled. */
const STALLED = 0.999;
/** Error that a step may always make, far below what is asked for: rounding alone is of this size. */
const ROUNDING = 1e-15;

/**
 * Integrates dα/dt = rate(T(t), α) along one straight piece of a temperature history, step by step.
 *
 * Dormand–Prince 5(4) with the step chosen so that the embedded error stays below `tolerance` times what the step adds
 * to α: the errors of a whole cure then sum to about `tolerance`. A step ends where the law changes its form (the time
 * of that degree is found by integrating dt/dα = 1/rate) and at the end of the piece, so no kink lies inside a step.
 */
export class CureStepper {
  /** The step last taken: from and to, in s from the start of the piece, and in degree of cure. */
  fromS = 0;
  toS = 0;
  fromAlpha = 0;
  toAlpha = 0;

  readonly #rate: CureRate;
  readonly #tolerance: number;
  readonly #trial: EmbeddedStep = { value: 0, error: 0, slope: 0 };
  #startS = 0;
  #startK = 0;
  #spanS = 0;
  #kPerS = 0;
  #branch = 0;

  constructor(rate: CureRate, tolerance: number) {
    this.#rate = rate;
    this.#tolerance = tolerance;
  }

  /** Sets out along the piece from (startS, startK) to (endS, endK). */
  enter(startS: number, startK: number, endS: number, endK: number): void {
    this.#startS = startS;
    this.#startK = startK;
    this.#spanS = endS - startS;
    this.#kPerS = (endK - startK) / this.#spanS;
    this.toS = 0;
  }

  /** Takes the next step and moves `state` along; false when the piece is done. */
  advance(state: CureState): boolean {
    if (this.toS >= this.#spanS) return false;
    this.fromS = this.toS;
    this.fromAlpha = state.alpha;
    this.#branch = state.branch;
    const slope = this.#slope(this.fromS, state.alpha);
    const stallDegree = this.#rate.stallsAt(this.#branch, this.temperatureAt(this.fromS));
    if (!(slope >= 0) || state.alpha > STALLED * stallDegree) this.#refuseRate(slope, stallDegree);
    // A step past the end of its branch is cut there, be that end at 1.
    const most = this.#rate.branchEnds[this.#branch]! <= 1 ? Number.POSITIVE_INFINITY : 1 + ROUNDING;
    let h = state.stepS;
    for (;;) {
      const last = this.fromS + h >= this.#spanS;
      if (last) h = this.#spanS - this.fromS;
      dormandPrinceStep(this.#slope, this.fromS, state.alpha, h, slope, this.#trial);
      const { value, error } = this.#trial;
      const gained = value - state.alpha;
      const allowed = this.#tolerance * gained + ROUNDING;
      const excess = Math.abs(error) / allowed;
      if (excess <= 1 && gained >= 0 && value <= most) {
        state.stepS = Math.max(last ? state.stepS : 0, h * Math.min(5, 0.9 * excess ** -0.2));
        this.#accept(state, last ? this.#spanS : this.fromS + h, value);
        return true;
      }
      const shorter = Number.isFinite(excess) && gained >= 0 ? Math.max(0.2, 0.9 * excess ** -0.2) : 0.2;
      h *= shorter < 1 ? shorter : 0.5;
      state.stepS = h;
      if (!(h > 1e-13 * this.#spanS)) this.#refuseStep(value);
    }
  }

  /** Degree at a moment inside the step last taken: the same step, cut short there. */
  alphaAt(elapsedS: number): number {
    if (elapsedS <= this.fromS) return this.fromAlpha;
    if (elapsedS >= this.toS) return this.toAlpha;
    const slope = this.#slope(this.fromS, this.fromAlpha);
    dormandPrinceStep(this.#slope, this.fromS, this.fromAlpha, elapsedS - this.fromS, slope, this.#trial);
    return this.#trial.value;
  }

  /** Moment inside the step last taken at which a degree is reached, by integrating dt/dα = 1/rate. */
  elapsedAt(alpha: number): number {
    if (alpha <= this.fromAlpha) return this.fromS;
    let at = this.fromAlpha;
    let elapsedS = this.fromS;
    let h = alpha - at;
    while (at < alpha) {
      if (h > alpha - at) h = alpha - at;
      dormandPrinceStep(this.#slowness, at, elapsedS, h, this.#slowness(at, elapsedS), this.#trial);
      const excess = Math.abs(this.#trial.error) / (1e-9 * (this.toS - this.fromS));
      if (excess <= 1) {
        at = h === alpha - at ? alpha : at + h;
        elapsedS = this.#trial.value;
        h *= Math.min(5, 0.9 * excess ** -0.2);
      } else {
        h *= Number.isFinite(excess) ? Math.max(0.2, 0.9 * excess ** -0.2) : 0.2;
        if (!(h > 1e-13 * alpha)) this.#refuseStep(at);
      }
    }
    return Math.min(elapsedS, this.toS);
  }

  /** Temperature at a moment of the piece, K. */
  temperatureAt(elapsedS: number): number {
    return this.#startK + this.#kPerS * elapsedS;
  }

  #accept(state: CureState, toS: number, value: number): void {
    this.toS = toS;
    this.toAlpha = 1 - value <= NOTHING_LEFT ? 1 : value;
    const end = this.#rate.branchEnds[this.#branch]!;
    if (value > end) {
      this.toS = this.elapsedAt(end);
      this.toAlpha = end;
      state.branch += 1;
    }
    state.alpha = this.toAlpha;
  }

  readonly #slope = (elapsedS: number, alpha: number): number =>
    this.#rate.rate(this.#branch, this.temperatureAt(elapsedS), alpha);

  readonly #slowness = (alpha: number, elapsedS: number): number => 1 / this.#slope(elapsedS, alpha);

  #refuseRate(ratePerS: number, stallDegree: number): never {
    const temperatureC = this.temperatureAt(this.fromS) - 273.15;
    throw new DomainError(
      Number.isNaN(ratePerS) ? 'cure-out-of-bounds' : 'cure-stalls',
      `The set "${this.#rate.resinCode}" gives a rate of ${ratePerS.toPrecision(3)} 1/s at degree ` +
        `${this.fromAlpha.toPrecision(6)} and ${temperatureC.toFixed(2)} °C` +
        (stallDegree < 1 ? `, where it never passes degree ${stallDegree.toPrecision(6)}` : '') +
        '; a cure cannot go on from there',
      { ratePerS, degree: this.fromAlpha, temperatureC, timeS: this.#startS + this.fromS },
    );
  }

  #refuseStep(degree: number): never {
    const temperatureC = this.temperatureAt(this.fromS) - 273.15;
    throw new DomainError(
      'cure-out-of-bounds',
      `The set "${this.#rate.resinCode}" cannot be integrated past degree ${this.fromAlpha.toPrecision(6)} at ` +
        `${temperatureC.toFixed(2)} °C: no step is short enough`,
      { degree: this.fromAlpha, triedDegree: degree, temperatureC, timeS: this.#startS + this.fromS },
    );
  }
}
