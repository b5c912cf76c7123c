import { DomainError } from '../errors.ts';
import { cholesky } from '../numerics/cholesky.ts';
import { withParameters } from './parameters.ts';
import type { Resin } from './resin.ts';

/** A cure worked out with one source of uncertainty moved by its standard uncertainty. */
export interface CureTrial {
  readonly resin: Resin;
  /** Added to every temperature, K. */
  readonly offsetK: number;
}

/** One independent source, moved up and moved down. */
export type TrialPair = readonly [plus: CureTrial, minus: CureTrial];

/**
 * The trials whose differences are the uncertainty of a cure: the thermocouple as one offset, and the constants of the
 * kinetics moved together along the columns of the Cholesky factor of their covariance.
 *
 * @param temperatureUncertaintyK Expanded (k = 2), K; 0: not reckoned with.
 * @throws {DomainError} `option-out-of-range` for a negative uncertainty.
 *
 * Source: as `uncertaintyAlong`.
 */
export function cureTrials(resin: Resin, temperatureUncertaintyK: number): TrialPair[] {
  if (!(temperatureUncertaintyK >= 0)) {
    throw new DomainError('option-out-of-range', 'An uncertainty cannot be negative', { temperatureUncertaintyK });
  }
  const halfK = temperatureUncertaintyK / 2;
  const thermocouple: TrialPair[] =
    halfK > 0
      ? [
          [
            { resin, offsetK: halfK },
            { resin, offsetK: -halfK },
          ],
        ]
      : [];
  return [...thermocouple, ...movedResins(resin).map((pair): TrialPair => [trialOf(pair[0]), trialOf(pair[1])])];
}

/**
 * Expanded uncertainty (k = 2) of a figure from its values in the trials: half of each difference, added in squares.
 *
 * @returns In the figure's unit; null where a trial has no such figure.
 */
export function expandedUncertainty(pairs: readonly (readonly [number | null, number | null])[]): number | null {
  let sum = 0;
  for (const [above, below] of pairs) {
    if (above === null || below === null) return null;
    sum += ((above - below) / 2) ** 2;
  }
  return 2 * Math.sqrt(sum);
}

function trialOf(resin: Resin): CureTrial {
  return { resin, offsetK: 0 };
}

/** Kept by set, so that who follows a cure scan by scan finds the same resins again. */
const movedBySet = new WeakMap<Resin, [Resin, Resin][]>();

function movedResins(resin: Resin): [Resin, Resin][] {
  let moved = movedBySet.get(resin);
  if (moved === undefined) {
    moved = columnsOf(resin).map((column) => [movedAlong(resin, column, 1), movedAlong(resin, column, -1)]);
    movedBySet.set(resin, moved);
  }
  return moved;
}

/** Directions in which the constants move independently, each as moves by name for one standard uncertainty. */
function columnsOf({ covariance }: Resin): Map<string, number>[] {
  if (covariance === undefined) return [];
  const L = cholesky(covariance.matrix);
  return covariance.parameters
    .map((_, j) => new Map(covariance.parameters.map((name, i) => [name, L[i]![j]!])))
    .filter((column) => [...column.values()].some((move) => move !== 0));
}

function movedAlong(resin: Resin, column: ReadonlyMap<string, number>, sign: 1 | -1): Resin {
  const trial = withParameters(resin, new Map([...column].map(([name, move]) => [name, sign * move])));
  if (trial !== null) return trial;
  throw new DomainError('option-out-of-range', 'A covariance names a constant that the kinetics have not', {
    parameters: [...column.keys()].join(', '),
  });
}
