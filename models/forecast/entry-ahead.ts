import { bandC } from '../evaluation/dwell-course.ts';
import { Dwells } from '../evaluation/dwells.ts';
import { iso, say } from '../evaluation/finding.ts';
import type { Judgement } from '../evaluation/judgement.ts';
import type { Forecast } from './forecast.ts';
import { rateNow } from './rate-now.ts';
import { type SensorNow, sensorsNow } from './runners.ts';

/** A sensor slower than this, °C/min, is not coming. */
const STANDING_C_PER_MIN = 0.05;
/** Further ahead than this nothing is foretold. */
const FURTHEST_MIN = 24 * 60;

interface Coming {
  readonly sensor: SensorNow;
  readonly toGoC: number;
  /** Null where it is not coming nearer. */
  readonly minutes: number | null;
}

/**
 * When the last sensor is expected in the next dwell.
 *
 * While the air goes on heating, along a straight line at its present rate. Where the air has levelled off, towards the
 * air as a body with one time constant, τ = (air − T)/(dT/dt): t = τ ln((air − T)/(air − level)). A sensor that would
 * not reach the level that way is not coming.
 *
 * Limits: a first-order body under a steady air (Newton's law of cooling); an exotherm brings it in sooner.
 */
export function entryAhead(j: Judgement, index: number): Forecast['entry'] {
  const dwells = new Dwells(j);
  const stage = dwells.stages[index];
  if (stage === undefined) return null;
  const { course } = dwells.at(index, 'least');
  const sign = course.isColder ? -1 : 1;
  const coming = sensorsNow(j).flatMap((sensor): Coming[] => {
    const { lowerC, upperC } = bandC(j, stage, sensor.sensor, 0);
    const toGoC = sign * ((course.isColder ? upperC : lowerC) - sensor.valueC);
    return toGoC > 0 ? [{ sensor, toGoC, minutes: minutesTo(j, sensor, toGoC, sign) }] : [];
  });
  if (coming.length === 0) return null;
  const last = coming.reduce((a, b) => (isBehind(b, a) ? b : a));
  const { channel, rateCPerMin } = last.sensor;
  const going = rateCPerMin === null ? '' : ` at ${say(rateCPerMin, 2)} °C/min`;
  return {
    dwell: stage.name,
    expectedAt: last.minutes === null ? null : iso(j.log.until + last.minutes * 60_000),
    by: channel,
    because:
      last.minutes === null
        ? `${channel} has ${say(last.toGoC)} °C to go and is not coming nearer${going}.`
        : `${channel} has ${say(last.toGoC)} °C to go${going}.`,
  };
}

function isBehind(a: Coming, b: Coming): boolean {
  if (a.minutes === null || b.minutes === null) return b.minutes !== null || (a.minutes === null && a.toGoC > b.toGoC);
  return a.minutes > b.minutes;
}

function minutesTo(j: Judgement, { valueC, rateCPerMin }: SensorNow, toGoC: number, sign: 1 | -1): number | null {
  const rate = sign * (rateCPerMin ?? 0);
  if (rate < STANDING_C_PER_MIN) return null;
  const minutes = alongAir(j, valueC, toGoC, rate, sign) ?? toGoC / rate;
  return minutes <= FURTHEST_MIN ? minutes : null;
}

/** Minutes towards an air that has levelled off; null where no air says so. Infinite where it never gets there. */
function alongAir(j: Judgement, valueC: number, toGoC: number, rate: number, sign: 1 | -1): number | null {
  const airs = j.air.filter(({ lastMs }) => j.log.until - lastMs <= j.longestGapMs);
  if (airs.length === 0) return null;
  const air = airs.reduce((a, b) => (sign * (b.track.valueAt(b.lastMs) - a.track.valueAt(a.lastMs)) < 0 ? b : a));
  const airRate = sign * (rateNow(air.track, air.lastMs) ?? 0);
  if (airRate > rate / 2) return null;
  const ahead = sign * (air.track.valueAt(air.lastMs) - valueC);
  if (ahead <= 0) return null;
  return ahead <= toGoC ? Number.POSITIVE_INFINITY : (ahead / rate) * Math.log(ahead / (ahead - toGoC));
}
