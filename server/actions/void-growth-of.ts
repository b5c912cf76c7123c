import type { VoidGrowth } from '../../models/chart/chart-inputs.ts';
import type { Resin } from '../../models/cure/resin.ts';
import { pressureAgainst, voidGrowthAlong } from '../../models/cure/void-growth-along.ts';
import type { PartEvaluation } from '../../models/evaluation/evaluation.ts';
import type { Readings } from '../../models/log/readings.ts';
import type { RunChannel } from '../../models/run/channel.ts';
import type { Load } from '../../models/run/load.ts';
import { parseBarometer } from '../../models/run/parse-load.ts';
import { kelvinFromCelsius } from '../../models/units.ts';
import { thinned } from './thinned.ts';

/**
 * Least resin pressure against void growth along a run of a part, and how the vessel's pressure stood against it.
 *
 * Null without a humidity on record; and where the resin gives no degree at gel, for then nobody knows where it ends.
 */
export function voidGrowthOf(
  { timeMs, channels }: Readings,
  runChannels: readonly (RunChannel | null)[],
  load: Load,
  resin: Resin,
  part: PartEvaluation,
): VoidGrowth | null {
  const humidityPercent = load.parts.find((one) => one.part === part.part)?.humidity;
  if (humidityPercent === undefined || resin.gel === undefined || part.cure.length === 0) return null;
  const judged = (n: number, offset: number) => {
    const { judgedReading } = runChannels[n] ?? { judgedReading: () => Number.NaN };
    return channels[n]?.value.map((figure) => (Number.isNaN(figure) ? figure : judgedReading(figure) + offset));
  };
  const points = channels.flatMap(({ channel }, n) => {
    const estimate = part.cure.find((one) => one.channel === channel.name);
    const temperatureK = judged(n, kelvinFromCelsius(0));
    if (estimate === undefined || temperatureK === undefined) return [];
    return [{ temperatureK, gelMs: estimate.gelAt === null ? null : Date.parse(estimate.gelAt) }];
  });
  const leastPa = voidGrowthAlong(timeMs, points, humidityPercent);
  const most = mostOf(timeMs, leastPa);
  if (most === null) return null;
  const barometerPa = load.barometer === undefined ? null : parseBarometer(load.barometer);
  const vessels = runChannels.flatMap((channel, n) => {
    if (channel?.layout.role !== 'pressure' || !isOf(channel, part)) return [];
    const offset = channel.pressureUnit?.absolute ? 0 : barometerPa;
    return offset === null ? [null] : [judged(n, offset) ?? null];
  });
  const pressurePa = lowestOf(vessels);
  const kept = thinned(timeMs.map((ms) => ms / 1000));
  const gels = points.map(({ gelMs }) => gelMs);
  return {
    humidityPercent,
    timeMs: Float64Array.from(kept, (n) => timeMs[n] ?? Number.NaN),
    leastPa: Float64Array.from(kept, (n) => leastPa[n] ?? Number.NaN),
    most,
    gelMs: gels.includes(null) ? null : Math.max(...gels.map((ms) => ms ?? Number.NaN)),
    vessel: pressurePa && pressureAgainst(timeMs, pressurePa, leastPa),
  };
}

function isOf({ parts }: RunChannel, { part }: PartEvaluation): boolean {
  return parts.length === 0 || part === null || parts.includes(part);
}

function mostOf(timeMs: Float64Array, leastPa: Float64Array): VoidGrowth['most'] | null {
  let most: VoidGrowth['most'] | null = null;
  leastPa.forEach((pa, n) => {
    if (pa > (most?.leastPa ?? Number.NEGATIVE_INFINITY)) most = { atMs: timeMs[n] ?? Number.NaN, leastPa: pa };
  });
  return most;
}

/** The lowest of several pressures in every scan; null where there is none, or one cannot be told from zero. */
function lowestOf(columns: readonly (Float64Array | null)[]): Float64Array | null {
  const [first, ...rest] = columns;
  if (first === undefined || columns.includes(null)) return null;
  return rest.reduce<Float64Array | null>(
    (lowest, column) => lowest?.map((pa, n) => Math.min(pa, column?.[n] ?? Number.NaN)) ?? null,
    first,
  );
}
