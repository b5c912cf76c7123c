import { DomainError } from '../errors.ts';

/** Ultimate over limit load as most airworthiness codes ask it: common practice (14 CFR 25.303); the part's own document holds. */
export const USUAL_ULTIMATE_RATIO = 1.5;

/**
 * Ultimate load over limit load.
 *
 * @param limitKn     Limit load in kN; > 0.
 * @param ultimateKn  Ultimate load in kN; ≥ `limitKn`.
 * @returns dimensionless, ≥ 1.
 * @throws {DomainError} `option-out-of-range` when a load is not positive or the ultimate is below the limit.
 *
 * Source: 14 CFR 25.303, factor of safety (from memory).
 */
export function ultimateRatio(limitKn: number, ultimateKn: number): number {
  if (!(limitKn > 0) || !(ultimateKn >= limitKn)) {
    throw new DomainError(
      'option-out-of-range',
      `An ultimate load of ${ultimateKn} kN does not go with a limit load of ${limitKn} kN`,
      { limitKn, ultimateKn },
    );
  }
  return ultimateKn / limitKn;
}
