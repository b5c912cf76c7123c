import { DomainError } from '../../errors.ts';
import type { Resin } from '../resin.ts';

/** One layer of a part on its tool, as a slab of even properties. */
export interface Layer {
  readonly thicknessM: number;
  readonly densityKgM3: number;
  readonly specificHeatJKgK: number;
  /** Across the thickness. */
  readonly conductivityWMK: number;
  /** Heat that a m³ of the layer gives off from α = 0 to 1, in J/m³; 0 where nothing reacts. See `reactionHeatJM3`. */
  readonly reactionHeatJM3: number;
  /** Intervals that the layer is cut into. */
  readonly intervals: number;
}

/** What the face of a stack meets, along the times of the history. */
export type Face =
  /** A gas of known temperature: −k ∂T/∂n = h (T − T_gas). */
  | { readonly meets: 'gas'; readonly coefficientWM2K: number; readonly gasK: Float64Array }
  /** A thermocouple on the face: its temperature is taken as it was read. */
  | { readonly meets: 'thermocouple'; readonly temperatureK: Float64Array }
  | { readonly meets: 'insulation' };

/** What a laminate is made of. */
export interface Laminate {
  readonly densityKgM3: number;
  readonly resinDensityKgM3: number;
  /** Fibre by volume, 0 to 1. */
  readonly fibreFraction: number;
}

/**
 * Heat that a m³ of laminate gives off from α = 0 to 1.
 *
 * By the resin's mass, ρ_r (1 − V_f) H, or by the laminate's, ρ H, as the study of the set states its heat: to multiply
 * a heat per kg of laminate by (1 − V_f) once more is the commonest error there is.
 *
 * @returns J/m³.
 * @throws {DomainError} `option-out-of-range` where the resin gives no heat.
 *
 * Source: Loos & Springer, J Compos Mater 17 (1983) 135–169 (resin basis); Bogetti & Gillespie, J Compos Mater 25 (1991)
 *   239–273 (composite basis).
 */
export function reactionHeatJM3({ thermal, code }: Resin, laminate: Laminate): number {
  if (thermal === undefined) {
    throw new DomainError('option-out-of-range', `The resin "${code}" gives no heat of reaction`, { resin: code });
  }
  return thermal.basis === 'resin'
    ? laminate.resinDensityKgM3 * (1 - laminate.fibreFraction) * thermal.heatOfReaction
    : laminate.densityKgM3 * thermal.heatOfReaction;
}
