import type { DwellStage } from '../cycle/cycle.ts';
import { lowerOf, upperOf } from '../cycle/words-of-figures.ts';
import { credited } from '../run/gaps.ts';
import { firstHold, type Interval, within } from '../run/intervals.ts';
import { celsiusFrom, round9 } from '../units.ts';
import { type Fill, sensorStanding } from './holding.ts';
import { inUnit, isExcluded, type JudgedSensor, type Judgement, ruleFigures } from './judgement.ts';

/** How a dwell's band is moved for a guarded decision, in expanded uncertainties: 1 inwards, −1 outwards. */
export type Shift = -1 | 0 | 1;

/** The instant a sensor left a dwell; not final where its record, or belief in it, stops before that is settled. */
export interface Leaving {
  readonly ms: number;
  /** Through `upper`, towards a hotter dwell. */
  readonly isUpwards: boolean;
  readonly isFinal: boolean;
}

/** When each judged sensor entered and left one dwell. */
export interface DwellCourse {
  readonly stage: DwellStage;
  readonly shift: Shift;
  readonly fill: Fill;
  /** Entering is looked for from here on; `Infinity`: the dwell before has not been left. */
  readonly sinceMs: number;
  /** Entered from above: colder than the dwell before. */
  readonly isColder: boolean;
  readonly next: NextDwell;
  /** The instant at which a judged sensor enters the colder dwell that follows; `Infinity`: none does. */
  readonly colderMs: number;
  readonly entered: readonly (number | null)[];
  readonly left: readonly (Leaving | null)[];
}

/** What follows a dwell, as far as leaving it goes. Temperatures in °C. */
export interface NextDwell {
  readonly hotterLowerC: number | null;
  readonly colderUpperC: number | null;
  /** `until` of the stage that follows. */
  readonly coolsToC: number | null;
}

/** Lower and upper limit of a dwell for a sensor, in °C, formed in the written unit and then converted once. */
export function bandC(j: Judgement, stage: DwellStage, s: Pick<JudgedSensor, 'uncertaintyC'>, shift: Shift): Band {
  const unit = j.cycle.units.temperature;
  const moved = shift * s.uncertaintyC;
  return {
    lowerC: celsiusFrom(lowerOf(stage), unit) + moved,
    upperC: celsiusFrom(upperOf(stage), unit) - moved,
    backC: celsiusFrom(round9(upperOf(stage) - inUnit(unit, 1, 2)), unit) - moved,
  };
}

export interface Band {
  readonly lowerC: number;
  readonly upperC: number;
  /** At or below which a sensor has come back from above `upper`: 1 °C (2 °F) under it. */
  readonly backC: number;
}

/** The courses of all dwells of the cycle, in its order. `opened` tells whether a dwell's clock ever opened. */
export function dwellCourses(
  j: Judgement,
  shift: Shift,
  fill: Fill,
  opened: (course: DwellCourse) => boolean,
): DwellCourse[] {
  const courses: DwellCourse[] = [];
  let sinceMs = j.log.from;
  j.cycle.stages.forEach((stage, i) => {
    if (stage.kind !== 'dwell') return;
    const before = courses.at(-1)?.stage;
    const isColder = before !== undefined && stage.target < before.target;
    const next = nextDwell(j, i, stage);
    const entered = j.sensors.map((s) => enters(j, s, stage, { shift, fill, sinceMs, isColder }));
    const colderMs = firstInColder(j, entered, next, shift);
    const left = j.sensors.map((s, k) => leaves(j, s, stage, entered[k] ?? null, { shift, fill, next, colderMs }));
    const course = { stage, shift, fill, sinceMs, isColder, next, colderMs, entered, left };
    courses.push(course);
    if (opened(course)) {
      sinceMs = Math.min(
        ...left.map((leaving, k) => (closesClocks(j.sensors[k]!, leaving) ? leaving.ms : Number.POSITIVE_INFINITY)),
      );
    }
  });
  return courses;
}

interface EnteringRule {
  readonly shift: Shift;
  readonly fill: Fill;
  readonly sinceMs: number;
  readonly isColder: boolean;
}

/** When a sensor was in a dwell's band, or beyond it in the direction of travel. */
export function inOrBeyond(
  j: Judgement,
  s: JudgedSensor,
  stage: DwellStage,
  rule: Omit<EnteringRule, 'sinceMs'>,
): Interval[] {
  const { lowerC, upperC } = bandC(j, stage, s, rule.shift);
  if (!rule.isColder) return sensorStanding(j, s, lowerC, 1, rule.fill);
  // A colder dwell is entered by coming down: what was never above it has not entered.
  const aboveMs = s.track.length === 0 ? null : s.track.crossings(upperC, '>').firstOn(j.log.from);
  if (aboveMs === null) return [];
  return within(sensorStanding(j, s, upperC, -1, rule.fill), { from: aboveMs, until: Number.POSITIVE_INFINITY }).filter(
    ({ until }) => until > aboveMs,
  );
}

/** A sensor that was excluded while it might still have come back closes no clock. */
export function closesClocks(s: JudgedSensor, leaving: Leaving | null): leaving is Leaving {
  return leaving !== null && leaving.ms <= s.untilMs && (leaving.isFinal || !isExcluded(s));
}

export function enters(j: Judgement, s: JudgedSensor, stage: DwellStage, rule: EnteringRule): number | null {
  return firstHold(inOrBeyond(j, s, stage, rule), rule.sinceMs);
}

function nextDwell(j: Judgement, at: number, stage: DwellStage): NextDwell {
  const unit = j.cycle.units.temperature;
  const following = j.cycle.stages[at + 1];
  const dwell = j.cycle.stages.slice(at + 1).find((later) => later.kind === 'dwell');
  const isHotter = dwell !== undefined && dwell.target > stage.target;
  const until = following?.kind === 'cool' ? following.until : undefined;
  return {
    hotterLowerC: isHotter ? celsiusFrom(lowerOf(dwell), unit) : null,
    colderUpperC: dwell !== undefined && !isHotter ? celsiusFrom(upperOf(dwell), unit) : null,
    coolsToC: until === undefined ? null : celsiusFrom(until, unit),
  };
}

function firstInColder(j: Judgement, entered: readonly (number | null)[], next: NextDwell, shift: Shift): number {
  const { colderUpperC } = next;
  if (colderUpperC === null) return Number.POSITIVE_INFINITY;
  const instants = j.sensors.map((s, k) => {
    const enteredMs = entered[k];
    if (enteredMs === null || enteredMs === undefined) return Number.POSITIVE_INFINITY;
    const ms = s.track.crossings(colderUpperC - shift * s.uncertaintyC, '<=').firstOn(enteredMs);
    return ms === null || ms > s.lastMs ? Number.POSITIVE_INFINITY : ms;
  });
  return Math.min(...instants);
}

export interface LeavingRule {
  readonly shift: Shift;
  readonly fill: Fill;
  readonly next: NextDwell;
  /** Instant at which a judged sensor enters the colder dwell that follows. */
  readonly colderMs: number;
}

/** When a sensor that entered a dwell left it; null where it is still inside at the end of its record. */
export function leaves(
  j: Judgement,
  s: JudgedSensor,
  stage: DwellStage,
  enteredMs: number | null,
  rule: LeavingRule,
): Leaving | null {
  if (enteredMs === null) return null;
  const band = bandC(j, stage, s, rule.shift);
  const endMs = s.lastMs;
  const hotterLowerC = rule.next.hotterLowerC;
  if (hotterLowerC !== null) {
    const midpointC = (band.upperC + hotterLowerC + rule.shift * s.uncertaintyC) / 2;
    const midpointMs = s.track.crossings(midpointC, '>=').firstOn(enteredMs);
    if (midpointMs !== null && midpointMs <= endMs) {
      const ms = wayOut(s, band, enteredMs, midpointMs) ?? midpointMs;
      return { ms: inGap(j, s, ms, band.upperC, -1, rule.fill), isUpwards: true, isFinal: true };
    }
    if (s.track.valueAt(endMs) > band.backC) {
      const ms = wayOut(s, band, enteredMs, endMs);
      // It has left for now; one that is believed no further can no longer come back.
      const isFinal = isExcluded(s);
      return ms === null ? null : { ms: inGap(j, s, ms, band.upperC, -1, rule.fill), isUpwards: true, isFinal };
    }
  }
  return leavesDownwards(j, s, band, enteredMs, endMs, rule);
}

/** The first crossing of `upper` after the sensor was last at or below `upper` − 1 °C, up to an instant. */
function wayOut(s: JudgedSensor, band: Band, enteredMs: number, untilMs: number): number | null {
  const backMs = lastBackBelow(s, band, enteredMs, untilMs);
  const ms = s.track.crossings(band.upperC, '>').firstOn(backMs);
  return ms !== null && ms <= untilMs ? ms : null;
}

/** The last instant up to `untilMs` at which the sensor was at or below `upper` − 1 °C (2 °F). */
export function lastBackBelow(s: JudgedSensor, band: Band, enteredMs: number, untilMs: number): number {
  const below = s.track.crossings(band.backC, '<=');
  const endedMs = below.lastEndUntil(untilMs);
  const startedMs = below.lastStartUntil(untilMs);
  if (startedMs !== null && (endedMs === null || startedMs > endedMs)) return untilMs;
  return Math.max(enteredMs, endedMs ?? enteredMs);
}

function leavesDownwards(
  j: Judgement,
  s: JudgedSensor,
  { lowerC }: Band,
  enteredMs: number,
  endMs: number,
  { fill, next, colderMs }: LeavingRule,
): Leaving | null {
  const cooledMs = next.coolsToC === null ? null : s.track.crossings(next.coolsToC, '<=').firstOn(enteredMs);
  const limitMs = Math.min(endMs, cooledMs ?? endMs, colderMs);
  const inside = s.track.crossings(lowerC, '>=');
  let ms = s.track.valueAt(limitMs) >= lowerC ? null : inside.lastEndUntil(limitMs);
  if (ms === null && limitMs === colderMs) ms = inside.firstEndAfter(limitMs);
  if (ms === null || ms < enteredMs || ms > endMs) return null;
  const isSettled = limitMs < endMs || cooledMs === limitMs || hasCooled(j, s, endMs);
  return {
    ms: inGap(j, s, ms, lowerC, 1, fill),
    isUpwards: false,
    isFinal: isSettled || (!j.isOpen && !isExcluded(s)),
  };
}

function hasCooled(j: Judgement, s: JudgedSensor, endMs: number): boolean {
  const hottest = s.track.highestBetween(j.log.from, endMs);
  const { coolingC } = ruleFigures(j.cycle.units.temperature);
  return hottest >= 0 && s.track.valueAt(endMs) <= s.track.reading(hottest) - coolingC;
}

/** A leaving whose crossing lies in a gap: as early, or as late, as the gap allows. */
function inGap(j: Judgement, s: JudgedSensor, ms: number, level: number, sign: 1 | -1, fill: Fill): number {
  const gap = s.gaps.find(({ from, until }) => from < ms && ms < until);
  if (gap === undefined) return ms;
  return fill === 'least' ? gap.from : (credited(gap, level, sign, j.changesAtMost)?.until ?? ms);
}
