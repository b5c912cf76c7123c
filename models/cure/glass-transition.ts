import { kelvinFromCelsius } from '../units.ts';
import type { GlassTransition } from './resin.ts';

/**
 * Glass transition temperature at a degree of cure.
 *
 * Tg = Tg0 + (Tg∞ − Tg0) λ α / (1 − (1 − λ) α) (DiBenedetto).
 *
 * @param alpha Degree of cure in [0, 1].
 * @param set   Tg0 and Tg∞ in °C, λ in (0, 1], and the method they were measured by.
 * @returns Tg in K, by the method of the set; rising in α.
 *
 * Accuracy: closed form, 1e-12 relative; test/models/cure/glass-transition.test.ts.
 * Limits: Tg by DMA storage-modulus onset, DSC midpoint and tan δ peak lie up to 20–30 K apart: compare within one method.
 * Source: Nielsen, J Macromol Sci Rev C 3 (1969) 69–103 (there after DiBenedetto); λ as the ratio of the heat capacity
 *   steps: Pascault & Williams, J Polym Sci B 28 (1990) 85–95.
 */
export function glassTransitionK(alpha: number, set: GlassTransition): number {
  const { tg0C, tgInfC, lambda } = set;
  return kelvinFromCelsius(tg0C) + ((tgInfC - tg0C) * lambda * alpha) / (1 - (1 - lambda) * alpha);
}

/**
 * Degree of cure at which a glass transition temperature is reached: the inverse of {@link glassTransitionK}.
 *
 * α = y / (λ + (1 − λ) y), y = (Tg − Tg0)/(Tg∞ − Tg0).
 *
 * @param tgK Glass transition temperature in K.
 * @param set As for {@link glassTransitionK}.
 * @returns α; in [0, 1] for Tg between Tg0 and Tg∞, outside it otherwise.
 *
 * Source: as {@link glassTransitionK}.
 */
export function degreeFromGlassTransition(tgK: number, set: GlassTransition): number {
  const { tg0C, tgInfC, lambda } = set;
  const y = (tgK - kelvinFromCelsius(tg0C)) / (tgInfC - tg0C);
  return y / (lambda + (1 - lambda) * y);
}
