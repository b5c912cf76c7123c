import { branchAt, cureRate } from '../../../models/cure/cure-rate.ts';
import type { Resin } from '../../../models/cure/resin.ts';

/** dα/dt in 1/s at a temperature in K and a degree of cure. */
export type ReactionRate = (temperatureK: number, alpha: number) => number;

/** Fibre leaves this share of a laminate's volume to the resin. Invented, usual for a pressed laminate. */
const RESIN_SHARE = 0.42;
const RESIN_KG_PER_M3 = 1270;
const LAMINATE_KG_PER_M3 = 1570;

/** Heat set free in a cubic metre of laminate from degree 0 to 1, J/m³; 0 where the document does not say. */
export function heatOfLaminateJPerM3({ thermal }: Resin): number {
  if (thermal === undefined) return 0;
  return thermal.heatOfReaction * (thermal.basis === 'resin' ? RESIN_SHARE * RESIN_KG_PER_M3 : LAMINATE_KG_PER_M3);
}

/** The rate of cure of a resin, by the product's own law. */
export function reactionRate(resin: Resin): ReactionRate {
  const law = cureRate(resin);
  if (law.branchEnds.length === 1) return (temperatureK, alpha) => law.rate(0, temperatureK, alpha);
  return (temperatureK, alpha) => law.rate(branchAt(law, alpha), temperatureK, alpha);
}
