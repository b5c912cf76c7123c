import type { ChartConfiguration, ChartDataset, Scale, ScriptableLineSegmentContext } from 'chart.js';
import type { Line, RunChart, StripAxis } from '../../models/chart/chart.ts';
import { hoursWords, timeTicksS } from '../../models/chart/ticks.ts';
import { clock, day, shortDay } from '../words/clock.ts';
import { geometryPlugin, type Scene } from './geometry-plugin.ts';
import type { Ink } from './ink.ts';
import { leftRoom, NAME_ROOM, rightRoom, stripHeight } from './strips.ts';

export type Point = { x: number; y: number };
type LineConfig = ChartConfiguration<'line', Point[]>;
type Scales = NonNullable<NonNullable<LineConfig['options']>['scales']>;

/** One canvas, one axis of hours, the strips above each other. */
export function chartConfig(scene: Scene, width: number, zone: string): LineConfig {
  return {
    type: 'line',
    data: { datasets: datasetsOf(scene.chart, scene.ink) },
    options: {
      animation: false,
      parsing: false,
      normalized: true,
      // The painter sizes it: on paper as on the screen.
      responsive: false,
      maintainAspectRatio: false,
      events: [],
      layout: { padding: { right: rightRoom(width) } },
      scales: scalesOf(scene.chart, scene.ink, width, zone),
    },
    plugins: [geometryPlugin(scene)],
  };
}

/** Strong courses come last in front of the others: Chart.js draws its first dataset last. */
export function datasetsOf(chart: RunChart, ink: Ink): ChartDataset<'line', Point[]>[] {
  return [...chart.lines].sort((a, b) => weight(b) - weight(a)).map((line) => datasetOf(line, ink));
}

function weight({ role }: Line): number {
  if (role === 'lagging') return 3;
  if (role === 'leading') return 2;
  return role === 'judged' ? 1 : 0;
}

function datasetOf(line: Line, ink: Ink): ChartDataset<'line', Point[]> {
  return {
    label: line.channel,
    data: line.hours.map((x, n) => ({ x, y: line.value[n] ?? Number.NaN })),
    yAxisID: line.strip,
    pointRadius: 0,
    spanGaps: false,
    borderJoinStyle: 'round',
    ...dashOf(line),
    ...strokeOf(line, ink),
  };
}

/** Dashed from where it is not believed any more; asked for only there, because it is asked for every segment. */
function dashOf({ excludedFromH }: Line) {
  if (excludedFromH === null) return {};
  const borderDash = ({ p0 }: ScriptableLineSegmentContext) =>
    (p0.parsed.x ?? 0) >= excludedFromH ? [1, 4] : undefined;
  return { segment: { borderDash } };
}

function strokeOf({ role }: Line, ink: Ink) {
  switch (role) {
    case 'leading':
      return { borderColor: ink.accent, borderWidth: 2.5 };
    case 'lagging':
      return { borderColor: ink.ink, borderWidth: 2.5 };
    case 'pressure':
    case 'vacuum':
      return { borderColor: ink.ink, borderWidth: 1.5 };
    case 'judged':
      return { borderColor: ink.other, borderWidth: 1 };
    case 'guide':
      return { borderColor: ink.soft, borderWidth: 1, borderDash: [1, 3] };
    default:
      return { borderColor: ink.other, borderWidth: 1, borderDash: [5, 3] };
  }
}

export function scalesOf(chart: RunChart, ink: Ink, width: number, zone: string): Scales {
  const scales: Record<string, unknown> = { x: hourScale(chart, ink, width, zone) };
  // The first scale of a stack stands lowest.
  for (const axis of [...chart.strips].reverse()) {
    scales[axis.strip] = stripScale(axis, ink, width);
    scales[`above-${axis.strip}`] = spacer();
  }
  return scales as Scales;
}

function hourScale(chart: RunChart, ink: Ink, width: number, zone: string) {
  const most = Math.max(2, Math.floor((width - leftRoom(width) - rightRoom(width)) / 64));
  const hours = timeTicksS(chart.fromH * 3600, chart.untilH * 3600, most).map((seconds) => seconds / 3600);
  const days = new Map(hours.map((atH) => [atH, day(chart.zeroMs + atH * 3_600_000, zone)]));
  return {
    type: 'linear',
    min: chart.fromH,
    max: chart.untilH,
    grid: { display: false },
    border: { color: ink.hairline },
    ticks: {
      color: ink.soft,
      font: { family: ink.font, size: 13 },
      maxRotation: 0,
      autoSkip: false,
      callback: (value: string | number, n: number) => {
        const atH = Number(value);
        const at = chart.zeroMs + atH * 3_600_000;
        const isNewDay = n > 0 && days.get(atH) !== days.get(hours[n - 1] ?? atH);
        const names = [hoursWords(Math.round(atH * 3600)), clock(at, zone)];
        return isNewDay ? [...names, shortDay(at, zone)] : names;
      },
    },
    afterBuildTicks: (scale: Scale) => {
      scale.ticks = hours.map((value) => ({ value }));
    },
  };
}

function stripScale(axis: StripAxis, ink: Ink, width: number) {
  return {
    type: axis.scale === 'log' ? 'logarithmic' : 'linear',
    position: 'left',
    stack: 'strips',
    stackWeight: stripHeight(axis.strip, width),
    min: axis.low,
    max: axis.high,
    grid: { color: ink.hairline, drawTicks: false },
    border: { display: false },
    ticks: {
      color: ink.soft,
      padding: 8,
      autoSkip: false,
      font: { family: ink.font, size: 13 },
      callback: (value: string | number) => String(Number(Number(value).toPrecision(6))).replace('-', '−'),
    },
    afterBuildTicks: (scale: Scale) => {
      scale.ticks = axis.ticks.map((value) => ({ value }));
    },
    afterFit: (scale: Scale) => {
      scale.width = leftRoom(width);
    },
  };
}

/** Room above a strip, for its name. */
function spacer() {
  return {
    type: 'linear',
    axis: 'y',
    position: 'left',
    stack: 'strips',
    stackWeight: NAME_ROOM,
    min: 0,
    max: 1,
    ticks: { display: false },
    grid: { display: false },
    border: { display: false },
  };
}
