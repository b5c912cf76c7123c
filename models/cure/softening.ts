import { glassTransitionK } from './glass-transition.ts';
import type { Resin } from './resin.ts';
import { viscosityPaS } from './viscosity.ts';

/** From when on a resin flows, and by which sign of it. */
export interface Softening {
  /** On the clock of the scans. */
  readonly timeS: number;
  /** What passed its mark: the viscosity the set's own, or the temperature the resin's Tg. */
  readonly by: 'viscosity' | 'glass-transition';
  /** It was soft at the first scan; when it became so is not in the log. */
  readonly isFromStart: boolean;
}

/**
 * When a resin softens on its way to gel.
 *
 * The first instant at which its viscosity falls to the value its set states (`flowsBelow`); where the set states none,
 * the first at which the temperature passes Tg(α).
 *
 * @param timeS        Scan times: [n] in s, rising.
 * @param temperatureK Temperatures: [n] in K.
 * @param alpha        Degree of cure at each scan: [n], as `cureAlong` gives it.
 * @param resin        As `cureAlong`.
 * @returns See {@link Softening}; null where it never softens, or the set gives neither sign.
 *
 * Accuracy: read linearly between scans, the viscosity in its logarithm.
 * Limits: flow in the sense of its sign alone: above Tg a stiff resin still creeps rather than flows.
 */
export function softening(
  timeS: Float64Array,
  temperatureK: Float64Array,
  alpha: Float64Array,
  resin: Resin,
): Softening | null {
  const { viscosity, glassTransition, gasConstant } = resin;
  if (viscosity?.flowsBelow !== undefined) {
    const limit = Math.log(viscosity.flowsBelow);
    const spare = (i: number) => limit - Math.log(viscosityPaS(temperatureK[i]!, alpha[i]!, viscosity, gasConstant));
    return firstRise(timeS, spare, 'viscosity');
  }
  if (glassTransition === undefined) return null;
  return firstRise(timeS, (i) => temperatureK[i]! - glassTransitionK(alpha[i]!, glassTransition), 'glass-transition');
}

/** Where a margin first reaches zero from below. */
function firstRise(timeS: Float64Array, margin: (i: number) => number, by: Softening['by']): Softening | null {
  for (let i = 0; i < timeS.length; i += 1) {
    const here = margin(i);
    if (!(here >= 0)) continue;
    if (i === 0) return { timeS: timeS[0]!, by, isFromStart: true };
    const before = margin(i - 1);
    const share = Number.isFinite(before) ? before / (before - here) : 1;
    return { timeS: timeS[i - 1]! + share * (timeS[i]! - timeS[i - 1]!), by, isFromStart: false };
  }
  return null;
}
