import type { CastroMacosko, Viscosity, ViscosityLeeLoosSpringer } from './resin.ts';

/** Viscosity by the law a resin's document names, Pa s; see the two laws below for where it ends. */
export function viscosityPaS(temperatureK: number, alpha: number, set: Viscosity, gasConstant: number): number {
  return set.law === 'castro-macosko'
    ? castroMacoskoPaS(temperatureK, alpha, set, gasConstant)
    : leeLoosSpringerPaS(temperatureK, alpha, set, gasConstant);
}

/**
 * Viscosity of a reacting resin by Castro and Macosko.
 *
 * μ = A exp(E/(R T)) [αg/(αg − α)]^(a + b α).
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in [0, 1].
 * @param set          A in Pa s, E in J/mol, αg, a and b.
 * @param gasConstant  R in J/(mol K).
 * @returns μ in Pa s; Infinity from αg on, where the resin has gelled and no longer flows.
 *
 * Accuracy: closed form, 1e-12 relative; test/models/cure/viscosity.test.ts.
 * Limits: a steady shear viscosity of the neat resin; close to gel the true resin is a solid before the law says so.
 * Source: Castro & Macosko, AIChE J 28 (1982) 250–260.
 */
export function castroMacoskoPaS(
  temperatureK: number,
  alpha: number,
  { A, E, gelDegree, a, b }: CastroMacosko,
  gasConstant: number,
): number {
  if (alpha >= gelDegree) return Number.POSITIVE_INFINITY;
  return A * Math.exp(E / (gasConstant * temperatureK)) * (gelDegree / (gelDegree - alpha)) ** (a + b * alpha);
}

/**
 * Viscosity of a reacting resin by Lee, Loos and Springer.
 *
 * μ = μ∞ exp(U/(R T) + K α).
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in [0, 1].
 * @param set          μ∞ in Pa s, U in J/mol, K, and the degree the fit was made up to.
 * @param gasConstant  R in J/(mol K).
 * @returns μ in Pa s; NaN beyond `validTo`, where the fit says nothing.
 *
 * Accuracy: closed form, 1e-12 relative; test/models/cure/viscosity.test.ts.
 * Limits: knows no gel; the sets in use were fitted up to α = 0.5.
 * Source: Lee, Loos & Springer, J Compos Mater 16 (1982) 510–520.
 */
export function leeLoosSpringerPaS(
  temperatureK: number,
  alpha: number,
  { muInf, U, K, validTo }: ViscosityLeeLoosSpringer,
  gasConstant: number,
): number {
  return alpha > validTo ? Number.NaN : muInf * Math.exp(U / (gasConstant * temperatureK) + K * alpha);
}
