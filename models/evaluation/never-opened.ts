import { round9, temperatureDifferenceFromCelsius, temperatureFromCelsius } from '../units.ts';
import { DEFAULT_CLOCK, meanSubject } from './clock.ts';
import { bandC, type DwellCourse } from './dwell-course.ts';
import { showsCooling } from './dwell-time.ts';
import { say } from './finding.ts';
import type { JudgedSensor, Judgement } from './judgement.ts';

/** What kept a clock from opening: who stayed furthest from the band, and the sentence that says how far. */
export interface NeverOpened {
  readonly sensor: string | null;
  readonly because: string;
}

/**
 * Names the sensor that stayed coldest (in a dwell colder than the one before: hottest), how far it came and how far
 * short; of a clock that waits for the mean or the air, those instead.
 */
export function neverOpened(j: Judgement, course: DwellCourse): NeverOpened {
  const { stage, isColder } = course;
  const unit = j.cycle.units.temperature;
  const isWaiting = j.isOpen && !showsCooling(j);
  const never = `The clock of ${stage.name} ${isWaiting ? 'has not opened yet' : 'never opened'}`;
  const { opens } = stage.clock ?? DEFAULT_CLOCK;
  const far = furthestBehind(j, course, waitedFor(j, opens));
  if (far === null) return { sensor: null, because: `${never}: no reading to judge by` };
  const { name } = far;
  if (far.shortC <= 0) {
    const where = isColder ? 'came down to' : 'reached';
    const together = opens === 'lagging-enters' ? 'but never all of them at once' : 'but not when it counted';
    return { sensor: name, because: `${never}: every sensor ${where} the band, ${together}` };
  }
  const reading = `${say(temperatureFromCelsius(far.readingC, unit))} ${unit}`;
  const short = `${say(temperatureDifferenceFromCelsius(far.shortC, unit), 2)} ${unit}`;
  const came = isColder
    ? `came down to ${reading}, ${short} above the band`
    : `reached ${reading}, ${short} short of the band`;
  if (opens === 'mean-enters') return { sensor: name, because: `${never}: the mean ${came}` };
  if (opens === 'air-enters') return { sensor: name, because: `${never}: ${name} ${came}` };
  return { sensor: name, because: `${never}: ${name} stayed ${isColder ? 'hottest' : 'coldest'} and ${came}` };
}

function waitedFor(j: Judgement, opens: string): readonly JudgedSensor[] {
  if (opens === 'air-enters') return j.air;
  const mean = opens === 'mean-enters' ? meanSubject(j) : null;
  return mean === null ? j.sensors : [mean];
}

interface Behind {
  readonly name: string;
  readonly readingC: number;
  readonly shortC: number;
}

function furthestBehind(j: Judgement, course: DwellCourse, subjects: readonly JudgedSensor[]): Behind | null {
  const { stage, isColder, sinceMs } = course;
  const came = subjects.flatMap((s): Behind[] => {
    const { track } = s;
    const at = isColder ? track.lowestBetween(sinceMs, s.lastMs) : track.highestBetween(j.log.from, s.lastMs);
    if (at < 0) return [];
    const { lowerC, upperC } = bandC(j, stage, s, 0);
    const readingC = track.reading(at);
    return [{ name: s.name, readingC, shortC: round9(isColder ? readingC - upperC : lowerC - readingC) }];
  });
  return came.reduce<Behind | null>((far, next) => (far === null || next.shortC > far.shortC ? next : far), null);
}
