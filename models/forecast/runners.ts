import type { JudgedSensor, Judgement } from '../evaluation/judgement.ts';
import { isExcluded } from '../evaluation/judgement.ts';
import type { Runner } from './forecast.ts';
import { rateNow } from './rate-now.ts';

/** A believed sensor that is read now, with where it stands and how fast it goes. */
export interface SensorNow extends Runner {
  readonly sensor: JudgedSensor;
}

/** Judged sensors with a reading no older than a gap, hottest first. */
export function sensorsNow(j: Judgement): SensorNow[] {
  return j.sensors
    .filter((s) => !isExcluded(s) && s.track.length > 0 && j.log.until - s.lastMs <= j.longestGapMs)
    .map((sensor) => ({
      sensor,
      channel: sensor.name,
      valueC: sensor.track.valueAt(sensor.lastMs),
      rateCPerMin: rateNow(sensor.track, sensor.lastMs),
    }))
    .sort((a, b) => b.valueC - a.valueC);
}

/** Furthest along and furthest behind in the direction of travel. */
export function runnersOf(sensors: readonly SensorNow[], isCooling: boolean) {
  const [hottest = null, coldest = null] = [sensors[0], sensors.at(-1)];
  return isCooling
    ? { leading: runner(coldest), lagging: runner(hottest) }
    : { leading: runner(hottest), lagging: runner(coldest) };
}

function runner(sensor: SensorNow | null): Runner | null {
  if (sensor === null) return null;
  const { channel, valueC, rateCPerMin } = sensor;
  return { channel, valueC, rateCPerMin };
}
