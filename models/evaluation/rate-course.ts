import type { CoolStage, HeatStage, RateLimit } from '../cycle/cycle.ts';
import { type Interval, overlaps } from '../run/intervals.ts';
import { celsiusFrom } from '../units.ts';
import { enters } from './dwell-course.ts';
import type { Dwells } from './dwells.ts';
import { isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';

export type RampStage = (HeatStage | CoolStage) & { readonly rate: RateLimit };

/** A rate in °C/min, positive in the direction of travel, and the stretch it was found over. */
export interface Slope extends Interval {
  readonly perMin: number;
}

/** How fast one sensor ran a range. */
export interface RateCourse {
  readonly sensor: JudgedSensor;
  /** It ran from the first temperature to the second. */
  readonly ranWhole: boolean;
  /** It came to the end of the range, or was excluded on the way. */
  readonly isOver: boolean;
  readonly touchesGap: boolean;
  readonly slowest: Slope | null;
  readonly fastest: Slope | null;
}

/** The rate of one sensor over the range of a stage, looked for from `sinceMs` on. */
export function rateCourse(j: Judgement, s: JudgedSensor, stage: RampStage, sinceMs: number | null): RateCourse {
  const { rate } = stage;
  const unit = j.cycle.units.temperature;
  const sign = stage.kind === 'heat' ? 1 : -1;
  const first = celsiusFrom(rate.over[0], unit);
  const second = celsiusFrom(rate.over[1], unit);
  const none: RateCourse = {
    sensor: s,
    ranWhole: false,
    isOver: isExcluded(s),
    touchesGap: false,
    slowest: null,
    fastest: null,
  };
  if (s.track.length === 0 || sinceMs === null) return none;
  const endMs = s.lastMs;
  const beyondSecond = s.track.crossings(second, sign > 0 ? '>=' : '<=');
  // Where no dwell was entered before, a cold start is not the end of a cooling.
  const isCold = sign < 0 && sinceMs <= j.log.from;
  const reachedMs = isCold
    ? beyondSecond.firstStartAfter(s.track.firstMs)
    : beyondSecond.firstOn(Math.max(sinceMs, s.track.firstMs));
  const hasReached = reachedMs !== null && reachedMs <= endMs;
  const stop = hasReached ? reachedMs : turningPoint(s, sinceMs, endMs, sign);
  if (stop === null) return none;
  const beyondFirst = s.track.crossings(first, sign > 0 ? '>=' : '<=');
  const start = beyondFirst.lastStartUntil(stop);
  const cameBackMs = beyondFirst.lastEndUntil(stop);
  const isBeyondFirst = start !== null && (cameBackMs === null || cameBackMs < start);
  // After a dwell a range is run by coming to it; only before the first may a sensor start beyond its beginning.
  const isFromStart = start === s.track.firstMs;
  if (!isBeyondFirst || stop <= start || (isFromStart && followsDwell(j, stage))) return none;
  if (sign * (s.track.valueAt(stop) - s.track.valueAt(start)) <= 0) return none;
  const ranWhole = hasReached && !isFromStart;
  const stretch = { from: start, until: stop };
  return { ...none, ...slopesIn(j, s, rate, stretch, sign), ranWhole, isOver: none.isOver || hasReached };
}

/** The instant a sensor turned: its hottest reading in heating, the coldest after that in cooling. */
function turningPoint({ track }: JudgedSensor, sinceMs: number, endMs: number, sign: 1 | -1): number | null {
  const hottest = track.highestBetween(sinceMs, endMs);
  if (hottest < 0) return null;
  const turned = sign > 0 ? hottest : track.lowestBetween(track.timeMs(hottest), endMs);
  return track.timeMs(turned);
}

type Extremes = Pick<RateCourse, 'slowest' | 'fastest' | 'touchesGap'>;

function slopesIn(j: Judgement, s: JudgedSensor, rate: RateLimit, stretch: Interval, sign: 1 | -1): Extremes {
  const windowMs = (rate.window ?? 0) * 60_000;
  if (rate.average === 'chord' || stretch.until - stretch.from < windowMs * (1 - 1e-9)) {
    const endsInGap = s.gaps.some(
      ({ from, until }) => isInside(stretch.from, from, until) || isInside(stretch.until, from, until),
    );
    return ofChord(s, stretch, sign, endsInGap);
  }
  const { perMin } = s.track.slopes(windowMs, j.longestGapMs);
  const allowanceMs = 1e-9 * windowMs;
  const first = s.track.indexFrom(stretch.from - allowanceMs);
  const last = s.track.indexUntil(stretch.until - windowMs + allowanceMs);
  const lowest = perMin.indexOfLowest(first, last);
  const highest = perMin.indexOfHighest(first, last);
  const touchesGap = overlaps(s.gaps, stretch);
  if (lowest < 0 || highest < 0) {
    return touchesGap ? { slowest: null, fastest: null, touchesGap } : ofChord(s, stretch, sign, touchesGap);
  }
  const slope = (at: number): Slope => {
    const from = s.track.timeMs(at);
    return { perMin: sign * perMin.value[at]!, from, until: from + windowMs };
  };
  const [slow, fast] = sign > 0 ? [lowest, highest] : [highest, lowest];
  return { slowest: slope(slow), fastest: slope(fast), touchesGap };
}

/** The rate from one end of a stretch to the other. */
function ofChord({ track }: JudgedSensor, stretch: Interval, sign: 1 | -1, touchesGap: boolean): Extremes {
  const rise = track.valueAt(stretch.until) - track.valueAt(stretch.from);
  const slope = { perMin: (sign * rise) / ((stretch.until - stretch.from) / 60_000), ...stretch };
  return { slowest: slope, fastest: slope, touchesGap };
}

function isInside(instantMs: number, fromMs: number, untilMs: number): boolean {
  return fromMs < instantMs && instantMs < untilMs;
}

function followsDwell({ cycle }: Judgement, stage: RampStage): boolean {
  return cycle.stages.slice(0, cycle.stages.indexOf(stage)).some(({ kind }) => kind === 'dwell');
}

/**
 * When a sensor entered the dwell before a stage; the log's start where there is none or it never did. Null where no
 * sensor entered it: the stage has not begun.
 */
export function entersBefore(j: Judgement, dwells: Dwells, stageAt: number, s: JudgedSensor): number | null {
  const dwellsBefore = j.cycle.stages.slice(0, stageAt).filter(({ kind }) => kind === 'dwell').length;
  if (dwellsBefore === 0) return j.log.from;
  const { course } = dwells.at(dwellsBefore - 1, 'least');
  if (course.entered.every((ms) => ms === null)) return null;
  // A sensor that was excluded before it came there has not run what follows.
  return enters(j, s, course.stage, course) ?? (isExcluded(s) ? null : j.log.from);
}
