import type { WindowLimit } from '../cycle/cycle.ts';
import { bandC } from '../evaluation/dwell-course.ts';
import type { PartEvaluation } from '../evaluation/evaluation.ts';
import { iso, say } from '../evaluation/finding.ts';
import type { Judgement } from '../evaluation/judgement.ts';
import { channelsFor, decimalsOf, pressureScale, unitOf } from '../evaluation/pressure-scale.ts';
import type { RunChannel } from '../run/channel.ts';
import { celsiusFrom, temperatureDifferenceFromCelsius } from '../units.ts';
import type { Forecast, Nearing } from './forecast.ts';
import { rateNow } from './rate-now.ts';
import type { SensorNow } from './runners.ts';
import type { StageNow } from './stage-now.ts';

/** Told when a limit would be broken within so many minutes at the present rate … */
const AHEAD_MIN = 15;
/** … or when so little is left to it: °C, or this part of a pressure or vacuum limit. */
const CLOSE_C = 1;
const CLOSE_PART = 0.03;

/** A figure on its way to a level it must not pass. */
interface Approach {
  readonly limit: string;
  readonly sensor: string;
  /** What is left to the level, negative where it is passed, and how fast that shrinks, per minute. */
  readonly left: number;
  readonly shrinks: number;
  readonly close: number;
  readonly unit: string;
  readonly decimals: number;
}

/** Limits that would be broken soon at the present rate, or that are close, nearest first. */
export function nearingOf(
  j: Judgement,
  part: PartEvaluation,
  stage: StageNow | null,
  sensors: readonly SensorNow[],
  dwell: Forecast['dwell'],
): Nearing[] {
  const decided = new Set(part.findings.filter(({ outcome }) => outcome === 'not-met').map(({ limit }) => limit));
  const found = [...temperatures(j, stage, sensors), ...windows(j, part)]
    .filter(({ limit }) => !decided.has(limit))
    .flatMap((approach) => nearing(j, approach) ?? []);
  const time = dwell === null || decided.has(`${dwell.dwell}/time`) ? null : timeRunsOut(j, dwell);
  const all = time === null ? found : [...found, time];
  return nearestOfEach(all).sort((a, b) => instantOf(a) - instantOf(b));
}

function instantOf({ expectedAt }: Nearing): number {
  return expectedAt === null ? Number.POSITIVE_INFINITY : Date.parse(expectedAt);
}

/** One line a limit: the sensor that gets there first, or stands closest. */
function nearestOfEach(all: readonly Nearing[]): Nearing[] {
  const byLimit = new Map<string, Nearing>();
  for (const one of all) {
    const known = byLimit.get(one.limit);
    const isFirst =
      known === undefined || instantOf(one) < instantOf(known) || (!known.expectedAt && one.margin < known.margin);
    if (isFirst) byLimit.set(one.limit, one);
  }
  return [...byLimit.values()];
}

function nearing(j: Judgement, { limit, sensor, left, shrinks, close, unit, decimals }: Approach): Nearing | null {
  const minutes = left >= 0 && shrinks > 0 ? left / shrinks : null;
  const isSoon = minutes !== null && minutes <= AHEAD_MIN;
  if (!isSoon && Math.abs(left) > close) return null;
  const figure = say(Math.abs(left), decimals);
  const room = left < 0 ? `${sensor} is ${figure} ${unit} beyond it` : `${sensor} is ${figure} ${unit} from it`;
  return {
    limit,
    sensor,
    margin: left,
    unit,
    expectedAt: isSoon ? iso(j.log.until + minutes * 60_000) : null,
    text: isSoon ? `${room} and gets there in ${say(Math.max(0, minutes), 0)} min at the present rate.` : `${room}.`,
  };
}

function temperatures(j: Judgement, stage: StageNow | null, sensors: readonly SensorNow[]): Approach[] {
  const unit = j.cycle.units.temperature;
  const inUnit = (differenceC: number) => temperatureDifferenceFromCelsius(differenceC, unit);
  const approach = (limit: string, { channel, rateCPerMin }: SensorNow, leftC: number, sign: 1 | -1): Approach => ({
    limit,
    sensor: channel,
    left: inUnit(leftC),
    shrinks: inUnit(sign * (rateCPerMin ?? 0)),
    close: inUnit(CLOSE_C),
    unit,
    decimals: 1,
  });
  return sensors.flatMap((sensor) => {
    const found: Approach[] = [];
    if (j.cycle.ceiling !== undefined) {
      found.push(approach('ceiling', sensor, celsiusFrom(j.cycle.ceiling, unit) - sensor.valueC, 1));
    }
    if (stage?.stage.kind === 'dwell') {
      const { name } = stage.stage;
      const { lowerC, upperC } = bandC(j, stage.stage, sensor.sensor, 0);
      found.push(approach(`${name}/upper`, sensor, upperC - sensor.valueC, 1));
      // What has not come in yet is expected, not nearing.
      if (sensor.valueC >= lowerC) found.push(approach(`${name}/time`, sensor, sensor.valueC - lowerC, -1));
    }
    return found;
  });
}

/** Pressure and vacuum windows that are open now. */
function windows(j: Judgement, part: PartEvaluation): Approach[] {
  return (j.cycle.windows ?? []).flatMap((window) => {
    const record = part.windows.find(({ name }) => name === window.name);
    if (record === undefined || record.from === null || record.until !== null) return [];
    return channelsFor(j, window.quantity).flatMap((channel) => approachesOf(j, window, channel));
  });
}

function approachesOf(j: Judgement, window: WindowLimit, channel: RunChannel): Approach[] {
  const scale = pressureScale(j, window.quantity, channel);
  const { track } = channel;
  if (scale === null || track.length === 0 || j.log.until - track.lastMs > j.longestGapMs) return [];
  const pa = track.reading(track.length - 1);
  const now = scale.figureFrom(pa);
  const rate = scale.figureFrom(pa + (rateNow(track, track.lastMs) ?? 0)) - now;
  const unit = unitOf(j, window.quantity);
  const known = { limit: `window/${window.name}`, sensor: channel.layout.name, unit, decimals: decimalsOf(unit) };
  const { atLeast, atMost } = window;
  return [
    ...(atLeast === undefined
      ? []
      : [{ ...known, left: now - atLeast, shrinks: -rate, close: CLOSE_PART * Math.abs(atLeast) }]),
    ...(atMost === undefined
      ? []
      : [{ ...known, left: atMost - now, shrinks: rate, close: CLOSE_PART * Math.abs(atMost) }]),
  ];
}

/** A dwell that must have been left before long. */
function timeRunsOut(j: Judgement, { dwell, notAfter }: NonNullable<Forecast['dwell']>): Nearing | null {
  if (notAfter === null) return null;
  const minutes = (Date.parse(notAfter) - j.log.until) / 60_000;
  if (minutes > AHEAD_MIN || minutes < 0) return null;
  const text = `The dwell must be left within ${say(minutes, 0)} min.`;
  return { limit: `${dwell}/time`, sensor: null, margin: minutes, unit: 'min', expectedAt: notAfter, text };
}
