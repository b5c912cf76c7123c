import type { Cycle } from '../../models/cycle/cycle.ts';
import { parseCycle } from '../../models/cycle/parse-cycle.ts';
import type { ChannelLayout } from '../../models/log/layout.ts';
import type { Readings } from '../../models/log/readings.ts';

export const THERMOCOUPLES = 24;
export const SCANS = 36_000;

const VERTICES_MIN_C = [
  [0, 20],
  [30, 20],
  [85, 110],
  [180, 110],
  [230, 180],
  [400, 180],
  [470, 60],
  [600, 25],
] as const;

/** Ten hours at 1 Hz: 24 thermocouples that lag by up to 8 min with 0.2 °C of noise, air, pressure and bag vacuum. */
export function tenHourRun(): Readings {
  const timeMs = Float64Array.from({ length: SCANS }, (_, i) => Date.UTC(2026, 2, 3, 8) + 1000 * i);
  const channels = Array.from({ length: THERMOCOUPLES }, (_, k) => {
    const lagMin = 2 + (6 * k) / THERMOCOUPLES;
    return column({ name: `TC${k + 1}`, role: 'part', unit: '°C' }, (minute, i) =>
      tenths(programme(minute - lagMin) + 0.2 * noise(i, k)),
    );
  });
  channels.push(
    column({ name: 'air', role: 'air', unit: '°C' }, (minute, i) => tenths(programme(minute) + 1 + 0.2 * noise(i, 40))),
  );
  channels.push(
    column(
      { name: 'vessel pressure', role: 'pressure', unit: 'bar' },
      (minute, i) =>
        Math.round((minute < 20 || minute > 520 ? 0 : Math.min(7, (minute - 20) / 3)) * 100 + noise(i, 50)) / 100,
    ),
  );
  channels.push(
    column(
      { name: 'bag vacuum', role: 'vacuum', unit: 'bar' },
      (minute, i) => Math.round((minute < 26 ? 860 : 0) + noise(i, 51)) / 1000,
    ),
  );
  return { timeMs, channels };
}

/** A cycle with every kind of limit the run can be held against. */
export function fullCycle(): Cycle {
  const ramp = { atLeast: 0.4, atMost: 3, average: 'window', window: 10, of: 'every' };
  const clock = { opens: 'lagging-enters', closes: 'first-leaves' };
  return parseCycle({
    format: 'dwellbook-cycle/1',
    code: 'BENCH',
    issue: '1',
    title: 'Every kind of limit',
    units: { temperature: '°C', pressure: 'bar', vacuum: 'bar' },
    judgedBy: 'part',
    stages: [
      { name: 'heat-up 1', kind: 'heat', rate: { ...ramp, over: [50, 100] } },
      {
        name: 'dwell 1',
        kind: 'dwell',
        target: 110,
        plus: 5,
        minus: 5,
        time: { atLeast: 60, atMost: 100 },
        clock,
        counting: 'contiguous',
        longest: { atMost: 110, clock: { opens: 'leading-enters', closes: 'last-leaves' } },
        forgive: { below: { by: 2, for: 3 }, above: { by: 3, for: 5 } },
      },
      { name: 'heat-up 2', kind: 'heat', rate: { ...ramp, over: [120, 170] } },
      {
        name: 'dwell 2',
        kind: 'dwell',
        target: 180,
        plus: 5,
        minus: 5,
        time: { atLeast: 120, atMost: 180 },
        clock,
        counting: 'accumulated',
      },
      {
        name: 'cool-down',
        kind: 'cool',
        rate: { atMost: 4, over: [170, 70], average: 'window', window: 10, of: 'every' },
        until: 60,
      },
    ],
    windows: [
      {
        name: 'bag vacuum',
        quantity: 'vacuum',
        atLeast: 0.75,
        from: { at: 'start' },
        until: { at: 'pressure-reaches', value: 1.4 },
      },
      {
        name: 'cure pressure',
        quantity: 'pressure',
        atLeast: 6.5,
        atMost: 7.5,
        from: { at: 'all-reach', value: 100 },
        until: { at: 'all-cool-to', value: 60 },
      },
    ],
    ceiling: 190,
    spread: { atMost: 30, during: 'heating' },
    sensors: { workingAtLeast: 4 },
    log: { longestGap: 2 },
  });
}

function column(layout: Omit<ChannelLayout, 'column'>, at: (minute: number, scan: number) => number) {
  const channel: ChannelLayout = { column: layout.name, ...layout };
  return { channel, value: Float64Array.from({ length: SCANS }, (_, i) => at(i / 60, i)) };
}

function programme(minute: number): number {
  const after = VERTICES_MIN_C.findIndex(([at]) => at >= minute);
  if (after <= 0) return VERTICES_MIN_C[0][1];
  const [x0, y0] = VERTICES_MIN_C[after - 1]!;
  const [x1, y1] = VERTICES_MIN_C[after]!;
  return y0 + ((y1 - y0) * (minute - x0)) / (x1 - x0);
}

/** Repeatable, between −1 and 1. */
function noise(scan: number, seed: number): number {
  return Math.sin(12.9898 * scan + 78.233 * seed) * Math.cos(4.1414 * scan + seed);
}

function tenths(value: number): number {
  return Math.round(value * 10) / 10;
}
