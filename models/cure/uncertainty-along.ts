import { DomainError } from '../errors.ts';
import { cholesky } from '../numerics/cholesky.ts';
import { type CureHistory, cureAlong } from './cure-along.ts';
import { withParameters } from './parameters.ts';
import type { Resin } from './resin.ts';

/** A figure with its expanded uncertainty (k = 2), both in the unit of the figure. */
export interface WithUncertainty {
  readonly value: number;
  /** Null where it cannot be told: the figure exists on one side of the interval only. */
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
  if (!(temperatureUncertaintyK >= 0)) {
    throw new DomainError('option-out-of-range', 'An uncertainty cannot be negative', { temperatureUncertaintyK });
  }
  const options = startDegree === undefined ? {} : { startDegree };
  const cured = (trial: Resin, offsetK = 0) =>
    cureAlong(timeS, offsetK === 0 ? temperatureK : temperatureK.map((k) => k + offsetK), trial, options);
  const shares: [CureHistory, CureHistory][] = [];
  if (temperatureUncertaintyK > 0) {
    shares.push([cured(resin, temperatureUncertaintyK / 2), cured(resin, -temperatureUncertaintyK / 2)]);
  }
  for (const column of columnsOf(resin)) shares.push([cured(moved(resin, column, 1)), cured(moved(resin, column, -1))]);

  const whole = cured(resin);
  const spread = (figure: (history: CureHistory) => number | null): WithUncertainty | null => {
    const value = figure(whole);
    if (value === null) return null;
    let sum = 0;
    for (const [plus, minus] of shares) {
      const [above, below] = [figure(plus), figure(minus)];
      if (above === null || below === null) return { value, expanded: null };
      sum += ((above - below) / 2) ** 2;
    }
    return { value, expanded: 2 * Math.sqrt(sum) };
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

/** Directions in which the constants move independently, each as moves by name for one standard uncertainty. */
function columnsOf({ covariance }: Resin): Map<string, number>[] {
  if (covariance === undefined) return [];
  const L = cholesky(covariance.matrix);
  return covariance.parameters
    .map((_, j) => new Map(covariance.parameters.map((name, i) => [name, L[i]![j]!])))
    .filter((column) => [...column.values()].some((move) => move !== 0));
}

function moved(resin: Resin, column: ReadonlyMap<string, number>, sign: 1 | -1): Resin {
  const trial = withParameters(resin, new Map([...column].map(([name, move]) => [name, sign * move])));
  if (trial !== null) return trial;
  throw new DomainError('option-out-of-range', 'A covariance names a constant that the kinetics have not', {
    parameters: [...column.keys()].join(', '),
  });
}
