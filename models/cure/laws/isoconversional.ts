import type { Isoconversional } from '../resin.ts';

/**
 * Rate of cure from a table of activation energies, without a reaction model.
 *
 * dα/dt = exp(lnAf(α) − E(α)/(R T)), lnAf = ln(A f(α)) and E read linearly between the degrees of the table.
 *
 * @param temperatureK Absolute temperature in K.
 * @param alpha        Degree of cure in the interval.
 * @param set          `degree` [n] rising; `E` [n] in J/mol; `lnAf` [n], the logarithm of A f in 1/s.
 * @param gasConstant  R in J/(mol K).
 * @param interval     Which interval of the table, from 0; from n − 1 on the table has ended and nothing reacts.
 * @returns dα/dt in 1/s; > 0 inside the table.
 *
 * Limits: known only between the first and the last degree; a start below the first is refused where the set is read.
 * Source: Friedman, J Polym Sci C 6 (1964) 183–195; Vyazovkin et al., Thermochim Acta 520 (2011) 1–19, §3.
 */
export function isoconversionalRate(
  temperatureK: number,
  alpha: number,
  set: Isoconversional,
  gasConstant: number,
  interval: number,
): number {
  if (interval >= set.degree.length - 1) return 0;
  const from = set.degree[interval]!;
  const share = (alpha - from) / (set.degree[interval + 1]! - from);
  const energy = set.E[interval]! + share * (set.E[interval + 1]! - set.E[interval]!);
  const lnAf = set.lnAf[interval]! + share * (set.lnAf[interval + 1]! - set.lnAf[interval]!);
  return Math.exp(lnAf - energy / (gasConstant * temperatureK));
}
