import type { Bounds, Cycle, DwellStage, RateLimit, WindowLimit } from './cycle.ts';
import { vacuumWords } from './words-of-event.ts';
import { bandWords, figure, lowerOf, rateUnitOf, sentenceCase, upperOf } from './words-of-figures.ts';

/** One limit of a cycle, as screens list it. */
export interface CycleLimit {
  /** As findings name it: `dwell 1/time`, `window/cure pressure`, `ceiling`. */
  readonly name: string;
  /** For a person: `Dwell 1, time`. */
  readonly title: string;
  /** What is asked: `60 to 80 min`; a few words where it is no figure. */
  readonly band: string;
  /** An estimate from a model, never a measurement. */
  readonly isEstimate: boolean;
}

/** The limits a cycle has, in the order its document writes them. */
export function limitsOfCycle(cycle: Cycle): CycleLimit[] {
  return [
    ...cycle.stages.flatMap((stage) =>
      stage.kind === 'dwell' ? dwellLimits(cycle, stage) : rateLimits(cycle, stage.name, stage.rate),
    ),
    ...(cycle.windows ?? []).map((window) => windowLimit(cycle, window)),
    ...temperatureLimits(cycle),
    ...sensorLimits(cycle),
    ...leakTestLimits(cycle),
    ...cureLimits(cycle),
    ...(cycle.material?.outLife ? [limit('material/out-life', 'Material, out-life', 'within its out-life')] : []),
    ...(cycle.instruments?.calibration
      ? [limit('instruments/calibration', 'Instruments, calibration', 'in date on the day of the run')]
      : []),
  ];
}

/** Human title of a limit by its name, also for one the cycle does not have. */
export function limitTitle(cycle: Cycle, name: string): string {
  return limitsOfCycle(cycle).find((one) => one.name === name)?.title ?? sentenceCase(name.replace('/', ', '));
}

function limit(name: string, title: string, band: string, isEstimate = false): CycleLimit {
  return { name, title, band, isEstimate };
}

function dwellLimits(cycle: Cycle, dwell: DwellStage): CycleLimit[] {
  const unit = cycle.units.temperature;
  const title = sentenceCase(dwell.name);
  const limits: CycleLimit[] = [];
  if (dwell.time !== undefined)
    limits.push(limit(`${dwell.name}/time`, `${title}, time`, bandWords(dwell.time, 'min')));
  if (dwell.longest !== undefined) {
    limits.push(limit(`${dwell.name}/longest`, `${title}, longest`, bandWords(dwell.longest, 'min')));
  }
  limits.push(limit(`${dwell.name}/upper`, `${title}, upper`, bandWords({ atMost: upperOf(dwell) }, unit)));
  if (dwell.below === 'not-allowed') {
    limits.push(limit(`${dwell.name}/lower`, `${title}, lower`, bandWords({ atLeast: lowerOf(dwell) }, unit)));
  }
  return limits;
}

function rateLimits(cycle: Cycle, stage: string, rate: RateLimit | undefined): CycleLimit[] {
  if (rate === undefined) return [];
  const side = (which: 'slowest' | 'fastest', bounds: Bounds) =>
    limit(`${stage}/${which}`, `${sentenceCase(stage)}, ${which}`, bandWords(bounds, rateUnitOf(cycle)));
  return [
    ...(rate.atLeast === undefined ? [] : [side('slowest', { atLeast: rate.atLeast })]),
    ...(rate.atMost === undefined ? [] : [side('fastest', { atMost: rate.atMost })]),
  ];
}

function windowLimit(cycle: Cycle, window: WindowLimit): CycleLimit {
  const unit = window.quantity === 'vacuum' ? vacuumWords(cycle) : (cycle.units.pressure ?? '');
  return limit(`window/${window.name}`, sentenceCase(window.name), bandWords(window, unit));
}

function temperatureLimits({ ceiling, spread, units }: Cycle): CycleLimit[] {
  return [
    ...(ceiling === undefined ? [] : [limit('ceiling', 'Ceiling', bandWords({ atMost: ceiling }, units.temperature))]),
    ...(spread === undefined
      ? []
      : [limit('spread', 'Spread', bandWords({ atMost: spread.atMost }, units.temperature))]),
  ];
}

function sensorLimits({ sensors, log }: Cycle): CycleLimit[] {
  const limits: CycleLimit[] = [];
  if (sensors?.workingAtLeast !== undefined) {
    limits.push(limit('sensors/working', 'Sensors, working', bandWords({ atLeast: sensors.workingAtLeast }, '')));
  }
  if (sensors?.own === true) limits.push(limit('sensors/own', 'Sensors, own', 'each part has its own'));
  if (sensors?.mustWork !== undefined) {
    limits.push(limit('sensors/must-work', 'Sensors, must work', sensors.mustWork.join(', ')));
  }
  if (log?.longestGap !== undefined) {
    limits.push(limit('log/gap', 'Log, longest gap', bandWords({ atMost: log.longestGap }, 'min')));
  }
  return limits;
}

function leakTestLimits({ leakTest, units }: Cycle): CycleLimit[] {
  if (leakTest === undefined) return [];
  const loss = `at most ${figure(leakTest.lossAtMost)} ${units.vacuum ?? ''} in ${figure(leakTest.over)} min`;
  return [limit('leak-test', 'Bag leak test', loss)];
}

function cureLimits({ cure, units }: Cycle): CycleLimit[] {
  const limits: CycleLimit[] = [];
  if (cure?.degreeAtLeast !== undefined) {
    limits.push(limit('cure/degree', 'Degree of cure, estimate', bandWords({ atLeast: cure.degreeAtLeast }, ''), true));
  }
  if (cure?.tgAtLeast !== undefined) {
    limits.push(limit('cure/tg', 'Tg, estimate', bandWords({ atLeast: cure.tgAtLeast }, units.temperature), true));
  }
  if (cure?.pressureBeforeGel !== undefined) {
    const band = bandWords({ atLeast: cure.pressureBeforeGel }, units.pressure ?? '');
    limits.push(limit('cure/pressure-before-gel', 'Pressure before gel, estimate', band, true));
  }
  return limits;
}
