import type { Autocatalytic } from '../resin.ts';
import { arrhenius } from './arrhenius.ts';
import { unreacted } from './unreacted.ts';

/**
 * Rate of cure of an autocatalytic reaction (truncated Šesták–Berggren law).
 *
 * dα/dt = A exp(−E/(R T)) α^m (1 − α)^n.
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in (0, 1].
 * @param set          A in 1/s, E in J/mol, m ≥ 0, n > 0.
 * @param gasConstant  R in J/(mol K).
 * @returns dα/dt in 1/s; ≥ 0, 0 at α = 1 and, for m > 0, at α = 0.
 *
 * Limits: at α = 0 nothing ever starts, so the start degree is part of the set and must be above 0.
 * Source: Šesták & Berggren, Thermochim Acta 3 (1971) 1–12.
 */
export function autocatalyticRate(
  temperatureK: number,
  alpha: number,
  set: Autocatalytic,
  gasConstant: number,
): number {
  return arrhenius(set.A, set.E, temperatureK, gasConstant) * alpha ** set.m * unreacted(alpha) ** set.n;
}
