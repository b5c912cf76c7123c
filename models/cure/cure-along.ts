import { DomainError } from '../errors.ts';
import { beginCure, type CureOptions } from './cure-progress.ts';
import type { Resin } from './resin.ts';

/** The cure of one point over a whole temperature history. */
export interface CureHistory {
  /** [n], degree of cure at each scan, never falling. */
  readonly alpha: Float64Array;
  /** On the clock of the scans; null where it did not come or the resin gives no gel degree. */
  readonly gelS: number | null;
  /** On the clock of the scans; null where it did not come or the resin gives no Tg. */
  readonly vitrifiesS: number | null;
  /** Time spent outside the resin's `validC`, s. */
  readonly outsideValidS: number;
  readonly finalAlpha: number;
  /** Null where the resin gives no Tg. */
  readonly finalTgK: number | null;
}

/**
 * Degree of cure along a temperature history.
 *
 * Solves dα/dt = rate(T(t), α), temperature read linearly between scans, with Dormand–Prince 5(4) under error control;
 * the same figures as feeding {@link beginCure} scan by scan.
 *
 * @param timeS        Scan times: [n] in s, n ≥ 1, strictly rising.
 * @param temperatureK Temperatures: [n] in K.
 * @param resin        A resin as `parseResin` returns it.
 * @param options      See {@link CureOptions}.
 * @returns See {@link CureHistory}.
 * @throws {DomainError} as `beginCure` and its `accept`; `option-out-of-range` for an empty history or unequal lengths.
 *
 * Accuracy: |error in α| ≤ 1e-6 at the default tolerance, ≤ 1e-8 at 1e-11; test/models/cure/reference.test.ts.
 * Limits: refuses a negative rate (`cure-stalls`) and what cannot be integrated (`cure-out-of-bounds`); never clamps.
 * Source: Hairer, Nørsett & Wanner, Solving Ordinary Differential Equations I, 2nd ed., §II.4–5.
 */
export function cureAlong(
  timeS: Float64Array,
  temperatureK: Float64Array,
  resin: Resin,
  options: CureOptions = {},
): CureHistory {
  const n = timeS.length;
  if (n === 0 || temperatureK.length !== n) {
    throw new DomainError('option-out-of-range', 'A history needs as many temperatures as times, and at least one', {
      times: n,
      temperatures: temperatureK.length,
    });
  }
  const progress = beginCure(resin, options);
  const alpha = new Float64Array(n);
  progress.acceptAll(timeS, temperatureK, alpha);
  return {
    alpha,
    gelS: progress.gelS,
    vitrifiesS: progress.vitrifiesS,
    outsideValidS: progress.outsideValidS,
    finalAlpha: progress.alpha(),
    finalTgK: progress.tgK(),
  };
}
