import type { Bounds } from '../cycle/cycle.ts';
import { celsiusDifferenceFrom, type TemperatureUnit, temperatureDifferenceFromCelsius } from '../units.ts';
import { airSubject, derivedSubject, meanSubject } from './clock.ts';
import type { Dwells } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { type Found, isAtLeast, isAtMost, say, unfinished } from './finding.ts';
import { isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';
import { entersBefore, type RampStage, type RateCourse, rateCourse } from './rate-course.ts';

/** `<stage>/slowest` and `<stage>/fastest` of one stage of heating or cooling. */
export function rateLimits(j: Judgement, dwells: Dwells, stageAt: number): Found[] {
  const stage = j.cycle.stages[stageAt]!;
  if (stage.kind === 'dwell' || stage.rate === undefined) return [];
  const ramp = stage as RampStage;
  const courses = subjects(j, ramp).map(({ sensor, at }) =>
    rateCourse(j, sensor, ramp, entersBefore(j, dwells, stageAt, at)),
  );
  const found: Found[] = [];
  if (stage.rate.atLeast !== undefined) found.push(extremeRate(j, ramp, courses, 'slowest'));
  if (stage.rate.atMost !== undefined) found.push(extremeRate(j, ramp, courses, 'fastest'));
  return found;
}

function subjects(j: Judgement, { kind, rate }: RampStage): { sensor: JudgedSensor; at: number | null }[] {
  if (rate.of === 'every') return j.sensors.map((sensor, at) => ({ sensor, at }));
  const isHottest = (rate.of === 'leading') === (kind === 'heat');
  const one =
    rate.of === 'mean'
      ? meanSubject(j)
      : rate.of === 'air'
        ? airSubject(j)
        : derivedSubject(j, j.sensors, isHottest ? 'highest' : 'lowest', rate.of);
  return one === null ? [] : [{ sensor: one, at: null }];
}

function extremeRate(
  j: Judgement,
  stage: RampStage,
  courses: readonly RateCourse[],
  which: 'slowest' | 'fastest',
): Found {
  const unit = j.cycle.units.rate ?? `${j.cycle.units.temperature}/min`;
  const bounds: Bounds = which === 'slowest' ? { atLeast: stage.rate.atLeast! } : { atMost: stage.rate.atMost! };
  const limitCPerMin = cPerMin(which === 'slowest' ? stage.rate.atLeast! : stage.rate.atMost!, unit);
  const keeps = (rate: number) => (which === 'slowest' ? isAtLeast(rate, limitCPerMin) : isAtMost(rate, limitCPerMin));
  const judged = courses.filter((course) => course[which] !== null && (which === 'fastest' || counts(course)));
  const extreme = judged.reduce<RateCourse | null>(
    (best, next) =>
      best === null || (which === 'slowest' ? next.slowest! < best.slowest! : next.fastest! > best.fastest!)
        ? next
        : best,
    null,
  );
  const outcome = decide(j, courses, extreme, which, keeps);
  const rate = extreme === null ? null : inUnit(extreme[which]!, unit);
  const startMs = extreme === null ? null : which === 'slowest' ? extreme.slowestMs : extreme.fastestMs;
  const isWindow = stage.rate.average === 'window' && startMs !== null && startMs !== extreme?.stretch?.from;
  const endMs = isWindow ? startMs + stage.rate.window! * 60_000 : (extreme?.stretch?.until ?? null);
  return {
    limit: `${stage.name}/${which}`,
    outcome,
    observed: rate,
    possible: outcome === 'cannot-tell' || outcome === 'pending' ? null : rate,
    bounds,
    unit,
    sensor: extreme?.sensor.name ?? null,
    fromMs: startMs,
    untilMs: endMs,
    because: sentence(j, stage, which, extreme, rate, unit, bounds, outcome),
  };
}

/** A sensor that did not run the whole range says nothing of the slowest rate. */
function counts(course: RateCourse): boolean {
  return course.ranWhole || isExcluded(course.sensor);
}

function decide(
  j: Judgement,
  courses: readonly RateCourse[],
  extreme: RateCourse | null,
  which: 'slowest' | 'fastest',
  keeps: (rate: number) => boolean,
): Outcome {
  if (extreme !== null && !keeps(extreme[which]!)) return 'not-met';
  const believed = courses.filter(({ sensor }) => !isExcluded(sensor));
  const someRanWhole = courses.some(({ ranWhole }) => ranWhole);
  if (extreme === null || (believed.length === 0 && !someRanWhole)) return unfinished(j);
  if (courses.some(({ touchesGap }) => touchesGap)) return 'cannot-tell';
  const waits = believed.filter(({ ranWhole, isOver }) => !ranWhole && !(which === 'fastest' && isOver));
  if (waits.length === 0) return 'met';
  if (j.isOpen) return 'pending';
  if (which === 'slowest') return 'cannot-tell';
  return waits.every(({ fastest }) => fastest !== null) ? 'met' : 'cannot-tell';
}

function sentence(
  j: Judgement,
  { rate, name }: RampStage,
  which: 'slowest' | 'fastest',
  extreme: RateCourse | null,
  observed: number | null,
  unit: string,
  { atLeast, atMost }: Bounds,
  outcome: Outcome,
): string {
  const { temperature } = j.cycle.units;
  const range = `from ${rate.over[0]} to ${rate.over[1]} ${temperature}`;
  const asked = atLeast !== undefined ? `at least ${atLeast} ${unit} asked` : `at most ${atMost} ${unit} allowed`;
  if (extreme === null) {
    return j.isOpen ? `${name} has not run ${range} yet; ${asked}.` : `No sensor is seen to run ${range}; ${asked}.`;
  }
  const average = rate.average === 'window' ? `over ${rate.window} min` : 'from end to end';
  const part = extreme.ranWhole
    ? range
    : `on the part of the range ${rate.over[0]} to ${rate.over[1]} ${temperature} it ran`;
  const open = outcome === 'cannot-tell' ? '; not every sensor is seen over the whole range' : '';
  return `${extreme.sensor.name} was ${which} with ${say(observed!, 2)} ${unit} ${average} ${part}; ${asked}${open}.`;
}

function cPerMin(rate: number, unit: string): number {
  const perMin = unit.endsWith('/h') ? rate / 60 : rate;
  return celsiusDifferenceFrom(perMin, unit.slice(0, 2) as TemperatureUnit);
}

function inUnit(rateCPerMin: number, unit: string): number {
  const rate = temperatureDifferenceFromCelsius(rateCPerMin, unit.slice(0, 2) as TemperatureUnit);
  return unit.endsWith('/h') ? rate * 60 : rate;
}
