import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { normalQuantile } from '../../../models/trace/normal-quantile.ts';
import { riskDifference } from '../../../models/trace/risk-difference.ts';
import { readTraceReference } from '../../reference/trace/read-trace-reference.ts';
import { expectWithin } from './agree.ts';

describe('riskDifference', () => {
  it.each([
    // Newcombe, Statistics in Medicine 17 (1998) 873–890, table II, method 10; from memory.
    [56, 70, 48, 80, 0.0524, 0.3339],
    [9, 10, 3, 10, 0.1705, 0.809],
    [6, 7, 2, 7, 0.0582, 0.8062],
    [5, 56, 0, 29, -0.0381, 0.1926],
    [0, 10, 0, 20, -0.1611, 0.2775],
    [0, 10, 0, 10, -0.2775, 0.2775],
    [10, 10, 0, 20, 0.6791, 1],
    [10, 10, 0, 10, 0.6075, 1],
  ])('gives the limits of %i/%i − %i/%i', (a, m, b, n, low, high) => {
    const { estimate, interval } = riskDifference({ having: a, of: m }, { having: b, of: n });
    expect(estimate).toBeCloseTo(a / m - b / n, 15);
    expect(interval.low).toBeCloseTo(low, 4);
    expect(interval.high).toBeCloseTo(high, 4);
  });

  it('refuses counts and confidences that are none', () => {
    expect(() => riskDifference({ having: 3, of: 2 }, { having: 0, of: 1 })).toThrow(DomainError);
    expect(() => riskDifference({ having: 0, of: 0 }, { having: 0, of: 1 })).toThrow(DomainError);
    expect(() => riskDifference({ having: 0, of: 1 }, { having: 0, of: 1 }, 0)).toThrow(DomainError);
  });
});

describe('normalQuantile', () => {
  it('gives the quantiles printed with the algorithm', () => {
    // Wichura, Applied Statistics 37 (1988) 477–484: test values for 0.25, 0.001 and 1e-20.
    expectWithin(1e-15, normalQuantile(0.25), -0.6744897501960817);
    expectWithin(1e-15, normalQuantile(0.001), -3.090232306167814);
    expectWithin(1e-15, normalQuantile(1e-20), -9.262340089798409);
  });

  it('agrees with SciPy', () => {
    for (const [p, z] of readTraceReference<{ rows: [number, number][] }>('normal-quantile.json').rows) {
      expect(Math.abs(normalQuantile(p) - z)).toBeLessThanOrEqual(2e-15 * Math.max(1, Math.abs(z)));
    }
  });

  it('refuses what is no probability', () => {
    for (const p of [0, 1, Number.NaN]) expect(() => normalQuantile(p)).toThrow(DomainError);
  });
});
