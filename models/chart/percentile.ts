/**
 * Quantile of a sorted sample.
 *
 * Linear between order statistics, the k-th of n standing at (k − 1)/(n − 1).
 *
 * @param sorted Rising, without NaN.
 * @param share  0 to 1.
 * @returns Within the sample; NaN of an empty one.
 *
 * Source: Hyndman & Fan, Am Stat 50 (1996) 361–365, definition 7.
 */
export function percentile(sorted: readonly number[], share: number): number {
  if (sorted.length === 0) return Number.NaN;
  const place = share * (sorted.length - 1);
  const below = Math.floor(place);
  const above = Math.min(below + 1, sorted.length - 1);
  return sorted[below]! + (place - below) * (sorted[above]! - sorted[below]!);
}
