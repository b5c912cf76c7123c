import type { Evaluation } from '../evaluation/evaluation.ts';
import type { Hatch, Line, LineRole } from './chart.ts';
import { decimate } from './decimate.ts';
import type { DrawnChannel } from './drawn-channel.ts';
import { labelOfLine } from './line-roles.ts';
import { drawn } from './shown-unit.ts';
import { hoursAt, hoursOf, lineHours, type TimeScale } from './time-scale.ts';

/** A line before its label has found its place, and the stretches its channel was silent. */
export interface DrawnLine {
  readonly line: Omit<Line, 'labelAt'>;
  readonly gaps: readonly { readonly fromMs: number; readonly untilMs: number }[];
}

/** One channel in view, thinned to `points`. */
export function lineOf(
  channel: DrawnChannel,
  role: LineRole,
  evaluation: Evaluation | null,
  scale: TimeScale,
  options: { readonly points: number; readonly longestGapMs: number },
): DrawnLine {
  const { layout, strip, timeMs, figures, shown } = channel;
  const { fromMs, untilMs } = scale;
  const kept = decimate(timeMs, figures, { ...options, fromMs, untilMs });
  const state = evaluation?.sensors.find((sensor) => sensor.channel === layout.name);
  return {
    line: {
      channel: layout.name,
      strip,
      role,
      state: state?.state ?? 'working',
      excludedFromH: hoursOf(scale, state?.exclusion?.from ?? null),
      label: labelOfLine(layout.name, role),
      hours: lineHours(scale, kept.timeMs),
      value: Array.from(kept.value, (figure) => (Number.isNaN(figure) ? null : drawn(shown(figure)))),
    },
    gaps: kept.gaps,
  };
}

const NOT_HATCHED: readonly LineRole[] = ['setpoint', 'source', 'other'];

/** Stretches without readings, those of several channels drawn once. */
export function hatchesOf(lines: readonly DrawnLine[], scale: TimeScale): Hatch[] {
  const looked = lines.filter(({ line }) => !NOT_HATCHED.includes(line.role));
  const byStretch = new Map<string, { line: DrawnLine['line']; fromMs: number; untilMs: number; channels: string[] }>();
  for (const { line, gaps } of looked) {
    for (const gap of gaps) {
      const key = `${line.strip} ${gap.fromMs} ${gap.untilMs}`;
      const known = byStretch.get(key);
      if (known === undefined) byStretch.set(key, { line, ...gap, channels: [line.channel] });
      else known.channels.push(line.channel);
    }
  }
  return [...byStretch.values()].map(({ line, fromMs, untilMs, channels }) => ({
    strip: line.strip,
    fromH: hoursAt(scale, fromMs),
    untilH: hoursAt(scale, untilMs),
    channels,
    isOfAll: looked.filter((other) => other.line.strip === line.strip).length === channels.length,
  }));
}
