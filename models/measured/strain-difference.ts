import { DomainError } from '../errors.ts';

/**
 * How far two independent strain readings of one place differ, of their mean.
 *
 * |ε₁ − ε₂| / |(ε₁ + ε₂) / 2|.
 *
 * @param first   in µm/m.
 * @param second  in µm/m.
 * @returns dimensionless, ≥ 0.
 * @throws {DomainError} `option-out-of-range` when a reading is not finite or the mean is 0.
 *
 * Limits: nothing can be said of a mean of 0; it refuses.
 * Source: definition. Of two gauges back to back it is twice the percent bending of ASTM D3039, 11.6 (from memory).
 */
export function strainDifference(first: number, second: number): number {
  const mean = (first + second) / 2;
  if (!Number.isFinite(mean) || mean === 0) {
    throw new DomainError(
      'option-out-of-range',
      `Readings of ${first} and ${second} µm/m have no mean to compare with`,
      {
        first,
        second,
      },
    );
  }
  return Math.abs(first - second) / Math.abs(mean);
}
