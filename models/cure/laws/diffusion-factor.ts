/** Steepness of the factor, and the line of degrees α_C(T) = alphaC0 + alphaCT T at which it is one half. */
export interface DiffusionLine {
  readonly C: number;
  readonly alphaC0: number;
  /** 1/K, with T in K. */
  readonly alphaCT: number;
}

/**
 * Fraction of the chemical rate that diffusion lets through.
 *
 * f = 1 / (1 + exp(C (α − α_C(T)))), α_C(T) = αC0 + αCT T.
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure.
 * @param line         C, αC0 without unit; αCT in 1/K.
 * @returns f in [0, 1]; falling in α.
 *
 * Accuracy: written so that the exponential never overflows: e^z with z ≤ 0 only; 1e-15 relative, down to 0.
 * Limits: the line was fitted at cure temperatures; at room temperature it often says that nothing reacts at all.
 * Source: Chern & Poehlein, Polym Eng Sci 27 (1987) 788–795; linear α_C(T): Johnston, PhD thesis, UBC 1997.
 */
export function diffusionFactor(temperatureK: number, alpha: number, line: DiffusionLine): number {
  const z = line.C * (alpha - (line.alphaC0 + line.alphaCT * temperatureK));
  if (z <= 0) return 1 / (1 + Math.exp(z));
  const small = Math.exp(-z);
  return small / (1 + small);
}
