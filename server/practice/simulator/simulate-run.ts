import type { Cycle } from '../../../models/cycle/cycle.ts';
import type { Layout } from '../../../models/log/layout.ts';
import type { Load } from '../../../models/run/load.ts';
import { playRun } from './play-run.ts';
import { readInstruments } from './read-instruments.ts';
import type { SimulationPlan } from './simulation-plan.ts';
import { type Truth, truthOf } from './truth.ts';
import { type LogFileBytes, writeLogFiles } from './write-log.ts';

/** A run as a workshop would have it on its desk, and what nobody but the simulator knows. */
export interface SimulatedRun {
  readonly files: readonly LogFileBytes[];
  readonly layout: Layout;
  readonly cycle: Cycle;
  readonly load: Load;
  readonly truth: Truth;
}

/** No vessel's steps are longer than this. */
const LONGEST_STEP_S = 10;
const LONGEST_RUN_MIN = 20 * 60;
const PUMP_BAR = 0.91;

/** Plays a plan. The same plan and seed give the same bytes. */
export function simulateRun(plan: SimulationPlan, seed: number): SimulatedRun {
  const { recorder } = plan;
  const startMs = Date.parse(plan.startsAt);
  const history = playRun({
    startMs,
    stepS: recorder.intervalS / Math.ceil(recorder.intervalS / LONGEST_STEP_S),
    vessel: plan.vessel,
    ambientC: plan.ambientC,
    programme: plan.programme,
    pressure: plan.pressure,
    ventsAtBar: plan.ventsAtBar,
    resin: plan.resin,
    points: plan.sensors.map(({ point }) => point),
    lines: plan.lines,
    mishaps: plan.mishaps ?? [],
    tailMin: plan.tailMin ?? 10,
    longestMin: LONGEST_RUN_MIN,
  });
  const recorded = readInstruments(history, {
    recorder,
    sensors: plan.sensors,
    lines: plan.lines.map(({ name }) => name),
    faults: plan.faults ?? [],
    barometerBar: plan.barometerMbar / 1000,
    pumpBar: PUMP_BAR,
    seed,
  });
  const files = writeLogFiles(recorded, recorder, { run: plan.run, startMs, mishaps: plan.recorderMishaps ?? [] });
  return {
    files,
    layout: layoutFor(plan),
    cycle: plan.cycle,
    load: loadFor(plan),
    truth: truthOf(plan, history),
  };
}

/** The recorder's layout; one that counts elapsed time says when this file's count began. */
function layoutFor({ recorder, startsAt }: SimulationPlan): Layout {
  const { layout } = recorder;
  return 'elapsed' in layout.time ? { ...layout, time: { ...layout.time, startsAt } } : layout;
}

function loadFor(plan: SimulationPlan): Load {
  return {
    format: 'dwellbook-load/1',
    ...(plan.workOrder === undefined ? {} : { workOrder: plan.workOrder }),
    ...(plan.isBarometerRecorded ? { barometer: `${plan.barometerMbar} mbar` } : {}),
    parts: plan.parts,
    sensors: plan.sensors.map(({ point: _point, ...sensor }) => sensor),
    ...(plan.exclusions === undefined ? {} : { exclusions: plan.exclusions }),
  };
}
