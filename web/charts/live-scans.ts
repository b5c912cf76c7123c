import type { Line, RunChart, StripAxis } from '../../models/chart/chart.ts';
import {
  type Conversion,
  converted,
  drawn,
  pressureConversion,
  temperatureConversion,
} from '../../models/chart/shown-unit.ts';
import { parseBarometer } from '../../models/run/parse-load.ts';
import type { ScanEvent } from '../../server/contract/live.ts';
import type { RunView } from '../../server/contract/runs.ts';

const HOUR_MS = 3_600_000;
/** A line bridges no more than this where the cycle says nothing else. */
const LONGEST_GAP_MS = 60_000;

/** Scans that came after a chart was drawn, and what their figures are of. */
export interface LiveScans {
  /** Channels of a scan, in order. */
  readonly channels: readonly string[];
  readonly scans: readonly ScanEvent[];
}

/** The chart with the scans that came since: courses go on, everything else stands as it was drawn. */
export function withScans(chart: RunChart, run: RunView, { channels, scans }: LiveScans): RunChart {
  const lastMs = chart.zeroMs + chart.logUntilH * HOUR_MS;
  const fresh = scans.filter(({ timeMs }) => timeMs > lastMs);
  const end = fresh.at(-1);
  if (end === undefined) return chart;
  const untilH = (end.timeMs - chart.zeroMs) / HOUR_MS;
  const longestGapMs = (run.cycleIssue?.document.log?.longestGap ?? LONGEST_GAP_MS / 60_000) * 60_000;
  const lines = chart.lines.map((line) => {
    const column = channels.indexOf(line.channel);
    const axis = chart.strips.find(({ strip }) => strip === line.strip);
    const conversion = column < 0 || axis === undefined ? null : conversionOf(axis, line, run);
    return conversion === null ? line : longerLine(chart, line, fresh, column, conversion, longestGapMs);
  });
  return { ...chart, lines, untilH, logUntilH: untilH };
}

function longerLine(
  chart: RunChart,
  line: Line,
  fresh: readonly ScanEvent[],
  column: number,
  conversion: Conversion,
  longestGapMs: number,
): Line {
  const hours = [...line.hours];
  const value = [...line.value];
  for (const { timeMs, values } of fresh) {
    const figure = values[column] ?? null;
    if (figure === null) continue;
    const atH = (timeMs - chart.zeroMs) / HOUR_MS;
    const beforeH = hours.at(-1);
    // A stretch without readings is never bridged.
    if (beforeH !== undefined && (atH - beforeH) * HOUR_MS > longestGapMs) {
      hours.push((beforeH + atH) / 2);
      value.push(null);
    }
    hours.push(atH);
    value.push(drawn(converted(figure, conversion)));
  }
  return { ...line, hours, value };
}

const JUDGED_ROLES: readonly string[] = ['part', 'tool', 'air', 'pressure', 'vacuum'];

/** From a figure as scans bring it, °C or Pa, or the channel's own unit, to the strip's; null where it cannot be. */
function conversionOf(axis: StripAxis, { channel, strip }: Line, run: RunView): Conversion | null {
  const known = run.channels.find(({ name }) => name === channel);
  if (known === undefined) return null;
  const isJudged = JUDGED_ROLES.includes(known.role);
  if (strip === 'temperature') return temperatureConversion(isJudged ? '°C' : known.unit, axis.unit);
  if (strip !== 'pressure' && strip !== 'vacuum') return null;
  const pascal = known.unit.endsWith(' abs') ? 'Pa abs' : 'Pa';
  const barometer = run.load?.barometer;
  const barometerPa = barometer === undefined ? null : parseBarometer(barometer);
  return pressureConversion(strip, isJudged ? pascal : known.unit, axis.unit, barometerPa);
}
