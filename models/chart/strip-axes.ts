import type { Band, Line, Strip, StripAxis } from './chart.ts';
import { drawn } from './shown-unit.ts';
import { spreadLabels } from './spread-labels.ts';
import { roundTicks } from './ticks.ts';

type Unplaced = Omit<Line, 'labelAt'>;

/** What a strip's axis looks at besides its lines. */
export interface InView {
  readonly bands: readonly Band[];
  readonly fromH: number;
  readonly untilH: number;
  /** The resin's figures are from memory, which every name of an estimate says. */
  readonly isRecalled: boolean;
}

const TICKS: Readonly<Record<Strip, number>> = {
  temperature: 10,
  pressure: 4,
  vacuum: 4,
  cure: 2,
  viscosity: 4,
  tg: 4,
};

/** Least height of a strip's axis, so that noise of a steady reading does not fill it. */
const LEAST_SPAN: Readonly<Record<Strip, number>> = {
  temperature: 8,
  pressure: 0.2,
  vacuum: 0.02,
  cure: 1,
  viscosity: 0,
  tg: 20,
};

/** The axis of one strip: what is drawn of it in view, and the bands that apply there. */
export function axisOf(strip: Strip, unit: string, lines: readonly Unplaced[], view: InView): StripAxis {
  const title = titleOf(strip, unit, view.isRecalled);
  if (strip === 'viscosity') return { strip, title, unit, scale: 'log', ...decadesOf(lines) };
  const { low, high } = rangeOf(strip, lines, view);
  return { strip, title, unit, scale: 'linear', low, high, ticks: roundTicks(low, high, TICKS[strip]) };
}

/** Whole decades, two at least; a tick for each, or for every other where there are many. */
function decadesOf(lines: readonly Unplaced[]): Pick<StripAxis, 'low' | 'high' | 'ticks'> {
  const decades = lines.flatMap(({ value }) => value.flatMap((one) => (one === null ? [] : Math.log10(one))));
  const first = decades.length === 0 ? 0 : Math.floor(Math.min(...decades));
  const last = decades.length === 0 ? 2 : Math.max(first + 2, Math.ceil(Math.max(...decades)));
  const step = Math.ceil((last - first) / TICKS.viscosity);
  const ticks: number[] = [];
  for (let decade = first; decade <= last; decade += step) ticks.push(powerOfTen(decade));
  return { low: powerOfTen(first), high: powerOfTen(last), ticks };
}

function powerOfTen(exponent: number): number {
  return Number(`1e${exponent}`);
}

function rangeOf(strip: Strip, lines: readonly Unplaced[], view: InView): { low: number; high: number } {
  if (strip === 'cure') return { low: 0, high: 1 };
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (const { value } of lines) {
    for (const one of value) {
      if (one === null) continue;
      if (one < low) low = one;
      if (one > high) high = one;
    }
  }
  if (low > high) return { low: 0, high: 1 };
  const span = high - low;
  for (const band of view.bands) {
    if (band.strip !== strip || band.untilH < view.fromH || band.fromH > view.untilH) continue;
    for (const side of [band.low, band.high]) {
      // A ceiling far above the run would flatten it.
      if (side === null || (band.kind === 'ceiling' && side > high + 0.4 * span)) continue;
      low = Math.min(low, side);
      high = Math.max(high, side);
    }
  }
  if (strip === 'pressure' || strip === 'vacuum') low = Math.min(low, 0);
  const missing = Math.max(0, LEAST_SPAN[strip] - (high - low));
  const spare = 0.04 * (high - low);
  const isFromZero = low === 0;
  return {
    low: drawn(isFromZero ? 0 : low - missing / 2 - spare),
    high: drawn(isFromZero ? high + missing + spare : high + missing / 2 + spare),
  };
}

function titleOf(strip: Strip, unit: string, isRecalled: boolean): string {
  const estimate = isRecalled ? '(estimate, set from memory)' : '(estimate)';
  switch (strip) {
    case 'temperature':
      return unit;
    case 'pressure':
      return `vessel pressure, ${unit}${unit.endsWith(' abs') ? '' : ' gauge'}`;
    case 'vacuum':
      return `vacuum, ${unit}${unit.endsWith(' abs') ? '' : ' below ambient'}`;
    case 'cure':
      return `degree of cure ${estimate}`;
    case 'viscosity':
      return `viscosity ${estimate}, ${unit}`;
    case 'tg':
      return `Tg ${estimate}, ${unit}`;
  }
}

/** Least distance of two labels as a share of the strip's height: a line of 14 px on the strips as screens draw them. */
const LABEL_SHARE: Readonly<Record<Strip, number>> = {
  temperature: 0.05,
  pressure: 0.18,
  vacuum: 0.22,
  cure: 0.14,
  viscosity: 0.14,
  tg: 0.14,
};

/** Labels at the lines' ends in view, moved apart. */
export function placeLabels(lines: readonly Unplaced[], axes: readonly StripAxis[]): Line[] {
  const placed = new Map<Unplaced, number>();
  for (const { strip, scale, low, high } of axes) {
    const [rise, back] = scale === 'log' ? [Math.log10, (decade: number) => 10 ** decade] : [asItIs, asItIs];
    const ends = lines.flatMap((line) => {
      const end = line.strip === strip ? line.value.findLast((value) => value !== null) : undefined;
      return typeof end === 'number' ? [{ line, end }] : [];
    });
    const [lowest, highest] = [rise(low), rise(high)];
    const places = spreadLabels(
      ends.map(({ end }) => rise(end)),
      { apart: LABEL_SHARE[strip] * (highest - lowest), lowest, highest },
    );
    ends.forEach(({ line }, i) => {
      placed.set(line, drawn(back(places[i]!)));
    });
  }
  return lines.map((line) => ({ ...line, labelAt: placed.get(line) ?? null }));
}

function asItIs(value: number): number {
  return value;
}
