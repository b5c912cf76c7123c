import type { Laminate, Layer } from './layer.ts';

/** What fibre and resin bring to a laminate. */
export interface Constituents {
  readonly fibreDensityKgM3: number;
  readonly resinDensityKgM3: number;
  readonly fibreSpecificHeatJKgK: number;
  readonly resinSpecificHeatJKgK: number;
  /** Across the fibre. */
  readonly fibreConductivityWMK: number;
  readonly resinConductivityWMK: number;
  /** Fibre by volume, 0 to 1. */
  readonly fibreFraction: number;
}

/**
 * Conductivity of a unidirectional laminate across its fibres.
 *
 * k/k_r = 1 − 2 √(V/π) + (1/B) [π − (4/s) atan(s/(1 + B √(V/π)))], s = √(1 − B² V/π), B = 2 (k_r/k_f − 1).
 *
 * @param fibreConductivityWMK Of the fibre across its axis, W/(m K); > 0.
 * @param resinConductivityWMK W/(m K); > 0.
 * @param fibreFraction        V, 0 to π/4 (square packing).
 * @returns k in W/(m K).
 *
 * Accuracy: closed form; 0.646 W/(m K) for 26 and 0.167 W/(m K) at V = 0.6, test/models/cure/heat/mixture.test.ts.
 * Limits: round fibres in a square array, no voids; NaN where 1 − B² V/π < 0 (a very conductive fibre at V > π/4).
 * Source: Springer & Tsai, J Compos Mater 1 (1967) 166–173.
 */
export function transverseConductivityWMK(
  fibreConductivityWMK: number,
  resinConductivityWMK: number,
  fibreFraction: number,
): number {
  const root = Math.sqrt(fibreFraction / Math.PI);
  const B = 2 * (resinConductivityWMK / fibreConductivityWMK - 1);
  const s = Math.sqrt(1 - B * B * root * root);
  return resinConductivityWMK * (1 - 2 * root + (Math.PI - (4 / s) * Math.atan(s / (1 + B * root))) / B);
}

/** Density, specific heat and conductivity of a laminate by its constituents: by volume, by mass, and across the fibres. */
export function laminateOf(parts: Constituents): Laminate & Pick<Layer, 'specificHeatJKgK' | 'conductivityWMK'> {
  const { fibreFraction: V, resinDensityKgM3 } = parts;
  const fibreKgM3 = V * parts.fibreDensityKgM3;
  const resinKgM3 = (1 - V) * resinDensityKgM3;
  const densityKgM3 = fibreKgM3 + resinKgM3;
  return {
    densityKgM3,
    resinDensityKgM3,
    fibreFraction: V,
    specificHeatJKgK: (fibreKgM3 * parts.fibreSpecificHeatJKgK + resinKgM3 * parts.resinSpecificHeatJKgK) / densityKgM3,
    conductivityWMK: transverseConductivityWMK(parts.fibreConductivityWMK, parts.resinConductivityWMK, V),
  };
}
