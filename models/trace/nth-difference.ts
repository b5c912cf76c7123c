/**
 * The n-th smallest of all differences x − y, without forming them all.
 *
 * Selection in x + y: of the differences that can still be it, those of one x are a stretch of y; the weighted median of
 * the middles of the stretches is tried, and at least a quarter of what is left goes with each trial.
 *
 * @param x Rising finite numbers.
 * @param y Rising finite numbers.
 * @param n From 1 to x.length · y.length.
 * @returns One of the differences, exactly.
 *
 * Accuracy: exact; test/models/trace/hodges-lehmann.test.ts by forming all differences.
 * Source: Johnson & Mizoguchi, SIAM J Comput 7 (1978) 147–153.
 */
export function nthDifference(x: Float64Array, y: Float64Array, n: number): number {
  let [below, above] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  for (;;) {
    const pivot = middleBetween(x, y, below, above);
    if (count(x, y, pivot, false) >= n) above = pivot;
    else if (count(x, y, pivot, true) < n) below = pivot;
    else return pivot;
  }
}

/** A difference from amid those above `below` and under `above`. */
function middleBetween(x: Float64Array, y: Float64Array, below: number, above: number): number {
  const middles: { difference: number; weight: number }[] = [];
  let [start, end, total] = [0, 0, 0];
  for (const value of x) {
    while (start < y.length && value - y[start]! >= above) start += 1;
    while (end < y.length && value - y[end]! > below) end += 1;
    if (end === start) continue;
    middles.push({ difference: value - y[(start + end) >> 1]!, weight: end - start });
    total += end - start;
  }
  middles.sort((a, b) => a.difference - b.difference);
  let passed = 0;
  for (const { difference, weight } of middles) {
    passed += weight;
    if (2 * passed >= total) return difference;
  }
  throw new RangeError('No difference is left between the bounds');
}

/** Differences under a value, or at most it. */
function count(x: Float64Array, y: Float64Array, bound: number, isIncluded: boolean): number {
  let [sum, start] = [0, 0];
  for (const value of x) {
    while (start < y.length && (isIncluded ? value - y[start]! > bound : value - y[start]! >= bound)) start += 1;
    sum += y.length - start;
  }
  return sum;
}
