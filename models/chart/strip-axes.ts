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
}

const TICKS: Readonly<Record<Strip, number>> = { temperature: 10, pressure: 4, vacuum: 4, cure: 2, tg: 4 };

/** Least height of a strip's axis, so that noise of a steady reading does not fill it. */
const LEAST_SPAN: Readonly<Record<Strip, number>> = { temperature: 8, pressure: 0.2, vacuum: 0.02, cure: 1, tg: 20 };

/** The axis of one strip: what is drawn of it in view, and the bands that apply there. */
export function axisOf(strip: Strip, unit: string, lines: readonly Unplaced[], view: InView): StripAxis {
  const { low, high } = rangeOf(strip, lines, view);
  return { strip, title: titleOf(strip, unit), unit, low, high, ticks: roundTicks(low, high, TICKS[strip]) };
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

function titleOf(strip: Strip, unit: string): string {
  switch (strip) {
    case 'temperature':
      return unit;
    case 'pressure':
      return `vessel pressure, ${unit}${unit.endsWith(' abs') ? '' : ' gauge'}`;
    case 'vacuum':
      return `vacuum, ${unit}${unit.endsWith(' abs') ? '' : ' below ambient'}`;
    case 'cure':
      return 'degree of cure (estimate)';
    case 'tg':
      return `Tg (estimate), ${unit}`;
  }
}

/** Least distance of two labels as a share of the strip's height: a line of 14 px on the strips as screens draw them. */
const LABEL_SHARE: Readonly<Record<Strip, number>> = {
  temperature: 0.05,
  pressure: 0.18,
  vacuum: 0.22,
  cure: 0.14,
  tg: 0.14,
};

/** Labels at the lines' ends in view, moved apart. */
export function placeLabels(lines: readonly Unplaced[], axes: readonly StripAxis[]): Line[] {
  const placed = new Map<Unplaced, number>();
  for (const { strip, low, high } of axes) {
    const ends = lines.flatMap((line) => {
      const end = line.strip === strip ? line.value.findLast((value) => value !== null) : undefined;
      return typeof end === 'number' ? [{ line, end }] : [];
    });
    const apart = LABEL_SHARE[strip] * (high - low);
    const places = spreadLabels(
      ends.map(({ end }) => end),
      { apart, lowest: low, highest: high },
    );
    ends.forEach(({ line }, i) => {
      placed.set(line, drawn(places[i]!));
    });
  }
  return lines.map((line) => ({ ...line, labelAt: placed.get(line) ?? null }));
}
