import type { DwellStage } from '../cycle/cycle.ts';
import { Dwells, type WorkedDwell } from '../evaluation/dwells.ts';
import { iso, say } from '../evaluation/finding.ts';
import { isExcluded, type Judgement } from '../evaluation/judgement.ts';
import type { Forecast } from './forecast.ts';

/** A judgement of the part with some of the suspected sensors left out. */
export interface Variant {
  readonly j: Judgement;
  /** Names of the suspects left out; none where all are believed. */
  readonly without: readonly string[];
}

interface Course {
  readonly seenMin: number;
  readonly leftMin: number;
  readonly notBeforeMs: number | null;
  readonly by: string | null;
  readonly without: readonly string[];
}

/**
 * The dwell whose clock runs: the earliest instant at which its least time can have been met.
 *
 * Worked out with every suspect, without every set of them, and with a guarded band as written and moved: the latest
 * counts. A dip that is not over, and a gap, count against it.
 */
export function dwellAhead(variants: readonly Variant[], index: number): Forecast['dwell'] {
  const asIs = variants[0]!;
  const stage = new Dwells(asIs.j).stages[index]!;
  const leastMin = stage.time?.atLeast;
  const courses = variants.flatMap((variant) => coursesOf(variant, index, leastMin ?? 0));
  const worst = courses.reduce((a, b) => (isLater(b, a) ? b : a));
  const notAfterMs = latestEnd(asIs.j, stage, index);
  return {
    dwell: stage.name,
    minutesSeen: worst.seenMin,
    minutesLeft: worst.leftMin,
    notBefore: leastMin === undefined ? null : iso(worst.notBeforeMs),
    by: worst.by,
    notAfter: iso(notAfterMs),
    because: because(stage, worst),
  };
}

function isLater(a: Course, b: Course): boolean {
  if (b.notBeforeMs === null) return false;
  return a.notBeforeMs === null || a.notBeforeMs > b.notBeforeMs;
}

function coursesOf({ j, without }: Variant, index: number, leastMin: number): Course[] {
  const dwells = new Dwells(j);
  return dwells.shifts.map((shift): Course => {
    const worked = dwells.at(index, 'least', shift);
    const { opensMs } = worked.time;
    if (opensMs === null) return { seenMin: 0, leftMin: leastMin, notBeforeMs: null, by: null, without };
    const seenMin = minutesThatCount(j, worked);
    const leftMin = Math.max(0, leastMin - seenMin);
    const by = worked.clock.openedBy;
    return { seenMin, leftMin, notBeforeMs: j.log.until + leftMin * 60_000, by, without };
  });
}

/** Minutes a clock has that may still grow into the time asked for. */
function minutesThatCount(j: Judgement, { course, clock, time }: WorkedDwell): number {
  if (course.stage.counting !== 'contiguous' && course.stage.counting !== undefined) return time.minutes;
  const asked = course.stage.time?.atLeast ?? Number.POSITIVE_INFINITY;
  if (time.minutes >= asked) return time.minutes;
  const last = clock.holding.at(-1);
  if (last === undefined || last.until < heldUntil(j)) return 0;
  const broken = time.dips.findLast(({ isForgiven, until }) => !isForgiven && until <= last.until);
  const fromMs = Math.max(time.opensMs!, broken?.until ?? time.opensMs!);
  return Math.max(0, (last.until - fromMs) / 60_000);
}

/** A clock that still holds does so to where the record of its sensors stops; a silence longer than a gap ends it. */
function heldUntil(j: Judgement): number {
  const ends = [...j.sensors, ...j.air].filter((s) => !isExcluded(s)).map(({ lastMs }) => lastMs);
  return Math.max(j.log.until - j.longestGapMs, Math.min(j.log.until, ...ends));
}

/** The instant by which the dwell must have been left; null where nothing bounds it. */
function latestEnd(j: Judgement, stage: DwellStage, index: number): number | null {
  const dwells = new Dwells(j);
  const { opensMs } = dwells.at(index, 'most').time;
  if (opensMs === null) return null;
  const bounds = [
    ...(stage.time?.atMost === undefined ? [] : [opensMs + stage.time.atMost * 60_000]),
    ...(stage.longest === undefined ? [] : [longestFrom(j, dwells, index) + stage.longest.atMost * 60_000]),
  ];
  return bounds.length === 0 ? null : Math.min(...bounds);
}

/** When the clock of the longest stay opened: at the first sensor's entering, where that is its rule. */
function longestFrom(j: Judgement, dwells: Dwells, index: number): number {
  const { course, time } = dwells.at(index, 'most');
  if (course.stage.longest?.clock.opens !== 'leading-enters') return time.opensMs!;
  const entered = course.entered.filter((ms): ms is number => ms !== null);
  return Math.min(j.log.until, ...entered);
}

function because({ time }: DwellStage, { seenMin, leftMin, by, without }: Course): string {
  const asked = time?.atLeast;
  const counted = without.length === 0 ? '' : `, counted without ${without.join(' and ')}`;
  if (asked === undefined) return `${say(seenMin)} min so far; no least time is written${counted}.`;
  if (by === null) return `The clock does not run${counted}; ${say(asked)} min are asked.`;
  return `${say(seenMin)} of ${say(asked)} min, clock opened by ${by}${counted}; ${say(leftMin)} min to go if nothing drops out.`;
}
