import { lowerOf, upperOf } from '../cycle/words-of-figures.ts';
import { furthest } from '../run/gaps.ts';
import type { Interval } from '../run/intervals.ts';
import { celsiusDifferenceFrom, round9, temperatureDifferenceFromCelsius, temperatureFromCelsius } from '../units.ts';
import { type ForgivenessC, forgivenessC, forgiver } from './dips.ts';
import { bandC, type DwellCourse, lastBackBelow, type Shift } from './dwell-course.ts';
import { showsCooling } from './dwell-time.ts';
import type { Dwells } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { type Found, sayBeside, unfinished } from './finding.ts';
import { guarded } from './guarded.ts';
import {
  believedUntil,
  isExcluded,
  type JudgedSensor,
  type Judgement,
  openingGaps,
  someBelieved,
} from './judgement.ts';
import { whatIsOpen } from './what-is-open.ts';

/** `<dwell>/upper`: the highest reading of any judged sensor between its entering and its leaving. */
export function dwellUpperLimit(j: Judgement, dwells: Dwells, index: number): Found[] {
  const stage = dwells.stages[index]!;
  const sure = dwells.at(index, 'least').course;
  const widest = dwells.at(index, 'most').course;
  if (widest.entered.every((ms) => ms === null)) return [];
  const unit = j.cycle.units.temperature;
  const forgive = forgivenessC(stage.forgive?.above, (by) => celsiusDifferenceFrom(by, unit));
  const hasEnded = j.sensors.every((s, k) => isDone(j, s, sure, k));
  const mayBeOver = (shift: Shift) => {
    const { course } = dwells.at(index, 'most', shift);
    return j.sensors.some((s, k) => {
      const inside = insideOf(j, s, course, k);
      return inside !== null && (overshoots(inside, s, shift, forgive) || mayOvershoot(j, inside, s, forgive));
    });
  };
  const outcome = guarded(dwells.shifts.length > 1, (shift) => {
    const { course } = dwells.at(index, 'least', shift);
    const isOver = j.sensors.some((s, k) => {
      const inside = insideOf(j, s, course, k);
      return inside !== null && overshoots(inside, s, shift, forgive);
    });
    if (isOver) return 'not-met';
    if (mayBeOver(shift)) return 'cannot-tell';
    return hasEnded ? 'met' : unfinished(j);
  });
  const highest = highestOf(j, sure) ?? highestOf(j, widest);
  if (highest === null) return [];
  const { upperC } = bandC(j, stage, { uncertaintyC: 0 }, 0);
  const isForgiven = outcome === 'met' && highest.readingC > upperC;
  const observed = temperatureFromCelsius(highest.readingC, unit);
  const upper = upperOf(stage);
  const forgivenTo = isForgiven ? (stage.forgive?.above?.by ?? 0) : 0;
  return [
    {
      limit: `${stage.name}/upper`,
      outcome,
      observed,
      possible: observed,
      bounds: { atMost: upper },
      margin: upper + forgivenTo - observed,
      unit,
      uncertainty: knownUncertainty(j, highest.sensor),
      sensor: highest.sensor.name,
      fromMs: highest.ms,
      untilMs: highest.ms,
      isForgiven,
      because: `${upperSentence(outcome, highest.sensor.name, observed, upper, unit, isForgiven)}${whatIsOpen(j, outcome, hasEnded, () => mayBeOver(0))}.`,
    },
  ];
}

function upperSentence(
  outcome: Outcome,
  sensor: string,
  observed: number,
  upper: number,
  unit: string,
  isForgiven: boolean,
): string {
  const reached = `${sensor} reached ${sayBeside(observed, { atMost: upper }, 2)} ${unit}`;
  if (outcome === 'not-met' && observed > upper)
    return `${reached}, ${sayBeside(observed - upper, { atMost: 0 }, 2)} ${unit} above the ${upper} ${unit} allowed`;
  const forgiven = isForgiven ? ', short and small enough to be forgiven' : '';
  return `${reached}${forgiven}; at most ${upper} ${unit} allowed`;
}

function isDone(j: Judgement, s: JudgedSensor, course: DwellCourse, k: number): boolean {
  if (isExcluded(s)) return someBelieved(j) || course.left[k]?.isFinal === true;
  return course.entered[k] === null ? !j.isOpen || showsCooling(j) : course.left[k]?.isFinal === true;
}

interface Inside {
  readonly stretch: Interval;
  readonly upperC: number;
}

/** Where a sensor was inside a dwell, and its own upper limit there; null where it never entered. */
function insideOf(j: Judgement, s: JudgedSensor, course: DwellCourse, k: number): Inside | null {
  const stretch = stretchInside(j, s, course, k);
  return stretch === null ? null : { stretch, upperC: bandC(j, course.stage, s, course.shift).upperC };
}

/** From its entering to its leaving; on the way to a hotter dwell, to when it was last at or below `upper` − 1 °C. */
function stretchInside(j: Judgement, s: JudgedSensor, course: DwellCourse, k: number): Interval | null {
  const from = course.entered[k] ?? null;
  if (from === null) return null;
  const left = course.left[k] ?? null;
  const until = left?.ms ?? (isExcluded(s) ? believedUntil(j, s) : j.log.until);
  if (left?.isUpwards !== true) return { from, until };
  return { from, until: lastBackBelow(s, bandC(j, course.stage, s, course.shift), from, until) };
}

/** Whether readings of a sensor inside a dwell lie above its upper limit by more than is forgiven. */
function overshoots({ stretch, upperC }: Inside, s: JudgedSensor, shift: Shift, forgive: ForgivenessC | null): boolean {
  const isForgiven = forgiver(forgive);
  const side = shift === -1 && s.uncertaintyC > 0 ? '>=' : '>';
  for (const over of s.track.crossings(upperC, side).intervals()) {
    const from = Math.max(over.from, stretch.from);
    const until = Math.min(over.until, stretch.until);
    const highest = from > until ? -1 : s.track.highestBetween(from, until);
    if (highest < 0 || !isOutside(s.track.reading(highest), upperC, shift)) continue;
    if (!isForgiven(until - from, round9(s.track.reading(highest) - upperC))) return true;
  }
  return false;
}

/** Above the limit; with the limit moved outwards by U, outside by U is outside. */
function isOutside(reading: number, limit: number, shift: Shift): boolean {
  return shift === -1 ? reading >= limit : reading > limit;
}

/** Whether a gap inside the dwell leaves room for more than is forgiven. */
function mayOvershoot(
  j: Judgement,
  { stretch, upperC }: Inside,
  s: JudgedSensor,
  forgive: ForgivenessC | null,
): boolean {
  return openingGaps(j, s.gaps).some((gap) => {
    if (gap.from >= stretch.until || gap.until <= stretch.from) return false;
    const hottest = furthest(gap, 1, j.changesAtMost, stretch);
    if (hottest === null || hottest <= upperC) return false;
    return forgive === null || hottest - upperC > forgive.byC || gap.until - gap.from > forgive.forMs;
  });
}

function highestOf(j: Judgement, course: DwellCourse): { sensor: JudgedSensor; readingC: number; ms: number } | null {
  let best: { sensor: JudgedSensor; readingC: number; ms: number } | null = null;
  j.sensors.forEach((sensor, k) => {
    const stretch = stretchInside(j, sensor, course, k);
    const at = stretch === null ? -1 : sensor.track.highestBetween(stretch.from, stretch.until);
    if (at < 0 || (best !== null && sensor.track.reading(at) <= best.readingC)) return;
    best = { sensor, readingC: sensor.track.reading(at), ms: sensor.track.timeMs(at) };
  });
  return best;
}

/** U of a sensor in the cycle's unit; null where unknown. */
export function knownUncertainty(j: Judgement, s: JudgedSensor): number | null {
  const { uncertainty } = s.channel;
  return uncertainty === null ? null : temperatureDifferenceFromCelsius(uncertainty, j.cycle.units.temperature);
}

/** `<dwell>/lower`: where the cycle allows no dip, one that is not forgiven breaks it. */
export function dwellLowerLimit(j: Judgement, dwells: Dwells, index: number): Found[] {
  const stage = dwells.stages[index]!;
  if (stage.below !== 'not-allowed') return [];
  const unit = j.cycle.units.temperature;
  const lower = lowerOf(stage);
  const { time, clock } = dwells.at(index, 'least');
  const outcomes = dwells.shifts.map((shift) => dipsOutcome(j, dwells, index, shift));
  const outcome = outcomes.every((each) => each === outcomes[0]) ? outcomes[0]! : 'cannot-tell';
  const seen = time.dips.filter(({ depthC }) => depthC !== null);
  const deepest = seen.reduce<(typeof seen)[number] | null>(
    (worst, dip) => (worst === null || dip.depthC! > worst.depthC! ? dip : worst),
    null,
  );
  const observed = deepest === null ? null : round9(lower - temperatureDifferenceFromCelsius(deepest.depthC!, unit));
  const stops = seen.filter(({ isForgiven }) => !isForgiven).length;
  return [
    {
      limit: `${stage.name}/lower`,
      outcome,
      observed,
      possible: observed,
      bounds: { atLeast: lower },
      unit,
      sensor: deepest?.sensor ?? clock.openedBy,
      fromMs: deepest?.from ?? time.opensMs,
      untilMs: deepest?.until ?? time.closesMs,
      isForgiven: outcome === 'met' && seen.length > 0,
      because:
        outcome === 'not-met'
          ? `${deepest?.sensor ?? 'The clock'} fell ${sayBeside(lower - observed!, { atLeast: 0 }, 2)} ${unit} below ${lower} ${unit}; no dip is allowed${stops > 1 ? ` (${stops} dips)` : ''}.`
          : `No dip below ${lower} ${unit} is allowed; ${seen.length === 0 ? 'none was seen' : 'those seen are forgiven'}${outcome === 'met' ? '' : ', but the dwell is not seen whole'}.`,
    },
  ];
}

function dipsOutcome(j: Judgement, dwells: Dwells, index: number, shift: Shift): Outcome {
  const least = dwells.at(index, 'least', shift);
  const most = dwells.at(index, 'most', shift);
  if (least.time.dips.some(({ isForgiven, depthC }) => !isForgiven && depthC !== null)) return 'not-met';
  if (least.time.dips.some(({ depthC }) => depthC === null)) return 'cannot-tell';
  return least.clock.closing?.isFinal === true && most.clock.closing?.isFinal === true && least.time.opensMs !== null
    ? 'met'
    : unfinished(j);
}
