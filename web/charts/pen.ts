import type { Chart } from 'chart.js';
import type { Strip } from '../../models/chart/chart.ts';
import type { Ink } from './ink.ts';

/** A canvas that knows hours and units: what every drawing function below is handed. */
export interface Pen {
  readonly ctx: CanvasRenderingContext2D;
  readonly ink: Ink;
  readonly x: (hours: number) => number;
  readonly y: (strip: Strip, value: number) => number;
  readonly area: (strip: Strip) => Area;
  readonly has: (strip: Strip) => boolean;
  /** Whole width of the canvas. */
  readonly width: number;
}

export interface Area {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

export function penOf(chart: Chart, ink: Ink): Pen {
  const scale = (id: string) => chart.scales[id];
  return {
    ctx: chart.ctx,
    ink,
    x: (hours) => scale('x')?.getPixelForValue(hours) ?? 0,
    y: (strip, value) => scale(strip)?.getPixelForValue(value) ?? 0,
    area: (strip) => {
      const { top = 0, bottom = 0 } = scale(strip) ?? {};
      return { left: chart.chartArea.left, right: chart.chartArea.right, top, bottom };
    },
    has: (strip) => scale(strip) !== undefined,
    width: chart.width,
  };
}

/** Draws with everything outside the strip cut off. */
export function within(pen: Pen, strip: Strip, draw: () => void, spare = 0): void {
  const { ctx } = pen;
  const { left, right, top, bottom } = pen.area(strip);
  ctx.save();
  ctx.beginPath();
  ctx.rect(left, top - spare, right - left, bottom - top + 2 * spare);
  ctx.clip();
  draw();
  ctx.restore();
}

export function letters(pen: Pen, { bold = false, size = 13 }: { bold?: boolean; size?: number } = {}): void {
  pen.ctx.font = `${bold ? 680 : 400} ${size}px ${pen.ink.font}`;
}

/** Writes on a ground of paper, so that lines behind do not cross the letters. */
export function write(pen: Pen, text: string, x: number, y: number, align: CanvasTextAlign, colour: string): void {
  const { ctx } = pen;
  ctx.textAlign = align;
  ctx.textBaseline = 'middle';
  ctx.lineJoin = 'round';
  ctx.lineWidth = 4;
  ctx.strokeStyle = pen.ink.paper;
  ctx.strokeText(text, x, y);
  ctx.fillStyle = colour;
  ctx.fillText(text, x, y);
}
