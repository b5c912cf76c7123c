import type { CoolStage, HeatStage, RateLimit } from '../cycle/cycle.ts';
import type { Interval } from '../run/intervals.ts';
import { overlaps } from '../run/intervals.ts';
import { celsiusFrom } from '../units.ts';
import type { Dwells } from './dwells.ts';
import { isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';

export type RampStage = (HeatStage | CoolStage) & { readonly rate: RateLimit };

/** How fast one sensor ran a range: slowest and fastest in °C/min, positive in the direction of travel. */
export interface RateCourse {
  readonly sensor: JudgedSensor;
  readonly stretch: Interval | null;
  /** It ran from the first temperature to the second. */
  readonly ranWhole: boolean;
  /** It came to the end of the range, or was excluded on the way. */
  readonly isOver: boolean;
  readonly touchesGap: boolean;
  readonly slowest: number | null;
  readonly fastest: number | null;
  readonly slowestMs: number | null;
  readonly fastestMs: number | null;
}

/** The rate of one sensor over the range of a stage, looked for from `sinceMs` on. */
export function rateCourse(j: Judgement, s: JudgedSensor, stage: RampStage, sinceMs: number): RateCourse {
  const { rate } = stage;
  const unit = j.cycle.units.temperature;
  const sign = stage.kind === 'heat' ? 1 : -1;
  const first = celsiusFrom(rate.over[0], unit);
  const second = celsiusFrom(rate.over[1], unit);
  const none: RateCourse = {
    sensor: s,
    stretch: null,
    ranWhole: false,
    isOver: isExcluded(s),
    touchesGap: false,
    slowest: null,
    fastest: null,
    slowestMs: null,
    fastestMs: null,
  };
  if (s.track.length === 0) return none;
  const endMs = s.lastMs;
  const beyondSecond = s.track.crossings(second, sign > 0 ? '>=' : '<=');
  const reachedMs = beyondSecond.firstOn(Math.max(sinceMs, s.track.firstMs));
  const hasReached = reachedMs !== null && reachedMs <= endMs;
  const stop = hasReached ? reachedMs : turningPoint(s, sinceMs, endMs, sign);
  if (stop === null) return none;
  const beyondFirst = s.track.crossings(first, sign > 0 ? '>=' : '<=');
  const start = beyondFirst.lastStartUntil(stop);
  const cameBackMs = beyondFirst.lastEndUntil(stop);
  const isBeyondFirst = start !== null && (cameBackMs === null || cameBackMs < start);
  if (!isBeyondFirst || stop <= start) return none;
  const ranWhole = hasReached && start > s.track.firstMs;
  const stretch = { from: start, until: stop };
  return { ...none, ...slopesIn(j, s, rate, stretch, sign), stretch, ranWhole, isOver: none.isOver || hasReached };
}

/** The instant a sensor turned: its furthest reading in the direction of travel. */
function turningPoint(s: JudgedSensor, sinceMs: number, endMs: number, sign: 1 | -1): number | null {
  const at = sign > 0 ? s.track.highestBetween(sinceMs, endMs) : s.track.lowestBetween(sinceMs, endMs);
  return at < 0 ? null : s.track.timeMs(at);
}

type Slowest = Pick<RateCourse, 'slowest' | 'fastest' | 'slowestMs' | 'fastestMs' | 'touchesGap'>;

function slopesIn(j: Judgement, s: JudgedSensor, rate: RateLimit, stretch: Interval, sign: 1 | -1): Slowest {
  const lasts = stretch.until - stretch.from;
  const windowMs = (rate.window ?? 0) * 60_000;
  const isChord = rate.average === 'chord' || lasts < windowMs * (1 - 1e-9);
  if (isChord) {
    const chord = (sign * (s.track.valueAt(stretch.until) - s.track.valueAt(stretch.from))) / (lasts / 60_000);
    const endsInGap = s.gaps.some(
      ({ from, until }) => isInside(stretch.from, from, until) || isInside(stretch.until, from, until),
    );
    return { slowest: chord, fastest: chord, slowestMs: stretch.from, fastestMs: stretch.from, touchesGap: endsInGap };
  }
  const { perMin } = s.track.slopes(windowMs, j.longestGapMs);
  const allowanceMs = 1e-9 * windowMs;
  const from = s.track.indexFrom(stretch.from - allowanceMs);
  const until = s.track.indexUntil(stretch.until - windowMs + allowanceMs);
  const lowest = perMin.indexOfLowest(from, until);
  const highest = perMin.indexOfHighest(from, until);
  const touchesGap = overlaps(s.gaps, stretch);
  if (lowest < 0 || highest < 0) {
    if (touchesGap) return { slowest: null, fastest: null, slowestMs: null, fastestMs: null, touchesGap };
    const chord = (sign * (s.track.valueAt(stretch.until) - s.track.valueAt(stretch.from))) / (lasts / 60_000);
    return { slowest: chord, fastest: chord, slowestMs: stretch.from, fastestMs: stretch.from, touchesGap };
  }
  const [slow, fast] = sign > 0 ? [lowest, highest] : [highest, lowest];
  return {
    slowest: sign * perMin.value[slow]!,
    fastest: sign * perMin.value[fast]!,
    slowestMs: s.track.timeMs(slow),
    fastestMs: s.track.timeMs(fast),
    touchesGap,
  };
}

function isInside(instantMs: number, fromMs: number, untilMs: number): boolean {
  return fromMs < instantMs && instantMs < untilMs;
}

/** When a sensor entered the dwell before a stage; the log's start where there is none or it never did. */
export function entersBefore(j: Judgement, dwells: Dwells, stageAt: number, sensorAt: number | null): number {
  const dwellsBefore = j.cycle.stages.slice(0, stageAt).filter(({ kind }) => kind === 'dwell').length;
  if (dwellsBefore === 0) return j.log.from;
  const { course, clock } = dwells.at(dwellsBefore - 1, 'least');
  if (sensorAt === null) return clock.opensMs ?? j.log.from;
  return course.entered[sensorAt] ?? j.log.from;
}
