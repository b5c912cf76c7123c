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
  const { timeS, temperatureK, beginsMs } = historyOf(timeMs, value, judgedReading);
  if (timeS.length === 0) return null;
  try {
    const { alpha } = cureAlong(timeS, temperatureK, resin, startDegree === undefined ? {} : { startDegree });
    const kept = thinned(timeS);
    const degree = Float64Array.from(kept, (n) => alpha[n] ?? Number.NaN);
    const { glassTransition } = resin;
    const tgC =
      glassTransition === undefined
        ? null
        : degree.map((one) => celsiusFromKelvin(glassTransitionK(one, glassTransition)));
    const keptMs = Float64Array.from(kept, (n) => beginsMs + 1000 * (timeS[n] ?? Number.NaN));
    return { channel: layout.name, timeMs: keptMs, degree, tgC };
  } catch (error) {
    // A set that cannot be integrated gives no course; the findings say so where a limit hangs on it.
    if (error instanceof DomainError) return null;
    throw error;
  }
}

/** The readings that are there, as judged; from the first of them on. */
function historyOf(timeMs: Float64Array, value: Float64Array, judgedReading: (figure: number) => number) {
  const timeS = new Float64Array(value.length);
  const temperatureK = new Float64Array(value.length);
  let beginsMs = Number.NaN;
  let present = 0;
  for (let scan = 0; scan < value.length; scan += 1) {
    const figure = value[scan] ?? Number.NaN;
    if (Number.isNaN(figure)) continue;
    const at = timeMs[scan] ?? Number.NaN;
    if (present === 0) beginsMs = at;
    timeS[present] = (at - beginsMs) / 1000;
    temperatureK[present] = kelvinFromCelsius(judgedReading(figure));
    present += 1;
  }
  return { timeS: timeS.subarray(0, present), temperatureK: temperatureK.subarray(0, present), beginsMs };
}

/** Cure has no spikes to be lost: between figures so far apart, s, it runs straight to the eye. */
const APART_S = 15;

/** Places of the figures that are drawn: the first, the last, and between them none closer than that. */
function thinned(timeS: Float64Array): number[] {
  const kept: number[] = [];
  let lastS = Number.NEGATIVE_INFINITY;
  for (let n = 0; n < timeS.length; n += 1) {
    const at = timeS[n] ?? Number.NaN;
    if (at - lastS < APART_S && n < timeS.length - 1) continue;
    kept.push(n);
    lastS = at;
  }
  return kept;
}
