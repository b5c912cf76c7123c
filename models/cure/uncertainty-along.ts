import { DomainError } from '../errors.ts';
import { type CureHistory, cureAlong } from './cure-along.ts';
import { type CureTrial, cureTrials, expandedUncertainty } from './cure-trials.ts';
import type { Resin } from './resin.ts';

/** A figure with its expanded uncertainty (k = 2), both in the unit of the figure. */
export interface WithUncertainty {
  readonly value: number;
  /** Null where it cannot be told: on one side of the interval the figure does not exist, or the set cannot go on. */
  readonly expanded: number | null;
}

export interface CureUncertainty {
  readonly degree: WithUncertainty;
  /** K; null where the resin gives no Tg. */
  readonly tgK: WithUncertainty | null;
  /** s, on the clock of the scans; null where there is no gel. */
  readonly gelS: WithUncertainty | null;
  /** What was reckoned with. */
  readonly reckonedWith: readonly ('temperature' | 'kinetics')[];
}

export interface UncertaintyOptions {
  /** Expanded uncertainty (k = 2) of the thermocouple in K, taken as one offset for the whole run; default 0. */
  temperatureUncertaintyK?: number;
  /** Default: the resin's `initialDegree`. */
  startDegree?: number;
}

/**
 * Degree, Tg and gel time at the end of a history, with the uncertainty that the thermocouple and the fit bring in.
 *
 * Law of propagation: for each independent source, the cure is worked out with it moved by plus and by minus its standard
 * uncertainty, and half the difference is that source's share; the shares add in squares; times 2. Correlated constants
 * are moved together along the columns of the Cholesky factor of their covariance.
 *
 * @param timeS        As `cureAlong`.
 * @param temperatureK As `cureAlong`.
 * @param resin        As `cureAlong`; its `covariance` is reckoned with where it has one.
 * @param options      See {@link UncertaintyOptions}.
 * @returns See {@link CureUncertainty}.
 * @throws {DomainError} as `cureAlong`; `option-out-of-range` for a negative uncertainty.
 *
 * Accuracy: within 5 % of the standard deviation of 4000 random trials for uncertainties as they occur;
 *   test/models/cure/uncertainty-along.test.ts.
 * Limits: symmetric and near-linear effects; what the model leaves out (resin batch, exotherm, where the thermocouple
 *   sits) is not in it. The offset of a thermocouple is taken as constant; noise of single readings averages out.
 * Source: JCGM 100:2008, §5.1.2 and §5.2.2 (propagation, also by finite differences: §5.1.3 note 2).
 */
export function uncertaintyAlong(
  timeS: Float64Array,
  temperatureK: Float64Array,
  resin: Resin,
  { temperatureUncertaintyK = 0, startDegree }: UncertaintyOptions = {},
): CureUncertainty {
  const options = startDegree === undefined ? {} : { startDegree };
  const pairs = cureTrials(resin, temperatureUncertaintyK).map(
    ([plus, minus]) => [tried(timeS, temperatureK, plus, options), tried(timeS, temperatureK, minus, options)] as const,
  );
  const whole = cureAlong(timeS, temperatureK, resin, options);
  const spread = (figure: (history: CureHistory) => number | null): WithUncertainty | null => {
    const value = figure(whole);
    if (value === null) return null;
    const of = (history: CureHistory | null) => (history === null ? null : figure(history));
    return { value, expanded: expandedUncertainty(pairs.map(([plus, minus]) => [of(plus), of(minus)])) };
  };
  return {
    degree: spread(({ finalAlpha }) => finalAlpha)!,
    tgK: spread(({ finalTgK }) => finalTgK),
    gelS: spread(({ gelS }) => gelS),
    reckonedWith: [
      ...(temperatureUncertaintyK > 0 ? (['temperature'] as const) : []),
      ...(resin.covariance === undefined ? [] : (['kinetics'] as const)),
    ],
  };
}

/** Null where the moved set stalls or cannot be integrated although the set itself can. */
function tried(
  timeS: Float64Array,
  temperatureK: Float64Array,
  { resin, offsetK }: CureTrial,
  options: { readonly startDegree?: number },
): CureHistory | null {
  try {
    return cureAlong(timeS, offsetK === 0 ? temperatureK : temperatureK.map((k) => k + offsetK), resin, options);
  } catch (error) {
    if (error instanceof DomainError && (error.code === 'cure-stalls' || error.code === 'cure-out-of-bounds')) {
      return null;
    }
    throw error;
  }
}
