import { cureAlong } from './cure-along.ts';
import type { Resin } from './resin.ts';

/** Time that material spent at one temperature. */
export interface AgeingSpan {
  readonly seconds: number;
  readonly temperatureK: number;
}

export interface AgedDegree {
  readonly degree: number;
  /** Time spent outside the resin's `validC`, s; all of it where the resin gives no range. */
  readonly outsideValidS: number;
  /**
   * `fit`: every span lies in the range the set was fitted in. `beyond-fit`: some do not, and the degree is an
   * extrapolation to be labelled as one; `equivalentSeconds` is the plainer rule.
   */
  readonly basis: 'fit' | 'beyond-fit';
}

/**
 * Degree of cure that material has aged to, by the same integrator as its cure.
 *
 * @param spans Times at constant temperature, in their order: out of the freezer, back, at lay-up …
 * @param resin A resin as `parseResin` returns it.
 * @param startDegree Degree before the first span; default: the resin's own.
 * @returns See {@link AgedDegree}.
 * @throws {DomainError} as `cureAlong`.
 *
 * Accuracy: 1e-9 in degree; test/models/cure/aged-degree.test.ts.
 * Limits: a diffusion line fitted at cure temperatures can say that nothing reacts at room temperature: published sets
 *   for one resin differ twentyfold in what 30 days at 21 °C do. That is what `basis` is for.
 */
export function agedDegree(spans: readonly AgeingSpan[], resin: Resin, startDegree = resin.initialDegree): AgedDegree {
  let degree = startDegree;
  let outsideValidS = 0;
  for (const { seconds, temperatureK } of spans) {
    if (seconds === 0) continue;
    const span = [Float64Array.of(0, seconds), Float64Array.of(temperatureK, temperatureK)] as const;
    const aged = cureAlong(...span, resin, { startDegree: degree, tolerance: 1e-10 });
    degree = aged.finalAlpha;
    outsideValidS += resin.validC === undefined ? seconds : aged.outsideValidS;
  }
  return { degree, outsideValidS, basis: outsideValidS > 0 ? 'beyond-fit' : 'fit' };
}

/**
 * Time at a reference temperature that ages a material as much as its spans did.
 *
 * t = Σ t_i exp(−E/R (1/T_i − 1/T_ref)): one Arrhenius rate for the life as a whole.
 *
 * @param spans      Times at constant temperature.
 * @param referenceK Temperature that the material's out-life is stated at, in K.
 * @param E          Activation energy of its ageing in J/mol, from its maker or from two stated lives.
 * @param gasConstant R in J/(mol K).
 * @returns Equivalent time in s, to be held against the out-life at `referenceK`.
 *
 * Limits: takes ageing to be one reaction; use it where no set is fit for ambient temperatures, and say so.
 * Source: Arrhenius, Z phys Chem 4 (1889) 226–248; equivalent time as in ASTM C1074 (maturity method), annex A1.
 */
export function equivalentSeconds(
  spans: readonly AgeingSpan[],
  referenceK: number,
  E: number,
  gasConstant = 8.314462618,
): number {
  return spans.reduce(
    (sum, { seconds, temperatureK }) =>
      sum + seconds * Math.exp((-E / gasConstant) * (1 / temperatureK - 1 / referenceK)),
    0,
  );
}

/** One sentence on what an aged degree rests on. */
export function wordsOfAgedDegree({ degree, basis }: AgedDegree, resin: Resin): string {
  const range = resin.validC === undefined ? 'no stated range' : `${resin.validC[0]} to ${resin.validC[1]} °C`;
  return basis === 'fit'
    ? `Aged to degree ${degree.toFixed(3)} by the set "${resin.code}", fitted from ${range}.`
    : `Aged to degree ${degree.toFixed(3)} by the set "${resin.code}", which was not fitted at these temperatures ` +
        `(${range}): an extrapolation.`;
}
