import type { LeeLoosSpringer } from '../resin.ts';
import { arrhenius } from './arrhenius.ts';
import { unreacted } from './unreacted.ts';

/**
 * Rate of cure by the first branch of Lee, Loos and Springer: up to and at the switch degree.
 *
 * dα/dt = (k1 + k2 α)(1 − α)(B − α), k_i = A_i exp(−E_i/(R T)); A2 is negative by design.
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in [0, switchDegree].
 * @param set          A_i in 1/s, E_i in J/mol, B above the switch degree.
 * @param gasConstant  R in J/(mol K).
 * @returns dα/dt in 1/s; negative where α > −k1/k2: the caller refuses that.
 *
 * Limits: k1 + k2 α = 0 at a degree that falls with the temperature; below about 280 K the set of the paper never
 *   reaches its switch.
 * Source: Lee, Loos & Springer, J Compos Mater 16 (1982) 510–520.
 */
export function leeLoosSpringerFirstRate(
  temperatureK: number,
  alpha: number,
  set: LeeLoosSpringer,
  gasConstant: number,
): number {
  const k1 = arrhenius(set.A1, set.E1, temperatureK, gasConstant);
  const k2 = arrhenius(set.A2, set.E2, temperatureK, gasConstant);
  return (k1 + k2 * alpha) * unreacted(alpha) * (set.B - alpha);
}

/**
 * Rate of cure by the second branch of Lee, Loos and Springer: above the switch degree.
 *
 * dα/dt = k3 (1 − α).
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in (switchDegree, 1].
 * @param set          A3 in 1/s, E3 in J/mol.
 * @param gasConstant  R in J/(mol K).
 * @returns dα/dt in 1/s; ≥ 0. It does not join the first branch: the rate jumps at the switch.
 *
 * Source: Lee, Loos & Springer, J Compos Mater 16 (1982) 510–520.
 */
export function leeLoosSpringerSecondRate(
  temperatureK: number,
  alpha: number,
  set: LeeLoosSpringer,
  gasConstant: number,
): number {
  return arrhenius(set.A3, set.E3, temperatureK, gasConstant) * unreacted(alpha);
}

/**
 * Degree at which the first branch of Lee, Loos and Springer stands still.
 *
 * α* = −k1/k2, where k1 + k2 α changes sign.
 *
 * @param temperatureK Absolute temperature in K.
 * @param set          As for {@link leeLoosSpringerFirstRate}.
 * @param gasConstant  R in J/(mol K).
 * @returns α*, where it lies at or below the switch degree; Infinity where the branch runs through to its switch.
 *
 * Source: from the law itself.
 */
export function leeLoosSpringerStallDegree(temperatureK: number, set: LeeLoosSpringer, gasConstant: number): number {
  const k1 = arrhenius(set.A1, set.E1, temperatureK, gasConstant);
  const k2 = arrhenius(set.A2, set.E2, temperatureK, gasConstant);
  return k2 < 0 && -k1 / k2 <= set.switchDegree ? -k1 / k2 : Number.POSITIVE_INFINITY;
}
