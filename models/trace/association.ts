/**
 * How closely two rows of scores move together: Pearson's correlation over the parts on record in both.
 *
 * With both rows 0 and 1 (a level, or not) this is φ, Cramér's V of the 2×2 table; with both rows midranks it is
 * Spearman's ρ; with one of each it is the correlation ratio η of the ranks over the two groups.
 *
 * @param a Scores, whole numbers for exact sums; NaN where nothing is on record.
 * @param b Scores of the same parts.
 * @returns In [−1, 1]; 0 where either is the same over all parts on record in both.
 *
 * Limits: midranks are those of all parts on record in one row, not re-ranked over the common ones.
 * Source: Cramér, Mathematical Methods of Statistics (1946), §21.9; Spearman, Am J Psychol 15 (1904) 72–101; Pearson,
 *   Proc R Soc 71 (1903) 303 (η).
 */
export function association(a: Float64Array, b: Float64Array): number {
  // Scores are whole numbers (ranks, 0 and 1): the sums are exact.
  let [n, sumA, sumB, ab, aa, bb] = [0, 0, 0, 0, 0, 0];
  for (let i = 0; i < a.length; i += 1) {
    const [x, y] = [a[i]!, b[i]!];
    if (Number.isNaN(x + y)) continue;
    n += 1;
    sumA += x;
    sumB += y;
    ab += x * y;
    aa += x * x;
    bb += y * y;
  }
  const [varyA, varyB] = [n * aa - sumA * sumA, n * bb - sumB * sumB];
  if (!(varyA > 0 && varyB > 0)) return 0;
  return Math.max(-1, Math.min(1, (n * ab - sumA * sumB) / Math.sqrt(varyA * varyB)));
}

/**
 * How much of a row of scores the classes of something else account for: Kelley's ε, the correlation ratio without its bias.
 *
 * ε² = 1 − (1 − η²)(n − 1)/(n − k) with k classes of n parts, 0 where that is negative; η² is what lies between the means of
 * the classes. Without the correction many classes of few parts would seem to account for anything.
 *
 * @param score   Scores; NaN where nothing is on record.
 * @param classes Class of each of the same parts, from 0; −1 where nothing is on record.
 * @returns In [0, 1]; 0 where the scores do not vary or every part is a class of its own.
 *
 * Source: Kelley, Proc Natl Acad Sci 21 (1935) 554–559. With scores 0 and 1 η is Cramér's V of the 2 × k table.
 */
export function accountedFor(score: Float64Array, classes: Int32Array): number {
  let size = 0;
  for (const each of classes) size = Math.max(size, each + 1);
  const [sums, counts] = [new Float64Array(size), new Int32Array(size)];
  let [n, sum, squares, k] = [0, 0, 0, 0];
  for (let i = 0; i < score.length; i += 1) {
    const [of, value] = [classes[i]!, score[i]!];
    if (of < 0 || Number.isNaN(value)) continue;
    if (counts[of] === 0) k += 1;
    sums[of]! += value;
    counts[of]! += 1;
    n += 1;
    sum += value;
    squares += value * value;
  }
  let between = 0;
  for (let of = 0; of < size; of += 1) if (counts[of]! > 0) between += sums[of]! ** 2 / counts[of]!;
  const all = squares - (sum * sum) / n;
  if (!(all > 0) || k >= n) return 0;
  return Math.sqrt(Math.max(0, 1 - (((squares - between) / all) * (n - 1)) / (n - k)));
}
