import { DomainError } from '../errors.ts';
import { type Interval, refuseConfidence } from './interval.ts';
import { normalQuantile } from './normal-quantile.ts';

/** Difference of two proportions with its interval. */
export interface RiskDifference {
  readonly estimate: number;
  readonly interval: Interval;
}

/**
 * Difference of two independent proportions, a/m − b/n, with Newcombe's hybrid score interval (his method 10).
 *
 * With Wilson's limits l₁, u₁ of a/m and l₂, u₂ of b/n the limits are d − √((p₁ − l₁)² + (u₂ − p₂)²) and
 * d + √((u₁ − p₁)² + (p₂ − l₂)²), without correction for continuity.
 *
 * @param first      `of` counted parts, of which `having` do: whole, 0 ≤ having ≤ of, of ≥ 1.
 * @param second     The same of the other parts.
 * @param confidence In (0, 1); default 0.95.
 * @returns Estimate and limits, within [−1, 1].
 * @throws {DomainError} `option-out-of-range` when a count or the confidence is out of its range.
 *
 * Accuracy: closed form; the table of the paper to its four digits, test/models/trace/risk-difference.test.ts.
 * Limits: approximate coverage, near the confidence on average rather than at least it.
 * Source: Newcombe, Statistics in Medicine 17 (1998) 873–890, method 10; Wilson, JASA 22 (1927) 209–212.
 */
export function riskDifference(
  first: { readonly having: number; readonly of: number },
  second: { readonly having: number; readonly of: number },
  confidence = 0.95,
): RiskDifference {
  refuseConfidence(confidence);
  const z = normalQuantile((1 + confidence) / 2);
  const [p1, low1, high1] = wilson(first.having, first.of, z);
  const [p2, low2, high2] = wilson(second.having, second.of, z);
  const estimate = p1 - p2;
  return {
    estimate,
    interval: {
      low: estimate - Math.hypot(p1 - low1, high2 - p2),
      high: estimate + Math.hypot(high1 - p1, p2 - low2),
      confidence,
    },
  };
}

/** Proportion and Wilson's limits. */
function wilson(having: number, of: number, z: number): [number, number, number] {
  if (!(Number.isInteger(having) && Number.isInteger(of) && having >= 0 && having <= of && of >= 1)) {
    throw new DomainError('option-out-of-range', 'A proportion needs whole counts, some of one or more', {
      having,
      of,
    });
  }
  const p = having / of;
  const middle = p + (z * z) / (2 * of);
  const reach = z * Math.sqrt((p * (1 - p)) / of + (z * z) / (4 * of * of));
  const scale = 1 + (z * z) / of;
  // At 0 and at all the score limit is the proportion itself; rounding must not cross it.
  return [p, having === 0 ? 0 : (middle - reach) / scale, having === of ? 1 : (middle + reach) / scale];
}
