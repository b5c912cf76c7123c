import type { Breach, DipArc, Dot, Hatch, Mark } from '../../models/chart/chart.ts';
import { line } from './draw-limits.ts';
import { letters, type Pen, within, write } from './pen.ts';

/** Gaps are hatched and never bridged. */
export function drawHatches(pen: Pen, hatches: readonly Hatch[]): void {
  for (const hatch of hatches) {
    if (pen.has(hatch.strip)) within(pen, hatch.strip, () => drawHatch(pen, hatch));
  }
}

function drawHatch(pen: Pen, hatch: Hatch): void {
  const { ctx, ink } = pen;
  const { top: ceiling, bottom } = pen.area(hatch.strip);
  // Where other sensors went on, only the foot of the strip is hatched.
  const top = hatch.isOfAll ? ceiling : bottom - 8;
  const left = pen.x(hatch.fromH);
  const right = Math.max(pen.x(hatch.untilH), left + 2);
  ctx.beginPath();
  ctx.rect(left, top, right - left, bottom - top);
  ctx.clip();
  ctx.strokeStyle = ink.hatch;
  ctx.globalAlpha = 0.45;
  ctx.lineWidth = 1;
  const tall = bottom - top;
  for (let x = left - tall; x < right; x += 7) line(ctx, x, bottom, x + tall, top);
}

/** Instants at which a clock opens or closes: dotted through the strip, a ring where the course comes in. */
export function drawMarks(pen: Pen, marks: readonly Mark[]): void {
  const { ctx, ink } = pen;
  for (const mark of marks) {
    if (!pen.has(mark.strip)) continue;
    within(pen, mark.strip, () => {
      const { top, bottom } = pen.area(mark.strip);
      const x = pen.x(mark.atH);
      ctx.strokeStyle = ink.accent;
      ctx.lineWidth = 1.25;
      ctx.setLineDash([2, 4]);
      line(ctx, x, top, x, bottom);
      ctx.setLineDash([]);
      if (mark.value !== null) drawRing(pen, x, pen.y(mark.strip, mark.value));
    });
  }
}

function drawRing({ ctx, ink }: Pen, x: number, y: number): void {
  ctx.beginPath();
  ctx.arc(x, y, 4.5, 0, 2 * Math.PI);
  ctx.fillStyle = ink.paper;
  ctx.fill();
  ctx.strokeStyle = ink.ink;
  ctx.lineWidth = 1.75;
  ctx.stroke();
}

/** A dip hangs as an arc under the band's edge; a forgiven one is thin. */
export function drawDips(pen: Pen, dips: readonly DipArc[]): void {
  if (!pen.has('temperature')) return;
  within(pen, 'temperature', () => {
    for (const dip of dips) {
      const { ctx, ink } = pen;
      const left = pen.x(dip.fromH);
      const right = Math.max(pen.x(dip.untilH), left + 6);
      const y = pen.y('temperature', dip.level);
      ctx.beginPath();
      ctx.moveTo(left, y + 2);
      ctx.quadraticCurveTo((left + right) / 2, y + 20, right, y + 2);
      ctx.strokeStyle = dip.isForgiven ? ink.soft : ink.red;
      ctx.lineWidth = dip.isForgiven ? 1.25 : 2.5;
      ctx.stroke();
      letters(pen, { size: 12 });
      write(pen, dip.text, (left + right) / 2, y + 24, 'center', dip.isForgiven ? ink.soft : ink.red);
    }
  });
}

/** A breach is underlined heavily, with its minutes written on it. */
export function drawBreaches(pen: Pen, breaches: readonly Breach[], lit: string | null): void {
  const { ctx, ink } = pen;
  const written: Box[] = [];
  for (const breach of breaches) {
    if (!pen.has(breach.strip)) continue;
    const area = pen.area(breach.strip);
    const left = Math.max(pen.x(breach.fromH), area.left);
    const right = Math.min(Math.max(pen.x(breach.untilH), left + 6), area.right);
    if (right <= left) continue;
    const y = Math.min(Math.max(pen.y(breach.strip, breach.level), area.top + 4), area.bottom - 4);
    ctx.strokeStyle = ink.red;
    ctx.lineWidth = breach.limit === lit ? 7 : 4;
    line(ctx, left, y, right, y);
    letters(pen, { bold: true });
    const half = ctx.measureText(breach.text).width / 2;
    const middle = Math.min(Math.max((left + right) / 2, area.left + half), area.right - half);
    const isLow = y + 22 > area.bottom;
    const at = freePlace(written, { middle, half, y: isLow ? y - 14 : y + 14 }, isLow ? -16 : 16);
    written.push(at);
    write(pen, breach.text, at.middle, at.y, 'center', ink.red);
  }
}

interface Box {
  readonly middle: number;
  readonly half: number;
  readonly y: number;
}

/** The nearest line of writing, from where it should stand onwards, that no other text has taken. */
function freePlace(taken: readonly Box[], box: Box, step: number): Box {
  const isTaken = taken.some(
    (other) => Math.abs(other.y - box.y) < 15 && Math.abs(other.middle - box.middle) < other.half + box.half + 6,
  );
  return isTaken ? freePlace(taken, { ...box, y: box.y + step }, step) : box;
}

export function drawDots(pen: Pen, dots: readonly Dot[]): void {
  for (const dot of dots) if (pen.has(dot.strip)) within(pen, dot.strip, () => drawDot(pen, dot));
}

function drawDot(pen: Pen, dot: Dot): void {
  const { ctx, ink } = pen;
  const x = pen.x(dot.atH);
  const y = pen.y(dot.strip, dot.value);
  ctx.beginPath();
  ctx.arc(x, y, 4, 0, 2 * Math.PI);
  ctx.fillStyle = ink.ink;
  ctx.fill();
  letters(pen);
  const { left, right, bottom } = pen.area(dot.strip);
  const room = ctx.measureText(dot.text).width + 12;
  // Beside the dot where there is room on either side, else from the strip's left edge.
  const [from, align] =
    x + room < right
      ? [x + 10, 'left' as const]
      : x - room > left
        ? [x - 10, 'right' as const]
        : [left + 4, 'left' as const];
  write(pen, dot.text, from, y + 18 > bottom ? y - 12 : y + 10, align, ink.ink);
}
