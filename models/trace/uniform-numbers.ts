import { DomainError } from '../errors.ts';

/** Numbers in [0, 1), repeatable: the same seed gives the same row. */
export type UniformNumbers = () => number;

/**
 * Uniform numbers from a seed.
 *
 * xoshiro128** on four words, spread from the seed by the finalizer of MurmurHash3; the upper 32 bits of each number.
 *
 * @param seed Whole, 0 … 2³² − 1.
 * @throws {DomainError} `option-out-of-range` when the seed is none.
 *
 * Source: Blackman & Vigna, ACM Trans Math Softw 47 (2021) 36:1–32.
 */
export function uniformNumbers(seed: number): UniformNumbers {
  if (!Number.isInteger(seed) || seed < 0 || seed >= 2 ** 32) {
    throw new DomainError('option-out-of-range', 'A seed is a whole number from 0 below 2³²', { seed });
  }
  return fromState(spread(seed + 1), spread(seed + 2), spread(seed + 3), spread(seed + 4));
}

/** The generator from four words, not all zero. */
export function fromState(first: number, second: number, third: number, fourth: number): UniformNumbers {
  let [a, b, c, d] = [first | 0, second | 0, third | 0, fourth | 0];
  return () => {
    const word = Math.imul(turned(Math.imul(b, 5), 7), 9);
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = turned(d, 11);
    return (word >>> 0) / 2 ** 32;
  };
}

function turned(word: number, by: number): number {
  return (word << by) | (word >>> (32 - by));
}

function spread(word: number): number {
  let h = Math.imul(word ^ (word >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return h ^ (h >>> 16);
}
