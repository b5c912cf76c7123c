import type { CureTrial } from '../cure/cure-trials.ts';
import { whyNoLimit } from '../cure/standing.ts';
import { type CureFill, type FollowedCure, followCure } from './cure-followers.ts';
import { isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';

/** The earliest estimated gel of a judged sensor, as early and as late as gaps allow. */
export interface GelTimes {
  readonly earlyMs: number | null;
  readonly lateMs: number | null;
  readonly unknown: string | null;
}

/** The earliest estimated gel of a part's sensors; unknown without a resin set that says when it gels. */
export function gelTimes(j: Judgement): GelTimes {
  const unknown = gelUnknown(j);
  if (unknown !== null) return { earlyMs: null, lateMs: null, unknown };
  return { earlyMs: earliestGel(j, 'hot'), lateMs: earliestGel(j, 'cold'), unknown: null };
}

function gelUnknown(j: Judgement): string | null {
  if (j.resin === null) return 'no resin set was given, so gel cannot be estimated';
  const noLimit = whyNoLimit(j.resin);
  if (noLimit !== null) return noLimit;
  if (j.resin.gel === undefined) return `the set ${j.resin.code} gives no degree of cure at gel`;
  const sensors = estimated(j);
  if (sensors.length === 0) return 'no judged sensor is left to estimate gel by';
  const refused = sensors.map((s) => cureOf(j, s, 'hot').refusal ?? cureOf(j, s, 'cold').refusal);
  const refusal = refused.find((one) => one !== null);
  return refusal === undefined ? null : `the set ${j.resin.code} gives no estimate: ${refusal}`;
}

function earliestGel(j: Judgement, fill: CureFill): number | null {
  const instants = estimated(j).flatMap((s) => {
    const { gelS } = cureOf(j, s, fill).progress;
    return gelS === null ? [] : [j.log.from + 1000 * gelS];
  });
  return instants.length === 0 ? null : Math.min(...instants);
}

/** Judged sensors that give a cure estimate: those with readings that nobody excluded. */
export function estimated(j: Judgement): JudgedSensor[] {
  return j.sensors.filter((s) => !isExcluded(s) && s.track.length > 0);
}

/** The estimated cure of one sensor, its gaps filled one way; of a trial in place of the set as it stands. */
export function cureOf(j: Judgement, s: JudgedSensor, fill: CureFill, trial?: CureTrial): FollowedCure {
  const subject = {
    track: s.track,
    resin: trial?.resin ?? j.resin!,
    offsetK: trial?.offsetK ?? 0,
    startDegree: j.part?.startDegree ?? null,
    longestGapMs: j.longestGapMs,
    changesAtMost: j.changesAtMost,
  };
  return followCure(j.digest, subject, s.gaps.length === 0 ? 'line' : fill);
}
