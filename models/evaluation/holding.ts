import { type ChangeBound, credited, type Gap } from '../run/gaps.ts';
import { holdsAt, type Interval, intersection, union, within } from '../run/intervals.ts';
import type { Track } from '../run/track.ts';
import { believedUntil, isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';

/**
 * How gaps are filled: `least` counts nothing in them, `most` all that the ends and the bound on change allow.
 * For a time or an event the truth lies between the two.
 */
export type Fill = 'least' | 'most';

/** When a track stood at or above (`sign` 1) or at or below (−1) a level, gaps filled one way. */
export function standing(
  track: Track,
  gaps: readonly Gap[],
  level: number,
  sign: 1 | -1,
  fill: Fill,
  changesAtMost: ChangeBound,
): Interval[] {
  if (track.length === 0) return [];
  let stretches: Interval[] = track.crossings(level, sign > 0 ? '>=' : '<=').intervals();
  for (const gap of gaps) {
    const around = [
      { from: Number.NEGATIVE_INFINITY, until: gap.from },
      { from: gap.until, until: Number.POSITIVE_INFINITY },
    ];
    stretches = intersection(stretches, around).filter(({ from, until }) => until > from || hasReadingAt(track, from));
    const credit = fill === 'most' ? credited(gap, level, sign, changesAtMost) : null;
    if (credit !== null) stretches = union(stretches, [credit]);
  }
  return stretches;
}

function hasReadingAt(track: Track, instantMs: number): boolean {
  const i = track.indexFrom(instantMs);
  return i < track.length && track.timeMs(i) === instantMs;
}

/**
 * When a judged sensor stood at or beyond a level of its own, up to its exclusion. Between its last believed reading
 * and the exclusion it stays where it was: what the line does from there to a reading nobody believes does not count.
 */
export function sensorStanding(j: Judgement, s: JudgedSensor, level: number, sign: 1 | -1, fill: Fill): Interval[] {
  const stretches = standing(s.track, s.gaps, level, sign, fill, j.changesAtMost);
  if (!isExcluded(s)) return stretches;
  const believedMs = believedUntil(j, s);
  const believed = within(stretches, { from: Number.NEGATIVE_INFINITY, until: believedMs });
  return holdsAt(believed, believedMs) ? union(believed, [{ from: believedMs, until: s.untilMs }]) : believed;
}

/** Instants at which all of the sensors that still count stand. Where none is left, nothing holds. */
export function allStand(sensors: readonly JudgedSensor[], standings: readonly (readonly Interval[])[]): Interval[] {
  const lastMs = Math.max(...sensors.map(({ untilMs }) => untilMs));
  let all: Interval[] = [{ from: Number.NEGATIVE_INFINITY, until: lastMs }];
  sensors.forEach(({ untilMs }, i) => {
    const afterwards = untilMs < lastMs ? [{ from: untilMs, until: lastMs }] : [];
    all = intersection(all, union(standings[i]!, afterwards));
  });
  return all;
}

/** Instants at which one of the sensors stands. */
export function oneStands(standings: readonly (readonly Interval[])[]): Interval[] {
  return standings.reduce<Interval[]>((either, next) => union(either, next), []);
}
