import type { Chart, Plugin } from 'chart.js';
import type { RunChart, Stretch } from '../../models/chart/chart.ts';
import { drawCursor, drawStretch } from './draw-cursor.ts';
import { drawBreaches, drawDips, drawDots, drawHatches, drawMarks } from './draw-events.ts';
import { drawFlows } from './draw-flows.ts';
import { drawBandNames, drawLimits } from './draw-limits.ts';
import { drawNames } from './draw-names.ts';
import type { Ink } from './ink.ts';
import { type Pen, penOf } from './pen.ts';

/** What is drawn beside the courses; changed in place, then the chart is drawn again. */
export interface Scene {
  chart: RunChart;
  ink: Ink;
  /** Limit of the finding that is pointed at, and the stretch it looks at. */
  lit: string | null;
  stretch: Stretch | null;
  /** Hour the cursor stands at. */
  cursorH: number | null;
  /** Hours being drawn out with the mouse. */
  selection: readonly [number, number] | null;
}

/** Draws limits behind the courses, and everything a reader looks for in front of them. */
export function geometryPlugin(scene: Scene): Plugin<'line'> {
  return {
    id: 'geometry',
    beforeDatasetsDraw: (chart: Chart) =>
      drawn(penOf(chart, scene.ink), (pen) => {
        drawLimits(pen, scene.chart, scene.lit);
        drawHatches(pen, scene.chart.hatches);
        drawMarks(pen, scene.chart.marks);
      }),
    afterDatasetsDraw: (chart: Chart) =>
      drawn(penOf(chart, scene.ink), (pen) => {
        if (scene.stretch && !scene.ink.isOnPaper) drawStretch(pen, scene.stretch);
        drawDips(pen, scene.chart.dips);
        drawBreaches(pen, scene.chart.breaches, scene.lit);
        drawFlows(pen, scene.chart.flows);
        drawDots(pen, scene.chart.dots);
        drawBandNames(pen, scene.chart);
        drawNames(pen, scene.chart);
        if (scene.selection) drawSelection(pen, scene.selection);
        if (scene.cursorH !== null && !scene.ink.isOnPaper) drawCursor(pen, scene.chart, scene.cursorH);
      }),
  };
}

function drawn(pen: Pen, draw: (pen: Pen) => void): void {
  pen.ctx.save();
  draw(pen);
  pen.ctx.restore();
}

function drawSelection(pen: Pen, [from, until]: readonly [number, number]): void {
  const { left, right, top, bottom } = pen.area('temperature');
  const x1 = Math.max(left, pen.x(Math.min(from, until)));
  const x2 = Math.min(right, pen.x(Math.max(from, until)));
  pen.ctx.fillStyle = pen.ink.band;
  pen.ctx.fillRect(x1, top, x2 - x1, bottom - top);
}
