import type { CureRate } from '../cure-rate.ts';
import type { CureState } from '../cure-state.ts';

/** Rate in 1/s, and its derivatives by T and α by central differences (1e-7 relative); null at α = 0 and α = 1. */
export function rateSlopes(law: CureRate, state: CureState): readonly [number, number, number] | null {
  const { branch, alpha, temperatureK } = state;
  const aside = 1e-4 * Math.min(alpha, 1 - alpha);
  if (!(aside > 0)) return null;
  const rate = (t: number, a: number) => law.rate(branch, t, a);
  const byT = (rate(temperatureK + 0.01, alpha) - rate(temperatureK - 0.01, alpha)) / 0.02;
  const byAlpha = (rate(temperatureK, alpha + aside) - rate(temperatureK, alpha - aside)) / (2 * aside);
  return [rate(temperatureK, alpha), byT, byAlpha];
}
