import type { Chart, Plugin } from 'chart.js';
import { spreadLabels } from '../../models/chart/spread-labels.ts';
import { shortened } from './draw-names.ts';
import type { Ink } from './ink.ts';
import { courseAt, type PlotCourse } from './resin-plot.ts';
import { drawCurveNames, drawPlotMarks, drawRails } from './resin-plot-marks.ts';
import { colourOfWeight, type PlotScene } from './resin-plot-scene.ts';

/** Draws the rails behind the courses, and names, marks and the cursor in front of them. */
export function resinPlotPlugin(scene: PlotScene): Plugin<'line'> {
  return {
    id: 'resin-plot',
    beforeDatasetsDraw: (chart: Chart) => drawRails(chart, scene),
    afterDatasetsDraw: (chart: Chart) => {
      chart.ctx.save();
      for (const strip of scene.plot.strips) {
        drawStripName(chart, scene.ink, strip.id, strip.title);
        drawEndNames(chart, scene, strip.id);
      }
      drawPlotMarks(chart, scene);
      drawCurveNames(chart, scene);
      if (scene.cursorX !== null && !scene.ink.isOnPaper) drawCursor(chart, scene, scene.cursorX);
      chart.ctx.restore();
    },
  };
}

function drawStripName({ ctx, scales, chartArea }: Chart, ink: Ink, id: string, title: string): void {
  ctx.font = `400 13px ${ink.font}`;
  ctx.textAlign = 'left';
  ctx.textBaseline = 'middle';
  ctx.fillStyle = ink.soft;
  ctx.fillText(title, chartArea.left, (scales[id]?.top ?? 0) - 16);
}

const APART = 15;

function drawEndNames({ ctx, scales, chartArea, width }: Chart, { plot, ink }: PlotScene, id: string): void {
  const scale = scales[id];
  if (!scale) return;
  const ends = plot.courses
    .filter(({ strip, name }) => strip === id && name !== '')
    .map((course) => ({ course, end: endOf(course) }))
    .filter(({ end }) => end !== null);
  const wanted = ends.map(({ end }) => Math.min(Math.max(scale.getPixelForValue(end ?? 0), scale.top), scale.bottom));
  const room = { apart: APART, lowest: scale.top + 4, highest: scale.bottom - 4 };
  const places = spreadLabels(wanted, room);
  ctx.textAlign = 'left';
  ctx.textBaseline = 'middle';
  ends.forEach(({ course }, n) => {
    ctx.font = `${course.weight === 'first' ? 680 : 400} 13px ${ink.font}`;
    ctx.fillStyle = colourOfWeight(course.weight, ink);
    ctx.fillText(shortened(ctx, course.name, width - chartArea.right - 8), chartArea.right + 8, places[n] ?? 0);
  });
}

function endOf({ y }: PlotCourse): number | null {
  for (let n = y.length - 1; n >= 0; n -= 1) {
    const value = y[n];
    if (value !== undefined && Number.isFinite(value)) return value;
  }
  return null;
}

function drawCursor({ ctx, scales, chartArea }: Chart, { plot, ink }: PlotScene, atX: number): void {
  const x = scales.x?.getPixelForValue(atX) ?? 0;
  ctx.strokeStyle = ink.ink;
  ctx.lineWidth = 1;
  ctx.beginPath();
  ctx.moveTo(x, chartArea.top);
  ctx.lineTo(x, chartArea.bottom);
  ctx.stroke();
  ctx.fillStyle = ink.ink;
  for (const course of plot.courses) {
    const value = courseAt(course, atX);
    const y = value === null ? undefined : scales[course.strip]?.getPixelForValue(value);
    if (y === undefined) continue;
    ctx.beginPath();
    ctx.arc(x, y, 3, 0, 2 * Math.PI);
    ctx.fill();
  }
}
