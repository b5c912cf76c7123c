import type { Bounds, RateSubject } from '../cycle/cycle.ts';
import { bandWords } from '../cycle/words-of-figures.ts';
import { celsiusDifferenceFrom, type TemperatureUnit, temperatureDifferenceFromCelsius } from '../units.ts';
import { airSubject, derivedSubject, meanSubject } from './clock.ts';
import type { Dwells } from './dwells.ts';
import type { Outcome } from './evaluation.ts';
import { capitalised, type Found, isAtLeast, isAtMost, sayBeside, unfinished } from './finding.ts';
import { isExcluded, type JudgedSensor, type Judgement } from './judgement.ts';
import { entersBefore, type RampStage, type RateCourse, rateCourse, type Slope } from './rate-course.ts';

/** `<stage>/slowest` and `<stage>/fastest` of one stage of heating or cooling. */
export function rateLimits(j: Judgement, dwells: Dwells, stageAt: number): Found[] {
  const stage = j.cycle.stages[stageAt]!;
  if (stage.kind === 'dwell' || stage.rate === undefined) return [];
  const ramp = stage as RampStage;
  const courses = subjects(j, ramp).map((sensor) =>
    rateCourse(j, sensor, ramp, entersBefore(j, dwells, stageAt, sensor)),
  );
  const found: Found[] = [];
  if (stage.rate.atLeast !== undefined) found.push(extremeRate(j, ramp, courses, 'slowest'));
  if (stage.rate.atMost !== undefined) found.push(extremeRate(j, ramp, courses, 'fastest'));
  return found;
}

function subjects(j: Judgement, { kind, rate }: RampStage): readonly JudgedSensor[] {
  if (rate.of === 'every') return j.sensors;
  const isHottest = (rate.of === 'leading') === (kind === 'heat');
  const one =
    rate.of === 'mean'
      ? meanSubject(j)
      : rate.of === 'air'
        ? airSubject(j)
        : derivedSubject(j, j.sensors, isHottest ? 'highest' : 'lowest', rate.of);
  return one === null ? [] : [one];
}

function extremeRate(
  j: Judgement,
  stage: RampStage,
  courses: readonly RateCourse[],
  which: 'slowest' | 'fastest',
): Found {
  const unit = j.cycle.units.rate ?? `${j.cycle.units.temperature}/min`;
  const limit = (which === 'slowest' ? stage.rate.atLeast : stage.rate.atMost)!;
  const bounds: Bounds = which === 'slowest' ? { atLeast: limit } : { atMost: limit };
  const limitCPerMin = cPerMin(limit, unit);
  const keeps = (rate: number) => (which === 'slowest' ? isAtLeast(rate, limitCPerMin) : isAtMost(rate, limitCPerMin));
  const sign = which === 'slowest' ? -1 : 1;
  const extreme = courses
    .filter((course) => course[which] !== null && (which === 'fastest' || counts(course)))
    .reduce<RateCourse | null>(
      (best, next) => (best === null || sign * next[which]!.perMin > sign * best[which]!.perMin ? next : best),
      null,
    );
  const slope = extreme?.[which] ?? null;
  const outcome = decide(j, courses, slope, which, keeps);
  const rate = slope === null ? null : inUnit(slope.perMin, unit);
  return {
    limit: `${stage.name}/${which}`,
    outcome,
    observed: rate,
    possible: outcome === 'cannot-tell' || outcome === 'pending' ? null : rate,
    bounds,
    unit,
    sensor: extreme?.sensor.name ?? null,
    fromMs: slope?.from ?? null,
    untilMs: slope?.until ?? null,
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
  slope: Slope | null,
  which: 'slowest' | 'fastest',
  keeps: (rate: number) => boolean,
): Outcome {
  if (slope !== null && !keeps(slope.perMin)) return 'not-met';
  const believed = courses.filter(({ sensor }) => !isExcluded(sensor));
  const someRanWhole = courses.some(({ ranWhole }) => ranWhole);
  if (slope === null || (believed.length === 0 && !someRanWhole)) return unfinished(j);
  const waits = believed.filter(({ ranWhole, isOver }) => !ranWhole && !(which === 'fastest' && isOver));
  if (waits.length > 0 && j.isOpen) return 'pending';
  if (courses.some(({ touchesGap }) => touchesGap)) return 'cannot-tell';
  if (waits.length === 0) return 'met';
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
  bounds: Bounds,
  outcome: Outcome,
): string {
  const { temperature } = j.cycle.units;
  const range = `from ${rate.over[0]} to ${rate.over[1]} ${temperature}`;
  const asked = `${bandWords(bounds, unit)} ${which === 'slowest' ? 'asked' : 'allowed'}`;
  if (extreme === null) {
    if (rate.of === 'air' && j.air.length === 0) return `The log has no air channel to judge ${name} by; ${asked}.`;
    return `No sensor ${j.isOpen ? 'has yet run' : 'is seen to run'} ${range}; ${asked}.`;
  }
  const { from, until } = extreme[which]!;
  const isWindow = rate.average === 'window' && Math.abs(until - from - rate.window! * 60_000) < 1;
  const average = isWindow ? ` over ${rate.window} min` : '';
  const part = extreme.ranWhole ? range : `on what it ran of ${rate.over[0]} to ${rate.over[1]} ${temperature}`;
  const open = outcome === 'cannot-tell' ? '; not every sensor is seen over the whole range' : '';
  const soFar = outcome === 'pending' ? '; the run goes on' : '';
  return `${subjectInWords(extreme.sensor, rate.of)} was ${which} with ${sayBeside(observed!, bounds, 2)} ${unit}${average} ${part}; ${asked}${open}${soFar}.`;
}

function subjectInWords({ name }: JudgedSensor, of: RateSubject): string {
  if (of === 'leading' || of === 'lagging') return `The ${of} sensor`;
  return of === 'mean' ? 'The mean' : capitalised(name);
}

function cPerMin(rate: number, unit: string): number {
  const perMin = unit.endsWith('/h') ? rate / 60 : rate;
  return celsiusDifferenceFrom(perMin, unit.slice(0, 2) as TemperatureUnit);
}

function inUnit(rateCPerMin: number, unit: string): number {
  const rate = temperatureDifferenceFromCelsius(rateCPerMin, unit.slice(0, 2) as TemperatureUnit);
  return unit.endsWith('/h') ? rate * 60 : rate;
}
