import type { TwoTerm } from '../resin.ts';
import { arrhenius } from './arrhenius.ts';
import { diffusionFactor } from './diffusion-factor.ts';
import { unreacted } from './unreacted.ts';

/**
 * Rate of cure by two autocatalytic terms, the second limited by diffusion.
 *
 * dα/dt = k1 α^m1 (1 − α)^n1 + k2 α^m2 (1 − α)^n2 / (1 + exp(D (α − (αC0 + αCT T)))), k_i = A_i exp(−E_i/(R T)).
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in (0, 1].
 * @param set          A_i in 1/s, E_i in J/mol, m_i ≥ 0, n_i > 0, D and αC0 without unit, αCT in 1/K.
 * @param gasConstant  R in J/(mol K).
 * @returns dα/dt in 1/s; ≥ 0, 0 at α = 1 and, for m1, m2 > 0, at α = 0.
 *
 * Limits: the first term is not limited; fitted for out-of-autoclave resins between about 60 and 180 °C.
 * Source: Kratz, Hsiao, Fernlund & Hubert, J Compos Mater 47 (2013) 341–352.
 */
export function twoTermRate(temperatureK: number, alpha: number, set: TwoTerm, gasConstant: number): number {
  const left = unreacted(alpha);
  const first = arrhenius(set.A1, set.E1, temperatureK, gasConstant) * alpha ** set.m1 * left ** set.n1;
  const second = arrhenius(set.A2, set.E2, temperatureK, gasConstant) * alpha ** set.m2 * left ** set.n2;
  return (
    first + second * diffusionFactor(temperatureK, alpha, { C: set.D, alphaC0: set.alphaC0, alphaCT: set.alphaCT })
  );
}
