import type { Line, RunChart, StripAxis } from '../../models/chart/chart.ts';
import { spreadLabels } from '../../models/chart/spread-labels.ts';
import { letters, type Pen } from './pen.ts';
import { isNarrow } from './strips.ts';
import { lastValue } from './value-at.ts';

const APART = 15;

/** Names of strips at their heads and of courses at their ends. */
export function drawNames(pen: Pen, chart: RunChart): void {
  for (const axis of chart.strips) {
    if (!pen.has(axis.strip)) continue;
    drawStripName(pen, axis);
    drawEndNames(pen, chart, axis);
  }
}

function drawStripName(pen: Pen, { strip, title, unit }: StripAxis): void {
  const { left, top } = pen.area(strip);
  const { ctx, ink } = pen;
  letters(pen);
  ctx.textAlign = strip === 'temperature' ? 'right' : 'left';
  ctx.textBaseline = 'middle';
  ctx.fillStyle = ink.soft;
  ctx.fillText(strip === 'temperature' ? unit : title, strip === 'temperature' ? left - 8 : left, top - 14);
}

/** Names moved apart so that none overlaps; where more are drawn than fit, the weakest are left to the table. */
function drawEndNames(pen: Pen, chart: RunChart, { strip }: StripAxis): void {
  const { ctx, ink } = pen;
  const { right, top, bottom } = pen.area(strip);
  const isSaidAbove =
    isNarrow(pen.width) && strip !== 'temperature' && chart.lines.filter((line) => line.strip === strip).length === 1;
  if (isSaidAbove) return;
  const ends = chart.lines
    .filter((line) => line.strip === strip)
    .map((line) => ({ line, end: lastValue(line, chart.untilH) }))
    .filter(({ end }) => end !== null)
    .sort((a, b) => Number(isStrong(b.line)) - Number(isStrong(a.line)))
    .slice(0, Math.max(1, Math.floor((bottom - top - 8) / APART) + 1));
  const wanted = ends.map(({ end }) => Math.min(Math.max(pen.y(strip, end ?? 0), top), bottom));
  const places = spreadLabels(wanted, { apart: APART, lowest: top + 4, highest: bottom - 4 });
  ctx.textAlign = 'left';
  ctx.textBaseline = 'middle';
  ends.forEach(({ line }, n) => {
    letters(pen, { bold: isStrong(line) });
    ctx.fillStyle = line.role === 'leading' ? ink.accent : isStrong(line) ? ink.ink : ink.faint;
    const text = isNarrow(pen.width) ? line.channel : line.label;
    ctx.fillText(shortened(ctx, text, pen.width - right - 8), right + 8, places[n] ?? top);
  });
}

export function isStrong({ role }: Line): boolean {
  return role === 'leading' || role === 'lagging';
}

/** As much of a text as there is room for, the rest an ellipsis. */
export function shortened(ctx: CanvasRenderingContext2D, text: string, room: number): string {
  if (ctx.measureText(text).width <= room) return text;
  let cut = text;
  while (cut.length > 1 && ctx.measureText(`${cut}…`).width > room) cut = cut.slice(0, -1);
  return `${cut}…`;
}
