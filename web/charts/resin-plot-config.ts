import type { ChartConfiguration, ChartDataset, Scale } from 'chart.js';
import type { Ink } from './ink.ts';
import type { PlotCourse, PlotStrip, ResinPlot } from './resin-plot.ts';
import { resinPlotPlugin } from './resin-plot-plugin.ts';
import type { PlotScene } from './resin-plot-scene.ts';
import { leftRoom, NAME_ROOM, rightRoom } from './strips.ts';

export type PlotPoint = { x: number; y: number };
type Config = ChartConfiguration<'line', PlotPoint[]>;
type Scales = NonNullable<NonNullable<Config['options']>['scales']>;

const AXIS_ROOM = 46;

export function resinPlotConfig(scene: PlotScene, width: number): Config {
  return {
    type: 'line',
    data: { datasets: datasetsOfPlot(scene.plot, scene.ink) },
    options: {
      animation: false,
      parsing: false,
      normalized: true,
      // The painter sizes it: on paper as on the screen.
      responsive: false,
      maintainAspectRatio: false,
      events: [],
      layout: { padding: { right: rightRoom(width) } },
      scales: scalesOfPlot(scene.plot, scene.ink, width),
    },
    plugins: [resinPlotPlugin(scene)],
  };
}

export function plotHeight(plot: ResinPlot): number {
  return plot.strips.reduce((sum, { height }) => sum + height + NAME_ROOM, AXIS_ROOM);
}

export function datasetsOfPlot(plot: ResinPlot, ink: Ink): ChartDataset<'line', PlotPoint[]>[] {
  return plot.courses.map((course) => ({
    label: course.longName,
    data: Array.from(course.x, (x, n) => ({ x, y: course.y[n] ?? Number.NaN })),
    yAxisID: course.strip,
    pointRadius: 0,
    spanGaps: false,
    borderJoinStyle: 'round',
    ...strokeOf(course, ink),
  }));
}

function strokeOf({ weight }: PlotCourse, ink: Ink) {
  switch (weight) {
    case 'first':
      return { borderColor: ink.ink, borderWidth: 2.5 };
    case 'second':
      return { borderColor: ink.accent, borderWidth: 2, borderDash: [7, 4] };
    case 'given':
      return { borderColor: ink.other, borderWidth: 1.5 };
    case 'light':
      return { borderColor: ink.ink, borderWidth: 1.5 };
  }
}

export function scalesOfPlot(plot: ResinPlot, ink: Ink, width: number): Scales {
  const scales: Record<string, unknown> = { x: alongScale(plot, ink, width) };
  // The first scale of a stack stands lowest.
  for (const strip of [...plot.strips].reverse()) {
    scales[strip.id] = stripScale(strip, ink, width);
    scales[`above-${strip.id}`] = spacer();
  }
  return scales as Scales;
}

function alongScale(plot: ResinPlot, ink: Ink, width: number) {
  const most = Math.max(2, Math.floor((width - leftRoom(width) - rightRoom(width)) / 64));
  const ticks = plot.ticks(most);
  return {
    type: 'linear',
    min: plot.low,
    max: plot.high,
    grid: { display: false },
    border: { color: ink.hairline },
    title: { display: true, text: plot.title, align: 'end', color: ink.soft, font: { family: ink.font, size: 13 } },
    ticks: {
      color: ink.soft,
      font: { family: ink.font, size: 13 },
      maxRotation: 0,
      autoSkip: false,
      callback: (_: string | number, n: number) => ticks[n]?.text ?? '',
    },
    afterBuildTicks: (scale: Scale) => {
      scale.ticks = ticks.map(({ value }) => ({ value }));
    },
  };
}

function stripScale(strip: PlotStrip, ink: Ink, width: number) {
  return {
    type: strip.scale,
    position: 'left',
    stack: 'strips',
    stackWeight: strip.height,
    min: strip.low,
    max: strip.high,
    grid: { color: ink.hairline, drawTicks: false },
    border: { display: false },
    ticks: {
      color: ink.soft,
      padding: 8,
      autoSkip: false,
      font: { family: ink.font, size: 13 },
      callback: (value: string | number) => strip.tickText(Number(value)),
    },
    afterBuildTicks: (scale: Scale) => {
      scale.ticks = strip.ticks.map((value) => ({ value }));
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
