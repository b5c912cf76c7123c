import { DomainError } from '../errors.ts';
import { kelvinFromCelsius } from '../units.ts';
import { branchAt, type CureRate, cureRate } from './cure-rate.ts';
import { type CureState, CureStepper } from './cure-stepper.ts';
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

/** The coldest and hottest a channel's reading may be (−200 to 1372 °C), in K. */
const BELIEVABLE_K = [73.15, 1645.15] as const;

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
  /** Time spent outside the resin's `validC`, s. */
  outsideValidS = 0;

  readonly resin: Resin;
  readonly #rate: CureRate;
  readonly #tolerance: number;
  readonly #stepper: CureStepper;
  readonly #state: CureState;
  #timeS = Number.NaN;
  #temperatureK = Number.NaN;
  #vitrification: VitrificationWatch | null = null;

  constructor(resin: Resin, rate: CureRate, startDegree: number, tolerance: number) {
    this.resin = resin;
    this.#rate = rate;
    this.#tolerance = tolerance;
    this.#stepper = new CureStepper(rate, tolerance);
    this.#state = { alpha: startDegree, branch: branchAt(rate, startDegree), stepS: 1 };
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
    if (!(temperatureK >= BELIEVABLE_K[0] && temperatureK <= BELIEVABLE_K[1])) refuseTemperature(timeS, temperatureK);
    if (!Number.isFinite(timeS) || timeS <= this.#timeS) refuseTime(timeS, this.#timeS);
    if (Number.isNaN(this.#timeS)) this.#begin(timeS, temperatureK);
    else this.#goOn(timeS, temperatureK);
    this.#timeS = timeS;
    this.#temperatureK = temperatureK;
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

  /** Degree of cure at a moment not before the last scan, were the temperature to run straight there. */
  alphaAt(timeS: number, temperatureK: number): number {
    if (Number.isNaN(this.#timeS) || timeS <= this.#timeS) return this.#state.alpha;
    const state = { ...this.#state };
    this.#stepper.enter(this.#timeS, this.#temperatureK, timeS, temperatureK);
    while (this.#stepper.advance(state));
    return state.alpha;
  }

  /** An independent progress that stands where this one does. */
  copy(): CureProgress {
    const copied = new CureProgress(this.resin, this.#rate, this.#state.alpha, this.#tolerance);
    Object.assign(copied.#state, this.#state);
    copied.gelS = this.gelS;
    copied.vitrifiesS = this.vitrifiesS;
    copied.outsideValidS = this.outsideValidS;
    copied.#timeS = this.#timeS;
    copied.#temperatureK = this.#temperatureK;
    copied.#vitrification = this.#vitrification?.copy() ?? null;
    return copied;
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
    this.#vitrification?.accept(timeS, temperatureK);
    this.#stepper.enter(this.#timeS, this.#temperatureK, timeS, temperatureK);
    while (this.#stepper.advance(this.#state)) this.#watch();
    this.#vitrification?.passed(timeS);
    const { validC } = this.resin;
    if (validC === undefined) return;
    const [lowK, highK] = [kelvinFromCelsius(validC[0]), kelvinFromCelsius(validC[1])];
    this.outsideValidS += secondsOutside(timeS - this.#timeS, this.#temperatureK, temperatureK, lowK, highK);
  }

  #watch(): void {
    const gelDegree = this.resin.gel?.degree;
    if (gelDegree !== undefined && this.gelS === null && this.#stepper.toAlpha >= gelDegree) {
      this.gelS = this.#timeS + this.#stepper.elapsedAt(gelDegree);
    }
    const vitrifies = this.#vitrification?.within(this.#stepper, this.#timeS) ?? null;
    if (vitrifies === null) return;
    this.vitrifiesS = this.#timeS + vitrifies;
    this.#vitrification = null;
  }
}

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
