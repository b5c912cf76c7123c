import type { CureCourse, CureOfPart, FlowWindow } from '../../models/chart/chart-inputs.ts';
import { cureAlong } from '../../models/cure/cure-along.ts';
import { glassTransitionK } from '../../models/cure/glass-transition.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { softening } from '../../models/cure/softening.ts';
import { viscosityPaS } from '../../models/cure/viscosity.ts';
import { DomainError } from '../../models/errors.ts';
import type { PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { ChannelReadings, Readings } from '../../models/log/readings.ts';
import { judgedChannels, type RunChannel } from '../../models/run/channel.ts';
import type { Load } from '../../models/run/load.ts';
import { celsiusFromKelvin, kelvinFromCelsius } from '../../models/units.ts';
import { thinned } from './thinned.ts';
import { voidGrowthOf } from './void-growth-of.ts';

/** Estimated cure along every sensor a part is judged by, from its readings as they were judged. */
export function cureCourses(readings: Readings, load: Load, resin: Resin, part: PartEvaluation): CureOfPart {
  const layouts = readings.channels.map(({ channel }) => channel);
  const startDegree = load.parts.find((one) => one.part === part.part)?.startDegree;
  const channels = judgedChannels(layouts, load);
  const courses = readings.channels.flatMap((one, n) => {
    const channel = channels[n];
    if (!channel || !part.judgedBy.includes(one.channel.name)) return [];
    return courseOf(readings.timeMs, one, channel, resin, startDegree) ?? [];
  });
  return { courses, viscosity: aboutViscosity(resin), voidGrowth: voidGrowthOf(readings, channels, load, resin, part) };
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
    const { alpha, gelS } = cureAlong(timeS, temperatureK, resin, startDegree === undefined ? {} : { startDegree });
    const kept = thinned(timeS);
    const at = (column: Float64Array) => Float64Array.from(kept, (n) => column[n] ?? Number.NaN);
    const atMs = (s: number) => beginsMs + 1000 * s;
    const { glassTransition } = resin;
    const tgOf = (degree: number) =>
      glassTransition === undefined ? Number.NaN : celsiusFromKelvin(glassTransitionK(degree, glassTransition));
    const viscosity = viscosityBeforeGel(timeS, temperatureK, alpha, gelS, resin);
    const thinnest = viscosity && lowestOf(viscosity);
    return {
      channel: layout.name,
      timeMs: at(timeS).map(atMs),
      degree: at(alpha),
      tgC: glassTransition === undefined ? null : at(alpha).map(tgOf),
      viscosityPaS: viscosity && at(viscosity),
      thinnest: thinnest && { atMs: atMs(timeS[thinnest.n] ?? Number.NaN), viscosityPaS: thinnest.lowest },
      flow: flowOf(softening(timeS, temperatureK, alpha, resin), gelS, atMs),
    };
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

/** Viscosity at every scan, Pa s; NaN from gel on and where the law says nothing; null where the resin has none. */
function viscosityBeforeGel(
  timeS: Float64Array,
  temperatureK: Float64Array,
  alpha: Float64Array,
  gelS: number | null,
  { viscosity, gasConstant }: Resin,
): Float64Array | null {
  if (viscosity === undefined) return null;
  const along = new Float64Array(timeS.length).fill(Number.NaN);
  for (let n = 0; n < timeS.length; n += 1) {
    if (gelS !== null && (timeS[n] ?? 0) >= gelS) break;
    const here = viscosityPaS(temperatureK[n] ?? Number.NaN, alpha[n] ?? Number.NaN, viscosity, gasConstant);
    if (Number.isFinite(here)) along[n] = here;
  }
  return along;
}

function aboutViscosity({ viscosity }: Resin): CureOfPart['viscosity'] {
  if (viscosity === undefined) return null;
  const validTo = viscosity.law === 'lee-loos-springer' ? viscosity.validTo : null;
  return { validTo, flowsBelowPaS: viscosity.flowsBelow ?? null };
}

function lowestOf(column: Float64Array): { n: number; lowest: number } | null {
  let found: { n: number; lowest: number } | null = null;
  column.forEach((here, n) => {
    if (here < (found?.lowest ?? Number.POSITIVE_INFINITY)) found = { n, lowest: here };
  });
  return found;
}

function flowOf(
  softens: ReturnType<typeof softening>,
  gelS: number | null,
  atMs: (s: number) => number,
): FlowWindow | null {
  if (softens === null || gelS === null || softens.timeS >= gelS) return null;
  return { fromMs: atMs(softens.timeS), untilMs: atMs(gelS), by: softens.by, isFromStart: softens.isFromStart };
}
