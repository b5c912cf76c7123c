/**
 * Rate constant at a temperature.
 *
 * k = A exp(−E / (R T)).
 *
 * @param A            Pre-exponential factor in 1/s; negative only in the second constant of Lee, Loos & Springer.
 * @param E            Activation energy in J/mol.
 * @param temperatureK Absolute temperature in K; > 0.
 * @param gasConstant  R in J/(mol K) as the study used it.
 * @returns k in 1/s.
 *
 * Limits: an empirical line through the range of the fit; nothing is promised outside it.
 * Source: Arrhenius, Z phys Chem 4 (1889) 226–248.
 */
export function arrhenius(A: number, E: number, temperatureK: number, gasConstant: number): number {
  return A * Math.exp(-E / (gasConstant * temperatureK));
}
