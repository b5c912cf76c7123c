import { TOOL_MATERIALS } from '../../models/cure/heat/materials.ts';
import { setLayup } from '../actions/set-layup.ts';
import { setTool } from '../actions/set-tool.ts';
import type { SetLayupRequest } from '../contract/layups.ts';
import type { PartKind } from './plan-kinds.ts';
import type { PlannedPart, PlannedRun } from './plan-run.ts';
import type { PracticeDeed } from './practice-deed.ts';
import { beginRandom, seedFrom } from './simulator/random.ts';

const TOOLS_AT_MS = Date.parse('2025-10-21T09:00:00Z');
const HOUR_MS = 3_600_000;

/** What is on record of tools: their make is that of the simulator. */
export function toolDeeds(): PracticeDeed[] {
  const tools = [
    ...tool(['RT-01', 'RT-02', 'RT-03'], 'Rudder stock mould', 12, 'aluminium 6061'),
    ...tool(['ST-01', 'ST-02', 'ST-03', 'ST-04'], 'Strut mould', 10, 'carbon/epoxy tooling laminate'),
  ];
  return tools.map(({ code, ...record }, n) => ({
    atMs: TOOLS_AT_MS + n * 240_000,
    by: 'process engineer 1',
    does: (parts) => setTool(parts, code, record),
  }));
}

/** Lay-ups of the thick parts, the day before their cure. Nobody wrote down those of the others. */
export function layupDeeds(runs: readonly PlannedRun[]): PracticeDeed[] {
  return runs.flatMap((run) =>
    run.parts.flatMap((part, n): PracticeDeed[] => {
      const thickMm = THICKNESS_MM[part.kind];
      if (thickMm === undefined) return [];
      const endsMs = Date.parse(run.startsAt) - 15 * HOUR_MS + n * 600_000;
      const layup = layupOf(part, run, thickMm, endsMs);
      return [{ atMs: endsMs + 300_000, by: run.operator, does: (parts) => setLayup(parts, part.part, layup) }];
    }),
  );
}

const THICKNESS_MM: Partial<Record<PartKind, number>> = { 'rudder-stock': 28, 'heavy-stock': 46 };
const PLY_MM = 0.2;
const PLIES_A_DEBULK = 35;

/** The simulator's laminate, as a shop would have written it down. */
const LAMINATE = {
  name: 'skerry-180 tape, cured',
  densityKgM3: 1570,
  specificHeatJKgK: 1000,
  conductivityWMK: 0.62,
  resinDensityKgM3: 1270,
  source: 'invented for practice',
};

function layupOf({ part, tool: code }: PlannedPart, { workOrder }: PlannedRun, thicknessMm: number, endsMs: number) {
  const random = beginRandom(seedFrom(`${part} lay-up`));
  const plies = Math.round(thicknessMm / PLY_MM);
  const lastsMs = (4 + plies / 40) * HOUR_MS;
  const debulks = Math.floor(plies / PLIES_A_DEBULK);
  const iso = (ms: number) => new Date(60_000 * Math.round(ms / 60_000)).toISOString();
  return {
    tool: code ?? null,
    workOrder,
    customer: 'the boat shed',
    thicknessMm,
    plies,
    fibreFraction: 0.58,
    laminate: LAMINATE,
    beganAt: iso(endsMs - lastsMs),
    endedAt: iso(endsMs),
    roomC: Number((20.5 + 2 * random.next()).toFixed(1)),
    humidityPercent: Math.round(44 + 10 * random.next()),
    debulks: Array.from({ length: debulks }, (_, n) => ({
      at: iso(endsMs - lastsMs * (1 - (n + 1) / (debulks + 1))),
      minutes: 15,
      vacuum: 0.9,
      vacuumUnit: 'bar',
    })),
  } satisfies SetLayupRequest;
}

function tool(codes: readonly string[], title: string, thicknessMm: number, make: string) {
  const material = TOOL_MATERIALS.find(({ name }) => name === make);
  if (material === undefined) throw new Error(`the plan names ${make}, which is in no table`);
  return codes.map((code) => ({ code, title, thicknessMm, material: { ...material } }));
}
