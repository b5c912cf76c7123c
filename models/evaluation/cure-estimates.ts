import { cureTrials, expandedUncertainty } from '../cure/cure-trials.ts';
import { celsiusFromKelvin } from '../units.ts';
import type { FollowedCure } from './cure-followers.ts';
import type { CureEstimate, PartEvaluation } from './evaluation.ts';
import { iso } from './finding.ts';
import { cureOf, estimated } from './gel-times.ts';
import type { JudgedSensor, Judgement } from './judgement.ts';

/** Expanded uncertainties (k = 2) of a sensor's estimates; null where a trial has no such figure. */
export interface EstimateUncertainty {
  readonly degree: number | null;
  readonly tgK: number | null;
  readonly gelS: number | null;
}

/**
 * What the thermocouple, and the set's constants where their covariance is known, leave open in a sensor's estimates.
 *
 * As `uncertaintyAlong`, each trial carried along with the scans. Null where the thermocouple's uncertainty is not on
 * record: what the constants leave open would be told as the whole.
 */
export function uncertaintyOf(j: Judgement, s: JudgedSensor): EstimateUncertainty | null {
  const temperatureK = s.channel.uncertainty;
  if (j.resin === null || temperatureK === null) return null;
  const pairs = cureTrials(j.resin, temperatureK).map(
    ([plus, minus]) => [cureOf(j, s, 'line', plus), cureOf(j, s, 'line', minus)] as const,
  );
  const spread = (figure: (cure: FollowedCure['progress']) => number | null) => {
    const of = ({ progress, refusal }: FollowedCure) => (refusal === null ? figure(progress) : null);
    return expandedUncertainty(pairs.map(([plus, minus]) => [of(plus), of(minus)]));
  };
  return {
    degree: spread((progress) => progress.alpha()),
    tgK: spread((progress) => progress.tgK()),
    gelS: spread(({ gelS }) => gelS),
  };
}

/** The estimates of every judged sensor at the end of the log, for the record. */
export function cureEstimates(j: Judgement): CureEstimate[] {
  if (j.resin === null) return [];
  return estimated(j).flatMap((s) => {
    const { progress, refusal } = cureOf(j, s, 'line');
    if (refusal !== null) return [];
    const tgK = progress.tgK();
    const tgC = tgK === null ? null : celsiusFromKelvin(tgK);
    const at = (timeS: number) => iso(j.log.from + 1000 * timeS)!;
    const expanded = uncertaintyOf(j, s);
    const gel = intervalOf(progress.gelS, expanded?.gelS);
    return [
      {
        channel: s.name,
        degree: progress.alpha(),
        tgC,
        gelAt: progress.gelS === null ? null : at(progress.gelS),
        vitrifiesAt: progress.vitrifiesS === null ? null : at(progress.vitrifiesS),
        degreeInterval: intervalOf(progress.alpha(), expanded?.degree),
        tgIntervalC: intervalOf(tgC, expanded?.tgK),
        gelInterval: gel && [at(gel[0]), at(gel[1])],
      },
    ];
  });
}

/** The judged sensors along which the set gives no estimate, each with the reason. */
export function notEstimated(j: Judgement): NonNullable<PartEvaluation['notEstimated']> {
  if (j.resin === null) return [];
  return estimated(j).flatMap((s) => {
    const { refusal } = cureOf(j, s, 'line');
    return refusal === null ? [] : [{ channel: s.name, because: refusal }];
  });
}

/** From a figure less its expanded uncertainty to the figure and as much more. */
function intervalOf(figure: number | null, expanded: number | null | undefined): readonly [number, number] | null {
  return figure === null || expanded == null ? null : [figure - expanded, figure + expanded];
}
