import { overlaps } from '../run/intervals.ts';
import type { Dwells } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { heatOnMs } from './events.ts';
import { type Found, unfinished } from './finding.ts';
import { isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';

/** `sensors/working`, `sensors/own` and `sensors/must-work`. */
export function sensorLimits(j: Judgement, dwells: Dwells): Found[] {
  const { sensors } = j.cycle;
  if (sensors === undefined) return [];
  const span = judgedSpan(j, dwells);
  return [
    ...(sensors.workingAtLeast === undefined ? [] : [workingLimit(j, sensors.workingAtLeast, span)]),
    ...(sensors.own === true ? [ownLimit(j)] : []),
    ...(sensors.mustWork === undefined ? [] : [mustWorkLimit(j, dwells, sensors.mustWork, span)]),
  ];
}

interface Span {
  readonly from: number;
  readonly until: number;
  readonly hasEnded: boolean;
}

/** From heat-on to the last dwell's closing. */
function judgedSpan(j: Judgement, dwells: Dwells): Span {
  const last = dwells.stages.length - 1;
  const closesMs = last < 0 ? null : dwells.closesMs(last, 'least');
  const neverOpened = last >= 0 && dwells.opensMs(last, 'most') === null;
  return {
    from: heatOnMs(j) ?? j.log.from,
    until: closesMs ?? j.log.until,
    hasEnded: closesMs !== null || ((last < 0 || neverOpened) && !j.isOpen),
  };
}

function workingLimit(j: Judgement, atLeast: number, span: Span): Found {
  const { count, ms } = leastWorking(j, span);
  const outcome: Outcome = count < atLeast ? 'not-met' : span.hasEnded ? 'met' : unfinished(j);
  const lost = j.sensors.filter((s) => s.untilMs <= span.until).map(({ name }) => name);
  const without = lost.length === 0 ? '' : ` (${lost.join(', ')} excluded)`;
  const of = j.sensors.length;
  const all = of === 1 ? 'The judged sensor' : of === 2 ? 'Both judged sensors' : `All ${of} judged sensors`;
  const worked = count === of ? all : `No fewer than ${count} of ${of} judged sensors`;
  const over = span.hasEnded ? 'worked from heat-on to the end of the last dwell' : 'have worked since heat-on';
  return {
    limit: 'sensors/working',
    outcome,
    observed: count,
    possible: count,
    bounds: { atLeast },
    unit: '',
    fromMs: ms,
    untilMs: span.until,
    because: `${worked} ${over}${without}; at least ${atLeast} asked.`,
  };
}

/** The least number of sensors neither excluded nor silent, and the first instant it was so. */
function leastWorking(j: Judgement, span: Span): { count: number; ms: number } {
  const instants = [span.from];
  for (const s of j.sensors) {
    if (s.untilMs > span.from && s.untilMs <= span.until) instants.push(s.untilMs);
    for (const { from } of silences(j, s)) if (from >= span.from && from < span.until) instants.push(from + 1e-3);
  }
  let least = { count: Number.POSITIVE_INFINITY, ms: span.from };
  for (const ms of instants.sort((a, b) => a - b)) {
    const count = j.sensors.filter(
      (s) => ms < s.untilMs && !silences(j, s).some(({ from, until }) => from < ms && ms < until),
    ).length;
    if (count < least.count) least = { count, ms };
  }
  return least;
}

/** Stretches longer than a gap in which the sensor was silent while the recorder went on. */
function silences(j: Judgement, s: JudgedSensor): JudgedSensor['gaps'] {
  return s.gaps.filter(({ isTheSensors, from, until }) => isTheSensors && until - from > j.longestGapMs);
}

function ownLimit(j: Judgement): Found {
  const names = j.sensors.map(({ name }) => name).join(', ');
  return {
    limit: 'sensors/own',
    outcome: j.ownSensors ? 'met' : 'not-met',
    unit: '',
    because: j.ownSensors
      ? `The part is judged by sensors of its own: ${names}.`
      : `The part has no sensor of its own in the load; it is judged by ${names === '' ? 'none' : names}.`,
  };
}

function mustWorkLimit(j: Judgement, dwells: Dwells, places: readonly string[], span: Span): Found {
  const lost: string[] = [];
  const unknown: string[] = [];
  let lostAtMs: number | null = null;
  let sensor: string | null = null;
  for (const place of places) {
    const there = j.sensors.filter(({ channel }) => channel.place === place);
    if (there.length === 0) {
      unknown.push(place);
      continue;
    }
    const isLost = (s: JudgedSensor) => s.untilMs < span.until || overlaps(silences(j, s), span);
    if (!there.every(isLost)) continue;
    lost.push(
      `${there.map(({ name }) => name).join(', ')} at ${place}${wasLagging(j, dwells, there) ? ', which had been the lagging one,' : ''}`,
    );
    sensor ??= there[0]!.name;
    lostAtMs ??= Math.min(...there.map(({ untilMs }) => untilMs));
  }
  const known = {
    limit: 'sensors/must-work',
    unit: '',
    sensor,
    fromMs: lostAtMs,
    untilMs: lost.length > 0 ? span.until : null,
  };
  if (lost.length > 0)
    return {
      ...known,
      outcome: 'not-met',
      because: `${lost.join(' and ')} ${lost.length === 1 ? 'was' : 'were'} lost.`,
    };
  if (unknown.length > 0) {
    return {
      ...known,
      outcome: 'cannot-tell',
      because: `No sensor of the part is recorded at: ${unknown.join(', ')}.`,
    };
  }
  return {
    ...known,
    outcome: span.hasEnded ? 'met' : unfinished(j),
    because: `The ${places.length === 1 ? 'sensor' : 'sensors'} at ${places.join(', ')} worked${span.hasEnded ? '' : ' so far'}.`,
  };
}

/** Whether one of the sensors was the coldest when it was lost, or opened a dwell as the last to come in. */
function wasLagging(j: Judgement, dwells: Dwells, sensors: readonly JudgedSensor[]): boolean {
  return sensors.some((s) => {
    if (!isExcluded(s) || s.track.length === 0) return false;
    const at = (one: JudgedSensor) => one.track.valueAt(s.lastMs);
    const others = j.sensors.filter((other) => other !== s && other.untilMs >= s.untilMs && other.track.length > 0);
    const isColdest = others.length > 0 && others.every((other) => at(other) >= at(s));
    return isColdest || dwells.stages.some((_, i) => dwells.at(i, 'least').clock.openedBy === s.name);
  });
}
