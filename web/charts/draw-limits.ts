import type { Band, RunChart, Wedge } from '../../models/chart/chart.ts';
import type { Outcome } from '../../models/evaluation/evaluation.ts';
import type { Ink } from './ink.ts';
import { letters, type Pen, within, write } from './pen.ts';

/** Bands, windows and rate wedges: each only where its limit applies. They lie behind the courses. */
export function drawLimits(pen: Pen, drawing: RunChart, lit: string | null): void {
  for (const band of drawing.bands) {
    if (!pen.has(band.strip)) continue;
    within(pen, band.strip, () => drawBand(pen, band, band.limit === lit), band.kind === 'window' ? 5 : 0);
  }
  if (!pen.has('temperature')) return;
  for (const wedge of drawing.wedges) {
    within(pen, 'temperature', () => drawWedge(pen, wedge, lit !== null && wedge.limits.includes(lit)));
  }
}

function drawBand(pen: Pen, band: Band, isLit: boolean): void {
  const { ctx, ink } = pen;
  const area = pen.area(band.strip);
  const left = pen.x(band.fromH);
  const right = pen.x(band.untilH);
  const top = band.high === null ? area.top : pen.y(band.strip, band.high);
  const bottom = band.low === null ? area.bottom : pen.y(band.strip, band.low);
  if (band.kind === 'ceiling') {
    ctx.strokeStyle = ink.red;
    ctx.lineWidth = isLit ? 3 : 1;
    line(ctx, left, top, right, top);
    return;
  }
  ctx.fillStyle = ink.band;
  for (let coats = isLit ? 3 : 1; coats > 0; coats -= 1)
    ctx.fillRect(left, top, right - left, Math.max(2, bottom - top));
  if (band.kind === 'window') drawBracket(pen, band, left, right, top, bottom);
}

/** A window's edge is its limit; its ends are the instants it runs between. */
function drawBracket(pen: Pen, band: Band, left: number, right: number, top: number, bottom: number): void {
  const { ctx, ink } = pen;
  ctx.strokeStyle = colourOf(band.outcome, ink);
  ctx.lineWidth = 1.25;
  if (band.low !== null) line(ctx, left, bottom, right, bottom);
  if (band.high !== null) line(ctx, left, top, right, top);
  line(ctx, left, top - 4, left, bottom + 4);
  line(ctx, right, top - 4, right, bottom + 4);
}

function drawWedge(pen: Pen, wedge: Wedge, isLit: boolean): void {
  const { ctx, ink } = pen;
  ctx.beginPath();
  for (const [hours, value] of wedge.corners) ctx.lineTo(pen.x(hours), pen.y('temperature', value));
  ctx.closePath();
  ctx.save();
  ctx.globalAlpha = isLit ? 1 : 0.55;
  ctx.fillStyle = ink.band;
  for (let coats = isLit ? 2 : 1; coats > 0; coats -= 1) ctx.fill();
  ctx.restore();
}

/** Names of dwell bands stand above the strip, where no course runs; where they do not all fit, the worst come first. */
export function drawBandNames(pen: Pen, drawing: RunChart): void {
  letters(pen, { bold: true });
  const taken: { middle: number; half: number }[] = [];
  const dwells = drawing.bands.filter(({ kind, strip }) => kind === 'dwell' && pen.has(strip));
  for (const band of [...dwells].sort((a, b) => SEVERITY.indexOf(a.outcome) - SEVERITY.indexOf(b.outcome))) {
    const area = pen.area(band.strip);
    const left = Math.max(pen.x(band.fromH), area.left);
    const right = Math.min(pen.x(band.untilH), area.right);
    if (right <= left) continue;
    const half = pen.ctx.measureText(band.text).width / 2;
    const middle = Math.min(Math.max((left + right) / 2, area.left + half), area.right - half);
    if (taken.some((other) => Math.abs(other.middle - middle) < other.half + half + 8)) continue;
    taken.push({ middle, half });
    write(pen, band.text, middle, area.top - 12, 'center', colourOf(band.outcome, pen.ink));
  }
}

const SEVERITY: readonly Outcome[] = ['not-met', 'cannot-tell', 'pending', 'met'];

export function colourOf(outcome: Outcome, ink: Ink): string {
  if (outcome === 'met') return ink.accent;
  if (outcome === 'not-met') return ink.red;
  return outcome === 'cannot-tell' ? ink.amber : ink.soft;
}

export function line(ctx: CanvasRenderingContext2D, x1: number, y1: number, x2: number, y2: number): void {
  ctx.beginPath();
  ctx.moveTo(x1, y1);
  ctx.lineTo(x2, y2);
  ctx.stroke();
}
