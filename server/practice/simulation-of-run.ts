import { KINDS, TOOLS, ZONES } from './plan-kinds.ts';
import { AMBIENT_C, PRACTICES, type Practice } from './plan-practices.ts';
import { OVEN_1_RECORDER, RECORDERS } from './plan-recorders.ts';
import { ROLLS } from './plan-rolls.ts';
import type { PlannedPart, PlannedRun } from './plan-run.ts';
import { VESSELS } from './plan-vessels.ts';
import type { BagLine } from './simulator/bag-line.ts';
import type { Programme } from './simulator/programme.ts';
import { beginRandom, seedFrom } from './simulator/random.ts';
import type { PlannedSensor, SimulationPlan } from './simulator/simulation-plan.ts';

const SOURCE_BAR = 0.91;
/** A sound bag: what it loses in a minute, as a share. */
const SOUND_LEAK_PER_MIN = 0.004;

/** A run of the workshop's plan, with everything filled in that is as usual. */
export function simulationOf(planned: PlannedRun): SimulationPlan {
  const practice: Practice = PRACTICES[planned.practice];
  const recorder = named([...RECORDERS, OVEN_1_RECORDER], ({ vessel }) => vessel === planned.vessel, planned.vessel);
  const vessel = named(VESSELS, ({ name }) => name === planned.vessel, planned.vessel);
  return {
    run: planned.run,
    startsAt: planned.startsAt,
    recorder,
    cycle: practice.cycle,
    resin: practice.resin,
    workOrder: planned.workOrder,
    vessel: vessel.physics,
    ambientC: ambientOn(planned),
    barometerMbar: planned.barometerMbar,
    isBarometerRecorded: planned.isBarometerRecorded,
    programme: withScatter(planned.programme ?? practice.programme, planned.run),
    pressure: planned.pressure ?? practice.pressure,
    ventsAtBar: practice.ventsAtBar,
    lines: linesOf(planned, practice),
    parts: planned.parts.map((part) => ({
      part: part.part,
      ...(part.quantity === undefined ? {} : { quantity: part.quantity }),
      ...(part.bagLine === undefined ? {} : { bagLine: part.bagLine }),
      startDegree: startDegreeOf(part),
      ...humidityOf(part, planned),
      ...(part.leakTest === undefined ? {} : { leakTest: part.leakTest }),
    })),
    sensors: planned.parts.flatMap((part) => sensorsOf(part, planned)),
    mishaps: planned.mishaps ?? [],
    faults: planned.faults ?? [],
    recorderMishaps: planned.recorderMishaps ?? [],
  };
}

function linesOf({ run, parts, fouledLines = [] }: PlannedRun, { pumpMin }: Practice): BagLine[] {
  if (pumpMin === null) return [];
  const names = [...new Set(parts.flatMap(({ bagLine }) => bagLine ?? []))];
  return names.map((name) => {
    const fouled = fouledLines.find(({ line }) => line === name);
    return {
      name,
      sourceBar: SOURCE_BAR,
      pumpMin: pumpMin * scattered(`${run} ${name}`, 0.2),
      leakPerMin: SOUND_LEAK_PER_MIN,
      opensMin: 1,
      ...(fouled === undefined ? {} : { fouled }),
    };
  });
}

function sensorsOf(part: PlannedPart, planned: PlannedRun): PlannedSensor[] {
  const { corrections = {}, uncertainty } = planned;
  const kind = KINDS[part.kind];
  return part.channels.map((channel, i) => {
    const place = kind.sensors[i];
    if (place === undefined) throw new Error(`${part.part} has more thermocouples than ${part.kind} has places`);
    const own = corrections[channel];
    return {
      channel,
      parts: [part.part],
      place: place.place,
      ...(uncertainty === undefined ? {} : { uncertainty }),
      ...(own === undefined ? {} : { corrections: own }),
      point: {
        ...place.column,
        laminateM: place.column.laminateM * scattered(`${part.part} ${place.place}`, 0.03),
        position: place.column.position * ZONES[part.zone] * scattered(`${planned.run} ${channel}`, 0.08),
        toolJPerM2K: TOOLS[part.toolMake ?? kind.tool],
        startDegree: startDegreeOf(part),
      },
    };
  });
}

/** No two runs are alike: ramps within 3 %, soaks within 2 minutes of what was meant. */
function withScatter(programme: Programme, run: string): Programme {
  const random = beginRandom(seedFrom(run));
  return {
    ...programme,
    segments: programme.segments.map((segment) =>
      segment.kind === 'ramp'
        ? { ...segment, cPerMin: segment.cPerMin * (0.97 + 0.06 * random.next()) }
        : { ...segment, minutes: segment.minutes + 3 * random.next() },
    ),
  };
}

/** The hall is warmer in summer. */
function ambientOn({ startsAt, run }: PlannedRun): number {
  const month = new Date(startsAt).getUTCMonth();
  return AMBIENT_C + 2.5 * Math.sin(((month - 3) / 6) * Math.PI) + 2 * (scattered(run, 0.5) - 1);
}

/**
 * Relative humidity of the lay-up room, %, written down where the barometer is; none for what comes in cured. Such
 * rooms are kept between about 40 and 60 % (common practice).
 */
function humidityOf({ kind }: PlannedPart, { run, isBarometerRecorded }: PlannedRun): { humidity?: number } {
  if (!isBarometerRecorded || KINDS[kind].startDegree !== undefined) return {};
  return { humidity: Math.round(48 * scattered(`${run} lay-up`, 0.12)) };
}

/** A factor peculiar to a name, within `share` of 1. */
function scattered(name: string, share: number): number {
  return 1 + share * (2 * beginRandom(seedFrom(name)).next() - 1);
}

function startDegreeOf({ kind, roll }: PlannedPart): number {
  return KINDS[kind].startDegree ?? named(Object.values(ROLLS), (one) => one.roll === roll, roll).startDegree;
}

function named<T>(all: readonly T[], is: (one: T) => boolean, name: string): T {
  const found = all.find(is);
  if (found === undefined) throw new Error(`the plan names ${name}, which is not in it`);
  return found;
}
