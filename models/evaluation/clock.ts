import type { Clock, DwellStage } from '../cycle/cycle.ts';
import { bandWords, lowerOf, upperOf } from '../cycle/words-of-figures.ts';
import type { RunChannel } from '../run/channel.ts';
import type { Statistic } from '../run/derived-track.ts';
import { gapsOf } from '../run/gaps.ts';
import { firstHold, type Interval } from '../run/intervals.ts';
import {
  bandC,
  closesClocks,
  type DwellCourse,
  dwellCourses,
  enters,
  inOrBeyond,
  type Leaving,
  leaves,
  type Shift,
} from './dwell-course.ts';
import { allStand, type Fill, oneStands, sensorStanding } from './holding.ts';
import { isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';

/** The clock a dwell has where none is written. */
export const DEFAULT_CLOCK: Clock = { opens: 'lagging-enters', closes: 'first-leaves' };

/** What a dwell's clock did. */
export interface ClockCourse {
  readonly opensMs: number | null;
  readonly openedBy: string | null;
  readonly closing: (Leaving & { readonly by: string | null }) | null;
  /** When its condition held. */
  readonly holding: readonly Interval[];
}

/** The courses of all dwells, each with what its own clock did. */
export function clockedDwells(j: Judgement, shift: Shift, fill: Fill): { course: DwellCourse; clock: ClockCourse }[] {
  const clocks: ClockCourse[] = [];
  const courses = dwellCourses(j, shift, fill, (course) => {
    const clock = runClock(j, course, course.stage.clock ?? DEFAULT_CLOCK);
    clocks.push(clock);
    return clock.opensMs !== null;
  });
  return courses.map((course, i) => ({ course, clock: clocks[i]! }));
}

/** Runs one clock over a dwell: when it opened, when it closed, and when its condition held. */
export function runClock(j: Judgement, course: DwellCourse, clock: Clock): ClockCourse {
  const { stage, shift, fill } = course;
  const closing = closes(j, course, clock.closes);
  const holds = (s: JudgedSensor) => sensorStanding(j, s, bandC(j, stage, s, shift).lowerC, 1, fill);
  if (clock.opens === 'mean-enters' || clock.opens === 'air-enters') {
    const subject = clock.opens === 'mean-enters' ? meanSubject(j) : airSubject(j);
    if (subject === null) return { opensMs: null, openedBy: null, closing, holding: [] };
    return { opensMs: enters(j, subject, stage, course), openedBy: subject.name, closing, holding: holds(subject) };
  }
  const standings = j.sensors.map((s) => inOrBeyond(j, s, stage, course));
  const isLagging = clock.opens === 'lagging-enters';
  const open = isLagging ? allStand(j.sensors, standings) : oneStands(standings);
  const opensMs = j.sensors.length === 0 ? null : firstHold(open, course.sinceMs);
  const holding = isLagging ? allStand(j.sensors, j.sensors.map(holds)) : oneStands(j.sensors.map(holds));
  return { opensMs, openedBy: opener(j, standings, opensMs, isLagging), closing, holding };
}

/** The sensor that came in last (lagging) or first (leading) before an opening. */
function opener(
  j: Judgement,
  standings: readonly Interval[][],
  opensMs: number | null,
  isLagging: boolean,
): string | null {
  if (opensMs === null) return null;
  let by: string | null = null;
  let bestMs = isLagging ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
  j.sensors.forEach((s, k) => {
    const inside = standings[k]!.find(({ from, until }) => from <= opensMs && opensMs <= until);
    if (inside === undefined || (isLagging ? inside.from <= bestMs : inside.from >= bestMs)) return;
    bestMs = inside.from;
    by = s.name;
  });
  return by;
}

function closes(j: Judgement, course: DwellCourse, rule: Clock['closes']): ClockCourse['closing'] {
  if (rule === 'mean-leaves' || rule === 'air-leaves') {
    const subject = rule === 'mean-leaves' ? meanSubject(j) : airSubject(j);
    if (subject === null) return null;
    const enteredMs = enters(j, subject, course.stage, course);
    const leaving = leaves(j, subject, course.stage, enteredMs, course);
    return leaving === null ? null : { ...leaving, by: subject.name };
  }
  const believed = j.sensors.flatMap((s, k) => {
    const leaving = course.left[k] ?? null;
    return closesClocks(s, leaving) ? [{ ...leaving, by: s.name }] : [];
  });
  if (rule === 'first-leaves') return extreme(believed, (a, b) => a.ms < b.ms);
  const awaited = j.sensors.filter((s, k) => !isExcluded(s) && course.left[k] === null);
  return awaited.length > 0 ? null : extreme(believed, (a, b) => a.ms > b.ms);
}

function extreme<T>(all: readonly T[], isBetter: (a: T, b: T) => boolean): T | null {
  return all.reduce<T | null>((best, next) => (best === null || isBetter(next, best) ? next : best), null);
}

/** The mean of the judged sensors as if it were one of them, with the largest uncertainty; null where none is left. */
export function meanSubject(j: Judgement): JudgedSensor | null {
  return derivedSubject(j, j.sensors, 'mean', 'mean');
}

/** The air: of several channels, the coldest; null where the log has none. */
export function airSubject(j: Judgement): JudgedSensor | null {
  return j.air.length === 1 ? j.air[0]! : derivedSubject(j, j.air, 'lowest', 'coldest air');
}

/** Whether a clock waits for air that the log does not have. */
export function lacksAir(j: Judgement, { opens, closes }: Clock): boolean {
  return (opens === 'air-enters' || closes === 'air-leaves') && airSubject(j) === null;
}

/** Something worked out from several sensors as if it were one of them; null where there is none. */
export function derivedSubject(
  j: Judgement,
  sensors: readonly JudgedSensor[],
  statistic: Statistic,
  name: string,
): JudgedSensor | null {
  if (sensors.length === 0) return null;
  const track = j.digest.derived(statistic, sensors);
  if (track.length === 0) return null;
  const channel: RunChannel = { ...sensors[0]!.channel, track };
  return {
    name,
    channel,
    track,
    untilMs: Number.POSITIVE_INFINITY,
    lastMs: track.lastMs,
    uncertaintyC: Math.max(...sensors.map(({ uncertaintyC }) => uncertaintyC)),
    gaps: gapsOf(track, j.longestGapMs, j.log),
  };
}

/** The dwell stage's own band in words a sentence can use. */
export function bandInWords(stage: DwellStage, unit: string): string {
  return bandWords({ atLeast: lowerOf(stage), atMost: upperOf(stage) }, unit);
}
