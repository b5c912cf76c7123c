import { DomainError } from '../../models/errors.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import { isTemperatureUnit, parsePressureUnit } from '../../models/units.ts';
import { readCycleDocument, requireCycle } from '../store/cycles.ts';
import type { Db } from '../store/database.ts';
import { readResinDocument, requireResin } from '../store/resins.ts';
import { KINDS, type PartKind, TOOLS } from './plan-kinds.ts';
import { AMBIENT_C, PRACTICES, type Practice } from './plan-practices.ts';
import { SKERRY_180 } from './plan-resins.ts';
import { AUTOCLAVE_1, AUTOCLAVE_2, BLANKET_1, OVEN_2, PRESS_1, type PracticeVessel } from './plan-vessels.ts';
import { practiceOfCycle } from './practice-of-cycle.ts';
import type { History } from './simulator/history.ts';
import { playRun } from './simulator/play-run.ts';
import { beginRandom } from './simulator/random.ts';
import { readInstruments } from './simulator/read-instruments.ts';
import type { Figures } from './simulator/recorder.ts';
import { refineHistory } from './simulator/refine-history.ts';

/** What an invented vessel is to run, and by which channels it is watched. */
export interface InventedProgramme {
  readonly cycle: { readonly code: string; readonly issue: string };
  readonly channels: readonly ChannelLayout[];
  readonly intervalS: number;
  readonly seed: number;
}

const LONGEST_STEP_S = 10;
const LONGEST_RUN_MIN = 20 * 60;
const SOURCE_BAR = 0.91;
/** After the programme the vessel stands open before the next load. */
const TAIL_MIN = 20;

/** Vessels that run a released cycle's programme over and over. They play; nothing they show was ever measured. */
export function inventVesselBy(db: Db): (programme: InventedProgramme) => {
  readonly scans: number;
  figures(scan: number, round: number): Float64Array;
} {
  return ({ cycle: { code, issue }, channels, intervalS, seed }) => {
    channels.forEach(figuresOf);
    const row = requireCycle(db, code, issue);
    if (row.status !== 'released') {
      throw new DomainError('state-conflict', `Cycle ${code} issue ${issue} is not released`, { cycle: code, issue });
    }
    const cycle = readCycleDocument(db, row);
    const resin = cycle.cure === undefined ? SKERRY_180 : readResinDocument(db, requireResin(db, cycle.cure.resin));
    const history = play(practiceOfCycle(cycle, resin), channels, intervalS, seed);
    let values: readonly Float64Array[] = [];
    let valuesOf = -1;
    return {
      scans: Math.floor((history.count - 1) / Math.round(intervalS / history.stepS)) + 1,
      figures(scan, round) {
        if (round !== valuesOf) values = readChannels(history, channels, intervalS, (seed + round) >>> 0);
        valuesOf = round;
        return Float64Array.from(channels, ({ scale = 1, offset = 0 }, n) => {
          return ((values[n]?.[scan] ?? NaN) - offset) / scale;
        });
      },
    };
  };
}

function play(practice: Practice, channels: readonly ChannelLayout[], intervalS: number, seed: number): History {
  const random = beginRandom(seed);
  const scattered = (share: number) => 1 + share * (2 * random.next() - 1);
  const { kind, vessel } = placeOf(practice);
  const { sensors, tool, startDegree } = KINDS[kind];
  // Played in steps as long as the model bears and made finer after: nothing else may wait for it long.
  const finer = Math.max(1, Math.floor(LONGEST_STEP_S / intervalS));
  const history = playRun({
    startMs: 0,
    stepS: finer > 1 ? intervalS * finer : intervalS / Math.ceil(intervalS / LONGEST_STEP_S),
    vessel: vessel.physics,
    ambientC: AMBIENT_C * scattered(0.1),
    programme: practice.programme,
    pressure: practice.pressure,
    ventsAtBar: practice.ventsAtBar,
    resin: practice.resin,
    points: watched(channels).map((_, i) => {
      const { column } = sensors[i % sensors.length]!;
      return {
        ...column,
        laminateM: column.laminateM * scattered(0.05),
        position: column.position * scattered(0.06),
        toolJPerM2K: TOOLS[tool],
        startDegree: startDegree ?? practice.resin.initialDegree ?? 0.01,
      };
    }),
    lines: linesOf(channels).map((name) => ({
      name,
      sourceBar: SOURCE_BAR,
      pumpMin: (practice.pumpMin ?? 2.5) * scattered(0.2),
      leakPerMin: 0.004,
      opensMin: 1,
    })),
    mishaps: [],
    tailMin: TAIL_MIN,
    longestMin: LONGEST_RUN_MIN,
  });
  return refineHistory(history, finer);
}

/** Thermocouples in the load; where there is none, one that nobody reads, for the programme to go by. */
function watched(channels: readonly ChannelLayout[]): readonly string[] {
  const names = channels.filter(({ role }) => role === 'part' || role === 'tool').map(({ name }) => name);
  return names.length > 0 ? names : [''];
}

function linesOf(channels: readonly ChannelLayout[]): string[] {
  return channels.filter(({ role }) => role === 'vacuum').map(({ name }) => name);
}

function readChannels(history: History, channels: readonly ChannelLayout[], intervalS: number, seed: number) {
  return channels.map((channel) => {
    const figures = figuresOf(channel);
    const recorder = {
      intervalS,
      layout: { channels: [channel] },
      temperature: figures,
      pressure: figures,
      vacuum: figures,
    };
    const sensors = watched(channels).map((name) => ({ channel: name }));
    const instruments = {
      sensors,
      lines: linesOf(channels),
      faults: [],
      barometerBar: 1.013,
      pumpBar: SOURCE_BAR,
      seed,
    };
    return readInstruments(history, { ...instruments, recorder }).values[0] ?? new Float64Array(0);
  });
}

/** As a usual recorder shows: tenths of a degree, hundredths of a bar. */
function figuresOf({ name, role, unit }: ChannelLayout): Figures {
  if (role === 'other') {
    throw new DomainError('unit-unknown', `An invented vessel has nothing to show for "${name}", which is "other"`);
  }
  if (isTemperatureUnit(unit)) return { decimals: 1, noise: 0.12 };
  const unitsInBar = 1e5 / parsePressureUnit(unit).paPerUnit;
  return { decimals: Math.max(0, 2 - Math.round(Math.log10(unitsInBar))), noise: 0.005 * unitsInBar };
}

/** What is cured by a practice, and in which vessel. */
function placeOf(practice: Practice): { readonly kind: PartKind; readonly vessel: PracticeVessel } {
  switch (practice) {
    case PRACTICES.stocks:
      return { kind: 'rudder-stock', vessel: AUTOCLAVE_2 };
    case PRACTICES.radomes:
      return { kind: 'radome', vessel: OVEN_2 };
    case PRACTICES['post-cures']:
      return { kind: 'post-cured-strut', vessel: OVEN_2 };
    case PRACTICES.skins:
      return { kind: 'radome-skin', vessel: PRESS_1 };
    case PRACTICES.repairs:
      return { kind: 'repair', vessel: BLANKET_1 };
    default:
      return { kind: 'strut', vessel: practice.pressure === null ? OVEN_2 : AUTOCLAVE_1 };
  }
}
