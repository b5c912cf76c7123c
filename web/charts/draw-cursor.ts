import type { RunChart, Stretch } from '../../models/chart/chart.ts';
import { line } from './draw-limits.ts';
import type { Pen } from './pen.ts';
import { valueAt } from './value-at.ts';

/** The stretch a finding looks at: it stays as it is, what lies before and after it on its strip is dimmed. */
export function drawStretch(pen: Pen, stretch: Stretch): void {
  if (!pen.has(stretch.strip)) return;
  const { ctx, ink } = pen;
  const { left, right, top, bottom } = pen.area(stretch.strip);
  const from = Math.max(left, Math.min(pen.x(stretch.fromH), right));
  const until = Math.max(left, Math.min(Math.max(pen.x(stretch.untilH), from + 3), right));
  ctx.save();
  ctx.globalAlpha = 0.62;
  ctx.fillStyle = ink.paper;
  ctx.fillRect(left, top, from - left, bottom - top);
  ctx.fillRect(until, top, right - until, bottom - top);
  ctx.restore();
  ctx.strokeStyle = ink.accent;
  ctx.lineWidth = 1.5;
  line(ctx, from, top, from, bottom);
  line(ctx, until, top, until, bottom);
}

/** One hairline through all strips, with a dot where it meets each course. */
export function drawCursor(pen: Pen, chart: RunChart, atH: number): void {
  const { ctx, ink } = pen;
  const first = chart.strips[0];
  const last = chart.strips.at(-1);
  if (!first || !last) return;
  const x = pen.x(atH);
  ctx.strokeStyle = ink.ink;
  ctx.lineWidth = 1;
  line(ctx, x, pen.area(first.strip).top, x, pen.area(last.strip).bottom);
  for (const course of chart.lines) {
    const value = valueAt(course, atH);
    if (value === null || !pen.has(course.strip)) continue;
    ctx.beginPath();
    ctx.arc(x, pen.y(course.strip, value), 3, 0, 2 * Math.PI);
    ctx.fillStyle = ink.ink;
    ctx.fill();
  }
}
