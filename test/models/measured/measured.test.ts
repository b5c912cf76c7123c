import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { measuredDegree } from '../../../models/measured/measured-degree.ts';
import { strainDifference } from '../../../models/measured/strain-difference.ts';
import { ultimateRatio } from '../../../models/measured/ultimate-ratio.ts';

describe('measuredDegree', () => {
  it('is the share of the heat that was given off in the cure', () => {
    // By hand: 1 − 23.3/466 = 0.95.
    expect(measuredDegree(23.3, 466)).toBeCloseTo(0.95, 12);
    expect([measuredDegree(0, 466), measuredDegree(466, 466)]).toEqual([1, 0]);
  });

  it('falls as the residual rises, and does not depend on the unit of heat', () => {
    const heats = fc.tuple(fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 1, max: 900, noNaN: true }));
    fc.assert(
      fc.property(heats, ([share, total]) => {
        const degree = measuredDegree(share * total, total);
        expect(degree).toBeGreaterThanOrEqual(0);
        expect(degree).toBeLessThanOrEqual(1);
        expect(measuredDegree(4.184 * share * total, 4.184 * total)).toBeCloseTo(degree, 9);
      }),
    );
  });

  it('refuses what no scan can show', () => {
    for (const [residual, total] of [
      [467, 466],
      [-1, 466],
      [0, 0],
      [Number.NaN, 466],
    ] as const) {
      expect(() => measuredDegree(residual, total)).toThrow('gives no degree of cure');
    }
  });
});

describe('ultimateRatio', () => {
  it('is 1.5 for 9.0 kN over 6.0 kN, as 14 CFR 25.303 asks', () => {
    expect(ultimateRatio(6, 9)).toBe(1.5);
    expect(() => ultimateRatio(9, 6)).toThrow('does not go with');
    expect(() => ultimateRatio(0, 6)).toThrow('does not go with');
  });
});

describe('strainDifference', () => {
  it('is told of the mean, whichever is said first, in tension as in compression', () => {
    // By hand: |2050 − 1950| / 2000 = 0.05.
    expect(strainDifference(2050, 1950)).toBeCloseTo(0.05, 12);
    expect(strainDifference(-1950, -2050)).toBeCloseTo(0.05, 12);
    expect(() => strainDifference(100, -100)).toThrow('no mean');
  });
});
