import { DomainError } from '../errors.ts';

/**
 * Lower triangular square root of a covariance matrix: L Lᵀ = C.
 *
 * Cholesky's factorization; a pivot that is zero to rounding gives a column of zeros, so a parameter that is certain, or
 * bound to others, may stand in the matrix.
 *
 * @param matrix Symmetric, [n][n].
 * @returns L, [n][n], zero above the diagonal.
 * @throws {DomainError} `option-out-of-range` where the matrix is not square, not symmetric to 1e-9 of its diagonal, or
 *   has a negative eigenvalue.
 *
 * Accuracy: backward stable; test/models/numerics/cholesky.test.ts.
 * Source: Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed., §10.1 and §10.3 (semidefinite matrices).
 */
export function cholesky(matrix: readonly (readonly number[])[]): number[][] {
  const n = matrix.length;
  refuseUnlessSymmetric(matrix);
  const L = matrix.map(() => new Array<number>(n).fill(0));
  for (let j = 0; j < n; j += 1) {
    let pivot = matrix[j]![j]!;
    for (let k = 0; k < j; k += 1) pivot -= L[j]![k]! ** 2;
    const rounding = 1e-12 * matrix[j]![j]!;
    if (pivot < -rounding) refuseNegative(j, pivot);
    const root = pivot > rounding ? Math.sqrt(pivot) : 0;
    L[j]![j] = root;
    for (let i = j + 1; i < n; i += 1) {
      let sum = matrix[i]![j]!;
      for (let k = 0; k < j; k += 1) sum -= L[i]![k]! * L[j]![k]!;
      if (root > 0) L[i]![j] = sum / root;
      else if (Math.abs(sum) > 1e-6 * Math.sqrt(matrix[i]![i]! * matrix[j]![j]!)) refuseNegative(j, pivot);
    }
  }
  return L;
}

function refuseUnlessSymmetric(matrix: readonly (readonly number[])[]): void {
  for (const [i, row] of matrix.entries()) {
    for (let j = 0; j < matrix.length; j += 1) {
      const scale = Math.sqrt(Math.abs(matrix[i]![i]! * matrix[j]![j]!));
      if (row.length === matrix.length && Math.abs(row[j]! - matrix[j]![i]!) <= 1e-9 * scale) continue;
      throw new DomainError('option-out-of-range', 'A covariance matrix must be square and symmetric', {
        row: i,
        column: j,
      });
    }
  }
}

function refuseNegative(row: number, pivot: number): never {
  throw new DomainError('option-out-of-range', 'A covariance matrix must have no negative eigenvalue', { row, pivot });
}
