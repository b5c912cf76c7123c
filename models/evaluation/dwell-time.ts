import { type Interval, overlaps, totalMs } from '../run/intervals.ts';
import { celsiusDifferenceFrom, celsiusFrom, round9 } from '../units.ts';
import { airSubject, type ClockCourse, DEFAULT_CLOCK, meanSubject } from './clock.ts';
import { type ClockDip, countedIn, type Depth, dipsIn, forgivenessC } from './dips.ts';
import { bandC, closesClocks, type DwellCourse } from './dwell-course.ts';
import { type Fill, sensorStanding } from './holding.ts';
import { isExcluded, type JudgedSensor, type Judgement, ruleFigures } from './judgement.ts';

/** The time a dwell's clock counted, gaps filled one way. */
export interface DwellTime {
  readonly minutes: number;
  /** Whether the record shows that no more time can come. */
  readonly hasEnded: boolean;
  readonly opensMs: number | null;
  readonly closesMs: number | null;
  readonly dips: readonly ClockDip[];
  /** The stretch that was counted, where counting is contiguous: the longest unbroken one. */
  readonly counted: Interval | null;
}

/** Counts the time of a dwell between the opening and the closing of its clock. */
export function dwellTime(j: Judgement, course: DwellCourse, clock: ClockCourse): DwellTime {
  const { stage } = course;
  const { opensMs, closing } = clock;
  const closesMs = closing?.ms ?? null;
  if (opensMs === null || (closesMs !== null && closesMs < opensMs)) {
    return { minutes: 0, hasEnded: showsCooling(j), opensMs, closesMs, dips: [], counted: null };
  }
  const stretch = { from: opensMs, until: closesMs ?? j.log.until };
  const forgive = forgivenessC(stage.forgive?.below, (by) => celsiusDifferenceFrom(by, j.cycle.units.temperature));
  const dips = dipsIn(stretch, clock.holding, forgive, clockDepth(j, course));
  const known = { opensMs, closesMs, dips };
  if (stage.counting === 'each') {
    return { ...known, ...leastOfEach(j, course), counted: null };
  }
  const counted = countedIn(stretch, dips);
  const hasEnded = closing?.isFinal === true;
  if (stage.counting === 'accumulated') {
    return { ...known, minutes: totalMs(counted) / 60_000, hasEnded, counted: null };
  }
  const longest = counted.reduce<Interval | null>(
    (best, next) => (best === null || next.until - next.from > best.until - best.from ? next : best),
    null,
  );
  const minutes = longest === null ? 0 : (longest.until - longest.from) / 60_000;
  return { ...known, minutes, hasEnded, counted: longest };
}

/**
 * The least of what every judged sensor gathered between its own entering and leaving, in minutes. It is final where the
 * sensor that gathered least has left for good: the others can only gather more.
 */
function leastOfEach(j: Judgement, course: DwellCourse): { minutes: number; hasEnded: boolean } {
  const { stage, shift, fill } = course;
  const unit = j.cycle.units.temperature;
  const gathered = j.sensors.flatMap((s, k) => {
    const left = course.left[k] ?? null;
    if (isExcluded(s) && !closesClocks(s, left)) return [];
    const enteredMs = course.entered[k] ?? null;
    if (enteredMs === null) return [{ minutes: 0, hasEnded: showsCooling(j) }];
    const { lowerC } = bandC(j, stage, s, shift);
    const stretch = { from: enteredMs, until: left?.ms ?? j.log.until };
    const forgive = forgivenessC(stage.forgive?.below, (by) => celsiusDifferenceFrom(by, unit));
    const dips = dipsIn(stretch, sensorStanding(j, s, lowerC, 1, fill), forgive, (dip) =>
      depthBelow(s, lowerC, dip, fill),
    );
    return [{ minutes: totalMs(countedIn(stretch, dips)) / 60_000, hasEnded: left?.isFinal === true }];
  });
  const [first, ...others] = gathered;
  if (first === undefined) return { minutes: 0, hasEnded: false };
  return others.reduce((least, next) => (next.minutes < least.minutes ? next : least), first);
}

/** How deep the subjects of a dwell's clock were below the band: one of them for a lagging clock, all for a leading one. */
function clockDepth(j: Judgement, { stage, shift, fill }: DwellCourse): Depth {
  const opens = (stage.clock ?? DEFAULT_CLOCK).opens;
  const own = (s: JudgedSensor) => (dip: Interval) => depthBelow(s, bandC(j, stage, s, shift).lowerC, dip, fill);
  if (opens === 'mean-enters' || opens === 'air-enters') {
    const subject = opens === 'mean-enters' ? meanSubject(j) : airSubject(j);
    return subject === null ? () => ({ depthC: null, sensor: null }) : own(subject);
  }
  if (opens === 'lagging-enters') {
    return (dip) => {
      const depths = j.sensors.filter(({ untilMs }) => untilMs > dip.from).map((s) => own(s)(dip));
      if (depths.some(({ depthC }) => depthC === null)) return { depthC: null, sensor: null };
      return depths.reduce((worst, next) => (next.depthC! > worst.depthC! ? next : worst), { depthC: 0, sensor: null });
    };
  }
  return (dip) => {
    if (fill === 'least' && j.sensors.some(({ gaps }) => overlaps(gaps, dip))) return { depthC: null, sensor: null };
    const highest = j.digest.derived('highest', j.sensors);
    const lowest = highest.lowestBetween(dip.from, dip.until);
    const lowerC = Math.min(...j.sensors.map((s) => bandC(j, stage, s, shift).lowerC));
    return { depthC: lowest < 0 ? null : round9(lowerC - highest.reading(lowest)), sensor: null };
  };
}

/** How far a sensor's readings went below a level in a stretch; null where a gap hides it and nothing may be credited. */
function depthBelow(
  s: JudgedSensor,
  lowerC: number,
  dip: Interval,
  fill: Fill,
): { depthC: number | null; sensor: string | null } {
  if (fill === 'least' && overlaps(s.gaps, dip)) return { depthC: null, sensor: s.name };
  const lowest = s.track.lowestBetween(dip.from, Math.min(dip.until, s.lastMs));
  return { depthC: lowest < 0 ? 0 : Math.max(0, round9(lowerC - s.track.reading(lowest))), sensor: s.name };
}

/**
 * Whether the record shows the cooling: every sensor that is still believed has come down to the last `until`, or to
 * 15 °C (27 °F) below its hottest, at the end of its record.
 */
export function showsCooling(j: Judgement): boolean {
  const unit = j.cycle.units.temperature;
  const lastUntil = j.cycle.stages.findLast((stage) => stage.kind === 'cool' && stage.until !== undefined);
  const untilC = lastUntil?.kind === 'cool' ? celsiusFrom(lastUntil.until!, unit) : Number.NEGATIVE_INFINITY;
  const { coolingC } = ruleFigures(unit);
  const believed = j.sensors.filter((s) => !isExcluded(s));
  return (
    believed.length > 0 &&
    believed.every(({ track }) => {
      const hottest = track.highestBetween(j.log.from, j.log.until);
      if (hottest < 0) return false;
      const hottestC = track.reading(hottest);
      const lastC = track.reading(track.length - 1);
      return (lastC <= untilC && hottestC > untilC) || lastC <= hottestC - coolingC;
    })
  );
}
