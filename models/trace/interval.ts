import { DomainError } from '../errors.ts';

/** An interval with its confidence; null is a side without a bound. */
export interface Interval {
  readonly low: number | null;
  readonly high: number | null;
  readonly confidence: number;
}

/** @throws {DomainError} `option-out-of-range` when the confidence is not within (0, 1). */
export function refuseConfidence(confidence: number): void {
  if (confidence > 0 && confidence < 1) return;
  throw new DomainError('option-out-of-range', 'A confidence lies between 0 and 1', { confidence });
}
