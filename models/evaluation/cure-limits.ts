import { glassTransitionK } from '../cure/glass-transition.ts';
import { whyNoLimit } from '../cure/standing.ts';
import { gapsOf } from '../run/gaps.ts';
import { overlaps } from '../run/intervals.ts';
import {
  celsiusFromKelvin,
  kelvinFromCelsius,
  type TemperatureUnit,
  temperatureDifferenceFromCelsius,
  temperatureFromCelsius,
} from '../units.ts';
import { uncertaintyOf } from './cure-estimates.ts';
import { HOTTEST_C } from './cure-followers.ts';
import { showsCooling } from './dwell-time.ts';
import type { Outcome } from './evaluation.ts';
import { type EventSources, eventTime } from './events.ts';
import { type Found, isAtLeast, say, sayBeside, unfinished } from './finding.ts';
import { cureOf, estimated } from './gel-times.ts';
import type { JudgedSensor, Judgement } from './judgement.ts';
import { channelsFor, decimalsOf, pressureScale, unitOf } from './pressure-scale.ts';

/** `cure/degree`, `cure/tg` and `cure/pressure-before-gel`: estimates, which are limits only where the cycle says so. */
export function cureLimits(sources: EventSources): Found[] {
  const { j } = sources;
  const asked = j.cycle.cure;
  if (asked === undefined) return [];
  const unit = j.cycle.units.temperature;
  const found: Found[] = [];
  if (asked.degreeAtLeast !== undefined) {
    found.push(leastEstimate(j, 'cure/degree', asked.degreeAtLeast, '', (alpha) => alpha));
  }
  if (asked.tgAtLeast !== undefined) {
    found.push(
      leastEstimate(j, 'cure/tg', asked.tgAtLeast, unit, (_, tgK) =>
        tgK === null ? null : temperatureFromCelsius(celsiusFromKelvin(tgK), unit),
      ),
    );
  }
  if (asked.pressureBeforeGel !== undefined) found.push(pressureBeforeGel(sources, asked.pressureBeforeGel));
  return found;
}

type Figure = (alpha: number, tgK: number | null) => number | null;

function leastEstimate(
  j: Judgement,
  limit: string,
  atLeast: number,
  unit: '' | TemperatureUnit,
  figure: Figure,
): Found {
  const known = { limit, bounds: { atLeast }, unit };
  const asked = `${atLeast}${unit === '' ? '' : ` ${unit}`} asked`;
  if (j.resin === null)
    return { ...known, outcome: 'cannot-tell', because: `No resin set was given; at least ${asked}.` };
  const noLimit = whyNoLimit(j.resin);
  if (noLimit !== null) return { ...known, outcome: 'cannot-tell', because: `It cannot be told: ${noLimit}.` };
  const sensors = estimated(j);
  const refusal = sensors
    .map((s) => cureOf(j, s, 'cold').refusal ?? cureOf(j, s, 'hot').refusal)
    .find((one) => one !== null);
  if (refusal !== undefined)
    return { ...known, outcome: 'cannot-tell', because: `The set ${j.resin.code} gives no estimate: ${refusal}.` };
  const estimate = (s: JudgedSensor, fill: 'line' | 'cold' | 'hot') => {
    const { progress } = cureOf(j, s, fill);
    return figure(progress.alpha(), progress.tgK());
  };
  const least = sensors.reduce<{ s: JudgedSensor; value: number } | null>((best, s) => {
    const value = estimate(s, 'line');
    return value !== null && (best === null || value < best.value) ? { s, value } : best;
  }, null);
  if (least === null) {
    const why =
      sensors.length === 0
        ? 'no judged sensor is left to estimate by'
        : `the set ${j.resin.code} gives no glass transition`;
    return { ...known, outcome: 'cannot-tell', because: `Nothing to tell: ${why}.` };
  }
  const low = Math.min(...sensors.map((s) => estimate(s, 'cold')!));
  // What came before a sensor's first reading bounds nothing; after its last one it may have gone on getting hotter.
  const isUnbounded = sensors.some(({ gaps }) => gaps.some(({ before }) => before === null));
  const high = isUnbounded ? null : Math.min(...sensors.map((s) => hottestEnd(j, s, figure)!));
  const outcome = decide(j, low, high, atLeast);
  const digits = unit === '' ? 3 : 1;
  const source = `estimate by the set ${j.resin.code}, ${j.resin.source.citation} (${j.resin.source.status})`;
  const gap =
    low < least.value - 1e-9
      ? `; gaps leave ${say(low, digits)}${high === null ? ' or more' : ` to ${say(high, digits)}`} open`
      : '';
  return {
    ...known,
    outcome,
    observed: least.value,
    possible: high,
    uncertainty: uncertaintyOfFigure(j, least.s, unit),
    sensor: least.s.name,
    fromMs: j.log.from,
    untilMs: j.log.until,
    because: `Least at ${least.s.name}: ${sayBeside(least.value, { atLeast }, digits)}${unit === '' ? '' : ` ${unit}`} at the end of the log, at least ${asked}${gap}; ${source}.`,
  };
}

/** Of the degree where there is no unit, else of Tg in it; told beside the figure, and moving no limit. */
function uncertaintyOfFigure(j: Judgement, s: JudgedSensor, unit: '' | TemperatureUnit): number | null {
  const expanded = uncertaintyOf(j, s);
  if (unit === '') return expanded?.degree ?? null;
  return expanded?.tgK == null ? null : temperatureDifferenceFromCelsius(expanded.tgK, unit);
}

/** The figure at the end of the log, had the sensor got hotter after its last reading as fast as it can. */
function hottestEnd(j: Judgement, s: JudgedSensor, figure: Figure): number | null {
  const { progress } = cureOf(j, s, 'hot');
  const silentMs = j.log.until - s.lastMs;
  if (silentMs <= 0) return figure(progress.alpha(), progress.tgK());
  const hottestK = kelvinFromCelsius(Math.min(HOTTEST_C, s.track.valueAt(s.lastMs) + silentMs * j.changesAtMost));
  const alpha = progress.alphaAt((j.log.until - j.log.from) / 1000, hottestK);
  const { glassTransition } = j.resin!;
  return figure(alpha, glassTransition === undefined ? null : glassTransitionK(alpha, glassTransition));
}

function decide(j: Judgement, low: number, high: number | null, atLeast: number): Outcome {
  if (isAtLeast(low, atLeast)) return 'met';
  if (high === null || isAtLeast(high, atLeast)) return 'cannot-tell';
  return showsCooling(j) && !j.isOpen ? 'not-met' : unfinished(j);
}

function pressureBeforeGel(sources: EventSources, atLeast: number): Found {
  const { j, gel } = sources;
  const unit = unitOf(j, 'pressure');
  const known = { limit: 'cure/pressure-before-gel', bounds: { atLeast }, unit };
  const cannot = (because: string, outcome: Outcome = 'cannot-tell'): Found => ({ ...known, outcome, because });
  const reached = eventTime(sources, { at: 'pressure-reaches', value: atLeast });
  const unknown = gel.unknown ?? reached.unknown;
  if (unknown !== null) return cannot(`It cannot be told: ${unknown}.`);
  if (gel.earlyMs === null || gel.lateMs === null) {
    return cannot('No judged sensor is estimated to have gelled by the end of the log.', unfinished(j));
  }
  const [gelEarlyMs, gelLateMs] = [Math.min(gel.earlyMs, gel.lateMs), Math.max(gel.earlyMs, gel.lateMs)];
  let outcome: Outcome = 'met';
  let observed = Number.POSITIVE_INFINITY;
  let sensor: string | null = null;
  for (const channel of channelsFor(j, 'pressure')) {
    const scale = pressureScale(j, 'pressure', channel)!;
    const level = scale.paFrom(atLeast);
    const sinceMs = channel.track.crossings(level, '>=').firstOn(j.log.from);
    const lowest = sinceMs === null ? -1 : channel.track.lowestBetween(sinceMs, gelEarlyMs);
    const fell = lowest >= 0 && channel.track.reading(lowest) < level;
    const shownPa = fell ? channel.track.reading(lowest) : channel.track.valueAt(gelEarlyMs);
    const isLate = sinceMs === null || sinceMs > gelLateMs;
    const gaps = gapsOf(channel.track, j.longestGapMs, j.log);
    const open = gelEarlyMs !== gelLateMs || overlaps(gaps, { from: sinceMs ?? j.log.from, until: gelLateMs });
    const each: Outcome =
      isLate || fell ? (open && !fell && gaps.length > 0 ? 'cannot-tell' : 'not-met') : open ? 'cannot-tell' : 'met';
    if (scale.figureFrom(shownPa) < observed) {
      observed = scale.figureFrom(shownPa);
      sensor = channel.layout.name;
    }
    if (each === 'not-met' || outcome === 'met') outcome = each;
  }
  const source = `gel estimated by the set ${j.resin!.code} (${j.resin!.source.status})`;
  const because =
    outcome === 'met'
      ? `Pressure had reached ${atLeast} ${unit} and kept it when the first sensor is estimated to gel; ${source}.`
      : `Pressure was ${sayBeside(observed, { atLeast }, decimalsOf(unit))} ${unit} when the first sensor is estimated to gel; at least ${atLeast} ${unit} asked by then; ${source}.`;
  return { ...known, outcome, observed, possible: observed, sensor, fromMs: gelEarlyMs, untilMs: gelLateMs, because };
}
