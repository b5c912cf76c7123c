import { DomainError } from '../errors.ts';

/**
 * Degree of cure from the heat a scanning calorimeter still found in a cured specimen.
 *
 * α = 1 − ΔH_residual / ΔH_total, both per mass of the same specimen (resin or prepreg, but the same of both).
 *
 * @param residualJG  Heat of the residual exotherm in J/g; ≥ 0.
 * @param totalJG     Heat of the uncured material in J/g; > 0.
 * @returns dimensionless, in [0, 1].
 * @throws {DomainError} `option-out-of-range` when `totalJG` ≤ 0, `residualJG` < 0 or `residualJG` > `totalJG`.
 *
 * Accuracy: exact; that of the two heats is not known here.
 * Limits: a residual greater than the total is a mistake of the scan or of the baseline: refused.
 * Source: ISO 11357-5, Differential scanning calorimetry, determination of the degree of conversion (from memory).
 */
export function measuredDegree(residualJG: number, totalJG: number): number {
  if (!(totalJG > 0) || !(residualJG >= 0) || residualJG > totalJG) {
    throw new DomainError(
      'option-out-of-range',
      `A residual of ${residualJG} J/g of ${totalJG} J/g gives no degree of cure; expected 0 to the total`,
      { residualJG, totalJG },
    );
  }
  return 1 - residualJG / totalJG;
}
