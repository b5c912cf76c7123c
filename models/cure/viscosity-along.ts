import { DomainError } from '../errors.ts';
import type { Resin } from './resin.ts';
import { viscosityPaS } from './viscosity.ts';

export interface ViscosityHistory {
  /** [n] in Pa s; Infinity once gelled, NaN where the fit says nothing. */
  readonly viscosityPaS: Float64Array;
  /** The least at any scan, and when. */
  readonly least: { readonly viscosityPaS: number; readonly timeS: number; readonly temperatureK: number };
  /** From softening below the limit to stiffening above it for good; null where it never flows so easily. */
  readonly flows: { readonly fromS: number; readonly untilS: number } | null;
}

/**
 * Viscosity along a cure, its minimum, and the window in which the resin flows.
 *
 * @param timeS        Scan times: [n] in s, rising.
 * @param temperatureK Temperatures: [n] in K.
 * @param alpha        Degree of cure at each scan: [n], as `cureAlong` gives it.
 * @param resin        A resin with a `viscosity`.
 * @param flowsBelowPaS The viscosity below which it counts as flowing, Pa s; its author's choice, there is no common one.
 * @returns See {@link ViscosityHistory}.
 * @throws {DomainError} `option-out-of-range` when the resin gives no viscosity or the limit is not above 0.
 *
 * Accuracy: the least is that of the scans, within half a scan's change of the true one; the window's ends are read
 *   linearly in the logarithm between scans, or at the scan before where the viscosity ends there.
 */
export function viscosityAlong(
  timeS: Float64Array,
  temperatureK: Float64Array,
  alpha: Float64Array,
  resin: Resin,
  flowsBelowPaS: number,
): ViscosityHistory {
  const { viscosity, gasConstant, code } = resin;
  if (viscosity === undefined || !(flowsBelowPaS > 0)) {
    throw new DomainError('option-out-of-range', 'A viscosity needs a resin that gives one, and a limit above 0', {
      resin: code,
      flowsBelowPaS,
    });
  }
  const along = Float64Array.from(alpha, (degree, i) => viscosityPaS(temperatureK[i]!, degree, viscosity, gasConstant));
  let lowest = 0;
  for (let i = 1; i < along.length; i += 1) if (along[i]! < along[lowest]!) lowest = i;
  return {
    viscosityPaS: along,
    least: { viscosityPaS: along[lowest]!, timeS: timeS[lowest]!, temperatureK: temperatureK[lowest]! },
    flows: flowWindow(timeS, along, flowsBelowPaS),
  };
}

function flowWindow(timeS: Float64Array, along: Float64Array, limitPaS: number): ViscosityHistory['flows'] {
  const first = along.findIndex((viscosity) => viscosity <= limitPaS);
  if (first < 0) return null;
  const last = along.findLastIndex((viscosity) => viscosity <= limitPaS);
  return {
    fromS: first === 0 ? timeS[0]! : crossing(timeS, along, first - 1, limitPaS),
    untilS: last === along.length - 1 ? timeS[last]! : crossing(timeS, along, last, limitPaS),
  };
}

/** When the viscosity passes a limit between two scans; at the earlier of them where the later one has none. */
function crossing(timeS: Float64Array, along: Float64Array, before: number, limitPaS: number): number {
  const [from, to] = [Math.log(along[before]!), Math.log(along[before + 1]!)];
  const share = (Math.log(limitPaS) - from) / (to - from);
  return timeS[before]! + (Number.isFinite(to) ? share * (timeS[before + 1]! - timeS[before]!) : 0);
}
