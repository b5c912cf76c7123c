import type { Resin } from '../../models/cure/resin.ts';
import { type TrialCure, trialCure } from '../../models/cure/trial-cure.ts';
import { type CureUncertainty, uncertaintyAlong } from '../../models/cure/uncertainty-along.ts';
import { type Programme, programmeCorners } from '../../models/cycle/programme.ts';

/** One set tried on a programme: its course and what its end is known to. */
export interface Trial {
  readonly resin: Resin;
  readonly startDegree: number;
  readonly cure: TrialCure;
  /** Null where the cure could not go to the end. */
  readonly uncertainty: CureUncertainty | null;
}

/** A day is drawn at every 10 s, longer programmes at as many points. */
const POINTS = 8640;

export function trialOf(
  resin: Resin,
  programme: Programme,
  startDegree: number | undefined,
  temperatureUncertaintyK: number,
): Trial {
  const { timeS, temperatureK } = programmeCorners(programme);
  const start = startDegree === undefined ? {} : { startDegree };
  const stepS = Math.max(10, (timeS.at(-1) ?? 0) / POINTS);
  const cure = trialCure(timeS, temperatureK, resin, { ...start, stepS });
  return {
    resin,
    startDegree: startDegree ?? resin.initialDegree,
    cure,
    uncertainty:
      cure.stopped === null
        ? uncertaintyAlong(timeS, temperatureK, resin, { ...start, temperatureUncertaintyK })
        : null,
  };
}
