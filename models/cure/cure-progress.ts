import { DomainError } from '../errors.ts';
import { kelvinFromCelsius } from '../units.ts';
import { branchAt, type CureRate, cureRate } from './cure-rate.ts';
import { BELIEVABLE_K, type CureState } from './cure-state.ts';
import { CureStepper } from './cure-stepper.ts';
import { FAST_TOLERANCE, FastCure } from './fast/fast-cure.ts';
import { separableLaw } from './fast/separable-law.ts';
import { glassTransitionK } from './glass-transition.ts';
import type { Resin } from './resin.ts';
import { secondsOutside } from './seconds-outside.ts';
import { whyNotFrom } from './start-degree.ts';
import { VitrificationWatch } from './vitrification.ts';

export interface CureOptions {
  /** Degree of cure at the first scan; default: the resin's `initialDegree`. */
  startDegree?: number;
  /** Error allowed in α, per unit of α gained: 1e-13 … 1e-3; default 1e-7. */
  tolerance?: number;
}

/**
 * Starts following the cure of one point of a part, to be fed its temperature scan by scan.
 *
 * @param resin   A resin as `parseResin` returns it.
 * @param options See {@link CureOptions}.
 * @throws {DomainError} `option-out-of-range` when `startDegree` ∉ [0, 1), lies below the first degree of an
 *   isoconversional table, or is 0 where the law cannot start from 0; or when `tolerance` is out of its range.
 */
export function beginCure(resin: Resin, { startDegree, tolerance = 1e-7 }: CureOptions = {}): CureProgress {
  const start = startDegree ?? resin.initialDegree;
  const expected = whyNotFrom(start, resin.kinetics);
  if (expected !== null) {
    throw new DomainError('option-out-of-range', `The start degree is ${start}; expected ${expected}`, {
      startDegree: start,
    });
  }
  if (!(tolerance >= 1e-13 && tolerance <= 1e-3)) {
    throw new DomainError('option-out-of-range', `The tolerance is ${tolerance}; expected 1e-13 to 1e-3`, {
      tolerance,
    });
  }
  return new CureProgress(resin, cureRate(resin), start, tolerance);
}

/**
 * The cure of one point, as far as its readings have come.
 *
 * Temperature is read linearly between scans, and every scan ends a step, so nothing that the log shows is stepped
 * over and asking changes nothing: the degree after a scan depends on the scans up to it alone.
 */
export class CureProgress {
  /** Moment of gelation, on the clock of the scans; null while it has not come or the resin gives no gel degree. */
  gelS: number | null = null;
  /** Moment of vitrification, on the clock of the scans; null while it has not come or the resin gives no Tg. */
  vitrifiesS: number | null = null;

  readonly resin: Resin;
  readonly #rate: CureRate;
  readonly #tolerance: number;
  readonly #stepper: CureStepper;
  readonly #fast: FastCure | null;
  readonly #state: CureState;
  #vitrification: VitrificationWatch | null = null;

  constructor(resin: Resin, rate: CureRate, startDegree: number, tolerance: number) {
    this.resin = resin;
    this.#rate = rate;
    this.#tolerance = tolerance;
    this.#stepper = new CureStepper(rate, tolerance < FAST_TOLERANCE ? tolerance : tolerance * EARLY);
    const law = tolerance < FAST_TOLERANCE ? null : separableLaw(resin);
    this.#fast = law === null ? null : new FastCure(law, rate, resin);
    this.#state = {
      alpha: startDegree,
      branch: branchAt(rate, startDegree),
      stepS: 1,
      timeS: Number.NaN,
      temperatureK: Number.NaN,
      outsideValidS: 0,
    };
  }

  /**
   * Goes on to the next scan.
   *
   * @param timeS        Moment of the scan in s, on any clock; later than the one before.
   * @param temperatureK Temperature in K.
   * @throws {DomainError} `time-not-increasing`; `cure-out-of-bounds` when the temperature is not one, or the law
   *   cannot be integrated; `cure-stalls` when the rate is negative. After a refusal the progress is not to be used.
   */
  accept(timeS: number, temperatureK: number): void {
    one.timeS[0] = timeS;
    one.temperatureK[0] = temperatureK;
    this.acceptAll(one.timeS, one.temperatureK, one.alpha);
  }

  /** As {@link accept}, for scans in a row; fills `alphaOut` with the degree at each. */
  acceptAll(timeS: Float64Array, temperatureK: Float64Array, alphaOut: Float64Array): void {
    let i = 0;
    while (i < timeS.length) {
      if (this.#fast !== null && !Number.isNaN(this.#state.timeS)) {
        const end = this.#nextDegree();
        i = this.#fast.run(this.#state, timeS, temperatureK, i, timeS.length, end, this.#vitrification, alphaOut);
        if (i === timeS.length) return;
      }
      this.#step(timeS[i]!, temperatureK[i]!);
      alphaOut[i] = this.#state.alpha;
      i += 1;
    }
  }

  /** Degree of cure at the last scan. */
  alpha(): number {
    return this.#state.alpha;
  }

  /** Glass transition temperature at the last scan, K; null where the resin gives none. */
  tgK(): number | null {
    const { glassTransition } = this.resin;
    return glassTransition === undefined ? null : glassTransitionK(this.#state.alpha, glassTransition);
  }

  /** Time spent outside the resin's `validC`, s. */
  get outsideValidS(): number {
    return this.#state.outsideValidS;
  }

  /** Degree of cure at a moment not before the last scan, were the temperature to run straight there. */
  alphaAt(timeS: number, temperatureK: number): number {
    const state = { ...this.#state };
    if (!(timeS > state.timeS)) return state.alpha;
    this.#stepper.enter(state.timeS, state.temperatureK, timeS, temperatureK);
    while (this.#stepper.advance(state));
    return state.alpha;
  }

  /** An independent progress that stands where this one does. */
  copy(): CureProgress {
    const copied = new CureProgress(this.resin, this.#rate, this.#state.alpha, this.#tolerance);
    Object.assign(copied.#state, this.#state);
    if (copied.#fast !== null) this.#fast?.copyInto(copied.#fast);
    copied.gelS = this.gelS;
    copied.vitrifiesS = this.vitrifiesS;
    copied.#vitrification = this.#vitrification?.copy() ?? null;
    return copied;
  }

  /** Goes on to one scan with the step-by-step integrator, which finds events and refuses what is none. */
  #step(timeS: number, temperatureK: number): void {
    const state = this.#state;
    if (!(temperatureK >= BELIEVABLE_K[0] && temperatureK <= BELIEVABLE_K[1])) refuseTemperature(timeS, temperatureK);
    if (!Number.isFinite(timeS) || timeS <= state.timeS) refuseTime(timeS, state.timeS);
    if (Number.isNaN(state.timeS)) this.#begin(timeS, temperatureK);
    else this.#goOn(timeS, temperatureK);
    state.timeS = timeS;
    state.temperatureK = temperatureK;
    this.#fast?.lift();
  }

  #begin(timeS: number, temperatureK: number): void {
    const { gel, glassTransition } = this.resin;
    if (gel !== undefined && this.#state.alpha >= gel.degree) this.gelS = timeS;
    if (glassTransition === undefined) return;
    const watch = new VitrificationWatch(glassTransition, timeS, temperatureK);
    if (watch.holdsAtFirst(this.#state.alpha, temperatureK)) this.vitrifiesS = timeS;
    else this.#vitrification = watch;
  }

  #goOn(timeS: number, temperatureK: number): void {
    const state = this.#state;
    this.#vitrification?.accept(timeS, temperatureK);
    this.#stepper.enter(state.timeS, state.temperatureK, timeS, temperatureK);
    while (this.#stepper.advance(state)) this.#watch();
    const { validC } = this.resin;
    if (validC === undefined) return;
    const [lowK, highK] = [kelvinFromCelsius(validC[0]), kelvinFromCelsius(validC[1])];
    state.outsideValidS += secondsOutside(timeS - state.timeS, state.temperatureK, temperatureK, lowK, highK);
  }

  #watch(): void {
    const { timeS } = this.#state;
    const gelDegree = this.resin.gel?.degree;
    if (gelDegree !== undefined && this.gelS === null && this.#stepper.toAlpha >= gelDegree) {
      this.gelS = timeS + this.#stepper.elapsedAt(gelDegree);
    }
    const vitrifies = this.#vitrification?.within(this.#stepper, timeS) ?? null;
    if (vitrifies === null) return;
    this.vitrifiesS = timeS + vitrifies;
    this.#vitrification = null;
  }

  /** Degree at which the next event or the next branch of the law comes. */
  #nextDegree(): number {
    const gelDegree = this.gelS === null ? (this.resin.gel?.degree ?? 1) : 1;
    return Math.min(gelDegree, this.#rate.branchEnds[this.#state.branch]!);
  }
}

/** What the steps are held to beside the fast ones: errors made early in an autocatalytic cure grow with its rate. */
const EARLY = 0.01;

/** Room for one scan, to hand it on as a row of one. */
const one = { timeS: new Float64Array(1), temperatureK: new Float64Array(1), alpha: new Float64Array(1) };

function refuseTime(timeS: number, previousS: number): never {
  throw new DomainError('time-not-increasing', `Scan times must rise: ${timeS} s follows ${previousS} s`, {
    timeS,
    previousS,
  });
}

function refuseTemperature(timeS: number, temperatureK: number): never {
  throw new DomainError(
    'cure-out-of-bounds',
    `The temperature at ${timeS} s is ${temperatureK} K; expected ${BELIEVABLE_K[0]} to ${BELIEVABLE_K[1]} K ` +
      '(a figure in °C must be converted)',
    { timeS, temperatureK },
  );
}
