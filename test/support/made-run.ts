import type { Resin } from '../../models/cure/resin.ts';
import type { Cycle, DwellStage, Stage } from '../../models/cycle/cycle.ts';
import { parseCycle } from '../../models/cycle/parse-cycle.ts';
import type { Evaluation, Finding, Outcome, PartEvaluation } from '../../models/evaluation/evaluation.ts';
import { evaluateLog } from '../../models/evaluation/judge.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import type { ReadLog } from '../../models/log/readings.ts';
import type { Exclusion, Load } from '../../models/run/load.ts';
import { parseLoad } from '../../models/run/parse-load.ts';

/** Minutes since the log's start, and the figure read there; straight lines between vertices, held after the last. */
export type Vertex = readonly [minutes: number, figure: number];

export interface MadeChannel extends Omit<ChannelLayout, 'column' | 'name'> {
  readonly history: readonly Vertex[];
  /** Scans strictly between the two minutes hold no reading. */
  readonly absent?: readonly (readonly [from: number, until: number])[];
}

type More = Partial<Omit<MadeChannel, 'history'>>;

export const part = (history: readonly Vertex[], more: More = {}): MadeChannel => ({
  role: 'part',
  unit: '°C',
  history,
  ...more,
});
export const air = (history: readonly Vertex[], more: More = {}) => part(history, { role: 'air', ...more });
export const pressure = (history: readonly Vertex[], more: More = {}) =>
  part(history, { role: 'pressure', unit: 'bar', ...more });
export const vacuum = (history: readonly Vertex[], more: More = {}) =>
  part(history, { role: 'vacuum', unit: 'bar', ...more });

/** A run made of straight lines, and what it is judged against. */
export interface MadeRun {
  /** By name; a bare history is a thermocouple on the part, in °C. */
  readonly channels: Readonly<Record<string, MadeChannel | readonly Vertex[]>>;
  readonly cycle: Cycle;
  /** Minutes between scans; 1 where not written. */
  readonly every?: number;
  /** The recorder itself was silent strictly between these minutes. */
  readonly silent?: readonly (readonly [from: number, until: number])[];
  readonly load?: Omit<Load, 'format'>;
  readonly resin?: Resin;
  readonly exclusions?: readonly Exclusion[];
  readonly barometer?: string;
  readonly open?: boolean;
  /** Sensors believed whatever is suspected: all of them, since no real sensor draws straight lines. */
  readonly believed?: readonly string[];
}

const START_MS = Date.parse('2026-03-02T08:00:00Z');

/** The instant so many minutes after a made log's start. */
export function instantAt(minutes: number): string {
  return new Date(START_MS + minutes * 60_000).toISOString();
}

/** Minutes from a made log's start to an instant. */
export function minutesTo(instant: string | null | undefined): number | null {
  return instant == null ? null : (Date.parse(instant) - START_MS) / 60_000;
}

export function excluded(channel: string, minutes: number): Exclusion {
  return { channel, from: instantAt(minutes), reason: 'lead crushed', by: 'inspector 2' };
}

/** Scans at equal intervals along the histories, the last at the latest vertex of any channel. */
export function readingsOf({ channels, every = 1, silent = [] }: MadeRun): ReadLog {
  const made = Object.entries(channels).map(([name, channel]) => ({
    name,
    ...('history' in channel ? channel : part(channel)),
  }));
  const lasts = Math.max(...made.map(({ history }) => history.at(-1)![0]));
  const minutes = Array.from({ length: Math.floor(lasts / every + 1e-9) + 1 }, (_, i) => i * every).filter(
    (minute) => !isBetween(minute, silent),
  );
  return {
    readings: {
      timeMs: Float64Array.from(minutes, (minute) => Math.round(START_MS + minute * 60_000)),
      channels: made.map(({ history, absent = [], name, ...layout }) => ({
        channel: { column: name, name, ...layout },
        value: Float64Array.from(minutes, (minute) =>
          isBetween(minute, absent) ? Number.NaN : figureAt(history, minute),
        ),
      })),
    },
    repairs: [],
    passedOver: [],
  };
}

function isBetween(minute: number, stretches: readonly (readonly [number, number])[]): boolean {
  return stretches.some(([from, until]) => from < minute && minute < until);
}

function figureAt(history: readonly Vertex[], minute: number): number {
  const after = history.findIndex(([at]) => at >= minute);
  if (after < 0) return history.at(-1)![1];
  if (after === 0) return history[0]![1];
  const [t0, v0] = history[after - 1]!;
  const [t1, v1] = history[after]!;
  return Math.round((v0 + ((v1 - v0) * (minute - t0)) / (t1 - t0)) * 1e9) / 1e9;
}

export function judged(run: MadeRun): Evaluation {
  return evaluateLog(readingsOf(run), {
    cycle: run.cycle,
    load: run.load === undefined ? null : parseLoad({ format: 'dwellbook-load/1', ...run.load }),
    resin: run.resin ?? null,
    exclusions: run.exclusions ?? [],
    believed: run.believed ?? Object.keys(run.channels),
    barometer: run.barometer ?? null,
    open: run.open ?? false,
  });
}

export function partOf(run: MadeRun, name: string | null = null): PartEvaluation {
  return judged(run).parts.find(({ part: named }) => name === null || named === name)!;
}

/** The finding of a limit, of the first part or the one named; undefined where there is none. */
export function findingOf(run: MadeRun, limit: string, partName: string | null = null): Finding | undefined {
  return partOf(run, partName).findings.find((finding) => finding.limit === limit);
}

export function outcomeOf(run: MadeRun, limit: string, partName: string | null = null): Outcome | undefined {
  return findingOf(run, limit, partName)?.outcome;
}

/** A cycle in °C and bar of these stages, read by the product's own parser. */
export function cycleOf(stages: readonly Stage[], more: Partial<Cycle> = {}): Cycle {
  return parseCycle({
    format: 'dwellbook-cycle/1',
    code: 'MADE',
    issue: 'A',
    title: 'Made of straight lines',
    units: { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
    judgedBy: 'part',
    stages,
    ...more,
  });
}

/** A dwell at 180 ± 5 °C of at least 120 min from the last sensor in to the first one out. */
export function dwell(more: Partial<DwellStage> = {}): DwellStage {
  return {
    name: 'dwell',
    kind: 'dwell',
    target: 180,
    plus: 5,
    minus: 5,
    time: { atLeast: 120 },
    clock: { opens: 'lagging-enters', closes: 'first-leaves' },
    counting: 'contiguous',
    ...more,
  };
}

/** 2 °C/min up to 180 °C and down again: in a 175 to 185 °C band from 77.5 to 202.5 min, 125 min. */
export const QUICK: readonly Vertex[] = [
  [0, 20],
  [80, 180],
  [200, 180],
  [280, 20],
];

/** 1.6 °C/min up, held 10 min longer, 2 °C/min down: in that band from 96.875 to 212.5 min. */
export const SLOW: readonly Vertex[] = [
  [0, 20],
  [100, 180],
  [210, 180],
  [290, 20],
];

/** `QUICK` with other vertices while it is held at 180 °C. */
export function heldWith(...vertices: readonly Vertex[]): readonly Vertex[] {
  return [...QUICK.slice(0, 2), ...vertices, ...QUICK.slice(2)];
}

/** A dip (or a hump) from 180 °C at 2 °C/min: to 172 °C it lies 3 min below 175 °C, 2.5 min after it begins. */
export function dipTo(temperatureC: number, atMinute: number): readonly Vertex[] {
  const oneWay = Math.abs(180 - temperatureC) / 2;
  return [
    [atMinute, 180],
    [atMinute + oneWay, temperatureC],
    [atMinute + 2 * oneWay, 180],
  ];
}
