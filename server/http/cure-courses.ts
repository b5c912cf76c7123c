import type { CureCourse } from '../../models/chart/chart-inputs.ts';
import { cureAlong } from '../../models/cure/cure-along.ts';
import { glassTransitionK } from '../../models/cure/glass-transition.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { DomainError } from '../../models/errors.ts';
import type { PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { ChannelReadings, Readings } from '../../models/log/readings.ts';
import { judgedChannels, type RunChannel } from '../../models/run/channel.ts';
import type { Load } from '../../models/run/load.ts';
import { celsiusFromKelvin, kelvinFromCelsius } from '../../models/units.ts';

/** Estimated cure along every sensor a part is judged by, from its readings as they were judged. */
export function cureCourses(readings: Readings, load: Load, resin: Resin, part: PartEvaluation): CureCourse[] {
  const layouts = readings.channels.map(({ channel }) => channel);
  const startDegree = load.parts.find((one) => one.part === part.part)?.startDegree;
  const channels = judgedChannels(layouts, load);
  return readings.channels.flatMap((one, n) => {
    const channel = channels[n];
    if (!channel || !part.judgedBy.includes(one.channel.name)) return [];
    return courseOf(readings.timeMs, one, channel, resin, startDegree) ?? [];
  });
}

function courseOf(
  timeMs: Float64Array,
  { value }: ChannelReadings,
  { layout, judgedReading }: RunChannel,
  resin: Resin,
  startDegree: number | undefined,
): CureCourse | null {
  const present = presentOf(value);
  const times = Float64Array.from(present, (scan) => timeMs[scan] ?? Number.NaN);
  const [beginsMs] = times;
  if (beginsMs === undefined) return null;
  try {
    const { alpha } = cureAlong(
      times.map((at) => (at - beginsMs) / 1000),
      Float64Array.from(present, (scan) => kelvinFromCelsius(judgedReading(value[scan] ?? Number.NaN))),
      resin,
      startDegree === undefined ? {} : { startDegree },
    );
    const kept = thinned(times);
    const degree = Float64Array.from(kept, (n) => alpha[n] ?? Number.NaN);
    const { glassTransition } = resin;
    const tgC =
      glassTransition === undefined
        ? null
        : degree.map((one) => celsiusFromKelvin(glassTransitionK(one, glassTransition)));
    return { channel: layout.name, timeMs: Float64Array.from(kept, (n) => times[n] ?? Number.NaN), degree, tgC };
  } catch (error) {
    // A set that cannot be integrated gives no course; the findings say so where a limit hangs on it.
    if (error instanceof DomainError) return null;
    throw error;
  }
}

function presentOf(value: Float64Array): number[] {
  const present: number[] = [];
  value.forEach((figure, scan) => {
    if (!Number.isNaN(figure)) present.push(scan);
  });
  return present;
}

/** Cure has no spikes to be lost: between figures so far apart, ms, it runs straight to the eye. */
const APART_MS = 15_000;

/** Places of the figures that are drawn: the first, the last, and between them none closer than that. */
function thinned(timeMs: Float64Array): number[] {
  const kept: number[] = [];
  let lastMs = Number.NEGATIVE_INFINITY;
  timeMs.forEach((at, n) => {
    if (at - lastMs < APART_MS && n < timeMs.length - 1) return;
    kept.push(n);
    lastMs = at;
  });
  return kept;
}
