import type { Cycle, CycleEvent, DwellStage, Stage } from '../../models/cycle/cycle.ts';
import { upperOf } from '../../models/cycle/words-of-figures.ts';
import { temperatureFromCelsius } from '../../models/units.ts';

/** One stage as it is sketched: minutes along a drawn course, temperatures as written. */
export interface ShapeStage {
  readonly stage: Stage;
  readonly fromMin: number;
  readonly untilMin: number;
  readonly fromTemperature: number;
  readonly untilTemperature: number;
}

export interface ShapeWindow {
  readonly name: string;
  readonly quantity: 'pressure' | 'vacuum';
  readonly atLeast: number | null;
  readonly atMost: number | null;
  readonly fromMin: number;
  readonly untilMin: number;
}

/** A cycle as a course one run might take: drawn to be read, not to scale where the document leaves a choice. */
export interface CycleShape {
  readonly stages: readonly ShapeStage[];
  readonly windows: readonly ShapeWindow[];
  /** Minutes the picture holds: to the end of the last stage, and room for its slowest way. */
  readonly lengthMin: number;
  readonly lowest: number;
  readonly highest: number;
}

export function shapeOfCycle(cycle: Cycle): CycleShape {
  const stages = stagesOf(cycle);
  const endMin = stages.at(-1)?.untilMin ?? 1;
  const windows = (cycle.windows ?? []).map((window) => ({
    name: window.name,
    quantity: window.quantity,
    atLeast: window.atLeast ?? null,
    atMost: window.atMost ?? null,
    fromMin: minuteOf(window.from, stages, endMin),
    untilMin: minuteOf(window.until, stages, endMin),
  }));
  const dwells = cycle.stages.filter((stage) => stage.kind === 'dwell');
  const highest = Math.max(
    ...dwells.map(upperOf),
    ...stages.map((s) => s.untilTemperature),
    cycle.ceiling ?? -Infinity,
  );
  const last = stages.at(-1);
  // Room for the slow side of a last rate.
  const spareMin = last && last.stage.kind !== 'dwell' ? (last.untilMin - last.fromMin) * 0.3 : 0;
  return { stages, windows, lengthMin: endMin + spareMin, lowest: ambient(cycle), highest };
}

function stagesOf(cycle: Cycle): ShapeStage[] {
  const dwells = cycle.stages.filter((stage): stage is DwellStage => stage.kind === 'dwell');
  const longest = Math.max(60, ...dwells.map(dwellMinutes));
  let minute = 0;
  let temperature = ambient(cycle);
  return cycle.stages.map((stage, n) => {
    const untilTemperature = endOf(cycle, stage, n, temperature);
    const travel = Math.abs(untilTemperature - temperature);
    const minutes = stage.kind === 'dwell' ? dwellMinutes(stage) : travelMinutes(cycle, stage, travel, longest);
    const shape = {
      stage,
      fromMin: minute,
      untilMin: minute + minutes,
      fromTemperature: temperature,
      untilTemperature,
    };
    minute += minutes;
    temperature = untilTemperature;
    return shape;
  });
}

function endOf(cycle: Cycle, stage: Stage, n: number, temperature: number): number {
  if (stage.kind === 'dwell') return stage.target;
  const next = cycle.stages.slice(n + 1).find((later) => later.kind === 'dwell');
  if (next?.kind === 'dwell') return next.target;
  if (stage.kind === 'cool')
    return stage.until ?? Math.min(temperature, temperatureFromCelsius(60, cycle.units.temperature));
  return stage.rate ? Math.max(...stage.rate.over) : temperature;
}

function dwellMinutes(dwell: DwellStage): number {
  const { atLeast, atMost } = dwell.time ?? {};
  return atLeast ?? atMost ?? dwell.longest?.atMost ?? 60;
}

/** At the middle of the rates asked for, kept between a third and twice the longest dwell so that it can be seen. */
function travelMinutes(cycle: Cycle, stage: Stage, travel: number, longest: number): number {
  const rate = stage.kind === 'dwell' ? undefined : stage.rate;
  const perHour = cycle.units.rate?.endsWith('/h') ? 60 : 1;
  const slow = rate?.atLeast ?? rate?.atMost ?? 2 * perHour;
  const fast = rate?.atMost ?? slow;
  const minutes = (travel * perHour * 2) / (slow + fast);
  return Math.min(Math.max(minutes, longest / 3), longest * 2);
}

function ambient(cycle: Cycle): number {
  return temperatureFromCelsius(20, cycle.units.temperature);
}

function minuteOf(event: CycleEvent, stages: readonly ShapeStage[], lengthMin: number): number {
  const minute = momentOf(event, stages, lengthMin) + (event.plus ?? 0);
  return Math.min(Math.max(minute, 0), lengthMin);
}

function momentOf(event: CycleEvent, stages: readonly ShapeStage[], lengthMin: number): number {
  switch (event.at) {
    case 'start':
    case 'heat-on':
      return 0;
    case 'end':
      return lengthMin;
    case 'opens':
      return stages.find(({ stage }) => stage.name === event.stage)?.fromMin ?? 0;
    case 'closes':
      return stages.find(({ stage }) => stage.name === event.stage)?.untilMin ?? lengthMin;
    case 'first-reaches':
    case 'all-reach':
      return crossing(stages, event.value, 1) ?? lengthMin;
    case 'first-cools-to':
    case 'all-cool-to':
      return crossing([...stages], event.value, -1) ?? lengthMin;
    case 'pressure-reaches':
    case 'vacuum-reaches':
      return lengthMin * 0.08;
    case 'pressure-falls-to':
    case 'vacuum-falls-to':
      return lengthMin * 0.96;
    case 'gel':
      return stages.filter(({ stage }) => stage.kind === 'dwell').at(-1)?.fromMin ?? lengthMin / 2;
  }
}

function crossing(stages: readonly ShapeStage[], value: number, direction: 1 | -1): number | null {
  for (const s of stages) {
    const travel = s.untilTemperature - s.fromTemperature;
    if (travel * direction <= 0) continue;
    const part = (value - s.fromTemperature) / travel;
    if (part >= 0 && part <= 1) return s.fromMin + part * (s.untilMin - s.fromMin);
  }
  return null;
}
