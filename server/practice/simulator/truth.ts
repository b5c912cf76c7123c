import type { Cycle, DwellStage } from '../../../models/cycle/cycle.ts';
import { celsiusFrom, round9 } from '../../../models/units.ts';
import { lastUp, level, nextDown, nextUp, type Row } from './crossings.ts';
import type { History } from './history.ts';
import type { SimulationPlan } from './simulation-plan.ts';

/** What is so by construction, read off the noise-free history. Minutes are from the first scan. */
export interface Truth {
  readonly history: History;
  readonly channels: readonly string[];
  readonly sensors: readonly SensorTruth[];
  readonly dwells: readonly { readonly name: string; readonly lowerC: number; readonly upperC: number }[];
}

export interface SensorTruth {
  readonly channel: string;
  readonly parts: readonly string[];
  readonly highestC: number;
  readonly degree: number;
  /** By dwell of the cycle; null where the sensor never got there. */
  readonly dwells: readonly (DwellTruth | null)[];
}

export interface DwellTruth {
  readonly entersMin: number;
  readonly leavesMin: number;
  readonly highestC: number;
}

export function truthOf(plan: SimulationPlan, history: History): Truth {
  const bands = bandsOf(plan.cycle);
  const rows = history.junctionC.map((values) => ({ values, stepMin: history.stepS / 60 }));
  const passages = findPassages(rows, bands);
  return {
    history,
    channels: plan.sensors.map(({ channel }) => channel),
    dwells: bands,
    sensors: plan.sensors.map(({ channel, parts = [] }, i) => ({
      channel,
      parts,
      highestC: rows[i]!.values.reduce((most, value) => Math.max(most, value), -Infinity),
      degree: history.degree[i]!.at(-1)!,
      dwells: passages[i]!,
    })),
  };
}

/** Bands of the cycle's dwells in °C, formed in the unit they are written in. */
export function bandsOf({ stages, units }: Cycle): { name: string; lowerC: number; upperC: number }[] {
  return stages
    .filter((stage): stage is DwellStage => stage.kind === 'dwell')
    .map(({ name, target, minus, plus }) => ({
      name,
      lowerC: round9(celsiusFrom(target - minus, units.temperature)),
      upperC: round9(celsiusFrom(target + plus, units.temperature)),
    }));
}

/** Minutes from the last of the given sensors in to the first out; 0 where one of them never came. */
export function minutesAllIn(truth: Truth, dwell: string, channels: readonly string[]): number {
  const at = truth.dwells.findIndex(({ name }) => name === dwell);
  const passages = truth.sensors.filter(({ channel }) => channels.includes(channel)).map(({ dwells }) => dwells[at]!);
  if (passages.length === 0 || passages.some((passage) => passage === null)) return 0;
  const opens = Math.max(...passages.map(({ entersMin }) => entersMin));
  const closes = Math.min(...passages.map(({ leavesMin }) => leavesMin));
  return Math.max(0, closes - opens);
}

/** A stretch in which some sensor was under a temperature. */
export interface Dip {
  readonly fromMin: number;
  untilMin: number;
  deepestC: number;
}

/** Every stretch between two minutes in which any of the sensors is under a temperature. */
export function dipsUnder(
  truth: Truth,
  belowC: number,
  channels: readonly string[],
  between: readonly [number, number],
): readonly Readonly<Dip>[] {
  const stretches: Dip[] = [];
  const { history } = truth;
  const rows = channels.map((channel) => history.junctionC[truth.channels.indexOf(channel)]!);
  const stepMin = history.stepS / 60;
  for (let n = Math.ceil(between[0] / stepMin); n * stepMin <= between[1]; n++) {
    const coldestC = Math.min(...rows.map((row) => row[n]!));
    if (coldestC >= belowC) continue;
    const last = stretches.at(-1);
    if (last && n * stepMin - last.untilMin < 1.5 * stepMin) {
      last.untilMin = n * stepMin;
      last.deepestC = Math.max(last.deepestC, belowC - coldestC);
    } else {
      stretches.push({ fromMin: n * stepMin, untilMin: n * stepMin, deepestC: belowC - coldestC });
    }
  }
  return stretches;
}

/**
 * When each sensor enters and leaves each dwell, by the cycle and verdict rules for rising dwells.
 *
 * Limits: a dwell colder than the one before it is not worked out here.
 */
function findPassages(rows: readonly Row[], bands: readonly { lowerC: number; upperC: number }[]) {
  const passages: (DwellTruth | null)[][] = rows.map(() => []);
  let searchMin = 0;
  for (const [b, { lowerC, upperC }] of bands.entries()) {
    const next = bands[b + 1];
    const enters = rows.map((row) => nextUp(row, lowerC, searchMin));
    const leaves = rows.map((row, i) => {
      const from = enters[i] ?? null;
      if (from === null) return null;
      const goneMin = next ? nextUp(row, (upperC + next.lowerC) / 2, from) : null;
      if (goneMin !== null) return lastUp(row, upperC, from, goneMin);
      return lastDown(row, lowerC, from);
    });
    for (const [i, row] of rows.entries()) {
      const [entersMin, leavesMin] = [enters[i] ?? null, leaves[i] ?? null];
      passages[i]!.push(
        entersMin === null || leavesMin === null
          ? null
          : { entersMin, leavesMin, highestC: highest(row, entersMin, leavesMin) },
      );
    }
    searchMin = Math.min(...leaves.map((minute) => minute ?? Infinity));
    if (searchMin === Infinity) searchMin = 0;
  }
  return passages;
}

function lastDown(row: Row, temperatureC: number, fromMin: number): number | null {
  let found: number | null = null;
  for (let at = nextDown(row, temperatureC, fromMin); at !== null; at = nextDown(row, temperatureC, at + row.stepMin)) {
    found = at;
  }
  return found;
}

function highest(row: Row, fromMin: number, untilMin: number): number {
  let most = Math.max(level(row, fromMin), level(row, untilMin));
  for (let n = Math.ceil(fromMin / row.stepMin); n * row.stepMin <= untilMin; n++)
    most = Math.max(most, row.values[n]!);
  return most;
}
