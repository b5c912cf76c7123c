import type { NthOrder } from '../resin.ts';
import { arrhenius } from './arrhenius.ts';
import { unreacted } from './unreacted.ts';

/**
 * Rate of cure of an nth-order reaction.
 *
 * dα/dt = A exp(−E/(R T)) (1 − α)^n.
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in [0, 1].
 * @param set          A in 1/s, E in J/mol, n > 0.
 * @param gasConstant  R in J/(mol K).
 * @returns dα/dt in 1/s; ≥ 0, 0 at α = 1.
 *
 * Limits: no autocatalysis and no vitrification: runs to α = 1 at any temperature, for n < 1 in finite time
 *   1/((1 − n) k).
 * Source: textbook; e.g. Levenspiel, Chemical Reaction Engineering, 3rd ed., ch. 3.
 */
export function nthOrderRate(temperatureK: number, alpha: number, set: NthOrder, gasConstant: number): number {
  return arrhenius(set.A, set.E, temperatureK, gasConstant) * unreacted(alpha) ** set.n;
}
