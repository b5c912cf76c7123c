import type { Resin } from '../../../models/cure/resin.ts';
import type { ChannelLayout } from '../../../models/log/layout.ts';
import { TOOLS, type Tool } from '../../../server/practice/plan-kinds.ts';
import { SKERRY_120 } from '../../../server/practice/plan-resins.ts';
import { AUTOCLAVE_1, OVEN_2 } from '../../../server/practice/plan-vessels.ts';
import type { Point } from '../../../server/practice/simulator/point.ts';
import type { Recorder } from '../../../server/practice/simulator/recorder.ts';
import type { SimulationPlan } from '../../../server/practice/simulator/simulation-plan.ts';

/** A resin that gives off no heat, for runs in which only conduction counts. */
const { thermal: _none, ...inert } = SKERRY_120;
export const INERT: Resin = inert;

/** A column of laminate on a tool. */
export function column(tool: Tool, change: Partial<Point> = {}): Point {
  return {
    toolJPerM2K: TOOLS[tool],
    laminateM: 0.004,
    nodes: 1,
    junction: 0,
    position: 1,
    bagM2KPerW: 0.02,
    startDegree: 0.02,
    ...change,
  };
}

export function thermocouples(count: number, unit: '°C' | '°F', column_: (n: number) => string): ChannelLayout[] {
  return Array.from({ length: count }, (_, i) => ({ column: column_(i + 1), name: `TC${i + 1}`, role: 'part', unit }));
}

type RecorderOf = Pick<Recorder, 'layout'> & Partial<Recorder>;

/** A recorder in a dialect of the case's own. */
export function recorder(own: RecorderOf): Recorder {
  return {
    name: own.layout.name,
    vessel: 'test vessel',
    intervalS: 60,
    temperature: { decimals: 1, noise: 0.06 },
    pressure: { decimals: 1, noise: 0.05 },
    vacuum: { decimals: 2, noise: 0.02 },
    absent: '----',
    lineEnd: '\r\n',
    extension: 'csv',
    preamble: [],
    ...own,
  };
}

type PlanOf = Pick<SimulationPlan, 'run' | 'startsAt' | 'recorder' | 'cycle' | 'programme' | 'sensors'> &
  Partial<SimulationPlan>;

/** A run in an oven, without gas and without bags, unless the case says otherwise. */
export function inOven(own: PlanOf): SimulationPlan {
  return {
    resin: INERT,
    vessel: OVEN_2.physics,
    ambientC: 20,
    barometerMbar: 1009,
    isBarometerRecorded: false,
    pressure: null,
    ventsAtBar: null,
    lines: [],
    parts: [],
    ...own,
  };
}

export function inAutoclave(own: PlanOf): SimulationPlan {
  return { ...inOven(own), vessel: AUTOCLAVE_1.physics, ...own };
}
