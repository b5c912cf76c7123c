import { describe, expect, it } from 'vitest';
import { DomainError } from '../../../models/errors.ts';
import { cholesky } from '../../../models/numerics/cholesky.ts';

describe('cholesky', () => {
  it('factors the textbook matrix', () => {
    // [[4, 12, −16], [12, 37, −43], [−16, −43, 98]] = L Lᵀ with L = [[2], [6, 1], [−8, 5, 3]]: textbook.
    const L = cholesky([
      [4, 12, -16],
      [12, 37, -43],
      [-16, -43, 98],
    ]);
    expect(L).toEqual([
      [2, 0, 0],
      [6, 1, 0],
      [-8, 5, 3],
    ]);
  });

  it('takes what is certain or bound to others', () => {
    expect(
      cholesky([
        [4, 2, 0],
        [2, 1, 0],
        [0, 0, 0],
      ]),
    ).toEqual([
      [2, 0, 0],
      [1, 0, 0],
      [0, 0, 0],
    ]);
  });

  it.each([
    ['negative', [[-1]]],
    [
      'not positive',
      [
        [1, 2],
        [2, 1],
      ],
    ],
    [
      'bound beyond its own spread',
      [
        [0, 1],
        [1, 4],
      ],
    ],
    [
      'not symmetric',
      [
        [1, 0.5],
        [0.4, 1],
      ],
    ],
    ['not square', [[1, 0]]],
    ['no numbers', [[Number.NaN]]],
  ])('refuses a matrix that is %s', (_, matrix) => {
    expect(() => cholesky(matrix)).toThrow(DomainError);
  });
});
