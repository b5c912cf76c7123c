import { DomainError } from '../../errors.ts';
import { solveTridiagonal } from '../../numerics/tridiagonal.ts';
import type { Stack } from './stack.ts';

/** γ = 1 − 1/√2 makes the method L-stable: what conduction should have evened out is gone after one step. */
const GAMMA = 1 - Math.SQRT1_2;

/** Steps that one set of slopes of the rate serves: the order does not depend on them, and they cost half the time. */
const STEPS_PER_RENEWAL = 4;

/** A face during a step: its film coefficient and the gas, or a prescribed temperature (`coefficient` Infinity). */
export interface FaceLine {
  /** W/(m² K); 0 is insulation, Infinity a prescribed temperature. */
  readonly coefficient: number;
  /** At the start of the step, K. */
  readonly startK: number;
  readonly slopeKPerS: number;
}

/**
 * Steps temperature and degree of cure of a stack by ROS2, the two-stage Rosenbrock method of order two.
 *
 * (I − γhJ) k1 = F(t, u) + γh ∂F/∂t, (I − γhJ) k2 = F(t + h, u + h k1) − 2 k1 − γh ∂F/∂t, u' = u + h (3 k1 + k2)/2.
 * Its order does not depend on the exactness of J. The degree at a node couples to the temperature of that node alone and
 * is eliminated there, so each stage is one tridiagonal system. h (k1 + k2)/2, the distance to the embedded first-order
 * value, is the error estimate.
 *
 * Accuracy: order 2 in h; test/models/cure/heat/heat-through.test.ts.
 * Source: Verwer, Spee, Blom & Hundsdorfer, SIAM J Sci Comput 20 (1999) 1456–1480.
 */
export class RosenbrockStep {
  /** Result of the last `take`: temperature in K and degree at each node, and the greatest error estimates. */
  readonly temperatureK: Float64Array;
  readonly alpha: Float64Array;
  errorK = 0;
  errorAlpha = 0;

  readonly #stack: Stack;
  readonly #rate: (temperatureK: number, alpha: number) => number;
  #stepsToRenewal = 0;
  readonly #work: Record<'r' | 'rT' | 'rA' | 'lower' | 'diagonal' | 'upper' | 'k1' | 'k2' | 'a1' | 'a2', Float64Array>;

  constructor(stack: Stack, rate: (temperatureK: number, alpha: number) => number) {
    const room = () => new Float64Array(stack.positionM.length);
    this.#stack = stack;
    this.#rate = rate;
    this.temperatureK = room();
    this.alpha = room();
    this.#work = {
      r: room(),
      rT: room(),
      rA: room(),
      lower: room(),
      diagonal: room(),
      upper: room(),
      k1: room(),
      k2: room(),
      a1: room(),
      a2: room(),
    };
  }

  /** Lets the next step find the slopes of the rate anew: to be called after a step that was not good enough. */
  renew(): void {
    this.#stepsToRenewal = 0;
  }

  /**
   * Takes a step of `h` seconds from the given temperatures and degrees; leaves those as they are.
   *
   * @throws {DomainError} `cure-stalls` where a node's rate is negative or no number.
   */
  take(temperatureK: Float64Array, alpha: Float64Array, h: number, first: FaceLine, last: FaceLine): void {
    const { r, rT, rA, k1, k2, a1, a2 } = this.#work;
    const n = temperatureK.length;
    const isFresh = this.#stepsToRenewal <= 0;
    this.#stepsToRenewal = isFresh ? STEPS_PER_RENEWAL - 1 : this.#stepsToRenewal - 1;
    for (let i = 0; i < n; i += 1) {
      if (this.#stack.reactionHeat[i] === 0) continue;
      const [t, a] = [temperatureK[i]!, alpha[i]!];
      const aside = 1e-5 * Math.min(1, Math.max(1 - a, 1e-6));
      r[i] = this.#rate(t, a);
      if (!(r[i]! >= 0)) refuseRate(r[i]!, t, a);
      if (!isFresh) continue;
      rT[i] = (this.#rate(t + 0.01, a) - r[i]!) / 0.01;
      rA[i] = (this.#rate(t, a + aside) - r[i]!) / aside;
    }
    this.#fluxes(temperatureK, 0, first, last, k1);
    this.#addReaction(r, k1);
    a1.set(r);
    this.#addFaceSlopes(h * GAMMA, first, last, k1);
    this.#solve(h, first, last, k1, a1, 1);

    for (let i = 0; i < n; i += 1) {
      this.temperatureK[i] = temperatureK[i]! + h * k1[i]!;
      this.alpha[i] = alpha[i]! + h * a1[i]!;
      r[i] = this.#stack.reactionHeat[i] === 0 ? 0 : this.#rate(this.temperatureK[i]!, this.alpha[i]!);
    }
    this.#fluxes(this.temperatureK, h, first, last, k2);
    this.#addReaction(r, k2);
    this.#addFaceSlopes(-h * GAMMA, first, last, k2);
    for (let i = 0; i < n; i += 1) {
      k2[i]! -= 2 * this.#stack.capacity[i]! * k1[i]!;
      a2[i] = r[i]! - 2 * a1[i]!;
    }
    this.#solve(h, first, last, k2, a2, -1);

    this.errorK = 0;
    this.errorAlpha = 0;
    for (let i = 0; i < n; i += 1) {
      this.temperatureK[i] = temperatureK[i]! + h * (1.5 * k1[i]! + 0.5 * k2[i]!);
      this.alpha[i] = alpha[i]! + h * (1.5 * a1[i]! + 0.5 * a2[i]!);
      this.errorK = Math.max(this.errorK, Math.abs(0.5 * h * (k1[i]! + k2[i]!)));
      this.errorAlpha = Math.max(this.errorAlpha, Math.abs(0.5 * h * (a1[i]! + a2[i]!)));
    }
    if (first.coefficient === Number.POSITIVE_INFINITY) this.temperatureK[0] = first.startK + first.slopeKPerS * h;
    if (last.coefficient === Number.POSITIVE_INFINITY) this.temperatureK[n - 1] = last.startK + last.slopeKPerS * h;
  }

  /** Heat flowing into each node, W/m². */
  #fluxes(temperatureK: Float64Array, elapsedS: number, first: FaceLine, last: FaceLine, into: Float64Array): void {
    const { conductance } = this.#stack;
    const n = temperatureK.length;
    into.fill(0);
    for (let i = 0; i < n - 1; i += 1) {
      const flow = conductance[i]! * (temperatureK[i + 1]! - temperatureK[i]!);
      into[i]! += flow;
      into[i + 1]! -= flow;
    }
    const gas = ({ startK, slopeKPerS }: FaceLine) => startK + slopeKPerS * elapsedS;
    if (Number.isFinite(first.coefficient)) into[0]! += first.coefficient * (gas(first) - temperatureK[0]!);
    if (Number.isFinite(last.coefficient)) into[n - 1]! += last.coefficient * (gas(last) - temperatureK[n - 1]!);
  }

  #addReaction(rate: Float64Array, into: Float64Array): void {
    const { reactionHeat } = this.#stack;
    for (let i = 0; i < into.length; i += 1) into[i]! += reactionHeat[i]! * rate[i]!;
  }

  #addFaceSlopes(factor: number, first: FaceLine, last: FaceLine, into: Float64Array): void {
    if (Number.isFinite(first.coefficient)) into[0]! += factor * first.coefficient * first.slopeKPerS;
    if (Number.isFinite(last.coefficient)) into[into.length - 1]! += factor * last.coefficient * last.slopeKPerS;
  }

  /**
   * Solves (I − γhJ) for a right-hand side of heat (in k, W/m²) and of reaction (in a, 1/s), in place. A prescribed
   * temperature changes by its slope in the first stage and takes it back in the second (`sign` −1).
   */
  #solve(h: number, first: FaceLine, last: FaceLine, k: Float64Array, a: Float64Array, sign: 1 | -1): void {
    const { rT, rA, lower, diagonal, upper } = this.#work;
    const { capacity, conductance, reactionHeat } = this.#stack;
    const n = k.length;
    const g = GAMMA * h;
    for (let i = 0; i < n; i += 1) {
      const before = i > 0 ? conductance[i - 1]! : Number.isFinite(first.coefficient) ? first.coefficient : 0;
      const after = i < n - 1 ? conductance[i]! : Number.isFinite(last.coefficient) ? last.coefficient : 0;
      const held = 1 - g * rA[i]!;
      lower[i] = i > 0 ? -g * before : 0;
      upper[i] = i < n - 1 ? -g * after : 0;
      diagonal[i] = capacity[i]! + g * (before + after) - (g * reactionHeat[i]! * rT[i]!) / held;
      k[i]! += (g * reactionHeat[i]! * rA[i]! * a[i]!) / held;
    }
    if (first.coefficient === Number.POSITIVE_INFINITY) prescribe(0, sign * first.slopeKPerS);
    if (last.coefficient === Number.POSITIVE_INFINITY) prescribe(n - 1, sign * last.slopeKPerS);
    solveTridiagonal(lower, diagonal, upper, k);
    for (let i = 0; i < n; i += 1) a[i] = (a[i]! + g * rT[i]! * k[i]!) / (1 - g * rA[i]!);

    function prescribe(node: number, slopeKPerS: number): void {
      lower[node] = 0;
      upper[node] = 0;
      diagonal[node] = 1;
      k[node] = slopeKPerS;
    }
  }
}

function refuseRate(ratePerS: number, temperatureK: number, degree: number): never {
  throw new DomainError(
    'cure-stalls',
    `The rate of cure is ${ratePerS.toPrecision(3)} 1/s at degree ${degree.toPrecision(6)} and ` +
      `${(temperatureK - 273.15).toFixed(2)} °C; a cure cannot go on from there`,
    { ratePerS, degree, temperatureC: temperatureK - 273.15 },
  );
}
