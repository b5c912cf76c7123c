import type { Cycle } from '../cycle/cycle.ts';
import { DomainError } from '../errors.ts';
import type { PartEvaluation } from '../evaluation/evaluation.ts';
import { parseBarometer } from '../run/parse-load.ts';
import { type Band, type Mark, type RunChart, STRIPS, type Strip } from './chart.ts';
import type { ChartInputs } from './chart-inputs.ts';
import { clockTimeIn } from './clock-time.ts';
import { cureDots } from './cure-drawing.ts';
import { drawEstimates } from './draw-estimates.ts';
import { type DrawnChannels, drawnChannels } from './drawn-channels.ts';
import { drawDwells } from './dwell-drawing.ts';
import { findingStretches } from './finding-stretches.ts';
import { limitBands } from './limit-bands.ts';
import { leadAndLag, roleOfLine } from './line-roles.ts';
import { hatchesOf, lineOf } from './lines.ts';
import { longestGapMs } from './longest-gap.ts';
import { rateWedges } from './rate-wedges.ts';
import { runTable } from './run-table.ts';
import { AS_IT_STANDS, temperatureConversion } from './shown-unit.ts';
import { axisOf, placeLabels } from './strip-axes.ts';
import { timeAxis } from './time-axis.ts';
import { hoursAt, type TimeScale } from './time-scale.ts';

/** What is to be drawn of a run, for one part of it: courses, and where the limits it was judged by apply. */
export function chartOfRun(inputs: ChartInputs): RunChart {
  const { readings, cycle, evaluation, part, load, cure, zone, points = 1500 } = inputs;
  const scale = timeScale(inputs);
  const clock = clockTimeIn(zone);
  const barometerPa = inputs.barometerPa ?? (load?.barometer === undefined ? null : parseBarometer(load.barometer));
  const drawable = drawnChannels(readings, cycle?.units ?? {}, load, barometerPa);
  const { channels } = drawable;
  const lead = leadAndLag(part, channels);
  const options = { points, longestGapMs: longestGapMs(cycle, readings.timeMs) };

  const lines = channels.map((channel) => lineOf(channel, roleOfLine(channel, part, lead), evaluation, scale, options));
  const temperatureUnit = drawable.units.get('temperature') ?? '°C';
  const tgConversion = temperatureConversion('°C', temperatureUnit) ?? AS_IT_STANDS;
  const roleOf = (name: string) => lines.find(({ line }) => line.channel === name)?.line.role ?? 'other';
  const isRecalled = evaluation?.resin?.status === 'recalled';
  const { lines: estimated, ...estimates } = drawEstimates({
    ...{ cure, roleOf, tgConversion, barometerPa, isRecalled, clock, scale, options },
    pressureUnit: drawable.units.get('pressure'),
    isHumidityKnown: load?.parts.some((one) => one.part === part?.part && one.humidity !== undefined) ?? false,
  });
  const limits = cycle === null || part === null ? NOTHING : limitsDrawn(cycle, part, drawable, scale);

  const all = [...lines, ...estimated].map(({ line }) => line);
  const view = {
    bands: limits.bands,
    fromH: hoursAt(scale, scale.fromMs),
    untilH: hoursAt(scale, scale.untilMs),
    isRecalled,
  };
  const units: ReadonlyMap<Strip, string> = new Map([
    ...[...ESTIMATED_UNITS, ['tg', temperatureUnit] as const].filter(([strip]) =>
      estimated.some(({ line }) => line.strip === strip),
    ),
    ...drawable.units,
  ]);
  const strips = STRIPS.flatMap((strip) => {
    const unit = units.get(strip);
    const own = all.filter((line) => line.strip === strip);
    return unit === undefined ? [] : [axisOf(strip, unit, own, view)];
  });
  return {
    zeroMs: scale.zeroMs,
    isFromHeatOn: scale.isFromHeatOn,
    fromH: view.fromH,
    untilH: view.untilH,
    logFromH: hoursAt(scale, scale.logFromMs),
    logUntilH: hoursAt(scale, scale.logUntilMs),
    zone,
    part: part?.part ?? null,
    strips,
    timeTicks: timeAxis(clock, scale),
    lines: placeLabels(all, strips),
    ...limits,
    hatches: hatchesOf(lines, scale),
    dots: part === null || cure === undefined ? [] : [...cureDots(part, cure.courses, clock, scale), ...estimates.dots],
    flows: estimates.flows,
    table: runTable({
      ...{ cycle, part, channels, tgConversion, clock, scale },
      units: drawable.units,
      roleOf: (channel) => roleOfLine(channel, part, lead),
    }),
    estimates: estimates.words,
    notDrawn: drawable.notDrawn,
  };
}

const ESTIMATED_UNITS = [
  ['cure', ''],
  ['viscosity', 'Pa s'],
] as const;

type LimitsDrawn = Pick<RunChart, 'bands' | 'wedges' | 'marks' | 'dips' | 'breaches' | 'stretches'>;

const NOTHING: LimitsDrawn = { bands: [], wedges: [], marks: [], dips: [], breaches: [], stretches: [] };

function limitsDrawn(
  cycle: Cycle,
  part: PartEvaluation,
  { channels, inWritten }: DrawnChannels,
  scale: TimeScale,
): LimitsDrawn {
  const dwells = drawDwells(cycle, part, channels, scale);
  const bands: Band[] = [...dwells.bands, ...limitBands(cycle, part, inWritten, scale)];
  return {
    bands,
    wedges: rateWedges(cycle, part, channels, scale),
    marks: [...heatOnMark(scale), ...dwells.marks],
    dips: dwells.dips,
    ...findingStretches(cycle, part, channels, inWritten, scale),
  };
}

function heatOnMark(scale: TimeScale): Mark[] {
  if (!scale.isFromHeatOn) return [];
  const mark = { kind: 'heat-on', atH: 0, strip: 'temperature', value: null, text: 'heat-on', sensor: null } as const;
  return [{ ...mark, limit: null }];
}

function timeScale({ readings, evaluation, part, view }: ChartInputs): TimeScale {
  const { timeMs } = readings;
  const [logFromMs, logUntilMs] = [timeMs[0], timeMs.at(-1)];
  if (logFromMs === undefined || logUntilMs === undefined) {
    throw new DomainError('log-no-readings', 'A log without scans cannot be drawn');
  }
  const heatOn = part?.heatOn ?? evaluation?.parts.find((one) => one.heatOn !== null)?.heatOn ?? null;
  // A log of one scan has no length of its own to be drawn along.
  const { fromMs, untilMs } = view ?? { fromMs: logFromMs, untilMs: Math.max(logUntilMs, logFromMs + 1000) };
  return {
    zeroMs: heatOn === null ? logFromMs : Date.parse(heatOn),
    isFromHeatOn: heatOn !== null,
    ...{ logFromMs, logUntilMs, fromMs, untilMs },
  };
}
