import type { KamalSourour } from '../resin.ts';
import { arrhenius } from './arrhenius.ts';
import { unreacted } from './unreacted.ts';

/**
 * Rate of cure by the law of Kamal and Sourour.
 *
 * dα/dt = (k1 + k2 α^m)(1 − α)^n, k_i = A_i exp(−E_i/(R T)).
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in [0, 1].
 * @param set          A1, A2 in 1/s, E1, E2 in J/mol, m ≥ 0, n > 0.
 * @param gasConstant  R in J/(mol K).
 * @returns dα/dt in 1/s; ≥ 0, 0 at α = 1.
 *
 * Limits: no vitrification of its own: runs to α = 1 at any temperature unless a diffusion factor holds it back.
 * Source: Kamal & Sourour, Polym Eng Sci 13 (1973) 59–64; Sourour & Kamal, Thermochim Acta 14 (1976) 41–59.
 */
export function kamalSourourRate(temperatureK: number, alpha: number, set: KamalSourour, gasConstant: number): number {
  const k1 = arrhenius(set.A1, set.E1, temperatureK, gasConstant);
  const k2 = arrhenius(set.A2, set.E2, temperatureK, gasConstant);
  return (k1 + k2 * alpha ** set.m) * unreacted(alpha) ** set.n;
}
