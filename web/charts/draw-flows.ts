import type { Flow } from '../../models/chart/chart.ts';
import { line } from './draw-limits.ts';
import { letters, type Pen, within, write } from './pen.ts';

const FIRST = 12;
const APART = 20;
const SPARE = 8;

/** The stretches in which the resin flows: one below the other at the head of their strip, with their minutes. */
export function drawFlows(pen: Pen, flows: readonly Flow[]): void {
  flows.forEach((flow, n) => {
    if (pen.has(flow.strip)) within(pen, flow.strip, () => drawFlow(pen, flow, FIRST + n * APART));
  });
}

function drawFlow(pen: Pen, flow: Flow, down: number): void {
  const { ctx, ink } = pen;
  const area = pen.area(flow.strip);
  const [from, until] = [pen.x(flow.fromH), pen.x(flow.untilH)];
  const [left, right] = [Math.max(from, area.left), Math.min(until, area.right)];
  if (right < left) return;
  const y = area.top + down;
  const colour = flow.role === 'leading' ? ink.accent : ink.ink;
  ctx.strokeStyle = colour;
  ctx.lineWidth = 1.25;
  line(ctx, from, y - 5, from, y + 5);
  line(ctx, until, y - 5, until, y + 5);
  letters(pen);
  const half = ctx.measureText(flow.text).width / 2;
  const middle = (left + right) / 2;
  if (right - left > 2 * (half + SPARE) + 16) {
    line(ctx, left, y, middle - half - SPARE, y);
    line(ctx, middle + half + SPARE, y, right, y);
    write(pen, flow.text, middle, y, 'center', colour);
    return;
  }
  line(ctx, left, y, right, y);
  // Beside the stretch where there is room on either side, else from the strip's left edge.
  if (right + SPARE + 2 * half < area.right) write(pen, flow.text, right + SPARE, y, 'left', colour);
  else if (left - SPARE - 2 * half > area.left) write(pen, flow.text, left - SPARE, y, 'right', colour);
  else write(pen, flow.text, area.left + 4, y, 'left', colour);
}
