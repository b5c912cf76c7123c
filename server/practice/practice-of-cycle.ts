import type { Resin } from '../../models/cure/resin.ts';
import type { Bounds, Cycle, RateLimit, Stage } from '../../models/cycle/cycle.ts';
import { celsiusDifferenceFrom, celsiusFrom, parsePressureUnit, pascalFrom } from '../../models/units.ts';
import { PRACTICES, type Practice } from './plan-practices.ts';
import type { Segment } from './simulator/programme.ts';
import type { PressureProgramme } from './simulator/vessel-pressure.ts';

const RATE_C_PER_MIN = 1.5;
/** The fan on and the pump running before anything is heated. */
const SETTLE_MIN = 14;
const HOLD_MIN = 60;
const END_C = 45;
const PUMP_MIN = 2.5;

/** How a workshop would run a cycle: as Skerry Row does where it is one of its own, or by what the document asks. */
export function practiceOfCycle(cycle: Cycle, resin: Resin): Practice {
  const own = Object.values(PRACTICES).find(
    (practice) => practice.cycle.code === cycle.code && practice.cycle.issue === cycle.issue,
  );
  if (own !== undefined) return own;
  const hasVacuum = cycle.windows?.some(({ quantity }) => quantity === 'vacuum') === true;
  return {
    cycle,
    resin,
    programme: { segments: segmentsOf(cycle) },
    pressure: pressureOf(cycle),
    ventsAtBar: hasVacuum ? 1.6 : null,
    pumpMin: hasVacuum ? PUMP_MIN : null,
  };
}

function segmentsOf(cycle: Cycle): Segment[] {
  const unit = cycle.units.temperature;
  const segments: Segment[] = [{ kind: 'soak', minutes: SETTLE_MIN }];
  for (const [i, stage] of cycle.stages.entries()) {
    if (stage.kind !== 'dwell') continue;
    const minusC = celsiusDifferenceFrom(stage.minus, unit);
    const targetC = celsiusFrom(stage.target, unit);
    // A little under the target: the heat of reaction comes on top.
    const toC = targetC - 0.3 * minusC;
    segments.push({ kind: 'ramp', toC, cPerMin: rateCPerMin(cycle, cycle.stages[i - 1]) });
    segments.push({
      kind: 'soak',
      minutes: between(stage.time, HOLD_MIN, 0.15),
      onceLaggingC: targetC - 0.9 * minusC,
    });
  }
  const last = cycle.stages.at(-1);
  const untilC = last?.kind === 'cool' && last.until !== undefined ? celsiusFrom(last.until, unit) - 5 : END_C;
  segments.push({ kind: 'ramp', toC: Math.min(END_C, untilC), cPerMin: rateCPerMin(cycle, last) });
  return segments;
}

/** A rate within the stage's limit, °C/min. */
function rateCPerMin(cycle: Cycle, stage: Stage | undefined): number {
  const limit: RateLimit | undefined = stage === undefined || stage.kind === 'dwell' ? undefined : stage.rate;
  if (limit === undefined) return RATE_C_PER_MIN;
  const unit = cycle.units.rate ?? `${cycle.units.temperature}/min`;
  const perMin = between(limit, RATE_C_PER_MIN, 0.25) / (unit.endsWith('/h') ? 60 : 1);
  return celsiusDifferenceFrom(perMin, unit.startsWith('°F') ? '°F' : '°C');
}

/** So far from the lower of two bounds to the upper; where only one is written, a little on its good side. */
function between(bounds: Bounds | undefined, otherwise: number, share: number): number {
  const { atLeast, atMost } = bounds ?? {};
  if (atLeast !== undefined) return atMost === undefined ? atLeast * 1.05 : atLeast + share * (atMost - atLeast);
  return atMost === undefined ? otherwise : atMost * 0.6;
}

function pressureOf({ windows = [], units }: Cycle): PressureProgramme | null {
  const window = windows.find(({ quantity, atLeast }) => quantity === 'pressure' && atLeast !== undefined);
  if (window?.atLeast === undefined) return null;
  const unit = parsePressureUnit(units.pressure ?? 'bar');
  const toBar = pascalFrom(between(window, 0, 0.5), unit) / 1e5 - (unit.absolute ? 1 : 0);
  return {
    toBar,
    barPerMin: 0.5,
    when: { at: 'lagging-reaches', temperatureC: 45 },
    release: { when: { at: 'hottest-cools-to', temperatureC: 55 }, barPerMin: 0.5 },
  };
}
