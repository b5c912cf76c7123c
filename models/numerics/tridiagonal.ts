/**
 * Solves a tridiagonal system in place (Thomas algorithm).
 *
 * lower[i] x[i−1] + diagonal[i] x[i] + upper[i] x[i+1] = right[i].
 *
 * @param lower    [n]; the first is not used.
 * @param diagonal [n]; overwritten.
 * @param upper    [n]; the last is not used.
 * @param right    [n]; overwritten with the solution.
 *
 * Accuracy: no pivoting, so stable where the matrix is diagonally dominant, as those of heat conduction are;
 *   test/models/numerics/tridiagonal.test.ts.
 * Source: Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed., §9.5.
 */
export function solveTridiagonal(
  lower: Float64Array,
  diagonal: Float64Array,
  upper: Float64Array,
  right: Float64Array,
): void {
  const n = diagonal.length;
  for (let i = 1; i < n; i += 1) {
    const factor = lower[i]! / diagonal[i - 1]!;
    diagonal[i]! -= factor * upper[i - 1]!;
    right[i]! -= factor * right[i - 1]!;
  }
  right[n - 1]! /= diagonal[n - 1]!;
  for (let i = n - 2; i >= 0; i -= 1) right[i] = (right[i]! - upper[i]! * right[i + 1]!) / diagonal[i]!;
}
