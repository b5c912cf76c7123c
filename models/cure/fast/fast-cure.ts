import { kelvinFromCelsius } from '../../units.ts';
import type { CureRate } from '../cure-rate.ts';
import { type CureState, NOTHING_LEFT } from '../cure-state.ts';
import type { Resin } from '../resin.ts';
import type { VitrificationWatch } from '../vitrification.ts';
import { LocalShapes } from './local-shapes.ts';
import { moveAlong } from './move-along.ts';
import { rateSlopes } from './rate-slopes.ts';
import { runOut } from './run-out.ts';
import type { SeparableLaw, Term } from './separable-law.ts';
import { oneTermAnchored, stepOneTerm } from './step-one-term.ts';
import { anchored, FIGURES, stepReadings } from './step-readings.ts';

/** Below this tolerance the step-by-step integrator does all the work. */
export const FAST_TOLERANCE = 1e-7;

/**
 * Follows a cure over readings close together in time, by {@link stepOneTerm} or {@link stepReadings}; declines what
 * they cannot vouch for.
 */
export class FastCure {
  readonly #law: SeparableLaw;
  readonly #rate: CureRate;
  readonly #validK: readonly [number, number] | null;
  readonly #shapes: LocalShapes;
  readonly #now = new Float64Array(FIGURES);
  #isAnchored = false;

  constructor(law: SeparableLaw, rate: CureRate, { glassTransition, validC }: Resin) {
    this.#law = law;
    this.#rate = rate;
    this.#shapes = new LocalShapes(law.diffusion[0]!, glassTransition ?? null);
    this.#validK = validC === undefined ? null : [kelvinFromCelsius(validC[0]), kelvinFromCelsius(validC[1])];
  }

  /** To be called when the state was moved by anything but `run`. */
  lift(): void {
    this.#isAnchored = false;
  }

  copyInto(copied: FastCure): void {
    copied.#now.set(this.#now);
    copied.#shapes.takeOver(this.#shapes);
    copied.#isAnchored = this.#isAnchored;
  }

  /**
   * Goes through readings from index `from` on, as far as it can vouch for them, and moves `state` along.
   *
   * @param nextDegree Degree that must not be reached here: the next event or the end of the branch.
   * @param watch      Told of every reading it goes through; a piece that may vitrify is declined. Null: none is looked at.
   * @param alphaOut   Filled with the degree at each reading.
   * @returns Index of the first reading it declines, or `to`.
   */
  run(
    state: CureState,
    timeS: Float64Array,
    temperatureK: Float64Array,
    from: number,
    to: number,
    nextDegree: number,
    watch: VitrificationWatch | null,
    alphaOut: Float64Array,
  ): number {
    if (state.alpha >= 1)
      return runOut(state, timeS, temperatureK, from, to, this.#shapes, watch, alphaOut, this.#validK);
    if (!this.#isAnchored && !this.#anchor(state)) return from;
    const degreeEnd = Math.min(nextDegree, 1 - 10 * NOTHING_LEFT);
    const [now, shapes] = [this.#now, this.#shapes];
    const only = this.#onlyTerm(state);
    const i =
      only === null
        ? stepReadings(this.#law, now, shapes, state, timeS, temperatureK, from, to, degreeEnd, watch, alphaOut)
        : stepOneTerm(only, now, shapes, state, timeS, temperatureK, from, to, degreeEnd, watch, alphaOut);
    this.#isAnchored = i === to;
    moveAlong(state, timeS, temperatureK, from, i, alphaOut, this.#validK);
    return i;
  }

  /** Starts anew from the law itself; false where its derivatives are not to be had. */
  #anchor(state: CureState): boolean {
    const only = this.#onlyTerm(state);
    const found = rateSlopes(this.#rate, state);
    if (found === null) return false;
    this.#now.set(only === null ? anchored(state, ...found) : oneTermAnchored(only, state));
    this.#shapes.forget();
    this.#isAnchored = true;
    return true;
  }

  /** The term of a branch that has but one, with nothing that holds it back. */
  #onlyTerm({ branch }: CureState): Term | null {
    const [first, second] = this.#law.branches[branch]!;
    return second === undefined && this.#law.held === 'nothing' ? first : null;
  }
}
