import type { Evaluation } from '../../../models/evaluation/evaluation.ts';
import type { Forecast } from '../../../models/forecast/forecast.ts';
import type { LiveReading } from '../../contract/live.ts';

export interface Extreme {
  readonly channel: string;
  readonly valueC: number;
}

/**
 * Hottest and coldest sensor that a run is judged by, as they read now: what was judged last may be seconds old. Where
 * none of them is read, who led and lagged when it was judged. `asJudged` is the latest figure of each channel, in °C.
 */
export function extremesOf(
  evaluation: Evaluation | null,
  forecasts: readonly Forecast[],
  readings: readonly LiveReading[],
  asJudged: ReadonlyMap<string, number>,
): { readonly hottest: Extreme | null; readonly coldest: Extreme | null } {
  const excluded = evaluation?.sensors.filter(({ state }) => state === 'excluded').map(({ channel }) => channel);
  const judgedBy = new Set(evaluation?.parts.flatMap((part) => part.judgedBy));
  for (const channel of excluded ?? []) judgedBy.delete(channel);
  const now = readings.flatMap(({ channel, isStale }): Extreme[] => {
    const valueC = asJudged.get(channel);
    return isStale || valueC === undefined || !judgedBy.has(channel) ? [] : [{ channel, valueC }];
  });
  const runners = forecasts
    .flatMap(({ leading, lagging }) => [leading, lagging])
    .flatMap((one) => (one === null ? [] : [{ channel: one.channel, valueC: one.valueC }]));
  const byHeat = (now.length > 0 ? now : runners).toSorted((a, b) => b.valueC - a.valueC);
  return { hottest: byHeat[0] ?? null, coldest: byHeat.at(-1) ?? null };
}
