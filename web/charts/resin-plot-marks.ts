import type { Chart } from 'chart.js';
import { spreadLabels } from '../../models/chart/spread-labels.ts';
import type { PlotMark, PlotRail } from './resin-plot.ts';
import { colourOfWeight, type PlotScene } from './resin-plot-scene.ts';
import { isNarrow } from './strips.ts';

const RADIUS = 5;
const RAIL_HEIGHT = 8;

/** Gel, vitrification, a switch of the law …: a shape each, hollow for the second set. */
export function drawPlotMarks(chart: Chart, { plot, ink }: PlotScene): void {
  const { ctx, scales } = chart;
  for (const mark of plot.marks) {
    if (mark.shape === 'none') continue;
    const x = scales.x?.getPixelForValue(mark.x);
    const y = scales[mark.strip]?.getPixelForValue(mark.y);
    if (x === undefined || y === undefined || !Number.isFinite(y)) continue;
    const colour = colourOfWeight(mark.weight, ink);
    traceShape(ctx, mark.shape, x, y);
    ctx.strokeStyle = colour;
    ctx.fillStyle = mark.weight === 'second' ? ink.paper : colour;
    ctx.lineWidth = 2;
    if (mark.shape !== 'cross') ctx.fill();
    ctx.stroke();
    if (!isNarrow(chart.width)) writeBeside(chart, mark, x, y, colour, ink.paper, ink.font);
  }
}

/** The first set's words stand under its marks, the second's over them. */
function writeBeside(
  { ctx, chartArea }: Chart,
  { weight, text, side }: PlotMark,
  x: number,
  y: number,
  colour: string,
  paper: string,
  font: string,
): void {
  ctx.font = `${weight === 'second' ? 400 : 680} 13px ${font}`;
  const width = ctx.measureText(text).width;
  const isLeft = side === 'left' ? x - width - 10 > chartArea.left : x + width + 10 > chartArea.right;
  ctx.textAlign = isLeft ? 'right' : 'left';
  ctx.textBaseline = 'middle';
  const [atX, atY] = [x + (isLeft ? -10 : 10), y + (weight === 'second' ? -11 : 12)];
  ctx.lineJoin = 'round';
  ctx.lineWidth = 4;
  ctx.strokeStyle = paper;
  ctx.strokeText(text, atX, atY);
  ctx.fillStyle = colour;
  ctx.fillText(text, atX, atY);
}

/** Curves' own names at their highest points, moved apart so that none overlaps. */
export function drawCurveNames({ ctx, scales, chartArea }: Chart, { plot, ink }: PlotScene): void {
  const names = plot.marks.filter(({ shape }) => shape === 'none');
  const wanted = names.map((mark) => (scales[mark.strip]?.getPixelForValue(mark.y) ?? 0) - 11);
  const places = spreadLabels(wanted, { apart: 15, lowest: chartArea.top - 8, highest: chartArea.bottom - 8 });
  ctx.font = `680 13px ${ink.font}`;
  ctx.textAlign = 'center';
  ctx.textBaseline = 'middle';
  ctx.lineJoin = 'round';
  ctx.lineWidth = 4;
  ctx.strokeStyle = ink.paper;
  names.forEach(({ x, text, weight }, n) => {
    const half = ctx.measureText(text).width / 2;
    const middle = scales.x?.getPixelForValue(x) ?? 0;
    const atX = Math.min(Math.max(middle, chartArea.left + half + 4), chartArea.right - half - 4);
    ctx.strokeText(text, atX, places[n] ?? 0);
    ctx.fillStyle = colourOfWeight(weight, ink);
    ctx.fillText(text, atX, places[n] ?? 0);
  });
}

function traceShape(ctx: CanvasRenderingContext2D, shape: PlotMark['shape'], x: number, y: number): void {
  ctx.beginPath();
  if (shape === 'dot') ctx.arc(x, y, RADIUS - 0.5, 0, 2 * Math.PI);
  else if (shape === 'square') ctx.rect(x - RADIUS + 1, y - RADIUS + 1, 2 * RADIUS - 2, 2 * RADIUS - 2);
  else if (shape === 'diamond')
    polygon(ctx, [x, y - RADIUS - 1, x + RADIUS + 1, y, x, y + RADIUS + 1, x - RADIUS - 1, y]);
  else if (shape === 'triangle') polygon(ctx, [x, y + RADIUS, x + RADIUS, y - RADIUS + 1, x - RADIUS, y - RADIUS + 1]);
  else {
    ctx.moveTo(x - RADIUS, y - RADIUS);
    ctx.lineTo(x + RADIUS, y + RADIUS);
    ctx.moveTo(x - RADIUS, y + RADIUS);
    ctx.lineTo(x + RADIUS, y - RADIUS);
  }
}

function polygon(ctx: CanvasRenderingContext2D, corners: readonly number[]): void {
  for (let i = 0; i < corners.length; i += 2) ctx.lineTo(corners[i] ?? 0, corners[i + 1] ?? 0);
  ctx.closePath();
}

/** Hatched stretches along the foot of a strip. */
export function drawRails(chart: Chart, { plot, ink }: PlotScene): void {
  for (const rail of plot.rails) {
    const area = areaOf(chart, rail);
    if (area === null) continue;
    const { ctx } = chart;
    const { left, right, top } = area;
    ctx.save();
    ctx.beginPath();
    ctx.rect(left, top, right - left, RAIL_HEIGHT);
    ctx.clip();
    ctx.strokeStyle = ink.hatch;
    ctx.lineWidth = 1.25;
    for (let x = left - RAIL_HEIGHT; x < right; x += 5) {
      ctx.beginPath();
      ctx.moveTo(x, top + RAIL_HEIGHT);
      ctx.lineTo(x + RAIL_HEIGHT, top);
      ctx.stroke();
    }
    ctx.restore();
    ctx.strokeStyle = ink.hatch;
    ctx.lineWidth = 1;
    ctx.strokeRect(left, top, right - left, RAIL_HEIGHT);
  }
}

function areaOf({ scales }: Chart, rail: PlotRail): { left: number; right: number; top: number } | null {
  const [x, y] = [scales.x, scales[rail.strip]];
  if (!x || !y) return null;
  return {
    left: x.getPixelForValue(rail.fromX),
    right: x.getPixelForValue(rail.untilX),
    top: y.bottom - (rail.row + 1) * (RAIL_HEIGHT + 3),
  };
}
