import { glassTransitionK } from '../glass-transition.ts';
import type { GlassTransition } from '../resin.ts';
import type { Term } from './separable-law.ts';
import { expandShape, reachOf, type TermShape } from './term-shape.ts';

/** Natural logarithm by which diffusion may change the rate between a reference degree and the cure: half its square is left out. */
const OFF = 1e-3;
/** What is left out of the shapes is of one sign all along a cure, so they may change it by a thirteenth of that only. */
const SHAPES = 0.4;

/** The terms of a law about one degree: Taylor polynomials, how far they reach, and what holds throughout that reach. */
export class LocalShapes {
  /** Coefficients of the first term [0 … 4] and of the second [5 … 9] about `center`. */
  readonly taylor = new Float64Array(10);
  center = 0;
  /** Greatest degree within reach. */
  limit = Number.NEGATIVE_INFINITY;
  /** How far a degree may be moved by the first derivative of the rate alone. */
  near = 0;
  /** No degree within reach has a higher Tg, K. */
  limitTgK = 0;

  readonly #steepness: number;
  readonly #glassTransition: GlassTransition | null;

  constructor(steepness: number, glassTransition: GlassTransition | null) {
    this.#steepness = steepness;
    this.#glassTransition = glassTransition;
  }

  /** Renews the polynomials so that they reach from `alpha` onwards. */
  expand(first: Term, second: Term | undefined, alpha: number): void {
    const reach = Math.min(reachOf(first.shape, alpha), second === undefined ? 1 : reachOf(second.shape, alpha));
    this.center = alpha + reach;
    this.limit = alpha + 2 * reach;
    this.near = OFF / (this.#steepness + SHAPES / reach);
    this.#lookTo(this.limit);
    expandShape(first.shape, this.center, this.taylor, 0);
    if (second !== undefined) expandShape(second.shape, this.center, this.taylor, 5);
  }

  /**
   * The series of α in θ, dα/dθ = g(α), from a degree on: the greatest θ it may be used for, and c1 … c4.
   *
   * By differentiating dα/dθ = g three times: g g', g (g'² + g g''), g (g'³ + 4 g g' g'' + g² g''').
   */
  seriesInTheta(shape: TermShape, alpha: number): readonly [number, number, number, number, number] {
    const reach = reachOf(shape, alpha) / 2;
    this.#lookTo(alpha + reach);
    expandShape(shape, alpha, this.taylor, 0);
    const [g, g1, g2, g3] = [this.taylor[0]!, this.taylor[1]!, 2 * this.taylor[2]!, 6 * this.taylor[3]!];
    const fourth = g1 * g1 * g1 + 4 * g * g1 * g2 + g * g * g3;
    return [reach / g, g, (g * g1) / 2, (g * (g1 * g1 + g * g2)) / 6, (g * fourth) / 24];
  }

  /** Holds nothing: the next degree asked for is out of reach. */
  forget(): void {
    this.limit = Number.NEGATIVE_INFINITY;
  }

  isGlassy(alpha: number, temperatureK: number): boolean {
    return this.#glassTransition !== null && glassTransitionK(alpha, this.#glassTransition) >= temperatureK;
  }

  #lookTo(alpha: number): void {
    this.limitTgK = this.#glassTransition === null ? 0 : glassTransitionK(alpha, this.#glassTransition);
  }

  takeOver(other: LocalShapes): void {
    this.taylor.set(other.taylor);
    this.center = other.center;
    this.limit = other.limit;
    this.near = other.near;
    this.limitTgK = other.limitTgK;
  }
}
