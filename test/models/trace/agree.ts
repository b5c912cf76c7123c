import { expect } from 'vitest';

/** Two figures agree to a relative tolerance. */
export function expectWithin(relative: number, found: number | null, reference: number | null): void {
  if (reference === null || found === null) {
    expect(found).toBe(reference);
    return;
  }
  expect(Math.abs(found - reference), `${found} against ${reference}`).toBeLessThanOrEqual(
    relative * Math.abs(reference) + Number.MIN_VALUE,
  );
}
