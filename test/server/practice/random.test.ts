import { describe, expect, it } from 'vitest';
import { beginRandom, seedFrom } from '../../../server/practice/simulator/random.ts';

const COUNT = 40_000;

function draws(count: number, draw: () => number): number[] {
  return Array.from({ length: count }, draw);
}

function moments(values: readonly number[]): { mean: number; variance: number } {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return { mean, variance: values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length };
}

describe('beginRandom', () => {
  it('gives the same stream from the same seed, and another from another', () => {
    const stream = (seed: number) => draws(50, beginRandom(seed).next);
    expect(stream(7)).toEqual(stream(7));
    expect(stream(7)).not.toEqual(stream(8));
  });

  it('is uniform in [0, 1)', () => {
    const values = draws(COUNT, beginRandom(1).next);
    expect(Math.min(...values.slice(0, 10_000))).toBeGreaterThanOrEqual(0);
    expect(values.every((value) => value < 1)).toBe(true);
    // Mean 1/2 and variance 1/12, each within five standard errors.
    const { mean, variance } = moments(values);
    expect(Math.abs(mean - 1 / 2)).toBeLessThan(5 * Math.sqrt(1 / 12 / COUNT));
    expect(Math.abs(variance - 1 / 12)).toBeLessThan(5 * Math.sqrt(1 / 180 / COUNT));
  });

  it('has normal deviates of mean 0 and variance 1, 95 % of them within 1.96', () => {
    const values = draws(COUNT, beginRandom(2).normal);
    const { mean, variance } = moments(values);
    expect(Math.abs(mean)).toBeLessThan(5 / Math.sqrt(COUNT));
    expect(Math.abs(variance - 1)).toBeLessThan(5 * Math.sqrt(2 / COUNT));
    const inside = values.filter((value) => Math.abs(value) < 1.959964).length / COUNT;
    expect(Math.abs(inside - 0.95)).toBeLessThan(5 * Math.sqrt((0.95 * 0.05) / COUNT));
  });
});

describe('seedFrom', () => {
  it('is FNV-1a of 32 bits', () => {
    // Test vectors of the FNV reference distribution (Fowler, Noll, Vo): "" , "a" and "foobar".
    expect(seedFrom('')).toBe(0x811c9dc5);
    expect(seedFrom('a')).toBe(0xe40c292c);
    expect(seedFrom('foobar')).toBe(0xbf9cf968);
  });
});
